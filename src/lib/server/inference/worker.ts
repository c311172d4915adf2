/** Entry of a worker thread: the pure inference over one revision of the table, which arrives as the thread's data. */
import { workerData } from 'node:worker_threads';
import { createTasks, type Tasks } from './tasks';

const tasks = createTasks(workerData as Parameters<typeof createTasks>[0]);

/** Runs one task. Piscina calls this with what the estimator posted. */
export default function run({ name, args }: { name: keyof Tasks; args: unknown[] }): unknown {
	return (tasks[name] as (...values: unknown[]) => unknown)(...args);
}
