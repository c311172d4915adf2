import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import process from 'node:process';

/** Written last: a build that was cut short has none. */
const STAMP = 'build/complete';
const SOURCES = [
	'src',
	'static',
	'package-lock.json',
	'svelte.config.js',
	'vite.config.ts',
	'vite.entries.config.ts',
	'tailwind.config.ts'
];

/**
 * Whether a complete build newer than every source is there.
 * @param {string} root the project's folder
 */
export function isBuilt(root) {
	const stamp = path.join(root, STAMP);
	if (!existsSync(stamp)) return false;
	const built = statSync(stamp).mtimeMs;
	return SOURCES.every((source) => newestMs(path.join(root, source)) <= built);
}

/**
 * Builds kit's server, then the entries beside it.
 * @param {string} root the project's folder
 * @throws when a build fails
 */
export function build(root) {
	for (const config of ['vite.config.ts', 'vite.entries.config.ts']) {
		const vite = path.join(root, 'node_modules/vite/bin/vite.js');
		const { status } = spawnSync(
			process.execPath,
			[vite, 'build', '--config', config, '--logLevel', 'warn'],
			{
				cwd: root,
				stdio: 'inherit',
				env: { ...process.env, NODE_ENV: 'production' }
			}
		);
		if (status !== 0) throw new Error(`The build (${config}) failed.`);
	}
	writeFileSync(path.join(root, STAMP), new Date().toISOString());
}

/**
 * @param {string} file a file or folder
 * @returns {number} newest modification time below it, in milliseconds; 0 if it does not exist
 */
function newestMs(file) {
	const stat = statSync(file, { throwIfNoEntry: false });
	if (!stat) return 0;
	if (!stat.isDirectory()) return stat.mtimeMs;
	return readdirSync(file).reduce((newest, name) => Math.max(newest, newestMs(path.join(file, name))), 0);
}

if (process.argv[1] && path.resolve(process.argv[1]) === path.resolve(import.meta.filename))
	build(process.cwd());
