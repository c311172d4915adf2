import os from 'node:os';
import path from 'node:path';
import { LRUCache } from 'lru-cache';
import { Piscina } from 'piscina';
import { Problem } from '../api/problem';
import { serverDatabase } from '../db/server';
import { readSnapshot, tableRevision, type TableSnapshot } from '../table/snapshot';
import { ANSWERED_ROOTS } from './borrowing';
import { canonical, remember } from './cache';
import type { ConfluenceAnswer, ConfluenceOutlook } from './confluence';
import type { ConfluenceQuestion } from './confluenceQuestion';
import { sumCoverage, type RootCoverage, type TableCoverage } from './coverage';
import { OneByOne } from './oneByOne';
import type { TableChange } from './preview';
import { createTasks, type RootAnswer, type Tasks, type ToothAnswer } from './tasks';
import type { Filters, Study } from './types';

/** The second build puts the worker here, beside kit's own server. */
const WORKER_FILE = 'build/entries/inferenceWorker.js';
/** Tasks that may wait; beyond them the server says that it is busy rather than run out of memory. */
const MOST_WAITING = 500;
/** Roots kept with their models: some 200 kB each. */
const MOST_ROOTS = 300;
/** Coverages kept: some 10 kB each. */
const MOST_COVERAGES = 300;
/** Outlooks kept: under 1 kB each. */
const MOST_OUTLOOKS = 2000;
/** Coverages that may wait to be worked out for nobody in particular. */
const MOST_IN_BACKGROUND = 50;
const WORKER_IDLE_MS = 5 * 60 * 1000;
const OLD_REVISION_GRACE_MS = 60 * 1000;

