import type { Adapter } from 'lucia';
import { beforeEach, describe, expect, it } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { newPerson } from '../../../../tests/support/people';
import { Person, PersonRole, SessionRow } from '../db/models/people';
import { sessionStore } from './sessionStore';

// The contract is lucia's adapter interface; this line fails to compile when the store leaves it.
const adapter: Adapter = sessionStore;
const HOUR_MS = 3_600_000;

beforeEach(async () => {
	await temporaryDatabase();
});

const session = (id: string, userId: string, ms = HOUR_MS) => ({
	id,
	userId,
	expiresAt: new Date(Date.now() + ms),
	attributes: { handle: `h-${id}`, createdAt: 'a', seenAt: 'b', address: '192.0.2.1', agent: 'test' }
});

// The cases are those of lucia's own adapter test (@lucia-auth/adapter-test), which takes tables of another shape.
describe('the session store', () => {
	it('gives a session back under the id it was asked for, with its owner', async () => {
		const id = await newPerson({ name: 'Ada', roles: ['educator', 'dentist'] });
		const one = session('one', id);
		await adapter.setSession(one);
		expect(await adapter.getSessionAndUser('one')).toEqual([
			one,
			{
				id,
				attributes: {
					email: `${id}@example.org`,
					name: 'Ada',
					roles: ['dentist', 'educator'],
					secondFactor: false
				}
			}
		]);
	});

	it('keeps no id that opens a session', async () => {
		await adapter.setSession(session('secret-id', await newPerson()));
		const rows = JSON.stringify(await SessionRow.findAll());
		expect(rows).not.toContain('"secret-id"');
		const [{ idHash }] = await SessionRow.findAll();
		// SHA-256 of "secret-id", by coreutils' sha256sum.
		expect(idHash).toBe('2d4e223a1833d38ff89ba7abbfbd41df79b1680333e31d4e04618bcfa10059dd');
		expect(await adapter.getSessionAndUser(idHash)).toEqual([null, null]);
	});

	it('knows nothing of an unknown id', async () => {
		expect(await adapter.getSessionAndUser('none')).toEqual([null, null]);
	});

	it('gives no owner once the account is closed', async () => {
		const id = await newPerson();
		const one = session('one', id);
		await adapter.setSession(one);
		await Person.update({ deactivatedAt: 'now' }, { where: { id } });
		expect(await adapter.getSessionAndUser('one')).toEqual([one, null]);
	});

	it('reads roles anew each time', async () => {
		const id = await newPerson({ roles: ['student'] });
		await adapter.setSession(session('one', id));
		await PersonRole.create({ personId: id, role: 'educator' });
		const [, owner] = await adapter.getSessionAndUser('one');
		expect(owner?.attributes.roles).toEqual(['educator', 'student']);
	});

	it('moves the end of a session', async () => {
		const one = session('one', await newPerson());
		await adapter.setSession(one);
		const later = new Date(Date.now() + 5 * HOUR_MS);
		await adapter.updateSessionExpiration('one', later);
		expect((await adapter.getSessionAndUser('one'))[0]).toEqual({ ...one, expiresAt: later });
	});

	it('ends one session, those of a person, those that have expired, and all but one', async () => {
		const [ada, ben] = [await newPerson(), await newPerson()];
		const left = async () => (await SessionRow.findAll()).map(({ handle }) => handle).sort();
		for (const id of ['a1', 'a2', 'a3']) await adapter.setSession(session(id, ada));
		await adapter.setSession(session('b1', ben));
		await adapter.setSession(session('b2', ben, -1));
		await adapter.deleteExpiredSessions();
		expect(await left()).toEqual(['h-a1', 'h-a2', 'h-a3', 'h-b1']);
		await adapter.deleteSession('a1');
		expect(await left()).toEqual(['h-a2', 'h-a3', 'h-b1']);
		expect((await adapter.getUserSessions(ada)).map(({ attributes }) => attributes.handle).sort()).toEqual([
			'h-a2',
			'h-a3'
		]);
		expect(await sessionStore.deleteByHandle(ben, 'h-a2')).toBe(false);
		expect(await sessionStore.deleteOthers(ada, 'h-a3')).toBe(1);
		expect(await left()).toEqual(['h-a3', 'h-b1']);
		await adapter.deleteUserSessions(ben);
		expect(await left()).toEqual(['h-a3']);
	});
});
