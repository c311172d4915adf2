import { expect, test, type APIRequestContext } from '@playwright/test';

/** A root with few samples, cheap to work out. */
const ADDRESS = '/api/v1/teeth/maxillary-canine/roots/single/expectation';
const REQUESTS = 100;
const PATIENCE_MS = 90_000;

interface Expectation {
	tooth: string;
	filters: { minTotal?: number };
	questions: { studies: { source: string; total: number; weight: number }[] }[];
	coverage: object | null;
}

const ask = (request: APIRequestContext, minTotal: number) =>
	request.get(`${ADDRESS}?minTotal=${minTotal}`, { timeout: PATIENCE_MS });
/** Of the samples of whole roots, which the first question counts; what each weighs depends on the others. */
const samplesOf = ({ questions }: Expectation) =>
	questions[0].studies.map(({ weight: _, ...sample }) => sample);

test.describe.configure({ timeout: 2 * PATIENCE_MS });

// No answer of these is known yet: the server is new and no other test asks them. How often each is worked out,
// cache.test.ts counts.
test('a hundred different questions at once, all cold, each get their own answer', async ({ request }) => {
	const totals = Array.from({ length: REQUESTS }, (_, i) => 11 * (i + 1));
	const responses = await Promise.all(totals.map((minTotal) => ask(request, minTotal)));
	expect(responses.map((response) => response.status())).toEqual(totals.map(() => 200));
	const answers = await Promise.all(
		responses.map(async (response) => (await response.json()) as Expectation)
	);
	expect(answers.map(({ filters }) => filters)).toEqual(totals.map((minTotal) => ({ minTotal })));
	const all = samplesOf((await (await ask(request, 1)).json()) as Expectation);
	expect(all.length).toBeGreaterThan(1);
	answers.forEach((answer, i) => {
		expect(answer.tooth).toBe('maxillary-canine');
		expect(samplesOf(answer)).toEqual(all.filter(({ total }) => total >= totals[i]));
	});
});

test('one question asked ten times at once, cold, gets one answer', async ({ request }) => {
	const ten = async () => {
		const responses = await Promise.all(Array.from({ length: 10 }, () => ask(request, 2)));
		expect(responses.map((response) => response.status())).toEqual(responses.map(() => 200));
		return Promise.all(responses.map((response) => response.text()));
	};

	// The coverage beside the answer comes when it is known, perhaps between the first and the tenth.
	const cold = (await ten()).map((text) => JSON.parse(text) as Expectation);
	const without = cold.map((answer) => ({ ...answer, coverage: null }));
	expect(without).toEqual(without.map(() => without[0]));

	let known: Expectation['coverage'] = null;
	await expect
		.poll(
			async () => {
				known = ((await (await ask(request, 2)).json()) as Expectation).coverage;
				return known !== null;
			},
			{ timeout: PATIENCE_MS }
		)
		.toBe(true);
	const warm = await ten();
	expect(warm).toEqual(warm.map(() => warm[0]));
	expect(JSON.parse(warm[0])).toEqual({ ...without[0], coverage: known });
	for (const { coverage } of cold.filter((answer) => answer.coverage !== null))
		expect(coverage).toEqual(known);
});
