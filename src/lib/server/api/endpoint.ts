import { json, type RequestEvent, type RequestHandler } from '@sveltejs/kit';
import type { z } from 'zod';
import { Problem, problemResponse, type FieldError } from './problem';

/** A JSON body of an endpoint is at most this long unless the endpoint says otherwise. */
const BODY_LIMIT_BYTES = 256 * 1024;

/**
 * Wraps an endpoint: what it returns is sent as JSON (a Response passes as it is), a thrown Problem becomes a problem document.
 * Anything else thrown is a defect and goes on to kit's error handling.
 */
export function endpoint<Event extends RequestEvent>(handle: (event: Event) => unknown): RequestHandler {
	return async (event) => {
		try {
			const result = await handle(event as Event);
			return result instanceof Response ? result : json(result);
		} catch (error) {
			if (error instanceof Problem) return problemResponse(error);
			throw error;
		}
	};
}

/** Zod's issues as field errors. */
function fieldErrors(error: z.ZodError): FieldError[] {
	return error.issues.flatMap((issue) => {
		const path = issue.path.map(String);
		// An unknown key's issue stands at its parent; the caller wants to know which key.
		if (issue.code === 'unrecognized_keys')
			return issue.keys.map((key) => ({
				path: [...path, key].join('.'),
				message: 'This field is not known here.'
			}));
		return [{ path: path.join('.'), message: issue.message }];
	});
}

/**
 * Reads and validates a JSON body.
 * @throws Problem 415 for another content type, 413 over the limit, 400 if it is no JSON, 422 with the fields if the schema refuses it
 */
export async function readBody<Schema extends z.ZodType>(
	event: RequestEvent,
	schema: Schema,
	limitBytes = BODY_LIMIT_BYTES
): Promise<z.infer<Schema>> {
	const type = event.request.headers.get('content-type') ?? '';
	if (!/^application\/json\s*(;|$)/i.test(type))
		throw new Problem(415, 'Send the request as application/json.');
	const text = await readLimited(event.request, limitBytes);
	let value: unknown;
	try {
		value = JSON.parse(text);
	} catch {
		throw new Problem(400, 'The body is not valid JSON.');
	}
	return validate(schema, value);
}

/**
 * Validates a value with a schema.
 * @throws Problem 422 naming each field
 */
export function validate<Schema extends z.ZodType>(schema: Schema, value: unknown): z.infer<Schema> {
	const result = schema.safeParse(value);
	if (!result.success)
		throw new Problem(422, 'Some values are missing or out of range.', fieldErrors(result.error));
	return result.data;
}

/**
 * Validates the query of an address. A name that repeats, or is listed in `lists`, becomes an array.
 * @throws Problem 422 naming each field
 */
export function readQuery<Schema extends z.ZodType>(
	query: URLSearchParams,
	schema: Schema,
	lists: readonly string[] = []
): z.infer<Schema> {
	const values: Record<string, string | string[]> = {};
	for (const name of new Set(query.keys())) {
		const all = query.getAll(name);
		values[name] = all.length > 1 || lists.includes(name) ? all : all[0];
	}
	return validate(schema, values);
}

async function readLimited(request: Request, limitBytes: number): Promise<string> {
	const tooLarge = () => new Problem(413, `The body is larger than ${Math.floor(limitBytes / 1024)} kB.`);
	if (Number(request.headers.get('content-length') ?? 0) > limitBytes) throw tooLarge();
	if (!request.body) return '';
	const chunks: Uint8Array[] = [];
	let size = 0;
	const reader = request.body.getReader();
	for (;;) {
		const { done, value } = await reader.read().catch(() => {
			// The adapter errors the stream at its own limit.
			throw tooLarge();
		});
		if (done) break;
		size += value.byteLength;
		if (size > limitBytes) throw tooLarge();
		chunks.push(value);
	}
	try {
		return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks));
	} catch {
		throw new Problem(400, 'The body is not valid UTF-8.');
	}
}
