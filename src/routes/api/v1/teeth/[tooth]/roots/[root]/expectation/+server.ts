import { FILTER_LISTS, filtersOfQuery, filtersQuerySchema } from '$lib/schemas/common';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { knownRoot } from '$lib/server/api/places';
import { expectationOf } from '$lib/server/inference/expectationRequest';
import type { RequestEvent } from './$types';

export const GET = endpoint<RequestEvent>(({ params, url }) => {
	const { tooth, root } = knownRoot(params.tooth, params.root);
	return expectationOf(
		tooth,
		root,
		filtersOfQuery(readQuery(url.searchParams, filtersQuerySchema, FILTER_LISTS))
	);
});
