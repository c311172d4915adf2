/** What a page costs in scripts: the files its markup asks for before anything is clicked. */
import { gzipSync } from 'node:zlib';

/** Addresses of the scripts a page loads: its markup imports two, its Link header preloads what these need. */
function scriptsOf(html: string, link: string): string[] {
	const found = `${html} ${link}`.matchAll(/["<](?:\.{1,2}\/)*\/?(_app\/immutable\/[^"<>\s]+\.js)[">]/g);
	return [...new Set([...found].map(([, address]) => `/${address}`))];
}

/**
 * Bytes of a page's scripts, each packed by itself with gzip at its default level.
 * @param origin of a running server
 * @param path of the page
 * @throws Error for a page without scripts, or a script that is not there
 */
export async function scriptBytes(origin: string, path: string): Promise<number> {
	const page = await fetch(origin + path);
	const scripts = scriptsOf(await page.text(), page.headers.get('link') ?? '');
	// The two of the markup alone would be a page whose preloads were not read.
	if (scripts.length <= 2) throw new Error(`${path} names no script but its start.`);
	const sizes = scripts.map(async (address) => {
		const response = await fetch(origin + address);
		if (!response.ok) throw new Error(`${address}: ${response.status}`);
		return gzipSync(Buffer.from(await response.arrayBuffer())).byteLength;
	});
	return (await Promise.all(sizes)).reduce((sum, size) => sum + size, 0);
}
