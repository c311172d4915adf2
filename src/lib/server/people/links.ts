import { Op, UniqueConstraintError, type Transaction } from 'sequelize';
import { environment } from '../config';
import { OneTimeLink, Person, type LinkKind } from '../db/models/people';
import { sendMail } from '../mail/queue';
import { untilText } from '$lib/strings/people';
import {
	administratorIds,
	createPerson,
	emailKey,
	findByEmail,
	inTransaction,
	setPassword
} from './accounts';
import { recordAudit } from './audit';
import { resetLimits } from './limits';
import { hashPassword } from './passwords';
import { hashSecret, inMs, newSecret, now } from './secrets';

const HOUR_MS = 3_600_000;
/** How long each kind of link lives. A set-up link is made anew at each start. */
const LIFE_MS: Record<LinkKind, number> = {
	'set-up': 24 * HOUR_MS,
	reset: HOUR_MS,
	'email-change': 24 * HOUR_MS
};
const PATHS: Record<LinkKind, string> = {
	'set-up': '/set-up?key=',
	reset: '/reset/',
	'email-change': '/confirm-email/'
};

interface MadeLink {
	/** The whole address with the secret, which is not kept. */
	link: string;
	expiresAt: string;
}

/** Makes a link; links of the same kind for the same person made before stop working. */
async function makeLink(
	kind: LinkKind,
	personId: string | null,
	email: string | null,
	transaction: Transaction
): Promise<MadeLink> {
	const secret = newSecret();
	const expiresAt = inMs(LIFE_MS[kind]);
	await OneTimeLink.destroy({ where: { kind, personId, usedAt: null }, transaction });
	await OneTimeLink.create(
		{ kind, personId, email, tokenHash: hashSecret(secret), createdAt: now(), expiresAt },
		{ transaction }
	);
	return { link: `${environment.ORIGIN}${PATHS[kind]}${secret}`, expiresAt };
}

/** A link that still works, or null. Opening the page it leads to uses nothing up: mail scanners open links too. */
export const findLink = (
	kind: LinkKind,
	secret: string,
	transaction?: Transaction
): Promise<OneTimeLink | null> =>
	OneTimeLink.findOne({
		where: { kind, tokenHash: hashSecret(secret), usedAt: null, expiresAt: { [Op.gt]: now() } },
		transaction
	});

/** Uses a link up within a transaction; null if it no longer works. */
async function useLink(
	kind: LinkKind,
	secret: string,
	transaction: Transaction
): Promise<OneTimeLink | null> {
	const link = await findLink(kind, secret, transaction);
	return link && link.update({ usedAt: now() }, { transaction });
}

/** A new set-up link if nobody administrates yet, else null. The one before stops working. */
export async function makeSetUpLink(): Promise<string | null> {
	return inTransaction(async (transaction) => {
		if ((await administratorIds(transaction)).length > 0) return null;
		return (await makeLink('set-up', null, null, transaction)).link;
	});
}

/** Makes the first administrator; null if the link no longer works, or somebody administrates meanwhile. */
export async function setUp(
	secret: string,
	{ email, name, password }: { email: string; name: string; password: string }
): Promise<Person | null> {
	if (!(await findLink('set-up', secret))) return null;
	const passwordHash = await hashPassword(password);
	return inTransaction(async (transaction) => {
		if ((await administratorIds(transaction)).length > 0) return null;
		if (!(await useLink('set-up', secret, transaction))) return null;
		const id = await createPerson({ email, name, passwordHash, roles: ['administrator'] }, transaction);
		await recordAudit({ action: 'installation set up', subject: email, actor: { id, name } }, transaction);
		return Person.findByPk(id, { transaction });
	});
}

/**
 * Sends a reset link to the account of an address, if there is one that is open. Says nothing about it; not to be waited for by an answer,
 * since its work shows whether there is one.
 */
export async function sendReset(email: string): Promise<void> {
	if ((await resetLimits.account.take(hashSecret(emailKey(email)))) > 0) return;
	const person = await findByEmail(email);
	await inTransaction(async (transaction) => {
		await recordAudit({ action: 'reset asked', subject: emailKey(email) }, transaction);
		if (!person || person.deactivatedAt !== null) return;
		const { link, expiresAt } = await makeLink('reset', person.id, null, transaction);
		const data = { name: person.name, link, until: untilText(expiresAt) };
		await sendMail('reset', person.email, data, { expiresAt, transaction });
	});
}

/** A reset link that an administrator hands over, where no mail goes out; null for an unknown or closed account. */
export async function makeResetLink(personId: string): Promise<MadeLink | null> {
	return inTransaction(async (transaction) => {
		const person = await Person.findOne({ where: { id: personId, deactivatedAt: null }, transaction });
		if (!person) return null;
		await recordAudit({ action: 'reset link made', subject: person.email }, transaction);
		return makeLink('reset', person.id, null, transaction);
	});
}

/** The open account that a reset link belongs to, or null. */
export async function personOfReset(secret: string): Promise<Person | null> {
	const link = await findLink('reset', secret);
	return link && Person.findOne({ where: { id: link.personId!, deactivatedAt: null } });
}

/** Sets a new password by a reset link and ends every session; null if the link no longer works. */
export async function resetPassword(secret: string, password: string): Promise<Person | null> {
	const link = await inTransaction((transaction) => useLink('reset', secret, transaction));
	const person = link && (await Person.findOne({ where: { id: link.personId!, deactivatedAt: null } }));
	if (!person) return null;
	await setPassword(person.id, password, null, 'password reset');
	return person.reload();
}

/** Asks a new address to be confirmed, and tells the old one. An address that has an account gets no mail; the answer is the same. */
export async function askEmailChange(personId: string, email: string): Promise<void> {
	const person = await Person.findByPk(personId, { rejectOnEmpty: true });
	const taken = await findByEmail(email);
	await inTransaction(async (transaction) => {
		await recordAudit({ action: 'e-mail change asked', subject: person.email, detail: email }, transaction);
		const { link, expiresAt } = await makeLink('email-change', personId, email, transaction);
		const { name } = person;
		await sendMail('e-mail change notice', person.email, { name, newAddress: email }, { transaction });
		if (taken && taken.id !== personId) return;
		await sendMail(
			'e-mail change',
			email,
			{ name, link, until: untilText(expiresAt) },
			{ expiresAt, transaction }
		);
	});
}

/** Changes the address by its link; null if the link no longer works or the address has an account meanwhile. */
export async function confirmEmail(secret: string): Promise<string | null> {
	try {
		return await inTransaction(async (transaction) => {
			const link = await useLink('email-change', secret, transaction);
			const person = link && (await Person.findByPk(link.personId!, { transaction }));
			if (!person) return null;
			const [before, email] = [person.email, link.email!];
			await person.update({ email, emailKey: emailKey(email) }, { transaction });
			// A reset link in the old mailbox must not open the account any more.
			await OneTimeLink.destroy({ where: { kind: 'reset', personId: person.id, usedAt: null }, transaction });
			const actor = { id: person.id, name: person.name };
			await recordAudit(
				{ action: 'e-mail changed', subject: email, detail: `${before} → ${email}`, actor },
				transaction
			);
			return email;
		});
	} catch (error) {
		if (error instanceof UniqueConstraintError) return null;
		throw error;
	}
}

/** Removes links that are used up or over. */
export const purgeLinks = () => OneTimeLink.destroy({ where: { expiresAt: { [Op.lte]: now() } } });
