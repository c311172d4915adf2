import { mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { connect } from '$lib/server/db';
import type { Sequelize } from 'sequelize';
import { afterAll } from 'vitest';

const folders: string[] = [];
const open: Sequelize[] = [];

afterAll(async () => {
	for (const database of open) await database.close();
	for (const folder of folders) rmSync(folder, { recursive: true, force: true });
});

/** A folder of the test file's own, gone when its tests are. */
export function temporaryFolder(): string {
	const folder = mkdtempSync(path.join(os.tmpdir(), 'watersmeet-'));
	folders.push(folder);
	return folder;
}

/** An empty, migrated database in a folder of its own. The models are tied to the one opened last. */
export async function temporaryDatabase(): Promise<Sequelize> {
	const database = await connect(temporaryFolder());
	open.push(database);
	return database;
}
