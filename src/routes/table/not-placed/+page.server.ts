import { listUnplaced } from '$lib/server/table/unplaced';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async () => ({ rows: await listUnplaced() });
