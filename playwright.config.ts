import { randomUUID } from 'node:crypto';
import os from 'node:os';
import path from 'node:path';
import process from 'node:process';
import { defineConfig } from '@playwright/test';
import { chromiumOrReason } from './tests/support/chromium.js';
import { freePort } from './tests/support/freePort.js';

const chromium = chromiumOrReason();

// The workers read this file again and inherit what the first reading settled; knip reads it too, so reading it makes nothing.
process.env.E2E_PORT ??= String(await freePort());
process.env.E2E_DATA ??= path.join(os.tmpdir(), `watersmeet-e2e-${randomUUID()}`);
const origin = `http://localhost:${process.env.E2E_PORT}`;
const isRoot = process.getuid?.() === 0;

export default defineConfig({
	testDir: 'tests/e2e',
	outputDir: 'test-results',
	fullyParallel: true,
	forbidOnly: true,
	workers: 2,
	timeout: 60_000,
	expect: { timeout: 10_000 },
	globalTeardown: './tests/e2e/support/removeData.ts',
	use: {
		baseURL: origin,
		viewport: { width: 1280, height: 900 },
		// The system's own browser: `channel` would look for a download of Playwright's. Root has no sandbox.
		// Where there is none, Playwright says how to get its own.
		launchOptions: {
			...('path' in chromium && { executablePath: chromium.path }),
			args: isRoot ? ['--no-sandbox'] : []
		}
	},
	webServer: {
		command: 'node src/cli/start.js',
		url: `${origin}/health`,
		timeout: 180_000,
		reuseExistingServer: false,
		gracefulShutdown: { signal: 'SIGTERM', timeout: 10_000 },
		stdout: 'pipe',
		env: {
			PORT: process.env.E2E_PORT,
			ORIGIN: origin,
			DATA_DIR: process.env.E2E_DATA,
			LOG_LEVEL: 'warn',
			RATE_LIMIT_PER_MINUTE: '1000000'
		}
	}
});
