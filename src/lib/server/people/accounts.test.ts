import { beforeEach, describe, expect, it, vi } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { newPerson } from '../../../../tests/support/people';
import { Audit, Person, SessionRow } from '../db/models/people';
import {
	changeName,
	createPerson,
	deactivate,
	findByEmail,
	inTransaction,
	isOwnPassword,
	reactivate,
	rolesOf,
	setPassword,
	setRoles
} from './accounts';

vi.mock('$app/server', () => ({
	getRequestEvent: () => ({
		locals: { user: { id: 'boss', name: 'Boss' } },
		getClientAddress: () => '192.0.2.7'
	})
}));

beforeEach(async () => {
	await temporaryDatabase();
});

const lines = async () =>
	(await Audit.findAll({ order: ['id'] })).map(({ action, detail }) => ({ action, detail }));

async function signedIn(personId: string, handle: string) {
	const at = new Date().toISOString();
	await SessionRow.create({
		...{ idHash: `hash ${handle}`, handle, personId, expiresAt: '2999-01-01', createdAt: at, seenAt: at },
		...{ address: '', agent: '' }
	});
}

describe('an account', () => {
	it('is found by its address however it is typed, and there is one of it', async () => {
		const ada = { email: ' Ada@Example.org', name: ' Ada ', passwordHash: 'x', roles: ['dentist'] as const };
		const id = await inTransaction((transaction) => createPerson(ada, transaction));
		expect(await findByEmail('ADA@example.ORG ')).toMatchObject({
			id,
			email: 'Ada@Example.org',
			name: 'Ada'
		});
		expect(await rolesOf(id)).toEqual(['dentist']);
		await expect(inTransaction((transaction) => createPerson(ada, transaction))).rejects.toThrow();
		expect(await Person.count()).toBe(1);
	});

	it('changes its name, and the log tells who did it and from where', async () => {
		const id = await newPerson({ name: 'Ada' });
		await changeName(id, ' Ada B. ');
		expect((await Person.findByPk(id))?.name).toBe('Ada B.');
		expect(await Audit.findOne({ raw: true })).toMatchObject({
			...{ action: 'name changed', subject: `${id}@example.org`, detail: 'Ada → Ada B.' },
			...{ actorId: 'boss', actorName: 'Boss', address: '192.0.2.7' }
		});
	});

	it('gets a new password, and every other device is signed out', async () => {
		const [id, other] = [await newPerson(), await newPerson()];
		for (const handle of ['here', 'there', 'elsewhere']) await signedIn(id, handle);
		await signedIn(other, 'of another');
		await setPassword(id, 'two rivers become one', 'here', 'password changed');
		expect(await isOwnPassword(id, 'two rivers become one')).toBe(true);
		expect(await isOwnPassword(id, 'two rivers become two')).toBe(false);
		expect((await SessionRow.findAll()).map(({ handle }) => handle).sort()).toEqual(['here', 'of another']);
		expect(JSON.stringify(await Audit.findAll())).not.toContain('two rivers');
	});
});

describe('the audit log', () => {
	it('takes no change and no deletion', async () => {
		await changeName(await newPerson(), 'Ada');
		for (const sql of ["UPDATE audit SET detail = 'other'", 'DELETE FROM audit'])
			await expect(Audit.sequelize!.query(sql)).rejects.toMatchObject({
				parent: { message: expect.stringContaining('append-only') as string }
			});
		expect(await lines()).toHaveLength(1);
	});
});

describe('roles and closed accounts', () => {
	it('change, and the log says from what to what', async () => {
		const id = await newPerson({ roles: ['student'] });
		expect(await setRoles(id, ['educator', 'dentist', 'educator'])).toBe('done');
		expect(await rolesOf(id)).toEqual(['dentist', 'educator']);
		expect(await setRoles(id, [])).toBe('done');
		expect(await lines()).toEqual([
			{ action: 'roles changed', detail: 'student → dentist, educator' },
			{ action: 'roles changed', detail: 'dentist, educator → none' }
		]);
		expect(await setRoles('nobody', ['student'])).toBe('unknown');
	});

	it('end the sessions when the account is closed, and come back with it', async () => {
		await newPerson({ id: 'root', roles: ['administrator'] });
		const id = await newPerson({ roles: ['educator'] });
		await signedIn(id, 'one');
		expect(await deactivate(id)).toBe('done');
		expect(await deactivate(id)).toBe('done');
		expect(await SessionRow.count()).toBe(0);
		expect(await reactivate(id)).toBe('done');
		expect(await rolesOf(id)).toEqual(['educator']);
		expect((await lines()).map(({ action }) => action)).toEqual(['deactivated', 'reactivated']);
		expect(await deactivate('nobody')).toBe('unknown');
		expect(await reactivate('nobody')).toBe('unknown');
	});

	it('keep the last administrator who is active', async () => {
		const [ada, ben] = [
			await newPerson({ roles: ['administrator'] }),
			await newPerson({ roles: ['administrator'] })
		];
		expect(await deactivate(ben)).toBe('done');
		expect(await deactivate(ada)).toBe('last administrator');
		expect(await setRoles(ada, ['educator'])).toBe('last administrator');
		expect(await setRoles(ada, ['administrator', 'educator'])).toBe('done');
		expect(await setRoles(ben, [])).toBe('done');
		expect(await rolesOf(ada)).toEqual(['administrator', 'educator']);
	});

	it('keep one administrator when two close each other at once', async () => {
		const [ada, ben] = [
			await newPerson({ roles: ['administrator'] }),
			await newPerson({ roles: ['administrator'] })
		];
		const outcomes = await Promise.all([deactivate(ada), setRoles(ben, [])]);
		expect(outcomes.sort()).toEqual(['done', 'last administrator']);
	});
});
