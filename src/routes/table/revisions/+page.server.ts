import { serverDatabase } from '$lib/server/db/server';
import { numberOfPath } from '$lib/server/api/ifMatch';
import { listTableRevisions } from '$lib/server/table/tableRecord';
import type { PageServerLoad } from './$types';

const PAGE = 20;

export const load: PageServerLoad = async ({ url }) => {
	const before = numberOfPath(url.searchParams.get('before') ?? '') ?? undefined;
	return {
		...(await listTableRevisions(await serverDatabase(), { before, limit: PAGE })),
		origin: url.origin
	};
};
