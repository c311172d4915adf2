/** A file for keeping. @param name plain letters, digits, hyphens and dots */
export function fileResponse(body: string, type: string, name: string): Response {
	return new Response(body, {
		headers: { 'content-type': type, 'content-disposition': `attachment; filename="${name}"` }
	});
}
