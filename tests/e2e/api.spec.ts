import type { APIRequestContext } from '@playwright/test';
import { Validator } from '@seriousme/openapi-schema-validator';
import { Ajv2020, type AnySchema } from 'ajv/dist/2020.js';
import { fullFormats } from 'ajv-formats/dist/formats.js';
import { percent, range } from '../../src/lib/strings/format';
import { JOIN, NO_EVIDENCE, ROOT } from './support/places';
import { expect, test } from './support/test';

const API = '/api/v1';

interface Parameter {
	name: string;
	in: string;
	required?: boolean;
	example?: unknown;
}
interface Operation {
	operationId: string;
	parameters: Parameter[];
	security?: Record<string, string[]>[];
	requestBody?: { content: { 'application/json': { example: unknown } } };
	responses: Record<string, { content: Record<string, { schema: AnySchema }> }>;
}
interface OpenApi {
	openapi: string;
	paths: Record<string, Record<string, Operation>>;
}
interface Page<Key extends string, Item> {
	total: number;
	nextCursor: string | null;
	items: Record<Key, Item[]>;
}

const openApi = async (request: APIRequestContext) =>
	(await (await request.get(`${API}/openapi.json`)).json()) as OpenApi;

/** Says what an answer breaks of a schema; null if nothing. */
function faults(schema: AnySchema, answer: unknown): string | null {
	const ajv = new Ajv2020({ allErrors: true, strict: false, formats: fullFormats });
	return ajv.validate(schema, answer) ? null : ajv.errorsText(ajv.errors);
}

test('the document is valid OpenAPI 3.1', async ({ request }) => {
	const document = await openApi(request);
	expect(document.openapi).toMatch(/^3\.1\./);
	const { valid, errors } = await new Validator().validate({ ...document });
	expect(errors ?? [], 'errors of the document').toEqual([]);
	expect(valid).toBe(true);

	// What the document's own schema cannot say: every blank of an address is a parameter, and every parameter one of its blanks.
	for (const [path, methods] of Object.entries(document.paths)) {
		const blanks = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name);
		for (const { parameters, responses } of Object.values(methods)) {
			const inPath = parameters.filter((parameter) => parameter.in === 'path');
			expect(inPath.map(({ name }) => name).sort(), path).toEqual([...blanks].sort());
			expect(inPath.every(({ required }) => required)).toBe(true);
			expect(new Set(parameters.map(({ name }) => name)).size).toBe(parameters.length);
			expect(Object.keys(responses)).toEqual(expect.arrayContaining(['200', '429']));
		}
	}
});

test('every operation answers, and as the document says', async ({ request }) => {
	const document = await openApi(request);
	const asked: string[] = [];
	for (const [path, methods] of Object.entries(document.paths)) {
		for (const [method, operation] of Object.entries(methods)) {
			// Who may ask the others, and that nobody else can, the wall tests.
			if (operation.security?.every((ways) => Object.keys(ways).length > 0)) continue;
			const address = path.replace(/\{(\w+)\}/g, (_, name: string) => {
				const example = operation.parameters.find((one) => one.in === 'path' && one.name === name)?.example;
				return encodeURIComponent(String(example));
			});
			const response = await request.fetch(`${API}${address}`, {
				method,
				...(operation.requestBody && { data: operation.requestBody.content['application/json'].example })
			});
			expect(response.status(), `${method} ${address}`).toBe(200);
			const { content } = operation.responses['200'];
			const type = response.headers()['content-type'].split(';')[0];
			expect(Object.keys(content), `${method} ${address}`).toContain(type);
			asked.push(operation.operationId);
			if (type !== 'application/json') {
				expect((await response.body()).length).toBeGreaterThan(100);
				continue;
			}
			const { schema } = content[type];
			expect(faults(schema, await response.json()), `${method} ${address}`).toBeNull();
		}
	}
	expect(asked).toContain('confluence');
	expect(new Set(asked).size).toBe(asked.length);
	expect(asked.length).toBeGreaterThanOrEqual(10);
});

