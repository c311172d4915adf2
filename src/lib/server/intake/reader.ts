/** Hands files to the thread that reads them. */
import path from 'node:path';
import { Piscina } from 'piscina';
import { fileTypeFromBuffer } from 'file-type';
import { intake as words } from '$lib/strings/intake';
import { MOST_FILE_BYTES, THREAD_MEMORY_MB } from './limits';
import type { ReadAnswer, ReadTask } from './worker';

/** The second build puts the worker here, beside kit's own server. */
const WORKER_FILE = 'build/entries/intakeWorker.js';
/** Files that may wait; each holds up to 20 MB. */
const MOST_WAITING = 5;
const IDLE_MS = 60_000;

// Hot reload evaluates this module again; the thread must not be left behind.
const held = globalThis as typeof globalThis & { watersmeetReader?: Piscina };

/** What kind of table bytes are, by what they hold; or in a sentence why they are none. */
export async function kindOf(bytes: Buffer): Promise<{ kind: 'csv' | 'xlsx' } | { failure: string }> {
	if (bytes.length === 0) return { failure: words.unreadable.empty };
	if (bytes.length > MOST_FILE_BYTES) return { failure: words.unreadable.tooLarge };
	const sniffed = await fileTypeFromBuffer(bytes).catch(() => undefined);
	// An archive whose parts are in an order the sniffer does not know is still worth a try: the reader says if it is none.
	if (sniffed?.ext === 'xlsx' || sniffed?.ext === 'zip') return { kind: 'xlsx' };
	if (sniffed?.ext === 'cfb') return { failure: words.unreadable.oldSheet };
	if (sniffed) return { failure: words.unreadable.notTable(sniffed.ext) };
	return { kind: 'csv' };
}

/** Reads and checks a file in a thread of its own, whose memory has an end. */
export async function readInThread(task: ReadTask): Promise<ReadAnswer> {
	// The development server and unit tests have no built worker; there the file is read in place.
	if (import.meta.env.DEV) return (await import('./worker')).default(task);
	held.watersmeetReader ??= new Piscina({
		filename: path.resolve(WORKER_FILE),
		minThreads: 0,
		maxThreads: 1,
		maxQueue: MOST_WAITING,
		idleTimeout: IDLE_MS,
		resourceLimits: { maxOldGenerationSizeMb: THREAD_MEMORY_MB }
	});
	if (held.watersmeetReader.queueSize >= MOST_WAITING) return { unreadable: words.unreadable.busy };
	try {
		return (await held.watersmeetReader.run(task)) as ReadAnswer;
	} catch (error) {
		if ((error as NodeJS.ErrnoException).code === 'ERR_WORKER_OUT_OF_MEMORY')
			return { unreadable: words.unreadable.memory };
		throw error;
	}
}

/** Ends the thread, if there is one. */
export async function stopReader(): Promise<void> {
	const reader = held.watersmeetReader;
	held.watersmeetReader = undefined;
	await reader?.destroy();
}
