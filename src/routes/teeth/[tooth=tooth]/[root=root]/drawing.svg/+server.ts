import { describeExpectation, toExpectationData } from '$lib/components/root/expectationData';
import { readView } from '$lib/components/root/rootView';
import { readFilterFields } from '$lib/filterQuery';
import { endpoint } from '$lib/server/api/endpoint';
import { drawingSvg } from '$lib/server/root/drawingFile';
import { drawingNotes } from '$lib/server/root/drawingNotes';
import { fileResponse } from '$lib/server/root/fileResponse';
import { rootForFile } from '$lib/server/root/rootForFile';
import { root as words } from '$lib/strings/root';

export const GET = endpoint(async ({ params, url }) => {
	const filters = readFilterFields(url.searchParams);
	const { tooth, root, name, expectation, shape, sources } = await rootForFile(params, filters);
	const label = words.drawingLabel(tooth.name, root.name);
	const svg = drawingSvg({
		data: toExpectationData(expectation.sequences, shape, expectation.rareSequences),
		label,
		description: describeExpectation(expectation),
		show: readView(url.searchParams).show,
		notes: drawingNotes(label, expectation, shape, sources, filters, new Date())
	});
	return fileResponse(svg, 'image/svg+xml; charset=utf-8', `${name}.svg`);
});
