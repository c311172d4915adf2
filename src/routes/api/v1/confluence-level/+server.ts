import { levelRequestSchema } from '$lib/schemas/level';
import { endpoint, readBody } from '$lib/server/api/endpoint';
import { levelOf } from '$lib/server/inference/levelRequest';

export const POST = endpoint(async (event) => levelOf(await readBody(event, levelRequestSchema)));
