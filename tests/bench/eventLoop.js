/**
 * Loaded into the measured server with --import: watches its event loop. SIGUSR2 writes the delays since the last signal to the file
 * EVENT_LOOP_REPORT names, as JSON, and starts anew.
 */
import { writeFileSync } from 'node:fs';
import { monitorEventLoopDelay } from 'node:perf_hooks';
import process from 'node:process';
import { isMainThread } from 'node:worker_threads';

const NANOSECONDS_PER_MS = 1e6;
const RESOLUTION_MS = 5;

if (isMainThread) {
	const delays = monitorEventLoopDelay({ resolution: RESOLUTION_MS });
	delays.enable();
	process.on('SIGUSR2', () => {
		const report = {
			p99Ms: delays.percentile(99) / NANOSECONDS_PER_MS,
			maxMs: delays.max / NANOSECONDS_PER_MS,
			memoryMb: Math.round(process.memoryUsage.rss() / 2 ** 20)
		};
		writeFileSync(process.env.EVENT_LOOP_REPORT ?? '', JSON.stringify(report));
		delays.reset();
	});
}
