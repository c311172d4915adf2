import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { temporaryDatabase, temporaryFolder } from '../../../../tests/support/database';
import { newPerson } from '../../../../tests/support/people';
import { Mail } from '../db/models/mail';
import { Audit, Invitation, OneTimeLink, Person, SessionRow } from '../db/models/people';
import { rolesOf } from './accounts';
import { accept, findInvitation, invite, listInvitations, revoke, sendAgain } from './invitations';
import {
	askEmailChange,
	confirmEmail,
	findLink,
	makeResetLink,
	makeSetUpLink,
	personOfReset,
	purgeLinks,
	resetPassword,
	sendReset,
	setUp
} from './links';
import { unseal } from './seal';

vi.mock('../config', async (original) => {
	const { environment } = await original<{ environment: object }>();
	return { environment: { ...environment, DATA_DIR: temporaryFolder() } };
});
vi.mock('$app/server', () => ({
	getRequestEvent: () => {
		throw new Error('no request');
	}
}));

const HOUR_MS = 3_600_000;
const PASSWORD = 'two rivers become one';

beforeEach(async () => {
	vi.useFakeTimers({ toFake: ['Date'], now: new Date('2026-12-01T12:00:00Z') });
	await temporaryDatabase();
});
afterEach(() => void vi.useRealTimers());

const later = (ms: number) => vi.setSystemTime(Date.now() + ms);
const secretOf = (link: string) => /[\w-]{43}$/.exec(link)![0];

/** The queued mails, the oldest first, with the secret of their link. */
async function mails() {
	const rows = await Mail.findAll({ order: ['id'] });
	return rows.map(({ kind, recipient, sealed, expiresAt }) => {
		const { text } = JSON.parse(unseal(sealed!)) as { text: string };
		return { kind, recipient, expiresAt, secret: /[\w-]{43}/.exec(text)?.[0] ?? '', text };
	});
}

/** No secret of a link stands anywhere in the database as it is. */
async function expectHidden(secret: string) {
	const tables = await Promise.all([
		OneTimeLink.findAll(),
		Invitation.findAll(),
		Audit.findAll(),
		Mail.findAll()
	]);
	expect(JSON.stringify(tables)).not.toContain(secret);
}

describe('setting up', () => {
	const first = { email: 'first@example.org', name: 'First', password: PASSWORD };

	it('works once, with the link of the latest start, for a day', async () => {
		const [old, link] = [(await makeSetUpLink())!, (await makeSetUpLink())!];
		await expectHidden(secretOf(link));
		expect(await setUp(secretOf(old), first)).toBe(null);
		later(24 * HOUR_MS);
		expect(await setUp(secretOf(link), first)).toBe(null);
		const fresh = (await makeSetUpLink())!;
		const person = await setUp(secretOf(fresh), first);
		expect(await rolesOf(person!.id)).toEqual(['administrator']);
		expect(await setUp(secretOf(fresh), { ...first, email: 'second@example.org' })).toBe(null);
		expect(await makeSetUpLink()).toBe(null);
	});

	it('makes one administrator of two who use the link at once', async () => {
		const key = secretOf((await makeSetUpLink())!);
		const made = await Promise.all(
			['a', 'b'].map((name) => setUp(key, { ...first, email: `${name}@example.org` }))
		);
		expect(made.filter(Boolean)).toHaveLength(1);
		expect(await Person.count()).toBe(1);
	});
});

describe('a reset', () => {
	it('goes by mail to an open account only, works once within an hour, and ends every session', async () => {
		const [ada, closed] = [await newPerson(), await newPerson()];
		await Person.update({ deactivatedAt: 'now' }, { where: { id: closed } });
		for (const email of ['nobody@example.org', `${closed}@example.org`, ` ${ada.toUpperCase()}@Example.org`])
			await sendReset(email);
		const [mail, ...others] = await mails();
		expect(others).toEqual([]);
		expect(mail).toMatchObject({
			kind: 'reset',
			recipient: `${ada}@example.org`,
			expiresAt: '2026-12-01T13:00:00.000Z'
		});
		await expectHidden(mail.secret);
		expect(await Audit.count({ where: { action: 'reset asked' } })).toBe(3);
		await SessionRow.create({
			...{
				idHash: 'x',
				handle: 'x',
				personId: ada,
				expiresAt: '2999',
				createdAt: '',
				seenAt: '',
				address: '',
				agent: ''
			}
		});
		// Looking uses nothing up.
		expect((await personOfReset(mail.secret))?.id).toBe(ada);
		expect((await resetPassword(mail.secret, PASSWORD))?.id).toBe(ada);
		expect(await SessionRow.count()).toBe(0);
		expect(await resetPassword(mail.secret, PASSWORD)).toBe(null);
	});

	it('ends with its hour, with a newer one, and with the account', async () => {
		const ada = await newPerson();
		const [one, two] = [(await makeResetLink(ada))!, (await makeResetLink(ada))!];
		expect(await personOfReset(secretOf(one.link))).toBe(null);
		expect((await personOfReset(secretOf(two.link)))?.id).toBe(ada);
		await Person.update({ deactivatedAt: 'now' }, { where: { id: ada } });
		expect(await resetPassword(secretOf(two.link), PASSWORD)).toBe(null);
		expect(await makeResetLink(ada)).toBe(null);
		await Person.update({ deactivatedAt: null }, { where: { id: ada } });
		const three = (await makeResetLink(ada))!;
		later(HOUR_MS);
		expect(await personOfReset(secretOf(three.link))).toBe(null);
		await purgeLinks();
		expect(await OneTimeLink.count()).toBe(0);
	});

	it('mails one account five times an hour at most', async () => {
		const ada = await newPerson();
		for (let asked = 0; asked < 8; asked++) await sendReset(`${ada}@example.org`);
		expect(await mails()).toHaveLength(5);
	});
});

