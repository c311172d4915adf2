/** Lighthouse's marks of the main screens on the built server, in the system's own Chromium. */
import { launch } from 'chrome-launcher';
import lighthouse from 'lighthouse';
import { chromiumOrReason } from '../support/chromium.js';

const CATEGORIES = ['performance', 'accessibility', 'best-practices'] as const;
/** Marks move by some points from run to run: the median of three. */
const RUNS = 3;
const MARK_TARGET = 95;

/** Lighthouse's marks of one screen, 0 to 100. */
type Marks = Record<(typeof CATEGORIES)[number], number>;

/**
 * Measures a screen as Lighthouse does by default: a slow phone on a slow network.
 * @param address of a page
 * @param port of a browser that waits for commands
 * @throws Error where Lighthouse could not load the page
 */
async function marksOf(address: string, port: number): Promise<Marks> {
	const result = await lighthouse(address, { port, onlyCategories: [...CATEGORIES], logLevel: 'silent' });
	if (!result || result.lhr.runtimeError) throw new Error(`${address}: no marks.`);
	const { categories, audits } = result.lhr;
	const lost = CATEGORIES.flatMap((category) => categories[category].auditRefs)
		.filter(({ id, weight }) => weight > 0 && (audits[id].score ?? 1) < 0.9)
		.map(({ id }) => id);
	if (lost.length > 0) process.stdout.write(`  marks lost at ${address}: ${lost.join(', ')}\n`);
	return Object.fromEntries(
		CATEGORIES.map((category) => [category, Math.round((categories[category].score ?? 0) * 100)])
	) as Marks;
}

/**
 * Lighthouse's median marks of screens.
 * @param origin of a running server
 * @param screens name to path
 * @param print a line's three columns
 */
export async function lighthouseMarks(
	origin: string,
	screens: Record<string, string>,
	print: (what: string, value: string, target: string) => void
): Promise<void> {
	const chromium = chromiumOrReason();
	if (!('path' in chromium)) throw new Error(chromium.reason);
	const browser = await launch({
		chromePath: chromium.path,
		chromeFlags: ['--headless=new', ...(process.getuid?.() === 0 ? ['--no-sandbox'] : [])],
		logLevel: 'silent'
	});
	try {
		for (const [name, path] of Object.entries(screens)) {
			const runs: Marks[] = [];
			for (let run = 0; run < RUNS; run++) runs.push(await marksOf(origin + path, browser.port));
			const medians = CATEGORIES.map(
				(category) => runs.map((marks) => marks[category]).sort((a, b) => a - b)[Math.floor(RUNS / 2)]
			);
			print(
				`Lighthouse, ${name}: ${CATEGORIES.join(', ')}`,
				medians.join(' '),
				`target ≥ ${MARK_TARGET} each`
			);
		}
	} finally {
		browser.kill();
	}
}
