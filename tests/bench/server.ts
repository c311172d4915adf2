/** Starts the built server for a measurement, and asks it how its event loop fared. */
import { spawn, type ChildProcess } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { freePort } from '../support/freePort.js';

const START_TIMEOUT_MS = 120_000;

/** Delays of the server's event loop since it was last asked. */
export interface EventLoopReport {
	p99Ms: number;
	maxMs: number;
	memoryMb: number;
}

/** A built server of the measurement's own, with a fresh database. */
export class MeasuredServer {
	private constructor(
		readonly address: string,
		readonly dataDir: string,
		private readonly child: ChildProcess,
		private readonly report: string
	) {}

	static async start(): Promise<MeasuredServer> {
		const dataDir = mkdtempSync(path.join(os.tmpdir(), 'watersmeet-bench-'));
		const report = path.join(dataDir, 'event-loop.json');
		const port = await freePort();
		const child = spawn(process.execPath, ['--import', './tests/bench/eventLoop.js', 'src/cli/start.js'], {
			stdio: ['ignore', 'ignore', 'inherit'],
			env: {
				...process.env,
				PORT: String(port),
				ORIGIN: `http://localhost:${port}`,
				DATA_DIR: dataDir,
				LOG_LEVEL: 'silent',
				RATE_LIMIT_PER_MINUTE: '100000000',
				EVENT_LOOP_REPORT: report
			}
		});
		const server = new MeasuredServer(`http://localhost:${port}`, dataDir, child, report);
		const deadline = Date.now() + START_TIMEOUT_MS;
		while (!(await server.answers())) {
			if (Date.now() > deadline || child.exitCode !== null) throw new Error('The server did not start.');
			await wait(200);
		}
		return server;
	}

	private async answers(): Promise<boolean> {
		const response = await fetch(`${this.address}/health`).catch(() => null);
		return response?.ok ?? false;
	}

	/** What the event loop did since the last call. */
	async eventLoop(): Promise<EventLoopReport> {
		rmSync(this.report, { force: true });
		this.child.kill('SIGUSR2');
		while (!existsSync(this.report) || readFileSync(this.report, 'utf8') === '') await wait(20);
		return JSON.parse(readFileSync(this.report, 'utf8')) as EventLoopReport;
	}

	async stop(): Promise<void> {
		const ended = new Promise((resolve) => this.child.once('exit', resolve));
		this.child.kill('SIGTERM');
		await ended;
		rmSync(this.dataDir, { recursive: true, force: true });
	}
}
