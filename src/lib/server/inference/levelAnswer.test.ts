import { levelRequestSchema, levelResponseSchema, type LevelRequest } from '$lib/schemas/level';
import { level as words } from '$lib/strings/level';
import { parse } from 'csv-parse/sync';
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { characteristicsFor } from './characteristics';
import { answerLevel, levelProblems } from './levelAnswer';
import type { FindingCharacteristic } from './types';

const csv = readFileSync('data/literature/finding-characteristics.csv', 'utf8');
const rows = parse<Record<string, string>>(csv, { columns: true }).map((row): FindingCharacteristic => ({
	finding: row.finding,
	parameter: row.parameter,
	toothGroup: row.tooth_group,
	betaA: null,
	betaB: null,
	sdMm: row.sd_mm === '' ? null : Number(row.sd_mm),
	basis: row.basis === 'assumed' ? 'assumed' : 'derived',
	sourceIds: row.source_ids.split(';').filter(Boolean),
	note: row.note
}));
const shipped = characteristicsFor(rows, '', '');
const matched = { tip: 0.25, taper: 0.06 };
const example: LevelRequest = {
	workingLengths: { first: 20.5, second: 19.5 },
	measurements: [{ kind: 'cone-mark', value: 3, coneShortBy: 0 }],
	canal: matched,
	cone: matched,
	secondShapedTo: 'full'
};
const problemsOf = (changes: Partial<LevelRequest>) =>
	levelProblems({ ...example, ...changes }, shipped).map(({ path }) => path);

describe('answerLevel with the shipped standard deviations', () => {
	it('answers the worked example in the shape of its schema', () => {
		const answer = answerLevel(example, shipped, null);
		expect(levelResponseSchema.parse({ tableRevision: 1, ...answer })).toEqual({
			tableRevision: 1,
			...answer
		});
		expect(answer.level.mean).toBeCloseTo(3, 7);
		expect(answer.secondLength.mean).toBeCloseTo(16.5, 7);
		expect(answer.secondLength.interval[0]).toBeCloseTo(19.5 - answer.level.interval[1], 12);
		expect(answer.coneCutFromTip).toBeCloseTo(3, 7);
		expect(answer.diameterAtConfluence).toBeCloseTo(0.43, 7);
		expect(answer.disagreement).toBeNull();
		expect(answer.prior).toBe('flat');
		expect(answer.assumed).toEqual(['cone-mark']);
	});

	it('says that a shortfall of 1.2 mm contradicts it', () => {
		const answer = answerLevel(
			{ ...example, measurements: [...example.measurements, { kind: 'cone-shortfall', value: 1.2 }] },
			shipped,
			null
		);
		expect(answer.disagreement!.pValue).toBeCloseTo(0.036, 3);
		expect(answer.disagreement!.consistent).toBe(false);
		expect(answer.cautions[0]).toContain('p = 0.036');
		expect(answer.assumed).toEqual(['cone-mark', 'cone-shortfall']);
		expect(answer.notes).toContain(words.notes.independent);
	});

	it('counts a published prior in and names it', () => {
		const prior = { mean: 4, sd: 0.5, source: 'someone-2020', locator: 'table 2' };
		const answer = answerLevel(example, shipped, prior);
		expect(answer.level.mean).toBeCloseTo(3.5, 6);
		expect(answer.prior).toEqual(prior);
		expect(answer.notes.join(' ')).toContain('someone-2020, table 2');
	});

	it('proposes no cut where it is not known how far the second canal was shaped', () => {
		const { secondShapedTo: _, ...unstated } = example;
		expect(answerLevel(unstated, shipped, null).coneCutFromTip).toBeNull();
		expect(answerLevel({ ...example, secondShapedTo: 'confluence' }, shipped, null).coneCutFromTip).toBe(0);
	});

	it('stays within 12 mm for a measurement above, and says that it is above', () => {
		const answer = answerLevel({ ...example, measurements: [{ kind: 'cbct', value: 14 }] }, shipped, null);
		expect(answer.level.interval[1]).toBeLessThanOrEqual(12);
		expect(answer.notes).toContain(words.notes.beyond(12));
	});
});

describe('levelProblems', () => {
	it('finds nothing wrong with the example', () => expect(problemsOf({})).toEqual([]));

	it.each<[string, LevelRequest['measurements'][number]]>([
		['measurements.0.value', { kind: 'cone-mark', value: 18, coneShortBy: 2.5 }],
		['measurements.0.value', { kind: 'cone-shortfall', value: 19.5 }],
		['measurements.0.value', { kind: 'file-contact', value: 19.6 }],
		['measurements.0.value', { kind: 'cbct', value: 19.5 }],
		['measurements.0.coneShortBy', { kind: 'cbct', value: 3, coneShortBy: 1 }]
	])('names %s of %o', (path, measurement) => {
		expect(problemsOf({ measurements: [measurement] })).toEqual([path]);
	});

	it('names a kind that the table holds no standard deviation of', () => {
		expect(levelProblems(example, characteristicsFor([], '', '')).map(({ path }) => path)).toEqual([
			'measurements.0.kind'
		]);
	});
});

describe('levelRequestSchema', () => {
	const pathsOf = (value: unknown) =>
		(levelRequestSchema.safeParse(value).error?.issues ?? []).map(({ path }) => path.join('.'));

	it.each<[string, unknown]>([
		['workingLengths.first', { ...example, workingLengths: { first: 4, second: 19 } }],
		['workingLengths.second', { ...example, workingLengths: { first: 20, second: 41 } }],
		['workingLengths', { ...example, workingLengths: undefined }],
		['measurements', { ...example, measurements: [] }],
		['measurements.0.kind', { ...example, measurements: [{ kind: 'guess', value: 3 }] }],
		['measurements.0.value', { ...example, measurements: [{ kind: 'cbct', value: -1 }] }],
		['canal.tip', { ...example, canal: { tip: 25, taper: 0.06 } }],
		['cone.taper', { ...example, cone: { tip: 0.25, taper: 6 } }],
		['secondShapedTo', { ...example, secondShapedTo: 'half' }],
		['tooth', { ...example, root: 'MB' }],
		['root', { ...example, tooth: 'maxillary-first-molar' }]
	])('names %s', (path, value) => expect(pathsOf(value)).toEqual([path]));
});
