import { expect, test, type APIRequestContext } from '@playwright/test';
import { drawing } from '../../src/lib/strings/drawing';
import { NO_EVIDENCE } from './support/places';

const API = '/api/v1';

interface Estimate {
	mean: number;
	interval: [number, number];
}
type Fates = Record<keyof typeof drawing.fates, Estimate | undefined>;
interface Answer {
	prior: { fates: Fates; meet: Estimate; anotherCanal: Estimate | null };
	posterior: { fates: Fates; meet: Estimate; anotherCanal: Estimate | null };
	steps: {
		fates: Record<string, number>;
		intervals: Record<string, [number, number]>;
		expected: { meet: number; never: number } | null;
	}[];
	decision: { advice: string | null };
	evidence: { studies: number; sources: string[] };
	notes: string[];
}
interface Expectation {
	evidence: { studies: number; sources: string[] };
	questions: { borrowed: boolean; studies: unknown[]; observed: unknown; predictive: Estimate }[];
}

const MB = { tooth: 'maxillary-first-molar', root: 'MB' };
const PREMOLAR = { tooth: 'maxillary-first-premolar', root: 'whole' };
const found = (test: string, result: string, pair?: string) => ({ test, result, ...(pair && { pair }) });

async function ask(request: APIRequestContext, question: object): Promise<Answer> {
	const response = await request.post(`${API}/confluence`, {
		data: { canals: 2, findings: [], ...question }
	});
	expect(response.status(), await response.text()).toBe(200);
	return (await response.json()) as Answer;
}

async function expectationOf(request: APIRequestContext, tooth: string, root: string, query = '') {
	const response = await request.get(`${API}/teeth/${tooth}/roots/${root}/expectation${query}`);
	expect(response.status()).toBe(200);
	return (await response.json()) as Expectation;
}

/** What a page says, as it was sent, without its marks: no script has run. */
async function words(request: APIRequestContext, address: string): Promise<string> {
	const response = await request.get(address);
	expect(response.status()).toBe(200);
	return (await response.text())
		.replace(/<script[^]*?<\/script>|<!--[^]*?-->|<[^>]+>/g, ' ')
		.replace(/[\s\u00a0]+/g, ' ');
}

/** Whole percent as the screens write it; apart from the product's own formatter. */
const number = (p: number) =>
	p > 0 && p < 0.01 ? 'under 1' : p < 1 && p > 0.99 ? 'over 99' : String(Math.round(p * 100));
const percent = (p: number) => `${number(p)} %`;
const range = ([lower, upper]: [number, number]) =>
	number(lower) === number(upper) ? percent(lower) : `${number(lower)} to ${percent(upper)}`;
const figure = ({ mean, interval }: Estimate) => `${percent(mean)} (${range(interval)})`;

