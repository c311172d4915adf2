import { auditQuerySchema, peopleQuerySchema } from '$lib/schemas/people';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { newPerson } from '../../../../tests/support/people';
import { Person } from '../db/models/people';
import { recordAudit } from './audit';
import { exportAudit, listAudit } from './auditLog';
import { findPerson, listPeople } from './directory';

vi.mock('$app/server', () => ({
	getRequestEvent: () => {
		throw new Error('no request');
	}
}));

beforeEach(async () => {
	await temporaryDatabase();
});

const people = async (query: object) => listPeople(peopleQuerySchema.parse(query));
const names = async (query: object) => (await people(query)).people.map(({ name }) => name);

describe('the list of people', () => {
	beforeEach(async () => {
		await newPerson({ id: 'p1', name: 'Ada', email: 'ada@school.example', roles: ['educator', 'dentist'] });
		await newPerson({ id: 'p2', name: 'ben', email: 'BEN@practice.example', roles: ['student'] });
		await newPerson({ id: 'p3', name: '100% Cy_', email: 'cy@school.example' });
		await Person.update({ deactivatedAt: '2026-01-01T00:00:00.000Z' }, { where: { id: 'p2' } });
		await Person.update({ seenAt: '2026-02-01T00:00:00.000Z' }, { where: { id: 'p1' } });
	});

	it('is searched by name and address, with signs taken literally', async () => {
		expect(await names({ q: 'SCHOOL' })).toEqual(['100% Cy_', 'Ada']);
		expect(await names({ q: '%' })).toEqual(['100% Cy_']);
		expect(await names({ q: 'y_' })).toEqual(['100% Cy_']);
		expect(await names({ q: "' OR 1=1 --" })).toEqual([]);
	});

	it('is narrowed by role and state', async () => {
		expect(await names({ role: 'dentist' })).toEqual(['Ada']);
		expect(await names({ state: 'deactivated' })).toEqual(['ben']);
		expect(await names({ state: 'active', role: 'student' })).toEqual([]);
	});

	it('is sorted whatever the capitals, both ways', async () => {
		expect(await names({})).toEqual(['100% Cy_', 'Ada', 'ben']);
		expect(await names({ sort: '-name' })).toEqual(['ben', 'Ada', '100% Cy_']);
		expect((await names({ sort: '-seen' }))[0]).toBe('Ada');
		expect(await names({ sort: 'email' })).toEqual(['Ada', 'ben', '100% Cy_']);
	});

	it.each(['name', '-name', 'email', '-created', 'seen'])(
		'is cut into pages that miss and repeat nobody: %s',
		async (sort) => {
			const all = await names({ sort });
			const seen: string[] = [];
			let cursor: string | null = null;
			do {
				const page = await people({ sort, limit: 1, ...(cursor && { cursor }) });
				expect(page.total).toBe(3);
				seen.push(...page.people.map(({ name }) => name));
				cursor = page.nextCursor;
			} while (cursor);
			expect(seen).toEqual(all);
		}
	);

	it('refuses a cursor of another order, and shows nothing secret', async () => {
		const { nextCursor } = await people({ limit: 1 });
		await expect(people({ sort: 'email', cursor: nextCursor })).rejects.toMatchObject({ status: 422 });
		expect(await findPerson('p1')).toEqual({
			...{
				id: 'p1',
				name: 'Ada',
				email: 'ada@school.example',
				roles: ['dentist', 'educator'],
				secondFactor: false
			},
			...{ createdAt: expect.any(String) as string, seenAt: '2026-02-01T00:00:00.000Z', deactivatedAt: null }
		});
		expect(await findPerson('nobody')).toBe(null);
	});
});

describe('the audit log', () => {
	const lines = async (query: object) => listAudit(auditQuerySchema.parse(query));

	async function at(day: string, subject: string, name = 'Ada') {
		vi.useFakeTimers({ toFake: ['Date'], now: new Date(day) });
		await recordAudit({ action: 'invited', subject, actor: { id: `id-${name}`, name } });
		vi.useRealTimers();
	}

	it('is filtered by words, action and whole days, the newest first, in pages', async () => {
		await at('2026-12-01T00:00:00.000Z', 'one');
		await at('2026-12-02T23:59:59.999Z', 'two', 'Ben');
		await at('2026-12-03T00:00:00.000Z', 'three');
		await recordAudit({ action: 'settings changed' });
		const subjects = async (query: object) => (await lines(query)).lines.map(({ subject }) => subject);
		expect(await subjects({ action: 'invited' })).toEqual(['three', 'two', 'one']);
		expect(await subjects({ from: '2026-12-02', to: '2026-12-02' })).toEqual(['two']);
		expect(await subjects({ q: 'BEN' })).toEqual(['two']);
		expect(await subjects({ q: 'id-Ben' })).toEqual(['two']);
		const page = await lines({ limit: 3 });
		expect(page).toMatchObject({ total: 4, lines: [{ who: { id: null, name: 'server' } }, {}, {}] });
		expect((await lines({ limit: 3, cursor: page.nextCursor })).lines.map(({ subject }) => subject)).toEqual([
			'one'
		]);
	});

	it('is exported whole, with cells a spreadsheet would run made harmless', async () => {
		await recordAudit({
			action: 'sign-in refused',
			subject: '=cmd()|x',
			actor: { id: null, name: '+1,"2"' }
		});
		for (let line = 0; line < 1500; line++) await recordAudit({ action: 'signed in', subject: `s${line}` });
		const text = await new Response(exportAudit({})).text();
		const rows = text.trimEnd().split('\r\n');
		expect(rows).toHaveLength(1502);
		expect(rows[0]).toBe('id,at,action,who,who id,subject,detail,address');
		expect(rows.at(-1)).toContain(`,"'+1,""2""",,'=cmd()|x,`);
		expect(new Set(rows.slice(1).map((row) => row.split(',')[0])).size).toBe(1501);
		expect(await new Response(exportAudit({ q: 'nothing like it' })).text()).toBe(`${rows[0]}\r\n`);
	});
});
