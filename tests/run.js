/**
 * `npm test`: every check of the project, one after the other, even after one has failed.
 * Prints a line a step, the output of a step that failed, and last of all `N passed, N failed`; a step that is no test runner counts as one.
 */
import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import process from 'node:process';
import { fileURLToPath } from 'node:url';
import { chromiumOrReason } from './support/chromium.js';

const root = path.resolve(fileURLToPath(import.meta.url), '../..');
const reports = mkdtempSync(path.join(os.tmpdir(), 'watersmeet-test-'));
const unitReport = path.join(reports, 'unit.json');
const endToEndReport = path.join(reports, 'end-to-end.json');

/**
 * @typedef {{ passed: number, failed: number }} Counts
 * @typedef {{ name: string, command: string[], environment?: Record<string, string>, counts?: () => Counts }} Step
 */

/** @type {Step[]} */
const steps = [
	{ name: 'sync', command: ['svelte-kit', 'sync'] },
	{ name: 'types', command: ['svelte-check', '--tsconfig', './tsconfig.json', '--fail-on-warnings'] },
	{ name: 'lint', command: ['eslint', '.', '--max-warnings', '0'] },
	{ name: 'format', command: ['prettier', '--check', '.'] },
	{ name: 'unused', command: ['knip'] },
	{ name: 'unused outside tests', command: ['knip', '--production'] },
	{
		name: 'unit and reference',
		command: ['vitest', 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${unitReport}`],
		counts: unitCounts
	},
	{ name: 'build', command: ['node', 'src/cli/build.js'] },
	{
		name: 'end to end',
		command: ['playwright', 'test', '--reporter=line,json'],
		environment: { PLAYWRIGHT_JSON_OUTPUT_FILE: endToEndReport },
		counts: endToEndCounts
	}
];

/** @returns {Counts} */
function unitCounts() {
	const report =
		/** @type {{ numPassedTests: number, numFailedTests: number, numFailedTestSuites: number }} */ (
			readJson(unitReport)
		);
	// A file that does not even load has no test to fail.
	const failed = report.numFailedTests || report.numFailedTestSuites;
	return { passed: report.numPassedTests, failed };
}

/** @returns {Counts} */
function endToEndCounts() {
	const { stats, errors } =
		/** @type {{ stats: { expected: number, unexpected: number, flaky: number }, errors: unknown[] }} */ (
			readJson(endToEndReport)
		);
	return { passed: stats.expected, failed: stats.unexpected + stats.flaky || errors.length };
}

/**
 * @param {string} file
 * @returns {unknown}
 */
function readJson(file) {
	/** @type {unknown} */
	const value = JSON.parse(readFileSync(file, 'utf8'));
	return value;
}

/**
 * Runs a step's command from the project's own packages.
 * @param {Step} step
 * @param {Record<string, string>} extra environment of every step
 * @returns {Promise<{ status: number | null, output: string }>}
 */
function run({ command: [name, ...args], environment }, extra) {
	const bin = name === 'node' ? process.execPath : path.join(root, 'node_modules/.bin', name);
	return new Promise((resolve) => {
		const child = spawn(bin, args, {
			cwd: root,
			env: { ...process.env, ...extra, ...environment, FORCE_COLOR: '0', NO_COLOR: '1' },
			stdio: ['ignore', 'pipe', 'pipe']
		});
		let output = '';
		const collect = (/** @type {Buffer} */ chunk) => (output += chunk.toString());
		child.stdout.on('data', collect);
		child.stderr.on('data', collect);
		child.on('error', (error) => resolve({ status: null, output: `${output}${error.message}\n` }));
		child.on('close', (status) => resolve({ status, output }));
	});
}

/**
 * What a step counts for. A runner that ran nothing, or left no report, has failed.
 * @param {Step} step
 * @param {number | null} status
 * @returns {Counts}
 */
function countsOf(step, status) {
	if (!step.counts) return status === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
	try {
		const { passed, failed } = step.counts();
		if (passed + failed === 0) return { passed: 0, failed: 1 };
		return { passed, failed: status === 0 ? failed : Math.max(1, failed) };
	} catch {
		return { passed: 0, failed: 1 };
	}
}

let passed = 0;
let failed = 0;
const say = (/** @type {string} */ text) => process.stdout.write(`${text}\n`);

const chromium = chromiumOrReason();
/** @type {Record<string, string>} */
const extra = 'path' in chromium ? { CHROMIUM_PATH: chromium.path } : {};

for (const step of steps) {
	const started = performance.now();
	const { status, output } =
		step.name === 'end to end' && 'reason' in chromium
			? { status: 1, output: `${chromium.reason}\n` }
			: await run(step, extra);
	const counts = countsOf(step, status);
	passed += counts.passed;
	failed += counts.failed;
	const seconds = ((performance.now() - started) / 1000).toFixed(1);
	const numbers = step.counts ? `: ${counts.passed} passed, ${counts.failed} failed` : '';
	say(`${counts.failed === 0 ? 'ok    ' : 'FAILED'} ${step.name} (${seconds} s)${numbers}`);
	if (counts.failed > 0) say(output.trimEnd());
}
rmSync(reports, { recursive: true, force: true });
say(`${passed} passed, ${failed} failed`);
process.exitCode = failed === 0 ? 0 : 1;