/** The estimator over one revision of the table: its workers and what they have worked out. */
class Estimator {
	readonly revision: number;
	readonly #run: <Name extends keyof Tasks>(
		name: Name,
		args: Parameters<Tasks[Name]>
	) => Promise<ReturnType<Tasks[Name]>>;
	readonly #workers: Piscina | null = null;
	// Promises, not results: a question asked twice at once is worked out once.
	readonly #roots = new LRUCache<string, Promise<RootAnswer>>({ max: MOST_ROOTS });
	readonly #outlooks = new LRUCache<string, Promise<ConfluenceOutlook>>({ max: MOST_OUTLOOKS });
	readonly #teeth = new Map<string, Promise<ToothAnswer>>();
	readonly #coverages = new LRUCache<string, Promise<RootCoverage>>({ max: MOST_COVERAGES });
	readonly #knownCoverages = new LRUCache<string, RootCoverage>({ max: MOST_COVERAGES });
	readonly #inBackground = new OneByOne(MOST_IN_BACKGROUND);
	readonly #queuedCoverages = new Set<string>();
	readonly #table = new Map<'coverage', Promise<TableCoverage>>();

	constructor(snapshot: TableSnapshot) {
		this.revision = snapshot.revision;
		// The development server has no built worker; there the calculation runs in place.
		if (import.meta.env.DEV) {
			const tasks = createTasks(snapshot);
			this.#run = (name, args) =>
				new Promise((resolve) =>
					resolve((tasks[name] as (...values: unknown[]) => ReturnType<Tasks[typeof name]>)(...args))
				);
			return;
		}
		const workers = new Piscina({
			filename: path.resolve(WORKER_FILE),
			workerData: snapshot,
			minThreads: 1,
			// One core is left to the requests themselves.
			maxThreads: Math.max(1, os.availableParallelism() - 1),
			idleTimeout: WORKER_IDLE_MS,
			maxQueue: MOST_WAITING
		});
		this.#workers = workers;
		this.#run = async (name, args) => {
			if (workers.queueSize >= MOST_WAITING)
				throw new Problem(503, 'Too many calculations are waiting. Try again in a moment.', [], {
					'retry-after': '5'
				});
			return workers.run({ name, args }) as Promise<ReturnType<Tasks[typeof name]>>;
		};
	}

	root(tooth: string, root: string, filters: Filters): Promise<RootAnswer> {
		const kept = canonical(filters);
		const key = JSON.stringify([tooth, root, kept]);
		return remember(this.#roots, key, () => this.#run('root', [tooth, root, kept]));
	}

	/** Coverage of a root's questions; some tenths of a second where there are many samples. */
	coverage(tooth: string, root: string, filters: Filters): Promise<RootCoverage> {
		const kept = canonical(filters);
		const key = JSON.stringify([tooth, root, kept]);
		const found = remember(this.#coverages, key, () => this.#run('coverage', [tooth, root, kept]));
		// Each time, for the two caches may have forgotten different ones.
		return found.then((coverage) => {
			this.#knownCoverages.set(key, coverage);
			return coverage;
		});
	}

	/** The same if it is known; else null, and it is worked out when no other is. */
	coverageIfKnown(tooth: string, root: string, filters: Filters): RootCoverage | null {
		const key = JSON.stringify([tooth, root, canonical(filters)]);
		const known = this.#knownCoverages.get(key);
		if (known) return known;
		if (this.#queuedCoverages.has(key)) return null;
		const added = this.#inBackground.add(() =>
			this.coverage(tooth, root, filters).finally(() => this.#queuedCoverages.delete(key))
		);
		if (added) this.#queuedCoverages.add(key);
		return null;
	}

	/** Coverage over all roots, without filters. One root after another, so that requests get their turn in between. */
	tableCoverage(): Promise<TableCoverage> {
		return remember(this.#table, 'coverage', async () => {
			const roots: RootCoverage[] = [];
			for (const { tooth, root } of ANSWERED_ROOTS) roots.push(await this.coverage(tooth, root, {}));
			return sumCoverage(roots);
		});
	}

	tooth(tooth: string): Promise<ToothAnswer> {
		return remember(this.#teeth, tooth, () => this.#run('tooth', [tooth]));
	}

	/** Answers a question about a root. The outlooks on the way to its last finding are kept: most were answered a moment ago. */
	async confluence(
		tooth: string,
		root: string,
		filters: Filters,
		question: ConfluenceQuestion
	): Promise<ConfluenceAnswer> {
		const { model } = await this.root(tooth, root, filters);
		const { canals, orifices, search } = question;
		const place = [tooth, root, canonical(filters), canals, orifices, search];
		const clear = question.findings.filter(({ result }) => result !== 'unclear');
		const outlookAfter = (count: number) => {
			const findings = clear.slice(0, count);
			return remember(this.#outlooks, JSON.stringify([...place, findings]), () =>
				this.#run('outlook', [model, { ...question, findings }])
			);
		};
		const known = await Promise.all(clear.map((_, count) => outlookAfter(count)));
		const answer = await this.#run('confluence', [model, question, known]);
		const { fates, meet, anotherCanal } = answer.posterior;
		this.#outlooks.set(
			JSON.stringify([...place, clear]),
			Promise.resolve({ fates, meet, anotherCanal } satisfies ConfluenceOutlook)
		);
		return answer;
	}

	pool(studies: Study[], level?: number) {
		return this.#run('pool', [studies, level]);
	}

	/** A root as it would be if the table were changed; not kept, since a draft is seldom asked about twice. */
	changed(change: TableChange, place: { tooth: string; root: string; entry: number }) {
		return this.#run('changed', [change, place]);
	}

	/** Lets running tasks finish, then ends the threads. */
	async stop(): Promise<void> {
		await this.#workers?.close();
	}
}

// Hot reload evaluates this module again; the threads must not be left behind.
const held = globalThis as typeof globalThis & {
	watersmeetEstimator?: { revision: number; ready: Promise<Estimator> };
};

/** The estimator over the newest revision; made on first use, and anew when the table has been published since. */
export async function estimator(): Promise<Estimator> {
	const revision = await tableRevision();
	const present = held.watersmeetEstimator;
	if (present && present.revision >= revision) return present.ready;
	const ready = serverDatabase()
		.then(readSnapshot)
		.then((snapshot) => new Estimator(snapshot));
	held.watersmeetEstimator = { revision, ready };
	ready.catch(() => {
		if (held.watersmeetEstimator?.ready === ready) held.watersmeetEstimator = undefined;
	});
	// Requests that began on the old revision may still have a second task to run on it.
	if (present) {
		const stopOld = () =>
			present.ready.then(
				(old) => old.stop(),
				// It never came to be, as those who asked for it were told.
				() => undefined
			);
		setTimeout(() => void stopOld(), OLD_REVISION_GRACE_MS).unref();
	}
	return ready;
}

/** Ends the threads, if any were started. */
export async function stopEstimator(): Promise<void> {
	const present = held.watersmeetEstimator;
	held.watersmeetEstimator = undefined;
	await (await present?.ready)?.stop();
}

/** Pools proportions of a caller's own. */
export async function poolOf(studies: Study[], level?: number) {
	return (await estimator()).pool(studies, level);
}
