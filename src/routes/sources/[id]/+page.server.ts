import { error } from '@sveltejs/kit';
import { CITATION_FORMATS } from '$lib/schemas/table';
import { serverDatabase } from '$lib/server/db/server';
import { cite } from '$lib/server/table/citations';
import { hasRole } from '$lib/server/people/roles';
import { entriesOfSource } from '$lib/server/table/entries';
import type { CslSource } from '$lib/server/table/literatureFiles';
import { measurementsOfSource } from '$lib/server/table/measurements';
import { findKeptSource } from '$lib/server/table/sourceRecords';
import { supplementsOfSource } from '$lib/server/table/supplementsOfSource';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, locals }) => {
	const db = await serverDatabase();
	const source = await findKeptSource(db, params.id);
	if (!source) error(404, 'Unknown source.');
	const [entries, measurements, supplements] = await Promise.all([
		entriesOfSource(db, source.id),
		measurementsOfSource(source.id),
		supplementsOfSource(source.id)
	]);
	const citations = CITATION_FORMATS.map((format) => ({
		format,
		text: cite([source.csl as CslSource], format).trim()
	}));
	return {
		...{ source, citations, entries, measurements, ...supplements },
		mayKeep: hasRole(locals.user, 'educator')
	};
};
