import { confluence } from '$lib/strings/confluence';
import type { LevelDto } from '$lib/schemas/level';
import { describe, expect, it } from 'vitest';
import { inventedAnswer } from '../../../../tests/support/confluenceAnswer';
import { formatFor } from '$lib/strings/format';
import { recordText, saidOf, type RecordInput } from './recordText';
import { readState } from './state';

const level: LevelDto = {
	tableRevision: 7,
	level: { mean: 2.39, sd: 0.41, interval: [1.59, 3.19] },
	prior: 'flat',
	measurements: [{ kind: 'cone-mark', level: 3, sd: 0.5, assumed: true, sources: [] }],
	secondLength: { mean: 17.11, interval: [16.31, 17.91] },
	coneCutFromTip: 2.39,
	diameterAtConfluence: 0.3934,
	coneNotes: [],
	disagreement: null,
	assumed: ['cone-mark'],
	notes: [],
	cautions: ['A caution of the level.']
};

function record(changes: Partial<RecordInput> = {}, query = 'search=microscope') {
	return recordText({
		format: formatFor(),
		tooth: 'Upper first molar',
		root: 'Mesiobuccal root',
		canals: ['MB1', 'MB2'],
		state: readState(
			new URLSearchParams(`canals=2&${query}&cone-mark=positive&draw=unclear&file-contact=negative`)
		),
		line: { value: 0.9, from: 'usual' },
		answer: inventedAnswer({ cautions: ['A caution of this answer alone.', ...confluence.cautions.joining] }),
		level: null,
		date: '2026-12-01',
		address: 'http://localhost:3000/teeth/x/y/join?canals=2',
		...changes
	});
}

describe('the text for the record', () => {
	it('says what was said, what follows with its ranges, what it rests on, and the cautions', () => {
		expect(record()).toBe(`Do the canals join? An estimate from published samples
Upper first molar, mesiobuccal root
2026-12-01 (UTC), table revision 7

Canals negotiated: 2 (MB1, MB2)
Orifices seen: Not stated
Search: Microscope, no troughing
Findings, in order:
1. Cone mark: positive, a groove, nick or pierce [accuracy assumed]
2. Draw test: unclear
3. File contact: negative, no contact

Estimate, 95 % range in brackets
The canals meet somewhere: 96 % (83 to 99 %), before the findings 61 % (27 to 88 %)
- Meet and share one exit: 94 % (81 to 99 %)
- Meet, then part again: 2 % (0 to 5 %)
- Stay separate: 4 % (1 to 17 %)
Another canal is still hidden: 5 % (1 to 14 %)

Advice: Treat as joined. The canals share one exit with at least the probability you ask for.
A caution of this answer alone.
The line is at 90 % for a shared exit, the usual one.

What it rests on
From 12 sources on this root.
One of the nine questions behind this answer has no sample of this root: its figures are borrowed from other roots.
No accuracy was ever published for: cone mark, search by microscope, no troughing. The figures used for them are assumptions of the editors.
Findings are taken as independent.

Cautions
${confluence.cautions.joining.map((caution) => `- ${caution}\n`).join('')}- No patient identity belongs in this product.

The same answer: http://localhost:3000/teeth/x/y/join?canals=2`);
	});

	it('says the level with its ranges and what of it is assumed', () => {
		const said = record({ level });
		expect(said).toContain('Level of the confluence: 2.4 mm above the common end (1.6 to 3.2 mm)');
		expect(said).toContain('Second cone: 17.1 mm (16.3 to 17.9 mm)');
		expect(said).toContain('Cut 2.4 mm off its tip: the canal is 0.39 mm wide at the confluence.');
		expect(said).toContain('Mark on the cone: assumed, not published');
		expect(said).toContain('- A caution of the level.');
		const disagreeing = { ...level, disagreement: { pValue: 0.01, consistent: false } };
		expect(record({ level: disagreeing })).toContain('contradict each other');
		expect(said).not.toContain('contradict each other');
	});

	it('never gives a length without its condition unless the canals are treated as joined', () => {
		const decision = { threshold: 0.9, advice: 'undecided', furtherTestingCanChangeIt: true } as const;
		expect(record({ level, answer: inventedAnswer({ decision }) })).toContain(
			'Second cone: Only if they share one exit: 17.1 mm'
		);
		expect(record({ level })).not.toContain('Only if');
	});

	it('says that the line is reached by assumed findings alone', () => {
		const decision = { threshold: 0.9, advice: 'undecided', furtherTestingCanChangeIt: false } as const;
		const said = record({ answer: inventedAnswer({ decision }), line: { value: 0.9, from: 'device' } });
		expect(said).toContain('Advice: Undecided: plan as separate.');
		expect(said).toContain('with their weight halved the line is not reached');
		expect(said).toContain('The line is at 90 % for a shared exit, as kept on this device.');
	});

	it('keeps findings in their order and names the filters', () => {
		const { steps } = inventedAnswer();
		const said = record(
			{ answer: inventedAnswer({ steps: [steps[2], steps[0]] }) },
			'method=cbct&minTotal=50'
		);
		expect(said).toMatch(/1\. File contact: negative[^]*2\. Cone mark: positive/);
		expect(said).toContain('Samples narrowed to: method cbct, minTotal 50');
	});

	it('says neither findings nor a line where there is one canal, and has only plain spaces', () => {
		const said = record({
			state: readState(new URLSearchParams('canals=1')),
			canals: ['MB1'],
			answer: inventedAnswer({
				steps: [],
				decision: { threshold: 0.9, advice: null, furtherTestingCanChangeIt: null }
			})
		});
		expect(said).not.toContain('Findings, in order');
		expect(said).not.toContain('The line is at');
		expect(said).toContain('No advice. With one canal there is nothing to join.');
		expect(said).not.toContain('before the findings');
		expect(said).not.toMatch(/\u00a0/);
	});
});

describe('saidOf', () => {
	it('names how many roots were seen only where it was said', () => {
		const names = (query: string) =>
			saidOf({ state: readState(new URLSearchParams(query)), canals: ['B', 'P'] }).map(([name]) => name);
		expect(names('canals=2&rootsSeen=one')).toContain('Roots seen');
		expect(names('canals=2')).not.toContain('Roots seen');
	});
});
