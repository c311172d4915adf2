import { Op, type Transaction } from 'sequelize';
import type { Role } from '$lib/schemas/terms';
import { untilText } from '$lib/strings/people';
import { environment } from '../config';
import { Invitation, Person } from '../db/models/people';
import { sendMail } from '../mail/queue';
import { createPerson, emailKey, findByEmail, inTransaction } from './accounts';
import { recordAudit } from './audit';
import { hashPassword } from './passwords';
import { hashSecret, inMs, newSecret, now } from './secrets';

const INVITATION_DAYS = 7;
const LIFE_MS = INVITATION_DAYS * 86_400_000;

interface Inviter {
	id: string;
	name: string;
}

/** An invitation as an administrator sees it. */
export interface InvitationDto {
	id: number;
	email: string;
	roles: Role[];
	invitedBy: string;
	sentAt: string;
	expiresAt: string;
	expired: boolean;
}

/** What became of an invitation; the link is shown once, where no mail goes out. */
export type InviteOutcome = { link: string } | 'has an account' | 'invited already';

/** Invites somebody: queues the mail with a link that works once within seven days. */
export async function invite(
	inviter: Inviter,
	email: string,
	roles: readonly Role[]
): Promise<InviteOutcome> {
	const key = emailKey(email);
	return inTransaction(async (transaction) => {
		if (await Person.count({ where: { emailKey: key }, transaction })) return 'has an account';
		if (await Invitation.count({ where: { ...OPEN, emailKey: key }, transaction })) return 'invited already';
		const secret = newSecret();
		const unique = [...new Set(roles)];
		const invitation = await Invitation.create(
			{
				...{ email: email.trim(), emailKey: key, roles: JSON.stringify(unique), invitedBy: inviter.id },
				...{ tokenHash: hashSecret(secret), createdAt: now(), sentAt: now(), expiresAt: inMs(LIFE_MS) }
			},
			{ transaction }
		);
		await recordAudit(
			{ action: 'invited', subject: invitation.email, detail: unique.join(', ') || 'no role' },
			transaction
		);
		return { link: await post(invitation, inviter, secret, transaction) };
	});
}

/** Sends an invitation again with a new link; the one before stops working. Null if it is not open. */
export async function sendAgain(inviter: Inviter, id: number): Promise<{ link: string } | null> {
	return inTransaction(async (transaction) => {
		const invitation = await Invitation.findOne({ where: { ...OPEN, id }, transaction });
		if (!invitation) return null;
		const secret = newSecret();
		await invitation.update(
			{ tokenHash: hashSecret(secret), sentAt: now(), expiresAt: inMs(LIFE_MS) },
			{ transaction }
		);
		await recordAudit({ action: 'invitation sent again', subject: invitation.email }, transaction);
		return { link: await post(invitation, inviter, secret, transaction) };
	});
}

/** Takes an invitation back; false if it is not open. */
export async function revoke(id: number): Promise<boolean> {
	return inTransaction(async (transaction) => {
		const invitation = await Invitation.findOne({ where: { ...OPEN, id }, transaction });
		if (!invitation) return false;
		await invitation.update({ revokedAt: now() }, { transaction });
		await recordAudit({ action: 'invitation revoked', subject: invitation.email }, transaction);
		return true;
	});
}

/** Invitations that wait for an answer, expired ones too, the newest first. */
export async function listInvitations(): Promise<InvitationDto[]> {
	const rows = await Invitation.findAll({ where: OPEN, order: [['id', 'DESC']] });
	const inviters = await Person.findAll({ where: { id: rows.map(({ invitedBy }) => invitedBy) } });
	const names = new Map(inviters.map(({ id, name }) => [id, name]));
	return rows.map(({ id, email, roles, invitedBy, sentAt, expiresAt }) => ({
		...{ id, email, sentAt, expiresAt },
		roles: JSON.parse(roles) as Role[],
		invitedBy: names.get(invitedBy) ?? '',
		expired: expiresAt <= now()
	}));
}

/** The invitation a link belongs to, or null if it does not work any more. */
export async function findInvitation(secret: string): Promise<{ email: string; roles: Role[] } | null> {
	const found = await Invitation.findOne({ where: working(secret) });
	return found && { email: found.email, roles: JSON.parse(found.roles) as Role[] };
}

/** Accepts an invitation: makes the account. Null if the link does not work any more. */
export async function accept(secret: string, name: string, password: string): Promise<Person | null> {
	if (!(await Invitation.count({ where: working(secret) }))) return null;
	const passwordHash = await hashPassword(password);
	return inTransaction(async (transaction) => {
		const invitation = await Invitation.findOne({ where: working(secret), transaction });
		if (!invitation || (await findByEmail(invitation.email))) return null;
		const roles = JSON.parse(invitation.roles) as Role[];
		const { email } = invitation;
		const id = await createPerson({ email, name, passwordHash, roles }, transaction);
		await invitation.update({ acceptedAt: now() }, { transaction });
		const detail = roles.join(', ') || 'no role';
		await recordAudit(
			{ action: 'invitation accepted', subject: email, detail, actor: { id, name } },
			transaction
		);
		return Person.findByPk(id, { transaction });
	});
}

const OPEN = { acceptedAt: null, revokedAt: null };
const working = (secret: string) => ({
	...OPEN,
	tokenHash: hashSecret(secret),
	expiresAt: { [Op.gt]: now() }
});

async function post(invitation: Invitation, inviter: Inviter, secret: string, transaction: Transaction) {
	const link = `${environment.ORIGIN}/invitation/${secret}`;
	const { email, expiresAt } = invitation;
	const roles = JSON.parse(invitation.roles) as Role[];
	const data = { inviter: inviter.name, roles, link, until: untilText(expiresAt) };
	await sendMail('invitation', email, data, { expiresAt, transaction });
	return link;
}
