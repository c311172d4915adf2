import { roleNames } from './people';
import type { Role } from '$lib/schemas/terms';

/** A message before it becomes text and HTML. */
export interface MailWords {
	subject: string;
	paragraphs: string[];
	/** Points, such as the reasons of a return. */
	points?: string[];
	/** The one thing to do. */
	action?: { label: string; link: string };
	/** Stands after the action, smaller. */
	after?: string[];
}

/** What a message of each kind has to say. Times are given as text for the reader. */
export interface MailData {
	invitation: { inviter: string; roles: readonly Role[]; link: string; until: string };
	reset: { name: string; link: string; until: string };
	'e-mail change': { name: string; link: string; until: string };
	'e-mail change notice': { name: string; newAddress: string };
	/** An entry waits for a second person. `entry` names it: source, tooth and root. */
	'review asked': { author: string; entry: string; note: string; link: string };
	'entry returned': { reviewer: string; entry: string; reasons: readonly string[]; link: string };
	'entry published': { reviewer: string; entry: string; link: string };
}

/** The words of a message, by its kind. `product` is the name under which the installation writes. */
export const mailWords: { [Kind in keyof MailData]: (data: MailData[Kind], product: string) => MailWords } = {
	invitation: ({ inviter, roles, link, until }, product) => ({
		subject: `${inviter} invites you to ${product}`,
		paragraphs: [
			`${inviter} invites you to ${product}, a canal-anatomy and confluence decision aid backed by the published literature.`,
			roles.length > 0
				? `You would be: ${roles.map((role) => roleNames[role].toLowerCase()).join(', ')}.`
				: 'You would have an account without a role.'
		],
		action: { label: 'Accept the invitation', link },
		after: [
			`The link works once, until ${until}. If you did not expect it, there is nothing to do: no account exists until the invitation is accepted.`
		]
	}),
	reset: ({ name, link, until }, product) => ({
		subject: `A new password for ${product}`,
		paragraphs: [`Hello ${name},`, `somebody, probably you, asked for a new password at ${product}.`],
		action: { label: 'Choose a new password', link },
		after: [
			`The link works once, until ${until}. If it was not you, there is nothing to do: your password stays as it is.`
		]
	}),
	'e-mail change': ({ name, link, until }, product) => ({
		subject: `Confirm this address for ${product}`,
		paragraphs: [`Hello ${name},`, `you asked ${product} to use this address for your account from now on.`],
		action: { label: 'Confirm this address', link },
		after: [`The link works once, until ${until}. If you did not ask for this, there is nothing to do.`]
	}),
	'e-mail change notice': ({ name, newAddress }, product) => ({
		subject: `Your address at ${product} is about to change`,
		paragraphs: [
			`Hello ${name},`,
			`somebody who is signed in as you asked ${product} to use ${newAddress} for your account. It changes once that address is confirmed.`,
			'If it was not you, sign in, choose a new password, which signs every other device out, and tell your administrator.'
		]
	}),
	'review asked': ({ author, entry, note, link }) => ({
		subject: `For your review: ${entry}`,
		paragraphs: [
			`${author} asks for a second person to check an entry against its source: ${entry}.`,
			...(note ? [note] : [])
		],
		action: { label: 'Open the entry', link }
	}),
	'entry returned': ({ reviewer, entry, reasons, link }) => ({
		subject: `Returned to you: ${entry}`,
		paragraphs: [`${reviewer} checked your entry (${entry}) and returns it, for these reasons:`],
		points: [...reasons],
		action: { label: 'Open the entry', link }
	}),
	'entry published': ({ reviewer, entry, link }) => ({
		subject: `Published: ${entry}`,
		paragraphs: [
			`${reviewer} checked your entry (${entry}) against its source and published it. It now enters the estimates.`
		],
		action: { label: 'Open the entry', link }
	})
};

export const mailFooter = (product: string, origin: string) =>
	`This message was sent by ${product} at ${origin}. Nothing that identifies a patient belongs in it or in an answer to it.`;
