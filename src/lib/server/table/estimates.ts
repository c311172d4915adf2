import type { RootFigures } from '$lib/entry/effect';
import { ANSWERED_ROOTS } from '../inference/borrowing';
import { estimator } from '../inference/estimator';
import { rootFigures } from '../inference/preview';
import { askedRoot } from '../inference/scope';

/** A root the product answers for. */
export interface Place {
	tooth: string;
	root: string;
}

/** The main figures of some roots at one revision of the table. */
export interface Figures {
	revision: number;
	roots: (Place & { figures: RootFigures })[];
}

/** Works out the main figures of roots over the newest revision. */
export type Estimate = (roots: readonly Place[]) => Promise<Figures>;

/** By the estimator; one root after another, so that requests get their turn in between. */
export const estimateRoots: Estimate = async (roots) => {
	const current = await estimator();
	const answered: Figures['roots'] = [];
	for (const place of roots) {
		const { model, expectation } = await current.root(place.tooth, place.root, {});
		answered.push({ ...place, figures: rootFigures(model, expectation) });
	}
	return { revision: current.revision, roots: answered };
};

const key = ({ tooth, root }: Place) => `${tooth}|${root}`;
const ANSWERED = new Set(ANSWERED_ROOTS.map(key));

/** The roots that entries speak of and the product answers for, each once. */
export function placesOf(entries: readonly Place[]): Place[] {
	const places = entries.map(({ tooth, root }) => ({ tooth, root: askedRoot(tooth, root) }));
	const byKey = new Map(places.map((place) => [key(place), place]));
	return [...byKey.values()].filter((place) => ANSWERED.has(key(place)));
}