test('every root answers, and as the document says', async ({ request }) => {
	test.slow();
	const document = await openApi(request);
	const expectation = document.paths['/teeth/{tooth}/roots/{root}/expectation'].get;
	const { schema } = expectation.responses['200'].content['application/json'];
	const ajv = new Ajv2020({ allErrors: true, strict: false, formats: fullFormats });
	const holds = ajv.compile(schema);
	const { teeth } = (await (await request.get(`${API}/teeth`)).json()) as {
		teeth: { id: string; roots: { id: string }[] }[];
	};
	expect(teeth).toHaveLength(16);
	for (const tooth of teeth) {
		for (const { id } of tooth.roots) {
			const address = `${API}/teeth/${tooth.id}/roots/${id}/expectation`;
			const answer = (await (await request.get(address)).json()) as {
				sequences: { mean: number }[];
				questions: { id: string }[];
			};
			expect(holds(answer), `${address} ${ajv.errorsText(holds.errors)}`).toBe(true);
			expect(answer.sequences.reduce((sum, { mean }) => sum + mean, 0)).toBeCloseTo(1, 9);
			expect(answer.questions.map((question) => question.id)).toEqual(
				[1, 2, 3, 4, 5, 6, 7, 8, 9].map((n) => `q${n}`)
			);
		}
	}
});

/** Walks a list by its cursors to the end. */
async function walk<Item>(request: APIRequestContext, list: string, query: string) {
	const items: Item[] = [];
	let cursor: string | null = null;
	let total: number;
	do {
		const response = await request.get(
			`${API}/${list}?${query}${cursor ? `&cursor=${encodeURIComponent(cursor)}` : ''}`
		);
		expect(response.status()).toBe(200);
		const page = (await response.json()) as Record<string, Item[]> &
			Pick<Page<string, Item>, 'total' | 'nextCursor'>;
		items.push(...page[list]);
		cursor = page.nextCursor;
		total = page.total;
	} while (cursor !== null);
	return { items, total };
}

for (const name of ['id', 'source', 'tooth', 'year', 'total']) {
	test(`paging by ${name} gives every entry exactly once, both ways`, async ({ request }) => {
		interface Entry {
			id: number;
			source: string;
			tooth: string;
			year: number | null;
			total: number | null;
		}
		const keyOf = (entry: Entry) => entry[name as keyof Entry] ?? 0;
		for (const sort of [name, `-${name}`]) {
			const { items, total } = await walk<Entry>(request, 'entries', `sort=${sort}&limit=173`);
			expect(items).toHaveLength(total);
			expect(new Set(items.map(({ id }) => id)).size).toBe(total);
			const keys = items.map(keyOf);
			const misplaced = keys.findIndex((key, place) => {
				if (place === 0) return false;
				return sort.startsWith('-') ? key > keys[place - 1] : key < keys[place - 1];
			});
			expect(misplaced, `place in ${sort}`).toBe(-1);
		}
	});
}

test('paging gives every source exactly once, and the words of a search narrow it', async ({ request }) => {
	const { items, total } = await walk<{ id: string }>(request, 'sources', 'limit=37');
	expect(items).toHaveLength(total);
	expect(new Set(items.map(({ id }) => id)).size).toBe(total);
	const { items: found } = await walk<{ id: string }>(request, 'sources', 'limit=37&q=cleghorn');
	expect(found.map(({ id }) => id)).toContain('cleghorn-2007');
	expect(found.length).toBeLessThan(total);
});

test('the filters of the entries leave what they say, alone and together', async ({ request }) => {
	type Entry = Record<'tooth' | 'root' | 'measure' | 'method' | 'country' | 'source', string> & {
		id: number;
	};
	const { items: all } = await walk<Entry>(request, 'entries', 'limit=200');
	const matching = (wanted: Partial<Entry>) =>
		all.filter((entry) =>
			Object.entries(wanted).every(([name, value]) =>
				// A sample of several countries is found under each.
				name === 'country'
					? `+${entry.country}+`.includes(`+${value}+`)
					: entry[name as keyof Entry] === value
			)
		);
	const queries: Record<string, string>[] = [
		{ tooth: 'maxillary-first-molar' },
		{ root: 'MB' },
		{ measure: 'feature' },
		{ method: 'micro-ct' },
		{ country: 'BRA' },
		{ source: 'cleghorn-2007' },
		{ tooth: 'maxillary-first-molar', root: 'MB', method: 'cbct' },
		{ tooth: 'mandibular-canine', country: 'SAU', measure: 'configuration' },
		{ country: 'CHE+DEU' }
	];
	for (const wanted of queries) {
		const query = new URLSearchParams({ ...wanted, limit: '200' });
		const { items, total } = await walk<Entry>(request, 'entries', query.toString());
		const expected = matching(wanted);
		expect(
			items.map(({ id }) => id),
			query.toString()
		).toEqual(expected.map(({ id }) => id));
		expect(total).toBe(expected.length);
		expect(total, query.toString()).toBeGreaterThan(0);
		expect(total).toBeLessThan(all.length);
	}
	// Known, but not together, and known, but without entries: nothing, which is no mistake.
	for (const query of ['tooth=maxillary-canine&root=DL', 'root=L'])
		expect((await walk<Entry>(request, 'entries', query)).total).toBe(0);
});