for (const [tooth, root, query] of [
	['maxillary-first-molar', 'MB', ''],
	['maxillary-first-molar', 'MB', '?method=micro-ct'],
	['mandibular-first-molar', 'M', ''],
	['maxillary-central-incisor', 'single', ''],
	['mandibular-second-premolar', 'whole', '?minTotal=100'],
	['mandibular-first-molar', 'D', '?yearFrom=2000&exclude=vertucci-1984']
]) {
	test(`the page of ${tooth} ${root} ${query} says the digits of the API`, async ({ request }) => {
		const { questions } = await expectationOf(request, tooth, root, query);
		const { mean, interval } = questions[0].predictive;
		const page = await words(request, `/teeth/${tooth}/${root}${query}`);
		const [, said] = /More than one canal: (.*?)\. From \d+ sources?/.exec(page) ?? [];
		expect(said?.replace(/^.*?\(/, '(').replaceAll(' )', ')')).toBe(
			`(${percent(mean)}); in other populations ${range(interval)}`
		);
	});
}

for (const [name, question, query] of [
	['two canals', MB, 'canals=2'],
	[
		'two canals and three findings',
		{
			...MB,
			search: 'microscope',
			findings: [found('draw', 'positive'), found('cone-mark', 'positive'), found('two-files', 'negative')]
		},
		'canals=2&search=microscope&draw=positive&cone-mark=positive&two-files=negative'
	],
	[
		'three canals',
		{
			tooth: 'mandibular-first-molar',
			root: 'M',
			canals: 3,
			findings: [found('cone-mark', 'positive', 'MB-ML')]
		},
		'canals=3&cone-mark=positive&cone-mark-pair=MB-ML'
	],
	['one root of a premolar', { ...PREMOLAR, rootsSeen: 'one' }, 'canals=2&rootsSeen=one'],
	['one canal and two orifices', { ...MB, canals: 1, orifices: 2 }, 'canals=1&orifices=2']
] as const) {
	test(`with ${name} the page says the digits of the API`, async ({ request }) => {
		const answer = await ask(request, question);
		const page = await words(request, `/teeth/${question.tooth}/${question.root}/join?${query}`);
		for (const [fate, estimate] of Object.entries(answer.posterior.fates)) {
			const label = drawing.fates[fate as keyof Fates];
			const [, said] = new RegExp(`${label} [a-z0-9 ]+, (\\S+(?: 1| 99)? % \\([^)]*\\))`).exec(page) ?? [];
			expect(said, `${fate} in ${page.slice(0, 3000)}`).toBe(figure(estimate!));
		}
		const { anotherCanal } = answer.posterior;
		if (anotherCanal)
			expect(page).toContain(`, ${percent(anotherCanal.mean)} (${range(anotherCanal.interval)})`);
		else expect(page).toContain('Whether a fourth canal is there, the table cannot say.');
	});
}

test('the prior is the answer to the same question without its findings', async ({ request }) => {
	const findings = [found('cone-mark', 'positive'), found('draw', 'negative')];
	for (const question of [
		MB,
		{ ...MB, search: 'microscope-troughing', orifices: 2 },
		{ tooth: 'mandibular-second-molar', root: 'D', search: 'cbct' },
		{ ...PREMOLAR, filters: { methods: ['cbct'] } }
	]) {
		const { prior, posterior } = await ask(request, { ...question, findings });
		const without = await ask(request, question);
		expect(prior).toEqual({
			fates: without.posterior.fates,
			meet: without.posterior.meet,
			anotherCanal: without.posterior.anotherCanal
		});
		expect(without.prior).toEqual(prior);
		expect(posterior.fates).not.toEqual(prior.fates);
	}
});

test('the probabilities of the fates sum to one, at every step', async ({ request }) => {
	const findings = [
		found('cone-mark', 'positive'),
		found('draw', 'positive'),
		found('cbct-reading', 'negative')
	];
	const { prior, posterior, steps } = await ask(request, { ...MB, findings });
	for (const fates of [prior.fates, posterior.fates])
		expect(Object.values(fates).reduce((sum, one) => sum + (one?.mean ?? 0), 0)).toBeCloseTo(1, 9);
	expect(steps).toHaveLength(3);
	for (const { fates } of steps)
		expect(Object.values(fates).reduce((sum, mean) => sum + mean, 0)).toBeCloseTo(1, 9);
	// The account ends where the answer stands.
	expect(steps[2].fates['shared-exit']).toBeCloseTo(posterior.fates['shared-exit']!.mean, 9);
	expect(steps[2].intervals['shared-exit']).toEqual(posterior.fates['shared-exit']!.interval);
	expect(steps.map(({ expected }) => expected!.meet > expected!.never)).toEqual([true, true, false]);
});

test('an unclear finding changes nothing', async ({ request }) => {
	const clear = await ask(request, { ...MB, findings: [found('draw', 'positive')] });
	const unclear = await ask(request, {
		...MB,
		findings: [found('cone-mark', 'unclear'), found('draw', 'positive')]
	});
	expect(unclear.posterior).toEqual(clear.posterior);
	expect(unclear.decision).toEqual(clear.decision);
});

test('of a premolar, one root seen asks for the single root, two for one of them alone', async ({
	request
}) => {
	const single = await ask(request, { ...PREMOLAR, root: 'single' });
	for (const root of ['whole', 'single'])
		expect(await ask(request, { ...PREMOLAR, root, rootsSeen: 'one' })).toEqual(single);
	const whole = await ask(request, PREMOLAR);
	expect(whole.posterior).not.toEqual(single.posterior);
	const buccal = await ask(request, { ...PREMOLAR, root: 'B' });
	expect(await ask(request, { ...PREMOLAR, root: 'B', rootsSeen: 'two' })).toEqual(buccal);
	expect(buccal.posterior).not.toEqual(single.posterior);
});

test('a root without any sample borrows every figure, says so and advises nothing', async ({ request }) => {
	const [, , tooth, root] = NO_EVIDENCE.split('/');
	const { evidence, questions } = await expectationOf(request, tooth, root);
	expect(evidence).toMatchObject({ studies: 0, sources: [] });
	for (const { borrowed, studies, observed } of questions)
		expect({ borrowed, studies, observed }).toEqual({ borrowed: true, studies: [], observed: null });

	// Findings as strong as they come: still no advice.
	const findings = ['cone-mark', 'two-files', 'cbct-reading', 'file-contact'].map((test) =>
		found(test, 'positive')
	);
	const { decision, notes, posterior } = await ask(request, { tooth, root, findings });
	expect(posterior.fates['shared-exit']!.mean).toBeGreaterThan(0.9);
	expect(decision.advice).toBeNull();
	expect(notes.join(' ')).toContain('No evidence');
});
