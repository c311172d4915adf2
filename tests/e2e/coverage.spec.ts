import type { APIRequestContext } from '@playwright/test';
import { expect, open, test } from './support/test';

const API = '/api/v1';

interface Question {
	id: string;
	samples: number;
	level95: number;
	level80: number;
	flagged: boolean;
}
interface TableCoverage {
	samples: number;
	level95: number;
	level80: number;
	roots: { tooth: string; root: string; questions: (Question & { logScore: number; method: object })[] }[];
}
interface Expectation {
	coverage: { samples: number; questions: Question[] } | null;
}

/** A new server needs some seconds of work for it; a busy machine, more. */
const PATIENCE_MS = 90_000;

async function coverageOf(request: APIRequestContext): Promise<TableCoverage> {
	const response = await request.get(`${API}/coverage`, { timeout: PATIENCE_MS });
	expect(response.status(), await response.text()).toBe(200);
	return (await response.json()) as TableCoverage;
}

/** Whole percent as the screens write it; apart from the product's own formatter. */
const percent = (p: number) =>
	`${p > 0 && p < 0.01 ? 'under 1' : p < 1 && p > 0.99 ? 'over 99' : Math.round(p * 100)} %`;
const plain = (text: string) => text.replace(/[\s\u00a0]+/g, ' ').trim();

test.describe.configure({ timeout: 2 * PATIENCE_MS });

test('/how prints the coverage of the API, and a row for each of its questions', async ({
	page,
	request
}) => {
	const { samples, level95, level80, roots } = await coverageOf(request);
	const questions = roots.flatMap((root) => root.questions);
	expect(samples).toBeGreaterThan(0);
	expect(samples).toBe(questions.reduce((sum, question) => sum + question.samples, 0));

	await open(page, '/how');
	const section = page.locator('section[aria-labelledby="coverage"]');
	expect(plain((await section.textContent()) ?? '')).toContain(
		`Of ${samples} samples left out in turn, ${percent(level95)} fell into their 95 % range ` +
			`and ${percent(level80)} into their 80 % range.`
	);
	const rows = section.locator('tbody tr');
	await expect(rows).toHaveCount(questions.length);
	const figures = await rows.evaluateAll((all) =>
		all.map((row) => [...row.querySelectorAll('td')].slice(0, 3).map((cell) => cell.textContent ?? ''))
	);
	expect(figures.map((cells) => cells.map(plain))).toEqual(
		questions.map((question) => [
			String(question.samples),
			percent(question.level95),
			percent(question.level80)
		])
	);
});

for (const [tooth, root] of [
	['maxillary-first-molar', 'MB'],
	['mandibular-first-molar', 'M'],
	['maxillary-first-premolar', 'whole']
]) {
	test(`the coverage of ${tooth} ${root} is the same beside its expectation`, async ({ request }) => {
		const { roots } = await coverageOf(request);
		const found = roots.find((one) => one.tooth === tooth && one.root === root);
		const inTable = found?.questions.map(({ id, samples, level95, level80, flagged }) => ({
			...{ id, samples, level95, level80, flagged }
		}));
		expect(inTable?.length).toBeGreaterThan(0);

		let beside: Expectation['coverage'] = null;
		await expect
			.poll(
				async () => {
					const response = await request.get(`${API}/teeth/${tooth}/roots/${root}/expectation`);
					beside = response.ok() ? ((await response.json()) as Expectation).coverage : null;
					return beside !== null;
				},
				{ timeout: PATIENCE_MS }
			)
			.toBe(true);
		expect(beside).toMatchObject({
			samples: inTable!.reduce((sum, { samples }) => sum + samples, 0),
			questions: inTable
		});
	});
}
