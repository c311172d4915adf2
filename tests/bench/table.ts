/**
 * The table's page over a hundred thousand entries: the shipped ones, copied until there are so many, so that sources, teeth and words are
 * spread as they really are. They are written into the database of the measured server while it runs.
 */
import path from 'node:path';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import { openDatabase } from '../../src/lib/server/db/connection';
import type { MeasuredServer } from './server';

const ENTRIES = 100_000;
const ROUNDS = 15;
const PERCENTILE = 0.95;

const PAGES = [
	'/table',
	'/table?sort=-year',
	'/table?sort=total',
	'/table?tooth=maxillary-first-molar&method=cbct',
	'/table?country=CHN&sort=-total',
	'/table?measure=configuration&limit=100'
];
/** Words from rare to one that every entry of many sources has; the last stand in nearly all. */
const SEARCHES = [
	'vertucci',
	'middle mesial',
	'saudi cbct',
	'upper first premolar',
	'c',
	'canal morphology',
	'all'
];

async function copyEntries(db: Sequelize) {
	const [{ entries, lastEntry, lastSample }] = await db.query<{
		entries: number;
		lastEntry: number;
		lastSample: number;
	}>(
		`SELECT (SELECT COUNT(*) FROM entry) AS entries, (SELECT MAX(id) FROM entry) AS lastEntry, (SELECT MAX(id) FROM sample) AS lastSample`,
		{ type: QueryTypes.SELECT }
	);
	for (let copy = 1; copy * entries < ENTRIES; copy++) {
		await db.transaction((transaction) =>
			copyOnce(
				db,
				copy,
				{ entry: copy * lastEntry, sample: copy * lastSample, lastEntry, lastSample },
				transaction
			)
		);
	}
}

interface Offsets {
	entry: number;
	sample: number;
	lastEntry: number;
	lastSample: number;
}

async function copyOnce(db: Sequelize, copy: number, by: Offsets, transaction: Transaction) {
	const run = (sql: string) => db.query(sql, { transaction });
	// Figures before their entries, so that each entry's words are gathered once.
	await run('PRAGMA defer_foreign_keys = ON');
	await run(`INSERT INTO figure (entry_id, position, category, count, percent, count_derived, note)
		SELECT entry_id + ${by.entry}, position, category, count, percent, count_derived, note || ' copy${copy}'
		FROM figure WHERE entry_id <= ${by.lastEntry}`);
	await run(`INSERT INTO sample (id, source_id, tooth, root, scope, country, method, subgroup, total)
		SELECT id + ${by.sample}, source_id, tooth, root, scope, country, method, subgroup, total
		FROM sample WHERE id <= ${by.lastSample}`);
	await run(`INSERT INTO entry (id, sample_id, source_id, locator, measure, state, provenance, confirmed)
		SELECT id + ${by.entry}, sample_id + ${by.sample}, source_id, locator, measure, state, provenance, confirmed
		FROM entry WHERE id <= ${by.lastEntry}`);
}

/** Milliseconds each request took, one after another. */
async function timesOf(server: MeasuredServer, addresses: string[]): Promise<number[]> {
	const times: number[] = [];
	for (const address of addresses) {
		const started = performance.now();
		const answer = await fetch(server.address + address);
		await answer.text();
		times.push(performance.now() - started);
		if (!answer.ok) throw new Error(`${address}: ${answer.status}`);
	}
	return times;
}

const percentile = (times: number[]) =>
	[...times].sort((a, b) => a - b)[Math.ceil(times.length * PERCENTILE) - 1];
const repeat = (addresses: string[]) => Array.from({ length: ROUNDS }, () => addresses).flat();
const search = (words: string) => `/table?q=${encodeURIComponent(words).replaceAll('%20', '+')}`;

/** Measures the page of a large table; every figure also as a multiple of what /health takes in the same run. */
export async function measureTable(
	server: MeasuredServer,
	print: (what: string, value: string, target?: string) => void
) {
	const db = openDatabase(path.join(server.dataDir, 'watersmeet.sqlite'));
	const started = performance.now();
	await copyEntries(db);
	await db.query('ANALYZE');
	await db.close();
	print('generated entries', String(ENTRIES), `in ${((performance.now() - started) / 1000).toFixed(0)} s`);

	await timesOf(server, [...PAGES, ...SEARCHES.map(search)]);
	const health = percentile(await timesOf(server, repeat(['/health'])));
	const say = (what: string, times: number[], target: string) => {
		const ms = percentile(times);
		print(what, `${ms.toFixed(0)} ms`, `${target} (${(ms / health).toFixed(0)} times /health)`);
	};
	say('table page at 100,000 entries, p95', await timesOf(server, repeat(PAGES)), 'target ≤ 150 ms');
	say(
		'search in 100,000 entries, p95',
		await timesOf(server, repeat(SEARCHES.map(search))),
		'target ≤ 100 ms'
	);
	for (const words of SEARCHES)
		say(`  of these “${words}”, p95`, await timesOf(server, repeat([search(words)])), '');
	const [whole] = await timesOf(server, ['/api/v1/table.csv']);
	print('the whole of it as CSV', `${(whole / 1000).toFixed(1)} s`);
	const { memoryMb } = await server.eventLoop();
	print('memory of the server afterwards', `${memoryMb} MB`);
}
