import { redirect } from '@sveltejs/kit';
import { withQuery } from '$lib/filterQuery';
import { readTablePage } from '$lib/server/table/tablePage';
import { TABLE, isLonger, readTableFields } from '$lib/tableQuery';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ url }) => {
	const fields = readTableFields(url.searchParams);
	// A form sends its blanks too; the address people keep is the short one.
	if (isLonger(url.searchParams)) redirect(303, withQuery(TABLE, fields));
	return { fields, ...(await readTablePage(fields)) };
};
