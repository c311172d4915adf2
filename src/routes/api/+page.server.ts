import { describeOperations } from '$lib/server/api/openapi';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = () => ({ operations: describeOperations() });
