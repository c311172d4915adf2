import { Op } from 'sequelize';
import type { MailKind, MailState } from '$lib/schemas/terms';
import { Mail } from '../db/models/mail';
import { decodeCursor, encodeCursor } from '../table/paging';

const ORDER = 'mail';
const PAGE = 50;
/** Mails that went out or were dropped are forgotten after this. */
const KEPT_MS = 90 * 86_400_000;

/** A mail as an administrator sees it: never what it says, since it may hold a link. */
interface MailDto {
	id: number;
	kind: MailKind;
	to: string;
	state: MailState;
	attempts: number;
	createdAt: string;
	nextAt: string;
	sentAt: string | null;
	lastError: string | null;
	/** Whether there is something left to send. */
	canRetry: boolean;
}

/**
 * Mails, the newest first, in pages.
 * @throws Problem 422 for a cursor that is not of this list
 */
export async function listMail(state: MailState | undefined, cursor: string | undefined) {
	const where = {
		...(state && { state }),
		...(cursor && { id: { [Op.lt]: Number(decodeCursor(cursor, ORDER).id) } })
	};
	const rows = await Mail.findAll({ where, order: [['id', 'DESC']], limit: PAGE + 1 });
	const mails = rows.slice(0, PAGE).map(toMailDto);
	const last = mails.at(-1);
	return { mails, nextCursor: rows.length > PAGE && last ? encodeCursor(ORDER, last.id, last.id) : null };
}

/** How many mails were given up. */
export const countFailed = (): Promise<number> => Mail.count({ where: { state: 'failed' } });

/** Forgets mails that are long done with. */
export const purgeMail = () =>
	Mail.destroy({
		where: {
			state: ['sent', 'dropped', 'failed'],
			createdAt: { [Op.lt]: new Date(Date.now() - KEPT_MS).toISOString() }
		}
	});

const toMailDto = (mail: Mail): MailDto => ({
	id: mail.id,
	kind: mail.kind,
	to: mail.recipient,
	state: mail.state,
	attempts: mail.attempts,
	createdAt: mail.createdAt,
	nextAt: mail.nextAt,
	sentAt: mail.sentAt,
	lastError: mail.lastError,
	canRetry: (mail.state === 'waiting' || mail.state === 'failed') && mail.sealed !== null
});
