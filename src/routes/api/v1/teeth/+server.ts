import { endpoint } from '$lib/server/api/endpoint';
import { listTeeth } from '$lib/server/table/teeth';

export const GET = endpoint(async () => ({ teeth: await listTeeth() }));
