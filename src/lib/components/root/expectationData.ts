import { describeSequence } from '$lib/anatomy/sequence';
import type { ExpectationData } from '$lib/drawing/expectation';
import { formatFor } from '$lib/strings/format';
import { root as words } from '$lib/strings/root';

/** A length or level with its standing, as the drawing needs it. */
interface Placed {
	mm: number;
	range: [number, number] | null;
	source: string | null;
	locator: string | null;
	verified: boolean;
}

/** What the drawing of a root takes from published measurements. */
export interface RootShape {
	length: Placed;
	confluence: Placed | null;
}

/**
 * Turns an expectation and the published shape of its root into what the drawing takes.
 * A published level of the confluence is that of canals which share an exit, so only those sequences are drawn at it.
 */
export function toExpectationData(
	sequences: readonly { sequence: string; mean: number; interval: [number, number] }[],
	shape: RootShape,
	rare: readonly { sequence: string }[] = []
): ExpectationData {
	const levelOf = (sequence: string) =>
		describeSequence(sequence).fate === 'shared-exit' && shape.confluence ? shape.confluence.mm : null;
	return {
		sequences: sequences.map(({ sequence, mean, interval }) => ({
			sequence,
			probability: mean,
			interval,
			joinLevelMm: levelOf(sequence)
		})),
		...(rare.length > 0 && {
			alsoSeen: rare.map(({ sequence }) => ({ sequence, joinLevelMm: levelOf(sequence) }))
		}),
		rootLengthMm: shape.length.mm,
		lengthStanding:
			shape.length.source === null ? 'assumed' : shape.length.verified ? 'published' : 'unverified',
		joinRangeMm: shape.confluence?.range ?? null
	};
}

/** What the drawing says, in words: the commonest sequences with their ranges. */
export function describeExpectation(
	expectation: { sequences: readonly { sequence: string; mean: number; interval: [number, number] }[] },
	format = formatFor()
): string {
	const likely = [...expectation.sequences]
		.sort((a, b) => b.mean - a.mean)
		.slice(0, 3)
		.map(
			({ sequence, mean, interval }) => `${sequence}: ${format.percent(mean)} (${format.range(interval)})`
		);
	return words.drawingText(likely.join('; '));
}
