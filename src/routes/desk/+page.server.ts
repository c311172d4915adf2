import { serverDatabase } from '$lib/server/db/server';
import { requireRole } from '$lib/server/people/roles';
import { deskCare, deskWork, evidenceByRoot } from '$lib/server/table/deskLists';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async () => {
	const person = requireRole('educator');
	const db = await serverDatabase();
	return {
		work: await deskWork(db, person.id),
		care: await deskCare(db),
		evidence: await evidenceByRoot(db)
	};
};
