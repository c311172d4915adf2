/**
 * Stands in for Crossref's REST API in tests and in the demonstration: answers `/works/{doi}` and `/works?filter=updates:{doi}` from
 * data/demo/crossref.json, whose works are invented. Two DOIs misbehave on purpose: 10.5555/slow never answers, 10.5555/nonsense answers HTML.
 */
import { readFileSync } from 'node:fs';
import { createServer } from 'node:http';
import path from 'node:path';

/** @typedef {{ DOI: string, 'update-to'?: { DOI: string }[] }} Work */

/**
 * Starts the stand-in on this machine only.
 * @param {{ port?: number }} [options] port 0, the default, takes any free one
 * @returns {Promise<{ url: string, stop: () => Promise<void> }>}
 */
export async function startFakeCrossref({ port = 0 } = {}) {
	const file = path.resolve(import.meta.dirname, '../../data/demo/crossref.json');
	const works = readJson(file);
	const server = createServer((request, response) => {
		const url = new URL(request.url ?? '/', 'http://localhost');
		/** @param {unknown} body @param {number} [status] */
		const send = (body, status = 200) => {
			response.writeHead(status, { 'content-type': 'application/json' }).end(JSON.stringify(body));
		};
		const updates = /^updates:(.+)$/.exec(url.searchParams.get('filter') ?? '')?.[1].toLowerCase();
		if (url.pathname === '/works' && updates) {
			const items = works.filter((work) =>
				work['update-to']?.some(({ DOI }) => DOI.toLowerCase() === updates)
			);
			return send({ status: 'ok', 'message-type': 'work-list', message: { items } });
		}
		const doi = decodeURIComponent(url.pathname.replace(/^\/works\//, '')).toLowerCase();
		if (doi === '10.5555/slow') return;
		if (doi === '10.5555/nonsense') return void response.writeHead(200).end('<html>A page of a proxy</html>');
		const work = works.find(({ DOI }) => DOI.toLowerCase() === doi);
		if (!work) return void response.writeHead(404).end('Resource not found.');
		send({ status: 'ok', 'message-type': 'work', message: work });
	});
	await new Promise((resolve) => server.listen(port, '127.0.0.1', () => resolve(undefined)));
	const address = /** @type {import('node:net').AddressInfo} */ (server.address());
	return {
		url: `http://127.0.0.1:${address.port}`,
		stop: () =>
			new Promise((resolve) => {
				server.close(() => resolve(undefined));
				server.closeAllConnections();
			})
	};
}

/**
 * @param {string} file
 * @returns {Work[]}
 */
function readJson(file) {
	/** @type {unknown} */
	const value = JSON.parse(readFileSync(file, 'utf8'));
	return /** @type {Work[]} */ (value);
}
