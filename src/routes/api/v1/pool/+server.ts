import { poolRequestSchema } from '$lib/schemas/pool';
import { endpoint, readBody } from '$lib/server/api/endpoint';
import { poolOf } from '$lib/server/inference/estimator';

export const POST = endpoint(async (event) => {
	const { studies, level } = await readBody(event, poolRequestSchema);
	return poolOf(studies, level);
});
