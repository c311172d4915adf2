import type { Sequelize } from 'sequelize';
import { beforeEach, describe, expect, it } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { cslSource, literature, observation } from '../../../../tests/support/madeUpLiterature';
import {
	QUESTIONS,
	gradeOf,
	passesAppraisal,
	profileOf,
	type AppraisalAnswers
} from '$lib/schemas/appraisal';
import { keptSourceSchema } from '$lib/schemas/sources';
import { filteredOut } from '../inference/filters';
import { SourceRevision } from '../db/models/intake';
import { Source, TableRevision } from '../db/models/literature';
import type { Estimate } from './estimates';
import { seedLiterature } from './seed';
import { readSnapshot, tableRevision } from './snapshot';
import { fieldsOf, withFields } from './sourceFields';
import { changeSource, createSource, findKeptSource, removeSource, revisionsOfSource } from './sourceRecords';

const editor = { id: 'ida', name: 'Ida Editor' };
const still: Estimate = async () => ({ revision: await tableRevision(), roots: [] });
const answers = (change: Partial<AppraisalAnswers> = {}) =>
	({ ...Object.fromEntries(QUESTIONS.map((question) => [question, 'yes'])), ...change }) as AppraisalAnswers;

let db: Sequelize;
beforeEach(async () => {
	db = await temporaryDatabase();
	const sources = [cslSource('adams-2001'), cslSource('unused-2001')];
	await seedLiterature(db, literature({ sources, observations: [observation()] }));
});
const change = (id: string, expected: number, what: Parameters<typeof changeSource>[4]) =>
	changeSource(db, editor, id, expected, what, still);

describe('a source', () => {
	it('that is added gets an id people can read, and one of its own', async () => {
		const csl = cslSource('', { author: [{ family: 'Núñez de Vela' }] });
		expect(await createSource(db, editor, csl, 'Found.')).toBe('nunez-de-vela-2001');
		expect(await createSource(db, editor, csl, 'Found.')).toBe('nunez-de-vela-2001b');
		const kept = await findKeptSource(db, 'nunez-de-vela-2001');
		expect(keptSourceSchema.parse(kept)).toEqual(kept);
		expect(kept!.revision).toBe(1);
	});

	it('keeps every state it had, and refuses an edit of an older one', async () => {
		expect(
			await change('adams-2001', 0, { csl: cslSource('adams-2001', { title: 'Better' }), why: 'Typo.' })
		).toBe(1);
		const late = await change('adams-2001', 0, {
			csl: cslSource('adams-2001', { title: 'Worse' }),
			why: 'Late.'
		});
		expect(late).toMatchObject({ stale: true, revision: 1, current: { csl: { title: 'Better' } } });
		expect(
			await change('adams-2001', 1, { csl: cslSource('adams-2001', { title: 'Better' }), why: 'Same.' })
		).toBe(1);
		const [revision] = await revisionsOfSource('adams-2001');
		expect(revision).toMatchObject({ who: 'Ida Editor', why: 'Typo.', after: { csl: { title: 'Better' } } });
		expect(revision.before!.csl.title).toBe('Canals as adams-2001 saw them');
		await expect(SourceRevision.update({ why: 'other' }, { where: {} })).rejects.toMatchObject({
			original: { message: expect.stringContaining('append-only') as string }
		});
		expect(await change('nobody', 0, { why: 'x' })).toBeNull();
	});

	it('that was edited is left alone by later files', async () => {
		await change('adams-2001', 0, { csl: cslSource('adams-2001', { title: 'Better' }), why: 'Typo.' });
		const sources = [cslSource('adams-2001', { title: 'As the file has it' })];
		await seedLiterature(db, literature({ sources, observations: [observation()] }));
		expect((await Source.findByPk('adams-2001'))!.title).toBe('Better');
	});

	it('that is retracted leaves the table of the estimator with the revision that says so', async () => {
		const before = await TableRevision.count();
		const retraction = { reason: 'Figures invented.', notice: '10.5555/n' };
		await change('adams-2001', 0, { retraction, why: 'Notice seen.' });
		expect(await TableRevision.count()).toBe(before + 1);
		const { sources } = await readSnapshot(db);
		expect(sources.find(({ id }) => id === 'adams-2001')!.retracted).toBe(true);
		expect((await findKeptSource(db, 'adams-2001'))!.retraction).toMatchObject(retraction);
		await change('adams-2001', 1, { retraction: null, why: 'A mistake.' });
		expect(await TableRevision.count()).toBe(before + 2);
		// Nothing rests on the other one, and a title moves nothing.
		await change('unused-2001', 0, { retraction, why: 'Notice seen.' });
		await change('adams-2001', 2, { csl: cslSource('adams-2001', { title: 'Better' }), why: 'Typo.' });
		expect(await TableRevision.count()).toBe(before + 2);
	});

	it('that is appraised can be asked for by that', async () => {
		await change('adams-2001', 0, {
			appraisal: { answers: answers({ 'sample-size': 'partly' }), note: '' },
			why: 'Appraised.'
		});
		const { sources } = await readSnapshot(db);
		const [figure, facts] = [{ source: 'adams-2001', country: '', method: 'cbct', total: 10 }, sources[0]];
		expect(facts.appraisal).toBe('some');
		expect(filteredOut(figure, facts, { appraisal: 'any' })).toBeNull();
		expect(filteredOut(figure, facts, { appraisal: 'some' })).toBeNull();
		expect(filteredOut(figure, facts, { appraisal: 'low' })).toMatch(/appraisal/);
		expect(filteredOut(figure, sources[1], { appraisal: 'any' })).toMatch(/appraisal/);
	});

	it('is removed only where nothing rests on it and no file brings it back', async () => {
		expect(await removeSource(db, editor, 'adams-2001', 0, 'Not wanted.')).toBe(false);
		expect(await removeSource(db, editor, 'unused-2001', 0, 'Not wanted.')).toBe(false);
		const id = await createSource(db, editor, cslSource(''), 'Found.');
		expect(await removeSource(db, editor, id, 0, 'Not wanted.')).toMatchObject({ stale: true });
		expect(await removeSource(db, editor, id, 1, 'Not wanted.')).toBe(true);
		expect(await Source.findByPk(id)).toBeNull();
		expect(await revisionsOfSource(id)).toHaveLength(2);
	});
});

describe('the form of a source', () => {
	it('changes nothing where nothing is typed, and keeps what it does not show', () => {
		const csl = cslSource('a', {
			ISSN: '1234-5678',
			issued: { 'date-parts': [[2001, 5]] },
			author: [{ literal: 'Group' }]
		});
		expect(withFields(csl, fieldsOf(csl))).toEqual(csl);
		expect(withFields(csl, { ...fieldsOf(csl), year: '', authors: 'Adams, A\nBrown', volume: '3' })).toEqual({
			...{ id: 'a', type: 'article-journal', title: csl.title, 'container-title': 'Journal of Roots' },
			...{ ISSN: '1234-5678', volume: '3', author: [{ family: 'Adams', given: 'A' }, { family: 'Brown' }] }
		});
	});
});

describe('an appraisal', () => {
	it('has the concern of its worst answer, by domain and as a whole', () => {
		expect(gradeOf(answers())).toBe('low');
		const mixed = answers({ 'sample-size': 'unclear', 'agreement-figure': 'no' });
		expect(profileOf(mixed)).toEqual({
			sample: 'some',
			method: 'low',
			agreement: 'high',
			completeness: 'low'
		});
		expect(gradeOf(mixed)).toBe('high');
		expect(passesAppraisal('high', 'some')).toBe(false);
	});
});
