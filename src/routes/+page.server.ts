import { redirect } from '@sveltejs/kit';
import { lookUp } from '$lib/anatomy/lookup';
import { toothOf } from '$lib/anatomy/teeth';
import { placeAddress } from '$lib/addresses';
import { listTeeth } from '$lib/server/table/teeth';
import type { PageServerLoad } from './$types';

const MOST_CHARACTERS = 100;

export const load: PageServerLoad = async ({ url, locals }) => {
	const query = (url.searchParams.get('q') ?? '').trim().slice(0, MOST_CHARACTERS);
	const hits = lookUp(query, locals.preferences.numbers).map((hit) => ({
		...hit,
		name: toothOf(hit.tooth)?.name ?? hit.tooth,
		address: placeAddress(hit.tooth, hit.root)
	}));
	// One typed phrase is enough where it can mean one thing only.
	if (hits[0]?.exact) redirect(303, hits[0].address);
	return { query, hits, teeth: await listTeeth() };
};
