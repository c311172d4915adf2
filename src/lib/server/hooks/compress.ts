import type { Handle } from '@sveltejs/kit';

/** Below this a packed answer is no smaller on the wire, since it fits one packet either way. */
const SMALLEST_BYTES = 1400;
const TEXT =
	/^(text\/|application\/(json|problem\+json|[\w.-]+\+json|xml|x-research-info-systems)|image\/svg\+xml)/;

/** Whether a request's Accept-Encoding takes gzip (RFC 9110, section 12.5.3: a quality of 0 refuses). */
function takesGzip(accepted: string): boolean {
	const quality = (name: string) => {
		const wanted = accepted.split(',').find((part) => part.split(';')[0].trim().toLowerCase() === name);
		return wanted && Number(/;\s*q=([\d.]+)/i.exec(wanted)?.[1] ?? 1);
	};
	return Boolean(quality('gzip') ?? quality('*'));
}

/**
 * Packs texts with gzip: a root's page is a tenth of its size then, which is what a phone at the chair waits for. The build's own
 * files are packed already, by the adapter, and never come here.
 */
export const compress: Handle = async ({ event, resolve }) => {
	const response = await resolve(event);
	const { headers, body, status } = response;
	if (
		!body ||
		status === 206 ||
		headers.has('content-encoding') ||
		!TEXT.test(headers.get('content-type') ?? '')
	)
		return response;
	headers.append('vary', 'accept-encoding');
	const length = headers.get('content-length');
	if (length !== null && Number(length) < SMALLEST_BYTES) return response;
	if (event.request.method === 'HEAD' || !takesGzip(event.request.headers.get('accept-encoding') ?? ''))
		return response;
	const packed = new Response(body.pipeThrough(new CompressionStream('gzip')), response);
	packed.headers.set('content-encoding', 'gzip');
	packed.headers.delete('content-length');
	return packed;
};
