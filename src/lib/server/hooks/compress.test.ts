import { gunzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { compress } from './compress';

const TEXT = 'Two streams become one. '.repeat(200);

/** What the hook makes of an answer to a request with these headers. */
async function answered(
	accepts: Record<string, string>,
	headers: Record<string, string> = { 'content-type': 'text/html' },
	method = 'GET'
) {
	const event = requestEvent(new Request('http://localhost/', { method, headers: accepts }));
	return compress({ event, resolve: () => new Response(TEXT, { headers }) });
}

describe('compress', () => {
	it.each(['gzip', 'br, gzip;q=0.8', '*', 'GZIP'])(
		'packs a page for a browser that takes %s',
		async (accepted) => {
			const response = await answered(
				{ 'accept-encoding': accepted },
				{ 'content-type': 'text/html; charset=utf-8', 'content-length': String(TEXT.length) }
			);
			expect(response.headers.get('content-encoding')).toBe('gzip');
			expect(response.headers.get('vary')).toContain('accept-encoding');
			expect(response.headers.get('content-length')).toBeNull();
			const packed = Buffer.from(await response.arrayBuffer());
			expect(packed.length).toBeLessThan(TEXT.length / 10);
			expect(gunzipSync(packed).toString()).toBe(TEXT);
		}
	);

	it.each([
		['no encoding', {}],
		['another encoding only', { 'accept-encoding': 'br' }],
		['gzip refused', { 'accept-encoding': 'gzip;q=0, *' }]
	])('leaves it as it is with %s, and says that it varies', async (_, accepts) => {
		const response = await answered(accepts);
		expect(response.headers.get('content-encoding')).toBeNull();
		expect(response.headers.get('vary')).toBe('accept-encoding');
		expect(await response.text()).toBe(TEXT);
	});

	it.each([
		['a picture', { 'content-type': 'image/png' }],
		['what is packed already', { 'content-type': 'text/html', 'content-encoding': 'br' }],
		['what fits one packet', { 'content-type': 'text/html', 'content-length': '12' }]
	])('does not pack %s', async (_, headers) => {
		const response = await answered({ 'accept-encoding': 'gzip' }, headers);
		expect(response.headers.get('content-encoding')).not.toBe('gzip');
		expect(await response.text()).toBe(TEXT);
	});
});
