import { redirect } from '@sveltejs/kit';
import { readSourcesPage } from '$lib/server/table/sourcesPage';
import { withQuery, type FilterFields } from '$lib/filterQuery';
import type { PageServerLoad } from './$types';

const NAMES = ['q', 'sort', 'limit', 'cursor'];
const USUAL_SORT = 'author';

export const load: PageServerLoad = async ({ url }) => {
	const typed: FilterFields = NAMES.flatMap((name) =>
		url.searchParams.getAll(name).map((value): [string, string] => [name, value.trim()])
	);
	const fields = typed.filter(([name, value]) => value !== '' && !(name === 'sort' && value === USUAL_SORT));
	// A form sends its blanks too; the address people keep is the short one.
	if (fields.length < typed.length) redirect(303, withQuery('/sources', fields));
	return { fields, ...(await readSourcesPage(fields, USUAL_SORT)) };
};
