import type { ExpectationDto } from '$lib/schemas/expectation';
import type { FeatureDto } from '$lib/schemas/teeth';
import { formatFor } from '$lib/strings/format';
import { describe, expect, it } from 'vitest';
import { featuresWithoutEvidence, lookFor } from './lookFor';
import { rootSentence } from './rootSentence';

const plain = (text: string) => text.replaceAll('\u00a0', ' ');
const summary = (mean: number, interval: [number, number]) => ({ mean, median: mean, interval });
const studies = (count: number) =>
	Array.from({ length: count }, (_, entry) => ({
		source: 'a',
		entry,
		locator: 'table 1',
		country: 'BRA',
		method: 'cbct',
		events: 1,
		total: 10
	}));

function feature(id: string, mean: number, interval: [number, number], samples: number): FeatureDto {
	const figures = summary(mean, interval);
	return { id, name: id, pooled: figures, predictive: figures, observed: null, studies: studies(samples) };
}

function root(name: string, mean: number, interval: [number, number], samples: number) {
	const question = {
		borrowed: samples === 0,
		predictive: summary(mean, interval),
		studies: studies(samples)
	};
	const fates = {
		'one-canal': { mean: 1 - mean, interval: [0, 1] },
		'shared-exit': { mean: mean * 0.6, interval: [0.1, 0.5] },
		separate: { mean: mean * 0.4, interval: [0.05, 0.4] },
		'meet-and-part': { mean: 0.001, interval: [0, 0.01] }
	};
	return {
		root: { id: name, name },
		expectation: { questions: [question], fates } as unknown as ExpectationDto
	};
}

const lines = (...args: Parameters<typeof lookFor>) =>
	lookFor(...args).map(({ what, figure, samples }) => plain(`${what}: ${figure}; ${samples}`));

describe('lookFor', () => {
	it('says what the figures say, the likeliest first, thin evidence last', () => {
		const roots = [root('MB root', 0.63, [0.3, 0.9], 30), root('DB root', 0.06, [0.01, 0.3], 5)];
		const features = [feature('delta', 0.9, [0.1, 1], 1), feature('isthmus', 0.3, [0.02, 0.8], 4)];
		expect(lines(roots, features, formatFor())).toEqual([
			'MB root: expect a second canal: about 6 in 10; in other populations 30 to 90 %; 30',
			'isthmus: about 3 in 10; in other populations 2 to 80 %; 4',
			'DB root: a second canal is uncommon: about 1 in 15; in other populations 1 to 30 %; 5',
			'delta: about 9 in 10; in other populations 10 to 100 %; 1'
		]);
	});

	it('takes nothing from a root whose figures are borrowed, and leaves out what is rare everywhere', () => {
		const rare = [feature('c-shape', 0.01, [0, 0.05], 5)];
		expect(lines([root('DL root', 0.8, [0.1, 1], 0)], rare, formatFor())).toEqual([]);
	});

	it('names what is rare on the whole but may be common somewhere', () => {
		expect(
			lines(
				[],
				[feature('c-shape', 0.02, [0, 0.2], 5)],
				formatFor(() => 'in-100')
			)
		).toEqual(['c-shape: about 1 in 50; in other populations 0 to 20 in 100; 5']);
	});
});

describe('featuresWithoutEvidence', () => {
	it('names in words what one would ask about and no sample reports', () => {
		expect(
			featuresWithoutEvidence('mandibular-second-molar', [feature('c-shape', 0.2, [0, 0.5], 9)])
		).toEqual([
			'Extra distolingual root (radix entomolaris)',
			'Middle mesial canal',
			'Isthmus between two canals'
		]);
		expect(featuresWithoutEvidence('maxillary-canine', [])).toEqual([]);
	});
});

describe('rootSentence', () => {
	it('has each figure with its range, and only fates worth a word', () => {
		expect(plain(rootSentence(root('MB', 0.5, [0.2, 0.8], 9).expectation, formatFor()))).toBe(
			'More than one canal: about 5 in 10, 50 % (20 to 80 %) in other populations. Of all such roots: meet and share one exit 30 % (10 to 50 %); stay separate 20 % (5 to 40 %).'
		);
		expect(plain(rootSentence(root('P', 0.01, [0, 0.04], 9).expectation, formatFor()))).toBe(
			'More than one canal: about 1 in 100, 1 % (0 to 4 %) in other populations.'
		);
	});
});
