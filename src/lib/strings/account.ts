/** Words of a person's own pages. */
export const account = {
	title: 'My account',
	nav: 'My account',
	pages: {
		profile: 'Profile',
		password: 'Password',
		factor: 'Second factor',
		devices: 'Devices',
		tokens: 'API tokens'
	},
	saved: 'Kept.',
	ownPassword: 'Your present password',
	ownPasswordWrong: 'This is not your present password.',
	profile: {
		roles: 'Your roles',
		noRoles: 'You have no role yet. An administrator can give you one.',
		name: 'Name',
		nameHint: 'Stands beside what you enter and check.',
		saveName: 'Keep the name',
		email: 'E-mail address',
		emailLead:
			'A mail goes to the new address; the change is made when its link is opened. The old address is told.',
		newEmail: 'New e-mail address',
		changeEmail: 'Send the link',
		emailSent: (email: string) =>
			`A mail is on its way to ${email}. Your address changes when its link is opened.`
	},
	password: {
		lead: 'Every other device is signed out when you choose a new password.',
		save: 'Keep the new password',
		done: 'The new password is kept. Every other device was signed out.'
	},
	factor: {
		lead: 'With a second factor, a stolen password alone opens nothing. You need an authenticator on your phone or in your password manager.',
		off: 'The second factor is off.',
		on: 'The second factor is on.',
		begin: 'Set it up',
		scan: 'Scan this picture with your authenticator, or type the secret.',
		qr: 'QR code for your authenticator; the same secret stands beside it as text',
		secret: 'Secret',
		code: 'The six digits it shows now',
		confirm: 'Turn it on',
		wrong: 'This code is not right. Wait for the next one, and check the clock of your device.',
		left: (count: number) => `${count} of 10 recovery codes left.`,
		renew: 'Make new recovery codes',
		remove: 'Turn it off',
		codes: 'Your recovery codes',
		codesLead:
			'Keep them where you keep important papers. Each works once in place of a code. They are shown this once and cannot be shown again.',
		removed: 'The second factor is off.'
	},
	devices: {
		lead: 'Where you are signed in. A sign-in ends after 14 days without use.',
		here: 'this device',
		seen: 'Last used',
		since: 'Signed in',
		from: 'from',
		unknown: 'A device that does not say what it is',
		end: 'Sign out',
		endNamed: (name: string) => `Sign out ${name}`,
		endOthers: 'Sign out everywhere else',
		ended: 'Signed out.'
	},
	tokens: {
		lead: 'For your own scripts: sent as “Authorization: Bearer TOKEN”. A token can do what its scopes say, and never more than you can.',
		api: 'The API',
		none: 'You have no tokens.',
		name: 'What it is for',
		scopes: 'It may read or write',
		days: 'It lives for',
		daysOf: (days: number) => `${days} days`,
		make: 'Make the token',
		made: 'Your new token',
		madeLead: 'Copy it now: it is shown this once and cannot be shown again.',
		copy: 'Token',
		ends: 'Ends',
		ended: 'Ended',
		used: 'Last used',
		never: 'never',
		endsWith: 'ends with',
		revoke: 'End it',
		revokeNamed: (name: string) => `End the token ${name}`,
		revoked: 'The token no longer works.',
		tooMany: 'You have 20 tokens, which is the most. End one first.'
	}
};

/** Words of the menu in the head. */
export const menu = {
	signIn: 'Sign in',
	account: 'My account',
	desk: 'Evidence desk',
	administration: 'Administration',
	signOut: 'Sign out',
	label: (name: string) => `Menu of ${name}`
};
