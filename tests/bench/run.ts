/**
 * `npm run bench`: what the product's speed is, printed beside its targets. Rates are ratios to /health in the same run, since the machine
 * of one run is not the machine of another. Nothing here passes or fails.
 */
import path from 'node:path';
import autocannon from 'autocannon';
import type { ConfluenceQuestion } from '../../src/lib/server/inference/confluenceQuestion';
import { gatherLenders } from '../../src/lib/server/inference/borrowing';
import { buildRootModel } from '../../src/lib/server/inference/rootModel';
import { indexTable } from '../../src/lib/server/inference/tableIndex';
import { createTasks } from '../../src/lib/server/inference/tasks';
import { openDatabase } from '../../src/lib/server/db/connection';
import { defineLiterature } from '../../src/lib/server/db/models/literature';
import { defineSupplements } from '../../src/lib/server/db/models/supplements';
import { readSnapshot, type TableSnapshot } from '../../src/lib/server/table/snapshot';
import { scriptBytes } from '../support/pageScripts';
import { lighthouseMarks } from './screens';
import { MeasuredServer } from './server';
import { measureTable } from './table';

const RICHEST = { tooth: 'maxillary-first-molar', root: 'MB' };
const ROOT_PAGE = `/teeth/${RICHEST.tooth}/${RICHEST.root}`;
const SCREENS = {
	tooth: `/teeth/${RICHEST.tooth}`,
	root: ROOT_PAGE,
	estimator: `${ROOT_PAGE}/join?canals=2&cone-mark=positive`
};
const LOAD_SECONDS = 5;
const CONCURRENT_ESTIMATES = 20;
const COLD_AT_ONCE = 100;
/** The engine goes on optimising the loops over draws for some two hundred runs. */
const WARM_UP_RUNS = 200;

const FIVE_FINDINGS: ConfluenceQuestion = {
	canals: 2,
	search: 'microscope',
	findings: [
		{ test: 'cone-mark', result: 'positive' },
		{ test: 'draw', result: 'positive' },
		{ test: 'file-contact', result: 'negative' },
		{ test: 'angled-radiograph', result: 'positive' },
		{ test: 'cbct-reading', result: 'negative' }
	]
};
const ESTIMATE = JSON.stringify({ ...RICHEST, ...FIVE_FINDINGS });

const median = (values: number[]) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];
const print = (what: string, value: string, target = '') =>
	process.stdout.write(`${what.padEnd(66)} ${value.padStart(12)}   ${target}\n`);

/** Pure calculations in this process, JIT warm, every filter new so that no cache can help. */
function calculations(snapshot: TableSnapshot) {
	const index = indexTable(snapshot.rows, snapshot.sources);
	const tasks = createTasks(snapshot);
	for (const [tooth, root] of [
		['mandibular-first-molar', 'M'],
		['mandibular-first-molar', 'D'],
		['maxillary-second-molar', 'MB']
	])
		buildRootModel(index, tooth, root, {});

	const cold = Array.from({ length: 11 }, (_, k) => {
		const filters = { minTotal: k + 1 };
		const started = performance.now();
		const lenders = gatherLenders(index, filters);
		buildRootModel(index, RICHEST.tooth, RICHEST.root, filters, { lenders });
		return performance.now() - started;
	});
	print(
		'cold: nine questions of the richest root, median',
		`${median(cold).toFixed(0)} ms`,
		'target ≤ 300 ms'
	);

	const { model } = tasks.root(RICHEST.tooth, RICHEST.root, {});
	// The server keeps the outlooks on the way to the last finding, as it keeps the root's model.
	const known = FIVE_FINDINGS.findings.map((_, count, findings) =>
		tasks.outlook(model, { ...FIVE_FINDINGS, findings: findings.slice(0, count) })
	);
	for (let k = 0; k < WARM_UP_RUNS; k++) tasks.confluence(model, FIVE_FINDINGS, known);
	const runs = 100;
	const before = process.cpuUsage();
	for (let k = 0; k < runs; k++) tasks.confluence(model, FIVE_FINDINGS, known);
	const { user, system } = process.cpuUsage(before);
	const cpuMs = (user + system) / 1000 / runs;
	print('warm: an estimate with five findings, CPU', `${cpuMs.toFixed(1)} ms`, 'target ≤ 10 ms');
}

