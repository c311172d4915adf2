/**
 * `npm start`: checks the environment, builds if the sources are newer than the build, and serves.
 * Plain JavaScript, because it runs before anything is built.
 */
import { once } from 'node:events';
import { mkdirSync } from 'node:fs';
import path from 'node:path';
import process from 'node:process';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { readEnvironment } from '../lib/server/config/environment.js';
import { build, isBuilt } from './build.js';
import { answerUnreadable } from './unreadable.js';

const root = path.resolve(fileURLToPath(import.meta.url), '../../..');
process.chdir(root);

/**
 * Says why the server cannot run, and ends.
 * @param {string[]} reasons a sentence each
 * @returns {never}
 */
function refuse(reasons) {
	process.stderr.write(`Watersmeet cannot start:\n${reasons.map((text) => `  - ${text}\n`).join('')}`);
	process.exit(1);
}

const result = readEnvironment(process.env, root);
if ('mistakes' in result) refuse(result.mistakes);
const { environment } = result;
try {
	mkdirSync(environment.DATA_DIR, { recursive: true });
} catch (error) {
	refuse([`DATA_DIR could not be made: ${error instanceof Error ? error.message : String(error)}`]);
}
if (!isBuilt(root)) {
	process.stdout.write('Building (once; about half a minute)…\n');
	build(root);
}
// The adapter reads these when it is imported. Without ORIGIN it would take every request for https.
process.env.NODE_ENV = environment.NODE_ENV;
process.env.HOST = environment.HOST;
process.env.PORT = String(environment.PORT);
process.env.ORIGIN = environment.ORIGIN;
process.env.BODY_SIZE_LIMIT = environment.BODY_SIZE_LIMIT;
process.env.SHUTDOWN_TIMEOUT = String(environment.SHUTDOWN_TIMEOUT);
if (environment.ADDRESS_HEADER) process.env.ADDRESS_HEADER = environment.ADDRESS_HEADER;

try {
	const server = await import(pathToFileURL(path.join(root, 'build/index.js')).href).then(
		(/** @type {{ server: { server: import('node:http').Server } }} */ built) => built.server.server
	);
	answerUnreadable(server);
	if (!server.listening) await once(server, 'listening');
} catch (error) {
	const { code, syscall, message } = /** @type {NodeJS.ErrnoException} */ (error);
	if (code === 'EADDRINUSE') refuse([`PORT ${environment.PORT} is taken by another program.`]);
	// What the system refused, a missing file say, is not for the programmer: it needs no stack.
	if (syscall) refuse([message]);
	throw error;
}
process.stdout.write(`Watersmeet is ready: ${environment.ORIGIN}\n`);
