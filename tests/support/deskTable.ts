import type { RootFigures } from '$lib/entry/effect';
import type { EntryContent } from '$lib/entry/content';
import type { DeskPerson } from '$lib/server/table/entryDrafts';
import type { Estimate } from '$lib/server/table/estimates';
import { tableRevision } from '$lib/server/table/snapshot';

export const ada: DeskPerson = { id: 'ada', name: 'Ada Aas', roles: ['educator'] };
export const bo: DeskPerson = { id: 'bo', name: 'Bo Berg', roles: ['educator'] };
export const cy: DeskPerson = { id: 'cy', name: 'Cy Dahl', roles: ['educator', 'administrator'] };
export const student: DeskPerson = {
	id: 'sam',
	name: 'Sam Ek',
	roles: ['student', 'dentist', 'administrator']
};

/** A sample of 100 roots of the source that made-up literature has. */
export function content(change: Partial<EntryContent> = {}): EntryContent {
	const figure = (category: string, count: number) => ({
		...{ category, count, percent: null, countDerived: false, note: '' }
	});
	return {
		...{ source: 'adams-2001', locator: 'table 2', provenance: 'read', tooth: 'maxillary-first-molar' },
		...{ root: 'MB', scope: 'all', country: 'TUR', method: 'cbct', subgroup: 'all', total: 100 },
		measure: 'configuration',
		figures: [figure('1', 40), figure('2', 25), figure('2-1', 35)],
		...change
	};
}

/** Figures of a root that say only which revision of the table they are of. */
export const figuresAt = (revision: number): RootFigures => ({
	...{ studies: revision, orifices: [], fates: [], questions: [] }
});

/** Stands in for the estimator. */
export const fakeEstimate: Estimate = async (roots) => {
	const revision = await tableRevision();
	return { revision, roots: roots.map((place) => ({ ...place, figures: figuresAt(revision) })) };
};
