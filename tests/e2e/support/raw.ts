import { request as nodeRequest } from 'node:http';
import { connect } from 'node:net';

export interface RawAnswer {
	status: number;
	headers: Record<string, string | string[] | undefined>;
	text: string;
}

interface RawRequest {
	method?: string;
	headers?: Record<string, string>;
	/** Sent in chunks without a length, as a program that streams does. */
	chunks?: string[];
}

/** Sends a request whose address, method and headers no client tidies. */
export function sendRaw(
	origin: string,
	address: string,
	{ method = 'GET', headers, chunks = [] }: RawRequest = {}
): Promise<RawAnswer> {
	const { hostname, port } = new URL(origin);
	return new Promise((resolve, reject) => {
		const request = nodeRequest({ hostname, port, path: address, method, headers, agent: false });
		request.on('error', reject);
		request.on('response', (response) => {
			let text = '';
			response.setEncoding('utf8').on('data', (chunk: string) => (text += chunk));
			response.on('end', () =>
				resolve({ status: response.statusCode ?? 0, headers: response.headers, text })
			);
			response.on('error', reject);
		});
		for (const chunk of chunks) request.write(chunk);
		request.end();
	});
}

/** Sends bytes as they are and reads the answer until the server closes. */
export function sendBytes(origin: string, bytes: string): Promise<RawAnswer> {
	const { hostname, port } = new URL(origin);
	return new Promise((resolve, reject) => {
		let answer = '';
		const socket = connect(Number(port), hostname, () => socket.write(bytes));
		socket.setEncoding('utf8').on('data', (chunk) => (answer += String(chunk)));
		socket.on('error', reject);
		socket.on('close', () => {
			const [head, ...body] = answer.split('\r\n\r\n');
			const [first, ...lines] = head.split('\r\n');
			resolve({
				status: Number(first.split(' ')[1]),
				headers: Object.fromEntries(lines.map((line) => line.split(': ', 2) as [string, string])),
				text: body.join('\r\n\r\n')
			});
		});
	});
}
