import type { z } from 'zod';
import type { Role, Scope } from '$lib/schemas/terms';
import { filtersQuerySchema } from '$lib/schemas/common';
import { confluenceRequestSchema, confluenceResponseSchema } from '$lib/schemas/confluence';
import { tableCoverageSchema } from '$lib/schemas/coverage';
import {
	deskEntrySchema,
	entryBodySchema,
	entryDeleteSchema,
	entryPatchSchema,
	tableRevisionsQuerySchema,
	tableRevisionsSchema
} from '$lib/schemas/entries';
import { expectationSchema } from '$lib/schemas/expectation';
import { levelRequestSchema, levelResponseSchema } from '$lib/schemas/level';
import {
	auditQuerySchema,
	auditSchema,
	meSchema,
	peopleQuerySchema,
	peopleSchema
} from '$lib/schemas/people';
import { poolRequestSchema, poolResponseSchema } from '$lib/schemas/pool';
import { searchQuerySchema, searchSchema } from '$lib/schemas/search';
import {
	keptSourceSchema,
	newSourceSchema,
	removedSourceSchema,
	sourceChangeSchema,
	sourceRemovalSchema
} from '$lib/schemas/sources';
import {
	bibliographyQuerySchema,
	entriesQuerySchema,
	entriesSchema,
	entryWithRevisionsSchema,
	healthSchema,
	sourceQuerySchema,
	sourcesQuerySchema,
	sourcesSchema,
	tableQuerySchema,
	wholeTableSchema
} from '$lib/schemas/table';
import { teethSchema, toothSchema } from '$lib/schemas/teeth';

/** One operation of the API, as the OpenAPI document describes it and as its endpoint validates it. */
export interface Operation {
	method: 'get' | 'post' | 'patch' | 'delete';
	/** Whether If-Match must name the revision that is edited. */
	ifMatch?: boolean;
	path: string;
	id: string;
	summary: string;
	query?: z.ZodType;
	body?: z.ZodType;
	/** A request that works on the shipped table, shown as the example. */
	example?: unknown;
	/** Values of the path for the example; teeth and roots have theirs already. */
	exampleParameters?: Record<string, string>;
	/** The answer in JSON; without one the operation answers with text of the types in `formats`. */
	response?: z.ZodType;
	/** Media types of text that the answer may come in. */
	formats?: string[];
	/** Query of the example, where the operation says little without one. */
	exampleQuery?: string;
	/** Statuses other than 200 that the operation may answer with, besides 429 and those of its access. */
	failures: number[];
	/**
	 * Who may ask. Default: everybody, unless an administrator has closed the table; then an account, or a token with table:read.
	 * 'everybody' always; otherwise an account, or a token with the scope, whose person has the role.
	 */
	access?: 'everybody' | { scope: Scope; role?: Role };
}

const XLSX_TYPE = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';
/** Who keeps the table. */
const EDUCATOR = { scope: 'table:write', role: 'educator' } as const;

const slug = { tooth: 'maxillary-first-molar', root: 'MB' };

