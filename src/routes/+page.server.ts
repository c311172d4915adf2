import { redirect } from '@sveltejs/kit';
import { nearWords, search } from '$lib/server/search/search';
import { listTeeth } from '$lib/server/table/teeth';
import type { PageServerLoad } from './$types';

const MOST_CHARACTERS = 100;
const MOST_HITS = 30;

export const load: PageServerLoad = async ({ url, locals }) => {
	const query = (url.searchParams.get('q') ?? '').trim().slice(0, MOST_CHARACTERS);
	const [{ hits, exact }, teeth] = await Promise.all([
		search(query, locals.preferences.numbers, MOST_HITS),
		listTeeth()
	]);
	// One typed phrase is enough where it can mean one thing only.
	if (exact) redirect(303, exact);
	const near = query !== '' && hits.length === 0 ? await nearWords(query) : [];
	return { query, hits, near, teeth };
};
