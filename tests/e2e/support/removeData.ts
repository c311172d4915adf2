import { rmSync } from 'node:fs';

/** Removes the data folder of the server under test. */
export default function removeData() {
	if (process.env.E2E_DATA) rmSync(process.env.E2E_DATA, { recursive: true, force: true });
}
