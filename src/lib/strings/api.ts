/** Words of the page that describes the API. */
export const api = {
	title: 'The HTTP API',
	lead: 'Everything the screens show can be asked for as JSON. Reading the table and calculating need no account unless an administrator has closed the table; a script then sends a token made under “My account”. Each example runs on this server.',
	document: 'OpenAPI 3.1 document',
	errors:
		'Every answer that is not a success is a problem document (RFC 9457): type, title, status, detail, and errors that name the field.',
	operations: 'Operations',
	parameters: 'Parameters',
	name: 'Name',
	where: 'In',
	meaning: 'Meaning',
	required: 'required',
	body: 'Request',
	answer: 'Answer',
	schema: 'Schema (JSON Schema 2020-12)',
	formats: 'The answer may come as text:',
	failures: 'Other answers',
	example: 'Example',
	run: 'Run the example',
	running: 'Running…',
	result: (status: number, ms: number) => `Answer: status ${status}, ${ms} ms`,
	unreachable: 'The server could not be reached.',
	cut: 'The answer is longer; its beginning is shown.'
};
