import { endpoint } from '$lib/server/api/endpoint';
import { coverageOfTable } from '$lib/server/inference/coverageRequest';

export const GET = endpoint(() => coverageOfTable());
