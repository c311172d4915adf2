import { createReadStream } from 'node:fs';
import fs from 'node:fs/promises';
import path from 'node:path';
import { isStoredName, type Store } from './store';

/**
 * Keeps files in a folder of this machine.
 * @param folder made when the first file comes
 */
export function diskStore(folder: string): Store {
	const place = (name: string) => {
		if (!isStoredName(name)) throw new Error('This is no name of a stored file.');
		return path.join(folder, name);
	};
	const unlessMissing = async <Result>(work: Promise<Result>): Promise<Result | null> => {
		try {
			return await work;
		} catch (error) {
			if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
			throw error;
		}
	};
	return {
		async put(name, bytes) {
			await fs.mkdir(folder, { recursive: true });
			// Under another name until it is whole and on the disk: a crash leaves no half file behind the real one.
			const partial = `${place(name)}.partial`;
			const file = await fs.open(partial, 'wx', 0o600);
			try {
				await file.writeFile(bytes);
				await file.sync();
			} finally {
				await file.close();
			}
			await fs.rename(partial, place(name));
		},
		async open(name) {
			const stat = await unlessMissing(fs.stat(place(name)));
			return stat && { bytes: stat.size, stream: createReadStream(place(name)) };
		},
		read: (name) => unlessMissing(fs.readFile(place(name))),
		async remove(name) {
			await fs.rm(place(name), { force: true });
		}
	};
}