async function load(server: MeasuredServer, options: Omit<autocannon.Options, 'url'>, at: string) {
	const result = await autocannon({
		connections: 10,
		duration: LOAD_SECONDS,
		...options,
		url: server.address + at
	});
	if (result.non2xx > 0 || result.errors > 0)
		throw new Error(`${at}: ${result.non2xx + result.errors} requests failed.`);
	return result.requests.average;
}

/** Requests a second of the built server, as shares of what /health does. */
async function rates(server: MeasuredServer) {
	const post: Omit<autocannon.Options, 'url'> = {
		method: 'POST',
		headers: { 'content-type': 'application/json' },
		body: ESTIMATE
	};
	// Once each before measuring: the caches are warm, as they are in use.
	// Read to its end: a body left waiting would be torn off when the server stops.
	await (await fetch(server.address + ROOT_PAGE)).text();
	const health = await load(server, {}, '/health');
	print('/health', `${health.toFixed(0)} /s`, 'what the rest is measured against');
	const estimates = await load(server, post, '/api/v1/confluence');
	print(
		'/confluence with five findings, share of /health',
		(estimates / health).toFixed(3),
		`${estimates.toFixed(0)} /s`
	);
	const pages = await load(server, {}, ROOT_PAGE);
	print('root page, share of /health', (pages / health).toFixed(3), `${pages.toFixed(0)} /s`);

	await server.eventLoop();
	await load(server, { ...post, connections: CONCURRENT_ESTIMATES }, '/api/v1/confluence');
	const busy = await server.eventLoop();
	print(
		`event-loop delay under ${CONCURRENT_ESTIMATES} concurrent estimates, p99`,
		`${busy.p99Ms.toFixed(0)} ms`,
		`target ≤ 50 ms (largest ${busy.maxMs.toFixed(0)} ms)`
	);
}

/** A hundred questions at once, each with filters nobody asked for before. */
async function coldAtOnce(server: MeasuredServer) {
	await server.eventLoop();
	const started = performance.now();
	// Each body is read as it comes: the server closes a connection that its reader has left idle for five seconds.
	const ask = async (minTotal: number) => {
		const answer = await fetch(
			`${server.address}/api/v1/teeth/${RICHEST.tooth}/roots/${RICHEST.root}/expectation?minTotal=${minTotal}`
		);
		await answer.arrayBuffer();
		return answer.ok;
	};
	const answers = await Promise.all(Array.from({ length: COLD_AT_ONCE }, (_, k) => ask(k + 20)));
	const seconds = (performance.now() - started) / 1000;
	const answered = answers.filter((ok) => ok).length;
	const loop = await server.eventLoop();
	print(`${COLD_AT_ONCE} cold questions at once, answered`, String(answered), `in ${seconds.toFixed(1)} s`);
	print('event-loop delay meanwhile, p99', `${loop.p99Ms.toFixed(0)} ms`, 'target ≤ 50 ms');
	print('memory of the server afterwards', `${loop.memoryMb} MB`);
}

const server = await MeasuredServer.start();
try {
	const database = openDatabase(path.join(server.dataDir, 'watersmeet.sqlite'));
	defineLiterature(database);
	defineSupplements(database);
	calculations(await readSnapshot(database));
	await database.close();
	for (const [name, screen] of Object.entries(SCREENS)) {
		const kB = (await scriptBytes(server.address, screen)) / 1000;
		print(
			`scripts of the ${name} page, gzip`,
			`${kB.toFixed(1)} kB`,
			name === 'tooth' ? 'target ≤ 120 kB' : ''
		);
	}
	await rates(server);
	await coldAtOnce(server);
	await lighthouseMarks(server.address, SCREENS, print);

	await measureTable(server, print);
} finally {
	await server.stop();
}
