import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { freePort } from '../../support/freePort.js';

const START_TIMEOUT_MS = 60_000;

/** A built server of a test's own, for what the shared one must not be put through. */
export class OwnServer {
	private output = '';

	private constructor(
		readonly origin: string,
		private readonly child: ChildProcess,
		private readonly dataDir: string
	) {
		const collect = (chunk: Buffer) => (this.output += chunk.toString());
		child.stdout?.on('data', collect);
		child.stderr?.on('data', collect);
	}

	/** Starts a server and waits until it answers. */
	static async start(environment: Record<string, string> = {}): Promise<OwnServer> {
		const server = await OwnServer.spawn(environment);
		const deadline = Date.now() + START_TIMEOUT_MS;
		while (Date.now() < deadline && server.child.exitCode === null) {
			const response = await fetch(`${server.origin}/health`).catch(() => null);
			if (response?.ok) return server;
			await wait(100);
		}
		throw new Error(`The server did not start. ${server.output}`);
	}

	/** Starts a server without waiting for it. */
	static async spawn(environment: Record<string, string> = {}): Promise<OwnServer> {
		const port = String(await freePort());
		const dataDir = mkdtempSync(path.join(os.tmpdir(), 'watersmeet-own-'));
		const child = spawn(process.execPath, ['src/cli/start.js'], {
			env: { ...process.env, PORT: port, ORIGIN: '', DATA_DIR: dataDir, LOG_LEVEL: 'info', ...environment },
			stdio: ['ignore', 'pipe', 'pipe']
		});
		return new OwnServer(`http://localhost:${port}`, child, dataDir);
	}

	/** Waits until the server has printed something, and gives the match of it that came last. */
	async printed(pattern: RegExp): Promise<RegExpMatchArray> {
		const deadline = Date.now() + START_TIMEOUT_MS;
		while (Date.now() < deadline) {
			const found = [...this.output.matchAll(new RegExp(pattern, 'g'))].at(-1);
			if (found) return found;
			await wait(50);
		}
		throw new Error(`The server did not print ${pattern}. ${this.output}`);
	}

	/** Everything it has printed so far. */
	get printedSoFar(): string {
		return this.output;
	}

	signal(name: NodeJS.Signals) {
		this.child.kill(name);
	}

	/** Waits for the end of the process. */
	async ended(): Promise<{ code: number | null; output: string }> {
		if (this.child.exitCode === null && this.child.signalCode === null) await once(this.child, 'close');
		rmSync(this.dataDir, { recursive: true, force: true });
		return { code: this.child.exitCode, output: this.output };
	}

	/** Ends the process and waits for it. */
	async stop() {
		this.signal('SIGTERM');
		return this.ended();
	}
}
