import type { Role, Scope } from '$lib/schemas/terms';
import { momentUtc } from './format';

export const roleNames: Record<Role, string> = {
	student: 'Student',
	dentist: 'Dentist',
	educator: 'Educator',
	administrator: 'Administrator'
};

export const roleHints: Record<Role, string> = {
	student: 'reads and practises',
	dentist: 'estimates at the chair',
	educator: 'keeps the table: enters, checks and publishes samples',
	administrator: 'invites people, gives roles, sets the installation, reads the audit log'
};

export const scopeHints: Record<Scope, string> = {
	'account:read': 'who the token belongs to (GET /me)',
	'table:read': 'the table and the estimates, where they are not open to everybody',
	'table:write': 'drafts and reviews, as far as the roles allow',
	'people:read': 'the people, for administrators',
	'audit:read': 'the audit log, for administrators'
};

/** When a link ends, as mail says it. */
export const untilText = (iso: string): string => momentUtc(iso);

const PASSWORD_RULE =
	'At least 15 characters. Several words are easier to remember than signs; a password manager is easier still.';

/** Words of the ways in: sign-in, set-up, invitation, reset. */
export const signIn = {
	title: 'Sign in',
	lead: 'Looking up and estimating need no account here, unless whoever runs this installation has closed the table.',
	email: 'E-mail address',
	password: 'Password',
	button: 'Sign in',
	forgotten: 'Password forgotten?',
	refused: 'This address and password do not belong together, or the account is closed.',
	wait: (seconds: number) =>
		`Too many attempts from here. The next one is heard in ${seconds < 90 ? `${seconds} seconds` : `${Math.ceil(seconds / 60)} minutes`}.`,
	plainHttp:
		'This page was not opened over https, so what you type can be read on the way. Whoever runs this server: README says how to serve it over https.',
	already: (name: string) => `You are signed in as ${name}.`,
	onward: 'Go on',
	code: {
		title: 'Your second factor',
		lead: 'Type the six digits your authenticator shows, or one of your recovery codes.',
		label: 'Code',
		button: 'Sign in',
		other: 'Begin again with another account',
		refused: 'This code is not right, or was used already. Wait for the next one.'
	},
	again: {
		title: 'Sign in again',
		lead: 'Your sign-in had ended when you sent a form. Nothing you typed is lost: sign in, then send it.',
		ready: 'Send what you typed',
		readyLead: 'You are signed in. This is what you typed; it has not been sent yet.',
		send: 'Send it now',
		field: 'Field',
		value: 'What you typed',
		lost: 'These have to be given again on the page, because files and secrets are not carried along:',
		page: 'Open the page without sending',
		inline: 'Your sign-in has ended. What you typed is still here and has not been sent.',
		inlineLink: 'Sign in in a new tab',
		inlineThen: ', then come back and send the form again.'
	},
	errors: { password: 'Give the password.', code: 'Give the code.' }
};

export const newPassword = {
	label: 'New password',
	first: 'Password',
	rule: PASSWORD_RULE,
	mistakes: {
		'too short': 'A password has at least 15 characters.',
		'too long': 'A password has at most 256 characters.',
		common: 'Too many people use this password or one like it. Choose another one.',
		'own words': 'This is made of your name, your address or the name of this place. Choose another one.'
	}
};

export const setUp = {
	title: 'Set up this installation',
	lead: 'Make the first administrator. The link for this stands in the output of the server and is made anew with every start until it is used.',
	key: 'Key from the server’s output',
	keyHint: 'The part after “key=” in the link that the server printed when it started.',
	wrongKey: 'This key does not work. Copy the link from the output of the latest start; it lives for a day.',
	done: 'This installation is set up. Administrators invite everybody else.',
	button: 'Make the administrator',
	name: 'Your name'
};

export const invitation = {
	title: 'You are invited',
	lead: (email: string) => `Make your account for ${email}.`,
	roles: (roles: string) => `You will be: ${roles}.`,
	noRole: 'You will have an account without a role; an administrator can give you one.',
	button: 'Make my account',
	dead: 'This invitation no longer works',
	deadLead: 'It was used, taken back, or its time is over. Ask whoever invited you to send it again.',
	name: 'Your name'
};

export const reset = {
	title: 'A new password',
	lead: 'Type the address of your account. If there is one, a mail with a link is on its way; the link works for an hour.',
	button: 'Send the link',
	sent: (email: string) =>
		`If ${email} has an account here, a mail with a link is on its way. Look among unwanted mail too. Without one, ask an administrator.`,
	again: 'Back to the sign-in',
	choose: 'Choose a new password',
	chooseLead: (email: string) => `For ${email}. Every device that is signed in will be signed out.`,
	save: 'Keep the new password',
	dead: 'This link no longer works',
	deadLead: 'It was used, replaced by a newer one, or its hour is over. Ask for a new one.'
};

export const confirmEmail = {
	title: 'Confirm your new address',
	lead: (email: string) => `From now on your account uses ${email}.`,
	button: 'Confirm this address',
	done: (email: string) => `Your account now uses ${email}.`,
	dead: 'This link no longer works',
	deadLead:
		'It was used, replaced by a newer one, or its time is over. Ask for the change again from your account.'
};
