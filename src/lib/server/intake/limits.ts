/** What a file that is imported may be. */
export const MOST_FILE_BYTES = 20 * 1024 * 1024;
/** Bytes of a spreadsheet when its archive is unpacked. */
export const MOST_UNPACKED_BYTES = 100 * 1024 * 1024;
/** Parts of a spreadsheet's archive: a real one has some dozens. */
export const MOST_PARTS = 1_000;
export const MOST_ROWS = 50_000;
export const MOST_COLUMNS = 100;
/** Problems listed one by one; the others are counted. */
export const MOST_PROBLEMS = 200;
/** Memory of the thread that reads a file. */
export const THREAD_MEMORY_MB = 768;

/** Why a file cannot be read at all, in a sentence that says what to do. */
export class UnreadableFile extends Error {}