/** Every operation of version 1, in the order the document lists them. */
export const operations: Operation[] = [
	{
		method: 'get',
		path: '/teeth',
		id: 'listTeeth',
		summary: 'The sixteen types of permanent tooth, their numbers and roots',
		response: teethSchema,
		failures: []
	},
	{
		method: 'get',
		path: '/teeth/{tooth}',
		id: 'getTooth',
		summary: 'One tooth: root counts, canal counts, features, lengths, roots',
		response: toothSchema,
		failures: [404]
	},
	{
		method: 'get',
		path: '/teeth/{tooth}/roots/{root}/expectation',
		id: 'getExpectation',
		summary: 'What canals to expect in a root, and how surely',
		query: filtersQuerySchema,
		response: expectationSchema,
		failures: [404, 422]
	},
	{
		method: 'get',
		path: '/coverage',
		id: 'getCoverage',
		summary: 'How well the table predicts samples that were left out of it, question by question',
		response: tableCoverageSchema,
		failures: []
	},
	{
		method: 'get',
		path: '/entries',
		id: 'listEntries',
		summary: 'Published entries of the table, filtered, sorted, in pages',
		query: entriesQuerySchema,
		response: entriesSchema,
		failures: [422]
	},
	{
		method: 'get',
		path: '/entries/{id}',
		id: 'getEntry',
		exampleParameters: { id: '1' },
		summary: 'One entry with its revisions',
		response: entryWithRevisionsSchema,
		failures: [404]
	},
	{
		method: 'post',
		path: '/entries',
		id: 'createEntry',
		summary: 'Makes a draft of a new entry; somebody else has to publish it',
		access: EDUCATOR,
		body: entryBodySchema,
		example: {
			...{ source: 'weine-1969', locator: 'table 1', provenance: 'read', tooth: slug.tooth, root: slug.root },
			...{
				scope: 'all',
				country: 'USA',
				method: 'sectioning',
				subgroup: 'all',
				total: 208,
				measure: 'feature'
			},
			figures: [{ category: 'mb2', count: 107 }]
		},
		response: deskEntrySchema,
		failures: [400, 413, 415, 422]
	},
	{
		method: 'patch',
		path: '/entries/{id}',
		id: 'changeEntry',
		exampleParameters: { id: '1' },
		summary:
			'Saves a draft, of a published entry beside it, or moves it on: review, return, publication by another, restoring a revision, ' +
			'confirmation of recalled figures, a mark on its sample. 409 names the parts that somebody has changed meanwhile',
		access: EDUCATOR,
		ifMatch: true,
		body: entryPatchSchema,
		example: { action: 'save', changes: { locator: 'table 2' } },
		response: deskEntrySchema,
		failures: [400, 404, 409, 413, 415, 422, 428]
	},
	{
		method: 'delete',
		path: '/entries/{id}',
		id: 'withdrawEntry',
		exampleParameters: { id: '1' },
		summary: 'Withdraws a published entry, with the reason, or puts a draft away. Its revisions stay',
		access: EDUCATOR,
		ifMatch: true,
		query: entryDeleteSchema,
		response: deskEntrySchema,
		failures: [404, 409, 422, 428]
	},
	{
		method: 'get',
		path: '/entries/{id}/draft',
		id: 'getDraft',
		exampleParameters: { id: '1' },
		summary:
			'An entry as those see it who work on it: its draft, what the checks say of it, and every revision',
		access: EDUCATOR,
		response: deskEntrySchema,
		failures: [404]
	},
	{
		method: 'get',
		path: '/table-revisions',
		id: 'listTableRevisions',
		summary: 'Revisions of the table: what changed, who checked it, how far the estimates of each root moved',
		query: tableRevisionsQuerySchema,
		response: tableRevisionsSchema,
		failures: [422]
	},
	{
		method: 'get',
		path: '/table-revisions/{revision}/table.csv',
		id: 'downloadPastTableCsv',
		summary: 'The table as it stood at a revision, as CSV',
		formats: ['text/csv'],
		failures: [404]
	},
	{
		method: 'get',
		path: '/table-revisions/{revision}/table.json',
		id: 'downloadPastTableJson',
		summary: 'The same as JSON',
		response: wholeTableSchema,
		failures: [404]
	},
	{
		method: 'get',
		path: '/sources',
		id: 'listSources',
		summary: 'The sources of the table, in pages',
		query: sourcesQuerySchema,
		response: sourcesSchema,
		failures: [422]
	},
	{
		method: 'get',
		path: '/sources/{id}',
		id: 'getSource',
		exampleParameters: { id: 'weine-1969' },
		summary: 'One source with its CSL-JSON, or its citation in a format',
		query: sourceQuerySchema,
		response: keptSourceSchema,
		formats: [
			'text/plain',
			'application/x-bibtex',
			'application/x-research-info-systems',
			'application/vnd.citationstyles.csl+json'
		],
		failures: [404, 422]
	},
	{
		method: 'get',
		path: '/sources.bib',
		id: 'downloadSourcesBibtex',
		summary: 'The citations of all sources, or of those that words find, as BibTeX',
		query: bibliographyQuerySchema,
		formats: ['application/x-bibtex'],
		failures: [422]
	},
	{
		method: 'get',
		path: '/sources.ris',
		id: 'downloadSourcesRis',
		summary: 'The same as RIS',
		query: bibliographyQuerySchema,
		formats: ['application/x-research-info-systems'],
		failures: [422]
	},
	{
		method: 'get',
		path: '/sources.json',
		id: 'downloadSourcesCsl',
		summary: 'The same as CSL-JSON, as the table keeps it',
		query: bibliographyQuerySchema,
		formats: ['application/vnd.citationstyles.csl+json'],
		failures: [422]
	},
	{
		method: 'get',
		path: '/table.csv',
		id: 'downloadTableCsv',
		summary:
			'The whole published table, or what filters leave, with the columns of the import. Headers and the name of the file give revision ' +
			'and date. A cell that begins with = + - @, a tab, a carriage return or an apostrophe has an apostrophe in front, which the import takes off again',
		query: tableQuerySchema,
		formats: ['text/csv'],
		failures: [422]
	},
	{
		method: 'get',
		path: '/table.json',
		id: 'downloadTableJson',
		summary: 'The same as JSON, with revision, date and licence note',
		query: tableQuerySchema,
		response: wholeTableSchema,
		failures: [422]
	},
	{
		method: 'get',
		path: '/table.xlsx',
		id: 'downloadTableSpreadsheet',
		summary: 'The same as a spreadsheet',
		query: tableQuerySchema,
		formats: [XLSX_TYPE],
		failures: [422]
	},
	{
		method: 'post',
		path: '/sources',
		id: 'addSource',
		summary: 'Adds a source; 409 names the ones it may be a duplicate of',
		body: newSourceSchema,
		example: {
			csl: {
				type: 'article-journal',
				title: 'Canals of an invented population',
				author: [{ family: 'Vandermeer', given: 'Ilse' }],
				issued: { 'date-parts': [[2021]] },
				'container-title': 'Journal of Invented Anatomy'
			},
			why: 'Found in a hand search.',
			evenIfDuplicate: false
		},
		response: keptSourceSchema,
		failures: [400, 409, 413, 415, 422],
		access: EDUCATOR
	},
	{
		method: 'patch',
		path: '/sources/{id}',
		id: 'changeSource',
		exampleParameters: { id: 'weine-1969' },
		summary:
			'Changes the citation, the retraction or the appraisal of a source; each change is a revision of it',
		body: sourceChangeSchema,
		example: { retraction: { reason: 'Retracted by the journal.' }, why: 'The notice was seen.' },
		response: keptSourceSchema,
		failures: [400, 404, 409, 413, 415, 422, 428],
		ifMatch: true,
		access: EDUCATOR
	},
	{
		method: 'delete',
		path: '/sources/{id}',
		id: 'removeSource',
		exampleParameters: { id: 'weine-1969' },
		summary: 'Removes a source that nothing rests on; its revisions stay',
		body: sourceRemovalSchema,
		example: { why: 'Added by mistake.' },
		response: removedSourceSchema,
		failures: [400, 404, 409, 413, 415, 422, 428],
		ifMatch: true,
		access: EDUCATOR
	},
	{
		method: 'get',
		path: '/search',
		id: 'search',
		summary: 'Teeth, roots, features, sources and countries that a typed phrase may mean',
		query: searchQuerySchema,
		exampleQuery: '?q=mb2',
		response: searchSchema,
		failures: [422]
	},
	{
		method: 'post',
		path: '/pool',
		id: 'pool',
		summary: 'Pools proportions of your own: the middle population, a new one, and the spread between',
		body: poolRequestSchema,
		example: {
			studies: [
				{ events: 16, total: 17 },
				{ events: 10, total: 12 },
				{ events: 4, total: 8 }
			]
		},
		response: poolResponseSchema,
		failures: [400, 413, 415, 422]
	},
	{
		method: 'post',
		path: '/confluence',
		id: 'confluence',
		summary: 'How probable it is that the canals of a root join, given what was found',
		body: confluenceRequestSchema,
		example: {
			...slug,
			canals: 2,
			search: 'microscope',
			findings: [{ test: 'cone-mark', result: 'positive' }]
		},
		response: confluenceResponseSchema,
		failures: [400, 404, 413, 415, 422]
	},
	{
		method: 'post',
		path: '/confluence-level',
		id: 'confluenceLevel',
		summary: 'Where two canals join, and the length and cut of the second cone if they share one exit',
		body: levelRequestSchema,
		example: {
			...slug,
			workingLengths: { first: 20.5, second: 19.5 },
			measurements: [
				{ kind: 'cone-mark', value: 3, coneShortBy: 0 },
				{ kind: 'cone-shortfall', value: 2.6 }
			],
			canal: { tip: 0.25, taper: 0.06 },
			cone: { tip: 0.25, taper: 0.06 },
			secondShapedTo: 'full'
		},
		response: levelResponseSchema,
		failures: [400, 404, 413, 415, 422]
	},
	{
		method: 'get',
		path: '/health',
		id: 'health',
		summary: 'Whether the server is ready, and the revision of its table',
		response: healthSchema,
		failures: [],
		access: 'everybody'
	},
	{
		method: 'get',
		path: '/me',
		id: 'getMe',
		summary: 'The account that asks, its roles, and the scopes of its token',
		response: meSchema,
		failures: [422],
		access: { scope: 'account:read' }
	},
	{
		method: 'get',
		path: '/people',
		id: 'listPeople',
		summary: 'People with an account, filtered, sorted, in pages',
		query: peopleQuerySchema,
		response: peopleSchema,
		failures: [422],
		access: { scope: 'people:read', role: 'administrator' }
	},
	{
		method: 'get',
		path: '/audit',
		id: 'listAudit',
		summary: 'The audit log, the newest first, filtered, in pages',
		query: auditQuerySchema,
		response: auditSchema,
		failures: [422],
		access: { scope: 'audit:read', role: 'administrator' }
	}
];

/** Statuses other than 200 that an operation may answer with. */
export function failuresOf({ failures, access }: Operation): number[] {
	// A token that does not hold is refused everywhere, also where none is needed.
	const refusals = access === 'everybody' ? [401] : [401, 403];
	return [...new Set([...failures, ...refusals, 429, 503])].sort((a, b) => a - b);
}