test('an entry has its revision, its figures, its source and its place in it', async ({ request }) => {
	const { entries } = (await (await request.get(`${API}/entries?source=cleghorn-2007`)).json()) as {
		entries: { id: number; locator: string; source: string }[];
	};
	for (const { id, locator, source } of entries) {
		expect(locator.trim()).not.toBe('');
		const entry = (await (await request.get(`${API}/entries/${id}`)).json()) as {
			source: string;
			figures: unknown[];
			revisions: {
				number: number;
				who: string;
				before: unknown;
				after: { locator: string; figures: unknown[] };
			}[];
		};
		expect(entry.source).toBe(source);
		expect(entry.revisions.at(-1)?.after.locator).toBe(locator);
		expect(entry.revisions.at(-1)?.after.figures).toHaveLength(entry.figures.length);
	}
	expect(entries.length).toBeGreaterThan(0);
});

test('page and API give the same digits, twice', async ({ page, request }) => {
	const question = {
		tooth: 'maxillary-first-molar',
		root: 'MB',
		canals: 2,
		search: 'microscope',
		findings: [
			{ test: 'cone-mark', result: 'positive' },
			{ test: 'draw', result: 'negative' }
		]
	};
	type Answer = { posterior: { fates: Record<string, { mean: number; interval: [number, number] }> } };
	const ask = async () =>
		(await (await request.post(`${API}/confluence`, { data: question })).json()) as Answer;
	const answer = await ask();
	expect(await ask()).toEqual(answer);

	await page.goto(`${JOIN}?canals=2&search=microscope&cone-mark=positive&draw=negative`);
	const shared = answer.posterior.fates['shared-exit'];
	const panel = page.getByRole('region', { name: 'How probable it is' });
	await expect(panel).toContainText(`${percent(shared.mean)} (${range(shared.interval)})`);

	// The order of findings changes the account and never the result.
	question.findings.reverse();
	const turned = await ask();
	for (const [fate, { mean }] of Object.entries(turned.posterior.fates))
		expect(mean).toBeCloseTo(answer.posterior.fates[fate].mean, 12);
});

test('filters are the same filters on the page, in the query and in a body', async ({ page, request }) => {
	type Expectation = {
		evidence: { studies: number; roots: number };
		questions: { studies: { method: string; total: number }[] }[];
	};
	const response = await request.get(
		`${API}${ROOT.replace('/MB', '/roots/MB')}/expectation?method=cbct&minTotal=300`
	);
	const { evidence, questions } = (await response.json()) as Expectation;
	const studies = questions.flatMap((question) => question.studies);
	expect(studies.every(({ method, total }) => method === 'cbct' && total > 0)).toBe(true);
	expect(studies.length).toBeGreaterThan(0);
	await page.goto(`${ROOT}?method=cbct&minTotal=300`);
	await expect(page.getByText(`From ${evidence.studies} source`)).toBeVisible();
});

test('a root without a sample says so and advises nothing', async ({ page, request }) => {
	const [, , tooth, root] = NO_EVIDENCE.split('/');
	const response = await request.post(`${API}/confluence`, {
		data: { tooth, root, canals: 2, findings: [{ test: 'cone-mark', result: 'positive' }] }
	});
	expect(response.status()).toBe(200);
	const answer = (await response.json()) as {
		decision: { advice: string | null } | null;
		evidence: { studies: number };
		notes: string[];
	};
	expect(answer.evidence.studies).toBe(0);
	expect(answer.decision?.advice ?? null).toBeNull();
	expect(answer.notes.join(' ')).toContain('No evidence');
	await page.goto(NO_EVIDENCE);
	await expect(page.getByRole('main')).toContainText('No evidence');
	await page.goto(`${NO_EVIDENCE}/join?canals=2&cone-mark=positive`);
	await expect(page.getByRole('main')).toContainText('No evidence');
	await expect(page.getByRole('region', { name: 'How probable it is' })).toContainText('No advice');
});
