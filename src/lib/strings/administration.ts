import type { MailKind, MailState } from '$lib/schemas/terms';

/** Words of the administrator's pages. */
export const administration = {
	title: 'Administration',
	nav: 'Administration',
	pages: {
		people: 'People',
		invitations: 'Invitations',
		settings: 'Settings',
		audit: 'Audit log',
		mail: 'Mail'
	},
	noMail:
		'No mail goes out, because SMTP_URL is not set (README says how). Copy links by hand: they are shown once, when you make them.',
	failedMail: (count: number) =>
		count === 1 ? 'One mail could not be sent.' : `${count} mails could not be sent.`,
	failedMailLink: 'Look at them',
	next: 'Next page',
	first: 'First page',
	saved: 'Kept.',
	people: {
		filter: 'Narrow the list of people',
		search: 'Name or address',
		role: 'Role',
		anyRole: 'Any role',
		state: 'Account',
		anyState: 'Open or closed',
		states: { active: 'Open', deactivated: 'Closed' },
		apply: 'Show',
		name: 'Name',
		email: 'E-mail address',
		roles: 'Roles',
		seen: 'Last sign-in',
		created: 'Since',
		factor: 'Second factor',
		never: 'never',
		closed: 'closed',
		none: 'Nobody matches.',
		count: (total: number) => (total === 1 ? 'One person' : `${total} people`),
		sortBy: (name: string) => `Sort by ${name.toLowerCase()}`,
		invite: 'Invite somebody'
	},
	person: {
		roles: 'Roles',
		saveRoles: 'Keep the roles',
		account: 'Account',
		deactivate: 'Close the account',
		deactivateHint:
			'Every device is signed out, tokens stop, and nobody can sign in. What was entered stays.',
		reactivate: 'Open the account again',
		closedSince: 'Closed since',
		lastAdministrator: 'This is the last administrator. Make somebody else one first.',
		factor: 'Second factor',
		factorOn: 'On',
		factorOff: 'Off',
		removeFactor: 'Turn the second factor off',
		removeFactorHint: 'For somebody who has lost both the device and the recovery codes. Make sure who asks.',
		reset: 'Password',
		resetHint: 'For somebody whom no mail reaches. Make sure who asks; the link opens the account.',
		makeReset: 'Make a reset link',
		resetLink: 'Reset link, shown this once',
		until: 'works until',
		devices: 'Devices signed in',
		signOut: 'Sign out everywhere',
		signedOut: (count: number) =>
			count === 1 ? 'One device was signed out.' : `${count} devices were signed out.`,
		log: 'In the audit log'
	},
	invitations: {
		lead: 'An invitation is a mail with a link that works once, for seven days.',
		email: 'E-mail address',
		roles: 'Roles they will have',
		send: 'Invite',
		sent: (email: string) => `The invitation of ${email} is on its way.`,
		link: 'Link of the invitation, shown this once',
		pending: 'Waiting for an answer',
		none: 'No invitation is waiting.',
		by: 'by',
		sentAt: 'Sent',
		ends: 'Works until',
		expired: 'expired',
		again: 'Send again',
		againNamed: (email: string) => `Send the invitation of ${email} again`,
		revoke: 'Take back',
		revokeNamed: (email: string) => `Take the invitation of ${email} back`,
		sentAgain: 'The invitation is on its way again; the link before no longer works.',
		revoked: 'The invitation no longer works.',
		hasAccount: 'This address has an account already.',
		invitedAlready: 'This address is invited already: send that invitation again.',
		wait: 'Too many invitations within an hour. Go on later.'
	},
	settings: {
		name: 'Name of the installation',
		nameHint:
			'Such as the name of a school or practice. Stands at the foot of every page and in mails; may be empty.',
		tableOpen: 'Visitors without an account may read the table and use the estimator',
		tableOpenHint:
			'If not, pages and API ask everybody to sign in. What the product is, and how to sign in, stay open.',
		save: 'Keep the settings'
	},
	audit: {
		lead: 'Who did what, when, and from where. Nothing can be changed or removed here.',
		action: 'What',
		anyAction: 'Anything',
		filter: 'Narrow the audit log',
		search: 'Who, whom, detail or address',
		from: 'From',
		to: 'To',
		apply: 'Show',
		export: 'Download as CSV',
		when: 'When',
		who: 'Who',
		subject: 'To what',
		detail: 'Detail',
		address: 'From where',
		none: 'Nothing matches.',
		count: (total: number) => (total === 1 ? 'One line' : `${total.toLocaleString('en-GB')} lines`)
	},
	mail: {
		lead: 'What the installation writes. A mail that cannot be sent is tried again, after ever longer waits, for three days.',
		outbox: 'Mail is written into the folder “outbox” beside the database instead of being sent (SMTP_URL).',
		state: 'State',
		anyState: 'Any state',
		apply: 'Show',
		kind: 'Kind',
		to: 'To',
		attempts: 'Attempts',
		next: 'Next attempt',
		sentAt: 'Sent',
		queued: 'Written',
		error: 'What the mail server said',
		none: 'No mail.',
		retry: 'Try now',
		retryNamed: (to: string) => `Try the mail to ${to} now`,
		drop: 'Drop',
		dropNamed: (to: string) => `Drop the mail to ${to}`,
		retried: 'It is tried again now.',
		dropped: 'It will not be sent.'
	}
};

export const mailKinds: Record<MailKind, string> = {
	invitation: 'Invitation',
	reset: 'Reset of a password',
	'e-mail change': 'Change of address',
	'e-mail change notice': 'Notice of a change of address',
	'review asked': 'Review asked',
	'entry returned': 'Entry returned',
	'entry published': 'Entry published'
};

export const mailStates: Record<MailState, string> = {
	waiting: 'waiting',
	sending: 'being sent',
	sent: 'sent',
	failed: 'failed',
	dropped: 'dropped'
};

/** An action of the audit log as a sentence begins. */
export const actionName = (action: string): string => action[0].toUpperCase() + action.slice(1);
