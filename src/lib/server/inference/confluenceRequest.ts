import { describeSequence } from '$lib/anatomy/sequence';
import { confluence as words } from '$lib/strings/confluence';
import { percent } from '$lib/strings/format';
import type { ConfluenceDto, ConfluenceRequest } from '$lib/schemas/confluence';
import type { Root, Tooth } from '$lib/anatomy/teeth';
import { knownRoot } from '../api/places';
import { Problem, type FieldError } from '../api/problem';
import type { ConfluenceAnswer } from './confluence';
import { validateQuestion, type ConfluenceQuestion } from './confluenceQuestion';
import { checkFilters } from './checkFilters';
import { estimator } from './estimator';
import type { RootAnswer } from './tasks';

/** A share this much above the range, on the screen's whole percents, is worth a caution. */
const OUTSIDE_BY = 0.01;

/**
 * Answers a request of the estimator: which root it is about, whether it can be asked at all, and the answer in the API's shape.
 * @throws Problem 404 for an unknown tooth or root, 422 naming the field for anything else that cannot be answered
 */
export async function confluenceOf(request: ConfluenceRequest): Promise<ConfluenceDto> {
	const { tooth, root } = placeOf(request);
	const { canals, orifices, search, threshold, findings } = request;
	const question: ConfluenceQuestion = { canals, orifices, search, threshold, findings };
	const mistakes = [...validateQuestion(question), ...unknownPairs(request, root)];
	if (mistakes.length > 0) throw new Problem(422, 'This cannot be answered as it stands.', mistakes);
	const filters = request.filters ?? {};
	await checkFilters(filters);

	const current = await estimator();
	const known = await current.root(tooth.id, root.id, filters);
	const answer = await current.confluence(tooth.id, root.id, filters, question);
	return toDto(answer, known, request, current.revision);
}

/** The root that a request is about: of a premolar, the number of roots seen decides. */
function placeOf({ tooth: toothId, root: rootId, rootsSeen }: ConfluenceRequest): {
	tooth: Tooth;
	root: Root;
} {
	const place = knownRoot(toothId, rootId);
	if (rootsSeen === undefined) return place;
	const refuse = (message: string) => new Problem(422, message, [{ path: 'rootsSeen', message }]);
	if (place.tooth.kind !== 'premolar') throw refuse('The number of roots is asked of premolars only.');
	const oneRoot = rootId === 'whole' || rootId === 'single';
	if (rootsSeen === 'one') {
		if (!oneRoot)
			throw refuse(`With one root there is no ${place.root.name.toLowerCase()}: ask for the root "single".`);
		return knownRoot(toothId, 'single');
	}
	const two = place.tooth.roots.filter((id) => id !== 'whole' && id !== 'single');
	if (oneRoot) throw refuse(`With two roots each is asked for alone: ask for the root ${two.join(' or ')}.`);
	return place;
}

/** With three canals a pair must name two canals of this root; that it names two at all is checked with the question. */
function unknownPairs({ canals, findings }: ConfluenceRequest, root: Root): FieldError[] {
	if (canals !== 3) return [];
	const names = root.canals[3].map(({ id }) => id);
	return findings.flatMap(({ pair }, index) => {
		const given = (pair ?? '').split('-').map((name) => name.trim());
		if (given.length !== 2 || given.every((name) => names.includes(name))) return [];
		const message = `The canals of this root are called ${names.join(', ')} here.`;
		return [{ path: `findings.${index}.pair`, message }];
	});
}

/** What a reader must know of the evidence before leaning on the answer, the weightiest first. */
function cautionsOf({ model, named, expectation }: RootAnswer, canals: number): string[] {
	if (canals < 2) return words.cautions.one;
	const borrowed = (id: string) =>
		model.questions.some((question) => question.id === id && question.borrowed);
	const cautions: string[] = [];
	// Roots that open with two canals are asked q4, those that divide below the orifice q6.
	if (model.hasEvidence && borrowed('q4') && borrowed('q6')) cautions.push(words.cautions.joiningNotStudied);
	const seen = named.filter(({ sequence }) => describeSequence(sequence).fate === 'meet-and-part');
	const most = Math.max(0, ...seen.map(({ max }) => max));
	if (most > expectation.fates['meet-and-part'].interval[1] + OUTSIDE_BY)
		cautions.push(words.cautions.meetAndPartSeen(percent(most)));
	return [...cautions, ...words.cautions.joining];
}

function toDto(
	answer: ConfluenceAnswer,
	root: RootAnswer,
	request: ConfluenceRequest,
	tableRevision: number
): ConfluenceDto {
	const { model } = root;
	const sources = [
		...new Set(model.questions.flatMap(({ evidence }) => evidence.map(({ source }) => source)))
	].sort();
	const { superseded, decision } = answer;
	const supersededNote = (test: string) =>
		superseded?.test === test ? words.notes.superseded(superseded.test, superseded.by) : null;
	const notes = [words.notes.independent];
	if (superseded) notes.push(words.notes.superseded(superseded.test, superseded.by));
	if (request.canals === 3) notes.push(words.notes.threeCanals, words.notes.fourthCanal);
	if (!model.hasEvidence) notes.push(words.notes.noEvidence);
	return {
		tableRevision,
		prior: answer.prior,
		posterior: answer.posterior,
		steps: answer.steps.map((step) => ({ ...step, note: supersededNote(step.finding.test) })),
		next: answer.next.map(({ test, bits, results, effort, risk }) => ({
			test,
			bits,
			results,
			effort,
			note: words.risks[risk]
		})),
		decision: {
			threshold: decision.threshold,
			advice: decision.advice,
			furtherTestingCanChangeIt: decision.advice === null ? null : decision.furtherTestingCanChangeIt
		},
		evidence: {
			studies: sources.length,
			sources,
			borrowed: model.questions.filter(({ borrowed }) => borrowed).map(({ id }) => id)
		},
		assumed: answer.assumed,
		notes,
		cautions: cautionsOf(root, request.canals)
	};
}
