/** What a sample answers (inference, section 2): yes/no counts for the questions it can speak to. Pure. */
import { describeSequence, isSequence } from '$lib/anatomy/sequence';
import type { Leaf } from '$lib/anatomy/sequence';
import { toothOf } from '$lib/anatomy/teeth';
import { answersFromLeaves } from './distribution';
import { ROUNDING_SHARE } from './samples';
import type { Sample } from './samples';
import { QUESTION_IDS } from './types';
import type { QuestionId, Study } from './types';

/** A sample's answers, and in words why it has none. */
export interface Answers {
	studies: Partial<Record<QuestionId, Study>>;
	/** Set when `studies` is empty. */
	reason: string | null;
}

/** Unnamed roots a table may leave, as a share of its roots with more than one canal, and still be complete. */
const COMPLETE_SHARE = 0.02;

/** Unnamed multi-canal roots a partial table may leave, as a share of its two-orifice roots, and still answer q4. */
const PARTIAL_SHARE = 0.1;

/** Roots known to have two canals say nothing of how often there are more than one, or three. */
const TWO_CANAL_QUESTIONS: readonly QuestionId[] = ['q2', 'q4', 'q5', 'q6', 'q7'];

/**
 * Reads a sample against the tree.
 *
 * @param sample the sample
 * @param siblings samples of the same root left by the same filters; a partial table of classes may need the
 *   canal count of the same teeth beside it
 */
export function answersOf(sample: Sample, siblings: readonly Sample[]): Answers {
	const studies = studiesOf(sample, siblings);
	// A question nobody was asked (no root reached it) is no answer.
	for (const id of QUESTION_IDS) if (studies[id]?.total === 0) delete studies[id];
	const answered = Object.keys(studies).length > 0;
	return { studies, reason: answered ? null : whyNone(sample) };
}

function studiesOf(sample: Sample, siblings: readonly Sample[]): Answers['studies'] {
	switch (sample.measure) {
		case 'configuration':
			return fromClasses(sample, siblings);
		case 'canal-count':
			return withQuestion('q1', sample.grant === 'every' ? fromCanalCount(sample) : null);
		case 'feature':
			return fromFeature(sample);
		case 'confluence':
			return withQuestion('q4', joinedOf(sample));
		case 'extra-canal-confluence':
			return withQuestion('q8', sample.asked === 'M' ? joinedOf(sample) : null);
		default:
			return {};
	}
}

function withQuestion(question: QuestionId, study: Study | null): Answers['studies'] {
	return study ? { [question]: study } : {};
}

/** The named classes of a table (those other than `other`), also by leaf. A category that is no sequence is `other`. */
function namedClasses(sample: Sample): {
	named: Map<string, number>;
	leaves: Map<Leaf, number>;
	sum: number;
} {
	const named = new Map<string, number>();
	const leaves = new Map<Leaf, number>();
	let sum = 0;
	for (const [category, count] of sample.counts) {
		if (!isSequence(category)) continue;
		const { leaf } = describeSequence(category);
		named.set(category, count);
		leaves.set(leaf, (leaves.get(leaf) ?? 0) + count);
		sum += count;
	}
	return { named, leaves, sum };
}

function fromClasses(sample: Sample, siblings: readonly Sample[]): Answers['studies'] {
	const { total, grant } = sample;
	const { named, leaves, sum } = namedClasses(sample);
	const one = named.get('1');
	const studies: Answers['studies'] = {};
	if (grant === 'every') {
		if (one !== undefined) studies.q1 = { events: total - one, total };
		else if (named.size >= 3 && Math.abs(total - sum) <= ROUNDING_SHARE * total)
			studies.q1 = { events: total, total };
	}
	const multi = total - (one ?? 0);
	// A sum above the total by more than rounding contradicts itself and is no table.
	const complete =
		total - sum <= Math.max(1, COMPLETE_SHARE * multi) && sum - total <= Math.max(1, ROUNDING_SHARE * total);
	if (complete) {
		for (const id of QUESTION_IDS.slice(1)) {
			if (grant === 'every' || TWO_CANAL_QUESTIONS.includes(id)) studies[id] = answersFromLeaves(leaves, id);
		}
		return studies;
	}
	const joined = named.has('2') && named.has('2-1') ? fromPartial(sample, siblings, named, leaves) : null;
	return joined ? { ...studies, q4: joined } : studies;
}

/**
 * q4 from a partial table that names both `2` and `2-1`. Its multi-canal roots come from its own class `1`, from its
 * scope, or from a canal-count or MB2 figure of the same teeth (same source, root, scope, method and total).
 */
