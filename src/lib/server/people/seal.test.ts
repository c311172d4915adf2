import { readFileSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { temporaryFolder } from '../../../../tests/support/database';

let dataDir = '';
vi.mock('../config', () => ({
	environment: {
		get DATA_DIR() {
			return dataDir;
		}
	}
}));

/** The module as a server that starts anew has it. */
async function restarted() {
	vi.resetModules();
	return import('./seal');
}

beforeEach(() => {
	dataDir = path.join(temporaryFolder(), 'data');
});

describe('sealing', () => {
	it('gives the text back, also after a restart, and never the same twice', async () => {
		const { seal } = await restarted();
		const [one, two] = [seal('JBSWY3DP, née'), seal('JBSWY3DP, née')];
		expect(one).not.toBe(two);
		expect(Buffer.from(one, 'base64').toString('latin1')).not.toContain('JBSWY3DP');
		const { unseal } = await restarted();
		expect(unseal(one)).toBe('JBSWY3DP, née');
	});

	it('keeps its key where only the server reads it', async () => {
		(await restarted()).seal('x');
		expect(statSync(path.join(dataDir, 'secret.key')).mode & 0o777).toBe(0o600);
		expect(Buffer.from(readFileSync(path.join(dataDir, 'secret.key'), 'utf8'), 'base64')).toHaveLength(32);
	});

	it('refuses what was changed, what another installation sealed, and a file that is no key', async () => {
		const { seal, unseal } = await restarted();
		const bytes = Buffer.from(seal('text'), 'base64');
		bytes[bytes.length - 1] ^= 1;
		expect(() => unseal(bytes.toString('base64'))).toThrow();
		const foreign = seal('text');
		dataDir = path.join(temporaryFolder(), 'other');
		const other = await restarted();
		expect(() => other.unseal(foreign)).toThrow();
		writeFileSync(path.join(dataDir, 'secret.key'), 'short');
		expect(() => other.sign('x')).not.toThrow();
		const broken = await restarted();
		expect(() => broken.seal('x')).toThrow(/holds no key/);
	});
});

describe('signing', () => {
	it('proves its own texts and no others', async () => {
		const { sign, unsign } = await restarted();
		const signed = sign('["a","b.c"]');
		expect(unsign(signed)).toBe('["a","b.c"]');
		for (const wrong of ['', '.', 'a.b', signed.slice(0, -1), `x${signed}`, '["a","b.c"].'])
			expect(unsign(wrong)).toBe(null);
	});
});
