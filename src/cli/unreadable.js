/**
 * What never becomes a request of the application: bytes that are no HTTP, an address or headers over Node's limit, and TRACE, which no
 * Request can hold. Node and the adapter would answer with bare text or nothing; the API promises a problem document for every failure.
 */
import { STATUS_CODES } from 'node:http';

/** @type {Record<string, [status: number, detail: string]>} */
const REFUSALS = {
	HPE_HEADER_OVERFLOW: [431, 'The address or the headers are too long.'],
	ERR_HTTP_REQUEST_TIMEOUT: [408, 'The request did not arrive in time.']
};

/**
 * Answers on a server what its application never sees.
 * @param {import('node:http').Server} server
 */
export function answerUnreadable(server) {
	server.on('clientError', (/** @type {NodeJS.ErrnoException} */ error, socket) => {
		// After an answer has begun, more text would be taken for a part of it.
		if (!socket.writable || ('bytesWritten' in socket && socket.bytesWritten !== 0)) {
			socket.destroy();
			return;
		}
		const [status, detail] = REFUSALS[error.code ?? ''] ?? [400, 'This could not be read as a request.'];
		const title = STATUS_CODES[status];
		const body = JSON.stringify({ type: 'about:blank', title, status, detail, errors: [] });
		socket.end(
			[
				`HTTP/1.1 ${status} ${title}`,
				'content-type: application/problem+json',
				`content-length: ${Buffer.byteLength(body)}`,
				'cache-control: no-store',
				'connection: close',
				'',
				body
			].join('\r\n')
		);
	});
	// OPTIONS is refused as TRACE should be: with 405 and the methods that are allowed.
	server.prependListener('request', (request) => {
		if (request.method === 'TRACE') request.method = 'OPTIONS';
	});
}
