import { Op, type Transaction } from 'sequelize';
import { mailWords, type MailData } from '$lib/strings/mail';
import { environment } from '../config';
import { Mail } from '../db/models/mail';
import { log } from '../log';
import { seal, unseal } from '../people/seal';
import { newId, now } from '../people/secrets';
import { productName } from '../people/settings';
import { renderMail, type Rendered } from './render';
import type { Deliver } from './transport';

/** The wait doubles from MAIL_RETRY_SECONDS with every failure, up to this. */
const LONGEST_WAIT_MS = 6 * 3_600_000;
/** After this long a message is given up; an administrator can try it again by hand. */
const GIVE_UP_AFTER_MS = 3 * 86_400_000;
const ERROR_LENGTH = 300;

/** What a mail room that puts a message into the queue does next, once the message is committed. */
const listeners = new Set<() => void>();

/** Calls somebody whenever a message has been put into the queue. */
export const onMail = (listener: () => void) => void listeners.add(listener);

interface Options {
	/** When the link in it dies: a message is not sent after that. */
	expiresAt?: string;
	/** The message is sent only if the transaction is committed. */
	transaction?: Transaction;
}

/**
 * Puts a message into the queue. It goes out soon, or as soon as the mail server is there again, also after a restart.
 * @param kind which message; `data` is what it has to say (strings/mail.ts)
 * @param to address of the reader
 */
export async function sendMail<Kind extends keyof MailData>(
	kind: Kind,
	to: string,
	data: MailData[Kind],
	{ expiresAt, transaction }: Options = {}
): Promise<void> {
	const product = await productName();
	const message = renderMail(mailWords[kind](data, product), product, environment.ORIGIN);
	await Mail.create(
		{
			kind,
			recipient: to,
			subject: message.subject,
			sealed: seal(JSON.stringify(message)),
			messageId: `<${newId()}@${new URL(environment.ORIGIN).hostname}>`,
			state: 'waiting',
			nextAt: now(),
			createdAt: now(),
			expiresAt: expiresAt ?? null
		},
		{ transaction }
	);
	const wake = () => listeners.forEach((listener) => listener());
	if (transaction) transaction.afterCommit(wake);
	else wake();
}

/**
 * Sends every message that is due, one after another.
 * @param goesOn asked before each message; no to leave the rest for later
 * @returns when the next one is due, or null if none waits
 */
export async function deliverDue(deliver: Deliver, goesOn = () => true): Promise<string | null> {
	while (goesOn()) {
		const mail = await Mail.findOne({ where: { state: 'waiting' }, order: ['nextAt', 'id'] });
		if (!mail || mail.nextAt > now()) return mail?.nextAt ?? null;
		if (mail.expiresAt !== null && mail.expiresAt <= now()) {
			await mail.update({ state: 'failed', sealed: null, lastError: 'The link in it has expired.' });
			continue;
		}
		// Taken before it is sent: whoever else looks meanwhile does not send it a second time.
		const [taken] = await Mail.update(
			{ state: 'sending', attempts: mail.attempts + 1 },
			{ where: { id: mail.id, state: 'waiting' } }
		);
		if (taken === 1) await attempt(await mail.reload(), deliver);
	}
	return null;
}

async function attempt(mail: Mail, deliver: Deliver): Promise<void> {
	try {
		const message = JSON.parse(unseal(mail.sealed!)) as Rendered;
		await deliver({ ...message, to: mail.recipient, messageId: mail.messageId });
	} catch (error) {
		await mail.update(afterFailure(mail, error));
		log.warn({ mail: mail.id, kind: mail.kind, attempts: mail.attempts, state: mail.state }, 'mail not sent');
		return;
	}
	await mail.update({ state: 'sent', sentAt: now(), sealed: null, lastError: null });
}

/** What a failed attempt makes of a message. */
function afterFailure(mail: Mail, error: unknown) {
	const { message, code, responseCode } = error as Error & { code?: string; responseCode?: number };
	const lastError = message.slice(0, ERROR_LENGTH);
	// The server will not take this message for this reader, however often it is offered. A refused password (535) can be mended.
	const refused = (code === 'EENVELOPE' || code === 'EMESSAGE') && (responseCode ?? 0) >= 500;
	const tooOld = Date.now() - Date.parse(mail.createdAt) > GIVE_UP_AFTER_MS;
	if (refused || tooOld) return { state: 'failed' as const, lastError };
	return {
		state: 'waiting' as const,
		lastError,
		nextAt: new Date(Date.now() + waitMs(mail.attempts)).toISOString()
	};
}

/** How long after so many failures a message is tried again. @internal for its test */
export const waitMs = (attempts: number): number =>
	Math.min(environment.MAIL_RETRY_SECONDS * 1000 * 2 ** (attempts - 1), LONGEST_WAIT_MS);

/**
 * Puts messages back that a server which was killed had in hand. Whether they went out nobody can know; they keep their id, so that the
 * reader's server can drop the second copy.
 */
export async function takeUpInterrupted(): Promise<number> {
	const [count] = await Mail.update({ state: 'waiting' }, { where: { state: 'sending' } });
	return count;
}

/** Tries a message again at once; false if it is unknown or has nothing left to send. */
export async function retryMail(id: number, transaction: Transaction): Promise<Mail | null> {
	const mail = await Mail.findOne({
		where: { id, state: ['waiting', 'failed'], sealed: { [Op.ne]: null } },
		transaction
	});
	if (!mail) return null;
	transaction.afterCommit(() => listeners.forEach((listener) => listener()));
	return mail.update({ state: 'waiting', nextAt: now(), createdAt: now() }, { transaction });
}

/** Takes a message out of the queue for good; null if it is unknown or out already. */
export async function dropMail(id: number, transaction: Transaction): Promise<Mail | null> {
	const mail = await Mail.findOne({ where: { id, state: ['waiting', 'failed'] }, transaction });
	return mail && mail.update({ state: 'dropped', sealed: null }, { transaction });
}
