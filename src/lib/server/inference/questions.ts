/** The samples that answer each question of one root: the same teeth once (inference, section 2). Pure. */
import { answersOf } from './answers';
import type { Answers } from './answers';
import { samplesLeft } from './filters';
import type { LeftOut } from './filters';
import { groupBy } from './samples';
import type { Sample } from './samples';
import type { RootTable, TableIndex } from './tableIndex';
import { QUESTION_IDS } from './types';
import type { Filters, QuestionId, QuestionStudy, Study } from './types';

/** Methods from the one that sees most; any other comes last. */
const METHOD_ORDER = [
	'micro-ct',
	'clearing',
	'sectioning',
	'cbct',
	'microscope',
	'mixed',
	'clinical',
	'radiograph'
];

/**
 * Measures in the order they are preferred. Section 2 names configuration, canal-count and feature; the two kinds of
 * confluence, which it does not place, stand after the full tables they are an excerpt of.
 */
const MEASURE_ORDER = ['configuration', 'confluence', 'extra-canal-confluence', 'canal-count', 'feature'];

/** Measures that, where there is any sample of them, are the only ones to answer a question of M roots. */
const OWN_MEASURE: Partial<Record<QuestionId, string>> = { q3: 'feature', q8: 'extra-canal-confluence' };

/** One sample's answer to one question. */
export interface Candidate {
	sample: Sample;
	study: Study;
}

/** What the samples of a root answer under some filters. */
export interface RootQuestions {
	chosen: Record<QuestionId, Candidate[]>;
	/** Every sample left by the filters, with its answers, chosen or not. */
	read: { sample: Sample; answers: Answers }[];
	leftOut: LeftOut[];
}

/** Reads every sample of a root and chooses one a source and question. */
export function readQuestions(index: TableIndex, table: RootTable, filters: Filters): RootQuestions {
	const { samples, leftOut } = samplesLeft(table, index.sources, filters);
	// Only a sample that lost categories to a combined-country one has to be read anew.
	const read = samples.map((sample) => ({
		sample,
		answers: table.answers.get(sample) ?? answersOf(sample, samples)
	}));
	const chosen = Object.fromEntries(
		QUESTION_IDS.map((id) => {
			const candidates: Candidate[] = [];
			for (const { sample, answers } of read) {
				const study = answers.studies[id];
				if (study) candidates.push({ sample, study });
			}
			return [id, onePerSource(preferred(id, candidates))];
		})
	) as Record<QuestionId, Candidate[]>;
	return { chosen, read, leftOut };
}

/** `middle-mesial` before configurations, and then only such samples; `extra-canal-confluence` likewise. */
function preferred(id: QuestionId, candidates: readonly Candidate[]): readonly Candidate[] {
	const measure = OWN_MEASURE[id];
	if (measure === undefined) return candidates;
	const own = candidates.filter(({ sample }) => sample.measure === measure);
	return own.length > 0 ? own : candidates;
}

/**
 * The best candidate of each source. Country is no part of it: the page counts a source once, and its separate
 * countries are one sample only where the table has their sum.
 */
export function onePerSource<T extends Candidate>(candidates: readonly T[]): T[] {
	return [...groupBy(candidates, ({ sample }) => sample.source).values()].map((group) =>
		group.reduce((best, each) => (comesBefore(each, best) ? each : best))
	);
}

function comesBefore(a: Candidate, b: Candidate): boolean {
	const one = rank(a);
	const other = rank(b);
	const place = one.findIndex((value, index) => value !== other[index]);
	return place >= 0 && one[place] < other[place];
}

/** Smaller comes first: `whole` before `single` (one root of incisors and canines), method, measure, larger total. */
function rank({ sample, study }: Candidate): number[] {
	const place = (order: readonly string[], name: string) =>
		order.includes(name) ? order.indexOf(name) : order.length;
	return [
		sample.root === 'whole' ? 0 : 1,
		place(METHOD_ORDER, sample.method),
		place(MEASURE_ORDER, sample.measure),
		-study.total,
		sample.entries[0]
	];
}

/** A chosen answer with where it comes from. */
export function toQuestionStudy({ sample, study }: Candidate): QuestionStudy {
	return {
		source: sample.source,
		entry: sample.entries[0],
		locator: sample.locator,
		country: sample.country,
		method: sample.method,
		events: study.events,
		total: study.total
	};
}
