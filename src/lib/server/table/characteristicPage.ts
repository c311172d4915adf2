import type { CharacteristicContent } from '$lib/entry/characteristic';
import type { Difference } from '$lib/entry/difference';
import { allowedActions } from '$lib/entry/workflow';
import { betaQuantile } from '../inference/special';
import {
	characteristicRevisions,
	characteristicSituation,
	type CharacteristicNow
} from './characteristicDesk';
import type { DeskPerson } from './entryDrafts';

/** A Beta distribution as it is drawn; null for a standard deviation. */
function shapeOf({ betaA: a, betaB: b }: CharacteristicContent) {
	if (a === null || b === null) return null;
	const interval: [number, number] = [betaQuantile(0.025, a, b), betaQuantile(0.975, a, b)];
	return { a, b, mean: a / (a + b), interval };
}

/** A characteristic in a list. */
export const toCharacteristicDto = ({
	name,
	finding,
	parameter,
	toothGroup,
	inForce,
	work
}: CharacteristicNow) => ({
	...{ name, finding, parameter, toothGroup, inForce, shape: shapeOf(inForce) },
	work: work && { state: work.state, author: work.author }
});

/** Everything the page of one shows. */
export async function readCharacteristicPage(now: CharacteristicNow, person: DeskPerson) {
	const { work, content, kind, number } = now;
	const revisions = await characteristicRevisions(now.name);
	return {
		...toCharacteristicDto(now),
		...{ kind, number, content, draftShape: shapeOf(content) },
		actions: allowedActions(characteristicSituation(now), person).filter(
			(action) => action !== 'withdraw' && action !== 'mark-poolable'
		),
		work: work && {
			...{ state: work.state, author: work.author, note: work.note, reviewer: work.reviewer ?? null },
			reasons: work.reasons ? (JSON.parse(work.reasons) as string[]) : [],
			own: (JSON.parse(work.editors) as string[]).includes(person.id)
		},
		revisions: revisions.reverse().map(({ before, after, ...revision }) => ({
			...{ ...revision, restorable: true },
			differences: before && compare(before, after)
		}))
	};
}

const compare = (before: CharacteristicContent, after: CharacteristicContent): Difference[] =>
	(Object.keys(after) as (keyof CharacteristicContent)[])
		.filter((part) => before[part] !== after[part])
		.map((part) => ({ part, before: String(before[part] ?? ''), after: String(after[part] ?? '') }));
