import { site } from './site';

/** Words under a drawing that leaves the page as a file. */
export const drawingFile = {
	figures: (list: string) =>
		`In a new population, with 95 % ranges: ${list}. The stronger a stream is drawn, the more probable it is. Heights are to scale, widths are not.`,
	unverified: ', unverified',
	assumedShape: 'The length of the root is assumed: the table has none.',
	filters: (list: string) => `Samples narrowed by: ${list}.`,
	unfiltered: 'All samples of the table that answer.',
	made: (revision: number, date: string) =>
		`${site.name}, table revision ${revision}, ${date}. A probability from published samples is not a finding in a patient.`
};