function fromPartial(
	sample: Sample,
	siblings: readonly Sample[],
	named: ReadonlyMap<string, number>,
	leaves: ReadonlyMap<Leaf, number>
): Study | null {
	const multi = multiCanalRoots(sample, siblings, named.get('1'));
	if (multi === null) return null;
	let namedMulti = 0;
	let twoOrifices = 0;
	for (const [category, count] of named) {
		const { orifices, width } = describeSequence(category);
		if (width > 1) namedMulti += count;
		if (orifices === 2) twoOrifices += count;
	}
	const unnamed = multi - namedMulti;
	const contradicted = -unnamed > Math.max(1, COMPLETE_SHARE * multi);
	return !contradicted && unnamed <= PARTIAL_SHARE * twoOrifices ? answersFromLeaves(leaves, 'q4') : null;
}

function multiCanalRoots(
	sample: Sample,
	siblings: readonly Sample[],
	one: number | undefined
): number | null {
	if (one !== undefined) return sample.total - one;
	if (sample.grant === 'two-canal') return sample.total;
	const same = siblings.filter(
		(other) =>
			other.source === sample.source &&
			other.root === sample.root &&
			other.scope === sample.scope &&
			other.country === sample.country &&
			other.method === sample.method &&
			other.total === sample.total
	);
	const single = same
		.find(({ measure, counts }) => measure === 'canal-count' && counts.has('1'))
		?.counts.get('1');
	if (single !== undefined) return sample.total - single;
	if (sample.asked !== 'MB') return null;
	return (
		same.find(({ measure, counts }) => measure === 'feature' && counts.has('mb2'))?.counts.get('mb2') ?? null
	);
}

/** q1 from canal counts: per root, and of whole teeth for premolars, incisors and canines. */
function fromCanalCount({ counts, total, tooth, asked }: Sample): Study | null {
	const kind = toothOf(tooth)?.kind;
	if (asked === 'whole' && kind !== 'premolar') return null;
	const one = counts.get('1');
	if (one !== undefined) return { events: total - one, total };
	const several = counts.get('2+');
	if (several !== undefined) return { events: several, total };
	const sum = [...counts.values()].reduce((all, count) => all + count, 0);
	if (sum === total) return { events: total, total };
	// Three canals are so rare in these teeth that those with two are those with more than one; any further count named
	// beside it belongs to them.
	const front = kind === 'incisor' || kind === 'canine';
	return front && counts.has('2') && sum <= total ? { events: sum, total } : null;
}

function fromFeature({ counts, total, tooth, asked, grant }: Sample): Answers['studies'] {
	if (grant !== 'every' || toothOf(tooth)?.kind !== 'molar') return {};
	const mb2 = counts.get('mb2');
	if (asked === 'MB' && mb2 !== undefined) return { q1: { events: mb2, total } };
	const middleMesial = counts.get('middle-mesial');
	if (asked === 'M' && middleMesial !== undefined) return { q3: { events: middleMesial, total } };
	return {};
}

/**
 * Joined among joined and separate. With only one of the two the other is its complement, unless the note says that
 * the figure is partial or that some were undetermined, or the total counts roots with one canal too (scope `all`).
 */
function joinedOf({ counts, total, note, grant, measure }: Sample): Study | null {
	const joined = counts.get('joined');
	const separate = counts.get('separate');
	if (joined !== undefined && separate !== undefined) return { events: joined, total: joined + separate };
	const ofTwoCanals = grant === 'two-canal' || measure === 'extra-canal-confluence';
	if (/\b(?:partial|undetermined)/i.test(note) || !ofTwoCanals) return null;
	if (joined !== undefined) return { events: joined, total };
	return separate === undefined ? null : { events: total - separate, total };
}

function whyNone(sample: Sample): string {
	switch (sample.measure) {
		case 'configuration':
			return 'A partial table: it does not say how many roots have one canal, and too many roots are in no class it names.';
		case 'canal-count':
			return sample.grant === 'every'
				? 'Gives some numbers of canals but not how many roots have just one.'
				: 'Counts canals in roots already known to have two.';
		case 'confluence':
		case 'extra-canal-confluence':
			return 'Gives only joined or only separate canals, and the rest cannot be taken for the other.';
		case 'foramen-count':
			return 'Counts exits, which does not tell how the canals run to them.';
		case 'root-count':
			return 'Counts roots, not canals.';
		case 'feature':
			return 'A feature of the tooth or root, not the course of its canals.';
		default:
			return 'Answers none of the nine questions.';
	}
}
