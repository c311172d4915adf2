import { error } from '@sveltejs/kit';
import { serverDatabase } from '$lib/server/db/server';
import { findEntry } from '$lib/server/table/entries';
import { sourcesById } from '$lib/server/table/sources';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params }) => {
	const entry = /^\d{1,15}$/.test(params.entry)
		? await findEntry(await serverDatabase(), Number(params.entry))
		: null;
	if (!entry) error(404, 'Unknown entry.');
	const { revisions, ...rest } = entry;
	return {
		entry: rest,
		revisions: revisions.map(({ before, after, ...revision }) => ({
			...revision,
			changed: before === null ? [] : changedFields(before, after)
		})),
		source: (await sourcesById([entry.source]))[entry.source]
	};
};

/** Names of what differs between two states of an entry. */
function changedFields(before: unknown, after: unknown): string[] {
	const [was, is] = [before, after].map((state) => (state ?? {}) as Record<string, unknown>);
	return Object.keys(is).filter((name) => JSON.stringify(was[name]) !== JSON.stringify(is[name]));
}
