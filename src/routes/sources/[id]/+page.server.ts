import { error } from '@sveltejs/kit';
import { serverDatabase } from '$lib/server/db/server';
import { entriesOfSource } from '$lib/server/table/entries';
import { measurementsOfSource } from '$lib/server/table/measurements';
import { findSource } from '$lib/server/table/sources';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params }) => {
	const db = await serverDatabase();
	const source = await findSource(db, params.id);
	if (!source) error(404, 'Unknown source.');
	const [entries, measurements] = await Promise.all([
		entriesOfSource(db, source.id),
		measurementsOfSource(source.id)
	]);
	return { source, entries, measurements };
};
