import type { ExpectationDto } from '$lib/schemas/expectation';
import { drawing } from '$lib/strings/drawing';
import { inWords, type Format } from '$lib/strings/format';
import { tooth as words } from '$lib/strings/tooth';

/** A fate that fewer roots than this have is left to the root's own page. */
const WORTH_A_WORD = 0.02;

/** A root and its canals in a sentence or two: how often there is more than one, and what becomes of them. */
export function rootSentence(expectation: ExpectationDto, format: Format): string {
	const { predictive } = expectation.questions[0];
	const several = words.severalCanals(
		inWords(predictive.mean),
		format.figure(predictive.mean, predictive.interval)
	);
	const fates = (['shared-exit', 'separate', 'meet-and-part', 'partly-shared'] as const)
		.flatMap((fate) => {
			const estimate = expectation.fates[fate];
			return estimate && estimate.mean >= WORTH_A_WORD ? [{ fate, ...estimate }] : [];
		})
		.sort((a, b) => b.mean - a.mean)
		.map(
			({ fate, mean, interval }) => `${drawing.fates[fate].toLowerCase()} ${format.figure(mean, interval)}`
		);
	return fates.length === 0 ? several : `${several} ${words.fatesOfAll(fates.join('; '))}`;
}
