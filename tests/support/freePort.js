import { once } from 'node:events';
import { createServer } from 'node:net';

/** A port of this machine that nothing listens on. */
export async function freePort() {
	const server = createServer().listen(0);
	await once(server, 'listening');
	const address = server.address();
	server.close();
	if (address === null || typeof address === 'string') throw new Error('No port could be had.');
	return address.port;
}
