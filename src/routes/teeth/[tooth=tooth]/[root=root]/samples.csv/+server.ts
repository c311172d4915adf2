import { readFilterFields } from '$lib/filterQuery';
import { endpoint } from '$lib/server/api/endpoint';
import { fileResponse } from '$lib/server/root/fileResponse';
import { rootForFile } from '$lib/server/root/rootForFile';
import { samplesCsv } from '$lib/server/root/samplesFile';
import { standingsOf } from '$lib/server/table/standings';

export const GET = endpoint(async ({ params, url }) => {
	const filters = readFilterFields(url.searchParams);
	const { name, expectation, sources } = await rootForFile(params, filters);
	const entries = expectation.questions.flatMap(({ studies }) => studies.map(({ entry }) => entry));
	const csv = samplesCsv(expectation, sources, await standingsOf(entries), filters);
	return fileResponse(csv, 'text/csv; charset=utf-8; header=present', `${name}.csv`);
});
