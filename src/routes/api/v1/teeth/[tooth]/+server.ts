import { endpoint } from '$lib/server/api/endpoint';
import { knownTooth } from '$lib/server/api/places';
import { describeTooth } from '$lib/server/table/teeth';
import type { RequestEvent } from './$types';

export const GET = endpoint<RequestEvent>(({ params }) => describeTooth(knownTooth(params.tooth)));
