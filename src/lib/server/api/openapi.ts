import { z } from 'zod';
import { problemSchema } from '$lib/schemas/common';
import { SESSION_COOKIE } from '../people/sessions';
import { failuresOf, operations, type Operation } from './operations';

type Json = Record<string, unknown>;

const REASONS: Record<number, string> = {
	400: 'Not valid JSON',
	401: 'No account, or a token that is not known or has ended',
	403: 'The roles of the person, or the scopes of the token, do not allow this',
	404: 'Unknown tooth, root or id',
	409: 'Somebody has changed it meanwhile, or it is not in the state for this',
	413: 'The body is too large',
	415: 'The body is not application/json',
	422: 'A value is missing or out of range; errors name the field',
	428: 'If-Match is missing',
	429: 'Too many requests; Retry-After says when to try again',
	503: 'Too many calculations are waiting, or the database does not answer'
};

const PATH_PARAMETERS: Record<string, Json> = {
	tooth: {
		type: 'string',
		description: 'Slug of a tooth, as /teeth lists it',
		example: 'maxillary-first-molar'
	},
	root: { type: 'string', description: 'Id of a root, as /teeth lists it', example: 'MB' },
	id: { type: 'string', description: 'Id of the entry or source' },
	revision: { type: 'string', description: 'Number of a revision of the table', example: '1' }
};

/** The OpenAPI 3.1 document of version 1, generated from the schemas that validate the requests. */
export function openApiDocument(origin: string): Json {
	const paths: Record<string, Json> = {};
	for (const operation of operations) {
		paths[operation.path] = { ...paths[operation.path], [operation.method]: describe(operation) };
	}
	return {
		openapi: '3.1.0',
		info: {
			title: 'Watersmeet',
			version: '1',
			description:
				'What the literature says of root canals, and how probable it is that two of them join. Lengths in mm, probabilities 0 to 1. ' +
				'A probability from published samples is not a finding in a patient.'
		},
		servers: [{ url: `${origin}/api/v1` }],
		paths,
		components: {
			schemas: { Problem: jsonSchema(problemSchema, 'output') },
			securitySchemes: {
				session: {
					type: 'apiKey',
					in: 'cookie',
					name: SESSION_COOKIE,
					description: 'The session of a browser that is signed in; only from pages of this site'
				},
				token: {
					type: 'http',
					scheme: 'bearer',
					description: 'A token that a person makes under "My account"; it has scopes and an end'
				}
			}
		}
	};
}

/** The operations as the page about the API shows them, each with an example that works on the shipped table. */
export function describeOperations() {
	return operations.map((operation) => {
		const { id, method, path, summary, body, response, formats } = operation;
		const schema = (of: z.ZodType, io: 'input' | 'output') => JSON.stringify(jsonSchema(of, io), null, 2);
		return {
			id,
			method,
			path,
			summary,
			parameters: parametersOf(operation).map((parameter) => ({
				name: String(parameter.name),
				in: String(parameter.in),
				required: parameter.required === true,
				...(typeof parameter.description === 'string' && { description: parameter.description })
			})),
			access: accessInWords(operation),
			// A button that writes into the table is no example.
			runs: method === 'get' || operation.access === undefined,
			failures: failuresOf(operation).map((status) => ({
				status: String(status),
				description: REASONS[status]
			})),
			requestSchema: body ? schema(body, 'input') : null,
			answerSchema: response ? schema(response, 'output') : null,
			formats: formats ?? [],
			example: {
				address: `/api/v1${exampleAddress(operation)}`,
				body: operation.example === undefined ? null : JSON.stringify(operation.example, null, 2)
			}
		};
	});
}

function exampleAddress(operation: Operation): string {
	const path = operation.path.replace(/\{(\w+)\}/g, (_, name: string) =>
		encodeURIComponent(exampleOf(operation, name))
	);
	return path + (operation.exampleQuery ?? '');
}

/** A value of the path that works on the shipped table. */
function exampleOf({ exampleParameters = {} }: Operation, name: string): string {
	return String(exampleParameters[name] ?? PATH_PARAMETERS[name].example);
}

function describe(operation: Operation): Json {
	const failures = Object.fromEntries(
		failuresOf(operation).map((status) => [
			String(status),
			{
				description: REASONS[status],
				content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } }
			}
		])
	);
	const content = (schema: Json, example?: unknown) => ({
		'application/json': { schema, ...(example !== undefined && { example }) }
	});
	return {
		operationId: operation.id,
		summary: operation.summary,
		description: accessInWords(operation),
		security: securityOf(operation),
		parameters: parametersOf(operation),
		...(operation.body && {
			requestBody: {
				required: true,
				content: content(jsonSchema(operation.body, 'input'), operation.example)
			}
		}),
		responses: {
			'200': {
				description: 'The answer',
				content: {
					...(operation.response && content(jsonSchema(operation.response, 'output'))),
					...Object.fromEntries(
						(operation.formats ?? []).map((type) => [type, { schema: { type: 'string' } }])
					)
				}
			},
			...failures
		}
	};
}

/** Who may ask, in words: OpenAPI 3.1 lets a bearer scheme list what it needs, but not roles. */
function accessInWords({ access }: Operation): string {
	if (access === 'everybody') return 'Open to everybody.';
	if (!access)
		return 'Open to everybody, unless an administrator has closed the table: then an account is needed, or a token with the scope table:read.';
	const role = access.role ? ` whose role is ${access.role}` : '';
	return `Needs an account${role}; a token also needs the scope ${access.scope}.`;
}

/** The schemes of an operation; the empty one says that none is needed. */
function securityOf({ access }: Operation): Json[] {
	if (access === 'everybody') return [{}];
	if (!access) return [{}, { session: [] }, { token: ['table:read'] }];
	return [{ session: [] }, { token: [access.scope] }];
}

const IF_MATCH: Json = {
	name: 'If-Match',
	in: 'header',
	required: true,
	description: 'Number of the revision that is edited, in quotes, as the ETag gives it',
	example: '"1"',
	schema: { type: 'string' }
};

const parametersOf = (operation: Operation): Json[] => [
	...pathParameters(operation),
	...queryParameters(operation.query),
	...(operation.ifMatch ? [IF_MATCH] : [])
];

function pathParameters(operation: Operation): Json[] {
	return [...operation.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => {
		const { description, example: _, ...schema } = PATH_PARAMETERS[name];
		return { name, in: 'path', required: true, description, example: exampleOf(operation, name), schema };
	});
}

function queryParameters(query: z.ZodType | undefined): Json[] {
	if (!query) return [];
	const schema = jsonSchema(query, 'input') as { properties?: Record<string, Json>; required?: string[] };
	return Object.entries(schema.properties ?? {}).map(([name, property]) => ({
		name,
		in: 'query',
		required: schema.required?.includes(name) ?? false,
		...(property.description !== undefined && { description: property.description }),
		schema: property
	}));
}

function jsonSchema(schema: z.ZodType, io: 'input' | 'output'): Json {
	// OpenAPI 3.1 takes JSON Schema 2020-12 as it is; the dialect is the document's, not each schema's.
	const { $schema: _, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
	return rest;
}
