import { confluenceRequestSchema } from '$lib/schemas/confluence';
import { endpoint, readBody } from '$lib/server/api/endpoint';
import { confluenceOf } from '$lib/server/inference/confluenceRequest';

export const POST = endpoint(async (event) => confluenceOf(await readBody(event, confluenceRequestSchema)));