describe('a change of address', () => {
	it('is confirmed at the new address, told to the old one, and ends a reset that went there', async () => {
		const ada = await newPerson();
		const reset = (await makeResetLink(ada))!;
		await askEmailChange(ada, 'New@example.org');
		const [notice, question] = await mails();
		expect(notice).toMatchObject({ kind: 'e-mail change notice', recipient: `${ada}@example.org` });
		expect(notice.text).toContain('New@example.org');
		expect(notice.secret).toBe('');
		expect(question).toMatchObject({ kind: 'e-mail change', recipient: 'New@example.org' });
		await expectHidden(question.secret);
		expect((await Person.findByPk(ada))?.email).toBe(`${ada}@example.org`);
		expect(await confirmEmail(question.secret)).toBe('New@example.org');
		expect(await Person.findByPk(ada, { raw: true })).toMatchObject({
			email: 'New@example.org',
			emailKey: 'new@example.org'
		});
		expect(await confirmEmail(question.secret)).toBe(null);
		expect(await personOfReset(secretOf(reset.link))).toBe(null);
	});

	it('to an address that has an account sends nothing there, and one that gets one meanwhile changes nothing', async () => {
		const [ada, ben] = [await newPerson(), await newPerson()];
		await askEmailChange(ada, `${ben}@example.org`);
		expect((await mails()).map(({ kind }) => kind)).toEqual(['e-mail change notice']);
		await askEmailChange(ada, 'soon@example.org');
		const secret = (await mails()).at(-1)!.secret;
		await newPerson({ email: 'soon@example.org' });
		expect(await confirmEmail(secret)).toBe(null);
		expect((await Person.findByPk(ada))?.email).toBe(`${ada}@example.org`);
		expect(await findLink('email-change', secret)).not.toBe(null);
	});
});

describe('an invitation', () => {
	const boss = { id: 'boss', name: 'Boss' };
	const inviteBen = () => invite(boss, 'Ben@example.org', ['educator', 'dentist', 'educator']);
	beforeEach(async () => void (await newPerson({ ...boss, roles: ['administrator'] })));

	it('makes an account with the roles it was given, once, within seven days', async () => {
		await inviteBen();
		const [mail] = await mails();
		expect(mail).toMatchObject({
			kind: 'invitation',
			recipient: 'Ben@example.org',
			expiresAt: '2026-12-08T12:00:00.000Z'
		});
		expect(mail.text).toContain('Boss invites you');
		await expectHidden(mail.secret);
		expect(await findInvitation(mail.secret)).toEqual({
			email: 'Ben@example.org',
			roles: ['educator', 'dentist']
		});
		const ben = await accept(mail.secret, 'Ben', PASSWORD);
		expect(await rolesOf(ben!.id)).toEqual(['dentist', 'educator']);
		expect(await accept(mail.secret, 'Ben', PASSWORD)).toBe(null);
		expect(await listInvitations()).toEqual([]);
		expect(await inviteBen()).toBe('has an account');
	});

	it('is one an address, and a new link ends the one before', async () => {
		await inviteBen();
		expect(await inviteBen()).toBe('invited already');
		const [{ id }] = await listInvitations();
		later(8 * 24 * HOUR_MS);
		expect(await listInvitations()).toMatchObject([{ id, expired: true, invitedBy: 'Boss' }]);
		expect(await findInvitation((await mails())[0].secret)).toBe(null);
		await sendAgain(boss, id);
		const [old, fresh] = await mails();
		expect(await findInvitation(old.secret)).toBe(null);
		expect(await findInvitation(fresh.secret)).not.toBe(null);
		expect(await sendAgain(boss, id + 1)).toBe(null);
	});

	it('can be taken back', async () => {
		const outcome = await inviteBen();
		const [{ id }] = await listInvitations();
		expect(await revoke(id)).toBe(true);
		expect(await revoke(id)).toBe(false);
		expect(await accept(secretOf((outcome as { link: string }).link), 'Ben', PASSWORD)).toBe(null);
		expect(await inviteBen()).toHaveProperty('link');
	});

	it('makes one account of two who accept at once', async () => {
		const secret = secretOf(((await inviteBen()) as { link: string }).link);
		const made = await Promise.all(['a', 'b'].map((name) => accept(secret, name, PASSWORD)));
		expect(made.filter(Boolean)).toHaveLength(1);
	});
});
