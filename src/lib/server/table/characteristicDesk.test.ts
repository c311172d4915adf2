import type { Sequelize } from 'sequelize';
import { beforeEach, expect, it } from 'vitest';
import { ada, bo, fakeEstimate } from '../../../../tests/support/deskTable';
import { temporaryDatabase } from '../../../../tests/support/database';
import { literature } from '../../../../tests/support/madeUpLiterature';
import { checkCharacteristic, type CharacteristicText } from '$lib/entry/characteristic';
import {
	characteristicRevisions,
	moveCharacteristic,
	publishCharacteristic,
	readCharacteristic,
	restoreCharacteristic,
	saveCharacteristic
} from './characteristicDesk';
import { seedLiterature } from './seed';
import { readSnapshot } from './snapshot';
import { StaleEdit } from './deskProblem';

const NAME = 'cone-mark.positive-if-meet.any';
let db: Sequelize;
const files = (betaA: string) =>
	literature({
		characteristics: [
			{
				finding: 'cone-mark',
				parameter: 'positive-if-meet',
				tooth_group: 'any',
				beta_a: betaA,
				beta_b: '3',
				sd_mm: '',
				basis: 'assumed',
				source_ids: '',
				note: ''
			},
			{
				finding: 'level-cbct',
				parameter: 'sd',
				tooth_group: 'any',
				beta_a: '',
				beta_b: '',
				sd_mm: '0.5',
				basis: 'assumed',
				source_ids: '',
				note: betaA
			}
		]
	});
const inForce = async () =>
	(await readSnapshot(db)).characteristics.map(({ betaA, basis }) => [betaA, basis]);
const draft = {
	betaA: 30,
	betaB: 2,
	sdMm: null,
	basis: 'published' as const,
	sourceIds: 'adams-2001',
	note: 'table 3'
};
const number = async () => (await readCharacteristic(NAME))!.number;
const request = async (person = ada) => ({ name: NAME, person, expected: await number() });

beforeEach(async () => {
	db = await temporaryDatabase();
	await seedLiterature(db, files('17'));
});

it('a draft of a characteristic changes nothing until another puts it in force, and then the seed leaves it alone', async () => {
	await saveCharacteristic(db, await request(), draft);
	await moveCharacteristic(db, await request(), { action: 'ask-review', note: 'see table 3' });
	expect(await inForce()).toEqual([
		[17, 'assumed'],
		[null, 'assumed']
	]);
	await expect(publishCharacteristic(db, await request(), '', fakeEstimate)).rejects.toMatchObject({
		status: 403
	});
	await moveCharacteristic(db, await request(bo), { action: 'return', reasons: ['Which table?'] });
	await moveCharacteristic(db, await request(), { action: 'ask-review' });
	const { revision } = await publishCharacteristic(db, await request(bo), '', fakeEstimate);
	expect(revision).toBe(2);
	expect(await inForce()).toEqual([
		[30, 'published'],
		[null, 'assumed']
	]);
	await seedLiterature(db, files('18'));
	expect((await inForce()).sort()).toEqual(
		[
			[null, 'assumed'],
			[30, 'published']
		].sort()
	);
	const revisions = await characteristicRevisions(NAME);
	expect(revisions.map(({ state, who }) => [state, who])).toEqual([
		['draft', 'Ada Aas'],
		['in-review', 'Ada Aas'],
		['draft', 'Bo Berg'],
		['in-review', 'Ada Aas'],
		['published', 'Bo Berg']
	]);
	expect(revisions[4].before).toMatchObject({ betaA: 17 });
});

it('the second save on one revision is told what the first changed, and an old state can be restored', async () => {
	const both = await request();
	await saveCharacteristic(db, both, draft);
	const error = await saveCharacteristic(db, { ...both, person: bo }, { ...draft, betaA: 9 }).catch(
		(e: unknown) => e
	);
	expect(error).toBeInstanceOf(StaleEdit);
	expect((error as StaleEdit).clashes.map(({ part, yours, theirs }) => [part, yours, theirs])).toEqual([
		['betaA', '9', '30']
	]);
	await saveCharacteristic(db, await request(bo), { ...draft, betaA: 9 });
	await restoreCharacteristic(db, await request(), 1);
	expect((await readCharacteristic(NAME))!.content.betaA).toBe(30);
	await moveCharacteristic(db, await request(), { action: 'discard' });
	expect((await readCharacteristic(NAME))!.content.betaA).toBe(17);
});

it.each<[Partial<CharacteristicText>, string[]]>([
	[{}, []],
	[{ betaA: '0' }, ['betaA']],
	[{ betaB: 'many' }, ['betaB']],
	[{ betaA: '1e9' }, ['betaA']],
	[{ basis: 'guessed' }, ['basis']],
	[{ basis: 'derived', sourceIds: '' }, ['sourceIds']],
	[{ sourceIds: 'nobody' }, ['sourceIds']]
])('the check of %j names %j', (change, fields) => {
	const text = {
		betaA: '17',
		betaB: '3',
		sdMm: '',
		basis: 'published',
		sourceIds: 'adams-2001',
		note: '',
		...change
	};
	const { content, remarks } = checkCharacteristic(text, 'beta', (id) => id === 'adams-2001');
	expect(remarks.filter(({ level }) => level === 'error').map(({ path }) => path)).toEqual(fields);
	expect(content === null).toBe(fields.length > 0);
});
