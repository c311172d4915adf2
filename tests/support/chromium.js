/** Finds a Chromium for the end-to-end tests, or says in a sentence why there is none. */
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import process from 'node:process';
import { chromium } from '@playwright/test';

const SYSTEM = '/usr/bin/chromium';

/** @returns {string | null} a Chromium that is there: CHROMIUM_PATH, the system's, or Playwright's own */
function present() {
	return (
		[process.env.CHROMIUM_PATH, SYSTEM, chromium.executablePath()].find((path) => path && existsSync(path)) ??
		null
	);
}

/**
 * A Chromium to test with; as root on Debian a missing one is installed.
 * @returns {{ path: string } | { reason: string }}
 */
export function chromiumOrReason() {
	if (process.env.CHROMIUM_PATH && !existsSync(process.env.CHROMIUM_PATH))
		return { reason: `CHROMIUM_PATH names ${process.env.CHROMIUM_PATH}, which does not exist.` };
	const found = present();
	if (found) return { path: found };
	if (process.getuid?.() === 0 && existsSync('/etc/debian_version')) {
		process.stdout.write('No Chromium is here: installing the package chromium.\n');
		const environment = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
		for (const args of [['update'], ['install', '-y', '--no-install-recommends', 'chromium']]) {
			const { status, stderr } = spawnSync('apt-get', args, { env: environment, encoding: 'utf8' });
			if (status !== 0)
				return { reason: `apt-get ${args[0]} failed, so there is no Chromium. ${stderr.trim()}` };
		}
		const installed = present();
		if (installed) return { path: installed };
	}
	return {
		reason:
			'There is no Chromium: install the package chromium, run `npx playwright install chromium`, or name one in CHROMIUM_PATH.'
	};
}
