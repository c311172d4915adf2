import { readFileSync } from 'node:fs';
import path from 'node:path';
import { Validator } from '@seriousme/openapi-schema-validator';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { fullFormats } from 'ajv-formats/dist/formats.js';
import { describe, expect, it } from 'vitest';
import { describeOperations, openApiDocument } from './openapi';
import { failuresOf, operations } from './operations';

const ORIGIN = 'https://canals.example.org';
const routes = import.meta.glob<Record<string, unknown>>('/src/routes/api/v1/**/+server.ts');

/** `get /teeth/{tooth}` and so on, from the route files and the methods they export. */
async function served(): Promise<string[]> {
	const lists = await Promise.all(
		Object.entries(routes).map(async ([file, load]) => {
			const address = file
				.replace(/^\/src\/routes\/api\/v1|\/\+server\.ts$/g, '')
				.replace(/\[(\w+)\]/g, '{$1}');
			const methods = Object.keys(await load()).filter((name) => /^(GET|POST|PUT|PATCH|DELETE)$/.test(name));
			return methods.map((method) => `${method.toLowerCase()} ${address}`);
		})
	);
	return lists.flat().sort();
}

interface Schema {
	type?: string;
	properties?: Record<string, unknown>;
	$ref?: string;
}
interface Described {
	operationId: string;
	parameters: { name: string; in: string; required: boolean }[];
	requestBody?: { content: { 'application/json': { schema: Schema; example: unknown } } };
	security: Record<string, string[]>[];
	responses: Record<string, { description?: string; content: Record<string, { schema: Schema }> }>;
}
interface Document {
	servers: { url: string }[];
	paths: Record<string, Record<string, Described>>;
	components: { securitySchemes: Record<string, unknown> };
}

/** The document as a caller gets it. */
const document = JSON.parse(JSON.stringify(openApiDocument(ORIGIN))) as Document;
const described = operations.map((operation) => ({
	operation,
	entry: document.paths[operation.path][operation.method]
}));

describe('the operations', () => {
	it('are the routes, apart from the document itself', async () => {
		const listed = operations.map(({ method, path: address }) => `${method} ${address}`);
		expect(await served()).toEqual([...listed, 'get /openapi.json'].sort());
	});

	it('have an id each', () => {
		expect(new Set(operations.map(({ id }) => id)).size).toBe(operations.length);
	});

	it.each(operations.filter(({ body }) => body).map((operation) => [operation.id, operation] as const))(
		'%s has an example that its own schema takes as it is',
		(_, { body, example }) => {
			expect(body!.parse(example)).toEqual(example);
		}
	);

	it('name a source of the table in their example', () => {
		const file = path.resolve(import.meta.dirname, '../../../../data/literature/sources.json');
		const sources = JSON.parse(readFileSync(file, 'utf8')) as { id: string }[];
		const { exampleParameters } = operations.find(({ id }) => id === 'getSource')!;
		expect(sources.map(({ id }) => id)).toContain(exampleParameters!.id);
	});
});

describe('the OpenAPI document', () => {
	it('is valid OpenAPI 3.1', async () => {
		// The validator takes text of several lines as a document, and of one line as the name of a file.
		const { valid, errors } = await new Validator().validate(JSON.stringify(document, null, 1));
		expect(valid, JSON.stringify(errors)?.slice(0, 1000)).toBe(true);
	});

	it('stands at the origin it is asked at', () => {
		expect(document.servers).toEqual([{ url: `${ORIGIN}/api/v1` }]);
	});

	it.each(described.map((one) => [one.operation.id, one] as const))(
		'describes the answer, failures and parameters of %s',
		(id, { operation, entry }) => {
			expect(entry.operationId).toBe(id);
			expect(Object.keys(entry.responses).map(Number)).toEqual([200, ...failuresOf(operation)]);
			for (const [status, { description, content }] of Object.entries(entry.responses)) {
				expect(description).toBeTruthy();
				if (status === '200') {
					const types = [...(operation.response ? ['application/json'] : []), ...(operation.formats ?? [])];
					expect(types.length).toBeGreaterThan(0);
					expect(Object.keys(content)).toEqual(types);
					for (const type of types)
						expect(content[type].schema.type).toBe(type === 'application/json' ? 'object' : 'string');
				} else expect(content['application/problem+json'].schema.$ref).toBe('#/components/schemas/Problem');
			}
			const inPath = [...operation.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name);
			expect(entry.parameters.filter((one) => one.in === 'path').map(({ name }) => name)).toEqual(inPath);
			expect(entry.parameters.every((one) => one.in !== 'path' || one.required)).toBe(true);
			expect(entry.parameters.some((one) => one.in === 'query')).toBe(operation.query !== undefined);
			expect(entry.requestBody !== undefined).toBe(operation.body !== undefined);
		}
	);

	it.each(described.map((one) => [one.operation.id, one] as const))(
		'says who may ask for %s',
		(_, { operation: { access }, entry }) => {
			const open = entry.security.some((scheme) => Object.keys(scheme).length === 0);
			expect(open).toBe(access === undefined || access === 'everybody');
			const schemes = entry.security.flatMap((scheme) => Object.keys(scheme));
			for (const scheme of schemes) expect(document.components.securitySchemes).toHaveProperty(scheme);
			if (access && access !== 'everybody') expect(entry.security).toContainEqual({ token: [access.scope] });
		}
	);

	it.each(described.filter(({ entry }) => entry.requestBody).map((one) => [one.operation.id, one] as const))(
		'describes the body of %s so that its example fits, and nothing with an unknown field does',
		(_, { entry }) => {
			const { schema, example } = entry.requestBody!.content['application/json'];
			const fits = new Ajv2020({ strict: false, formats: fullFormats }).compile(schema);
			expect(fits(example), JSON.stringify(fits.errors)).toBe(true);
			expect(fits({ ...(example as object), unknown: 1 })).toBe(false);
		}
	);
});

describe('the operations as their page shows them', () => {
	it('have an example address without a blank to fill in, and schemas that are JSON', () => {
		for (const { example, requestSchema, answerSchema, formats, method } of describeOperations()) {
			expect(example.address).toMatch(/^\/api\/v1\/[^{}]+$/);
			if (answerSchema === null) expect(formats.length).toBeGreaterThan(0);
			else expect(JSON.parse(answerSchema)).toHaveProperty('properties');
			// A withdrawal may say why; the others always carry something, a reading never.
			if (method !== 'delete') expect(requestSchema !== null).toBe(method !== 'get');
			expect(example.body !== null).toBe(requestSchema !== null);
		}
	});
});
