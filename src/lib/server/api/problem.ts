/** One thing wrong with a request, at a field. `path` is dotted, as in `findings.1.test`. */
export interface FieldError {
	path: string;
	message: string;
}

const TITLES: Record<number, string> = {
	400: 'The request could not be read',
	401: 'Sign in first',
	403: 'Not allowed',
	404: 'Not found',
	405: 'Method not allowed',
	409: 'Edited meanwhile',
	413: 'The request is too large',
	415: 'Unsupported content type',
	422: 'A value is out of range',
	428: 'Say which revision was edited',
	429: 'Too many requests',
	500: 'Something went wrong here',
	503: 'Not ready yet'
};

/** A failure that the caller is told about, as a problem document (RFC 9457). Thrown anywhere below an endpoint. */
export class Problem extends Error {
	constructor(
		readonly status: number,
		readonly detail: string,
		readonly errors: FieldError[] = [],
		readonly headers: Record<string, string> = {}
	) {
		super(detail);
	}
}

/** The response of a problem: `application/problem+json` with type, title, status, detail and errors. */
export function problemResponse({ status, detail, errors, headers }: Problem): Response {
	const body = { type: 'about:blank', title: TITLES[status] ?? 'Error', status, detail, errors };
	return new Response(JSON.stringify(body), {
		status,
		headers: { ...headers, 'content-type': 'application/problem+json', 'cache-control': 'no-store' }
	});
}
