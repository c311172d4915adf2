import type { Fate } from '$lib/anatomy/sequence';
import type { LengthStanding } from '$lib/drawing/expectation';
import type { PicturedFinding } from '$lib/drawing/findingPicture';
import { count, mm, mmRange, NO_BREAK, type Format } from './format';

/** Interface texts of the drawings. */
export const drawing = {
	expectation: {
		orifices: 'orifices',
		rootEnd: 'root end',
		rulerUnit: 'mm',
		levelNotPublished: ['level not', 'published'],
		levelPublished: (levelMm: number, rangeMm?: readonly [number, number]) => [
			'meet at',
			rangeMm ? mmRange(rangeMm) : mm(levelMm)
		],
		levelRange: (rangeMm: readonly [number, number], drawnMm: number) =>
			`The published level of the confluence is a range, ${mmRange(rangeMm)} above the apex; it is drawn at its middle, ${mm(drawnMm)}.`,
		scale: 'Heights are to scale in mm above the root end; widths are not.',
		length: (lengthMm: number, standing: LengthStanding) =>
			({
				published: `Length ${mm(lengthMm)}, a published mean.`,
				unverified: `Length ${mm(lengthMm)}: unverified, recalled and not yet checked against its source.`,
				assumed: `No length of this root is in the table: ${mm(lengthMm)} is assumed.`
			})[standing],
		legend: 'Canal sequences, from orifice to exit',
		legendHint: 'Choose a sequence to see it alone; choose it again to see all.',
		alone: (sequence: string) => `Shown alone: ${sequence}.`,
		showAll: 'Show all sequences',
		alsoSeen: 'Also named by samples of this root',
		countedWith: (leaf: string) => `counted with ${leaf}`,
		strength: 'The stronger a stream is drawn, the more probable it is.',
		meeting: 'Canals meet here',
		dashed: 'Dashed: they meet, but no source gives the level',
		tooRare: 'too rare to draw',
		probability: (format: Format, probability: number, interval?: readonly [number, number]) =>
			interval === undefined ? format.percent(probability) : format.figure(probability, interval)
	},
	fates: {
		'one-canal': 'One canal',
		'shared-exit': 'Meet and share one exit',
		'meet-and-part': 'Meet, then part again',
		'partly-shared': 'Meet in part, share some exits',
		separate: 'Stay separate'
	} satisfies Record<Fate, string>,
	forest: {
		source: 'Source',
		place: 'Place in source',
		country: 'Country',
		method: 'Method',
		counts: 'Of roots',
		percent: 'Share (95 %)',
		weight: 'Weight',
		plot: (format: Format) => `Plot, 0 to 100${NO_BREAK}${format.unit}`,
		weightLabel: 'weight',
		marks: {
			secondary: 'quoted in another source',
			unverified: 'unverified'
		},
		group: (
			format: Format,
			name: string,
			samples: number,
			observed: readonly [number, number],
			weight: number | null
		) =>
			`${name}: ${count(samples)} ${samples === 1 ? 'sample' : 'samples'}, ${format.range(observed)}${
				weight === null ? '' : `, weight ${format.percent(weight)}`
			}`,
		of: (events: number, total: number) => `${count(events)} of ${count(total)}`,
		pooled: 'Pooled: the middle population',
		predictive: 'Predicted: a new population',
		noCountry: 'country not given',
		intervals: (weighed: boolean) =>
			`Square: a study, larger with ${weighed ? 'more weight' : 'more roots'}; line: its 95 % interval (Wilson). Diamond: pooled. Band: where a new population is expected, 95 %.`,
		weights:
			'Weight: the share of the information about the middle population that a sample gives. Where populations differ much, a large sample counts little more than a small one.',
		empty: 'No study answers this question for this root.'
	},
	coverage: {
		samples: 'samples left out in turn (logarithmic)',
		expected: (level: string) =>
			`Solid line: ${level}, what the ranges claim. Each dot is one question of one root.`,
		flag: (from: string) =>
			`Dashed line: ${from}. Diamonds: questions under it, or with under 70 % of samples in their 80 % range; they are named below.`
	},
	interval: {
		text: (format: Format, label: string, mean: number, interval: readonly [number, number]) =>
			`${label}: ${format.percent(mean)}, 95 % interval ${format.range(interval)}`
	},
	findings: {
		'cone-mark': {
			positive:
				'A cone to length in one canal, a file in the other: where the canals meet, the file marks the cone.',
			negative:
				'A cone to length in one canal, a file in the other: they do not touch, the cone comes out smooth.'
		},
		draw: {
			positive: 'Irrigant is drawn from one canal and its level falls in the other.',
			negative: 'Irrigant is drawn from one canal and its level stays in the other.'
		},
		'file-contact': {
			positive: 'Files in both canals touch where the canals meet, and the apex locator shows it.',
			negative: 'Files at length in both canals do not touch, and the apex locator shows nothing.'
		},
		'two-files': {
			positive:
				'One file is at full length; the second stops where the canals meet, so its handle stands higher.',
			negative: 'Both files stand at full length at the same time, their handles level.'
		},
		'angled-radiograph': {
			positive: 'An angled radiograph on which the canals seem to run together.',
			negative: 'An angled radiograph on which the canals seem to stay apart.'
		},
		'cbct-reading': {
			positive: 'Three sections of a CBCT: two canals, two canals nearer, one canal.',
			negative: 'Three sections of a CBCT, two canals in each.'
		}
	} satisfies Record<PicturedFinding, { positive: string; negative: string }>
};
