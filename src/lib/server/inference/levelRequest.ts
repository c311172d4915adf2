import type { LevelDto, LevelRequest } from '$lib/schemas/level';
import { knownRoot } from '../api/places';
import { Problem } from '../api/problem';
import { findingCharacteristics } from '../table/characteristics';
import { measurementsOf } from '../table/measurements';
import { publishedLevel } from '../table/publishedLevel';
import { tableRevision } from '../table/snapshot';
import { characteristicsFor } from './characteristics';
import { answerLevel, levelProblems } from './levelAnswer';

/**
 * Answers a request for the level of a confluence. Without tooth and root the prior is flat and the characteristics
 * are those that hold for any tooth.
 * @throws Problem 404 for an unknown tooth or root, 422 naming the field for anything else that cannot be answered
 */
export async function levelOf(request: LevelRequest): Promise<LevelDto> {
	const { tooth = '', root = '' } = request;
	const place = request.tooth === undefined ? null : knownRoot(tooth, root);
	const characteristics = characteristicsFor(await findingCharacteristics(), tooth, root);
	const mistakes = levelProblems(request, characteristics);
	if (mistakes.length > 0) throw new Problem(422, 'This cannot be answered as it stands.', mistakes);
	const prior = place && publishedLevel(await measurementsOf(place.tooth.id), place.root.id);
	return { tableRevision: await tableRevision(), ...answerLevel(request, characteristics, prior) };
}
