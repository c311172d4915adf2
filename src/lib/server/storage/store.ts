import type { ReadStream } from 'node:fs';

/** Where files are kept that people upload. Names are made by the caller from random bytes; a backend sees no other. */
export interface Store {
	/** Keeps bytes under a name that is not in use, whole or not at all. */
	put(name: string, bytes: Uint8Array): Promise<void>;
	/** Opens a file; null if there is none of this name. */
	open(name: string): Promise<{ bytes: number; stream: ReadStream } | null>;
	read(name: string): Promise<Buffer | null>;
	/** Removes a file; nothing happens if there is none. */
	remove(name: string): Promise<void>;
}

/** A name a store takes: what `newId` makes, with an ending. No dots that lead out of a folder, no slashes. */
export const isStoredName = (name: string): boolean => /^[\w-]{8,64}(\.[a-z]{2,5})?$/.test(name);
