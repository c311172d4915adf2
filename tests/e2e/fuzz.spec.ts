import { expect, test, type APIRequestContext } from '@playwright/test';
import fc from 'fast-check';
import { expectProblem } from './support/refused';

/** Seeded, so that a failure comes again; fast-check prints the smallest body that fails. */
const SEED = 20260601;

const anything = fc.jsonValue({ maxDepth: 3 });
/** Mostly what a field may be, so that the bodies get past the schema, sometimes anything at all. */
const mostly = <Value>(good: fc.Arbitrary<Value>) =>
	fc.oneof({ weight: 24, arbitrary: good }, { weight: 1, arbitrary: anything });
const maybe = { requiredKeys: [] };

const place = fc.constantFrom(
	{ tooth: 'maxillary-first-molar', root: 'MB' },
	{ tooth: 'mandibular-first-molar', root: 'M' },
	{ tooth: 'maxillary-second-premolar', root: 'whole' },
	{ tooth: 'mandibular-third-molar', root: 'DL' },
	{ tooth: 'maxillary-canine', root: 'single' },
	{ tooth: 'constructor', root: '__proto__' }
);
const findings = fc.uniqueArray(
	fc.record({
		test: mostly(
			fc.constantFrom('cone-mark', 'draw', 'file-contact', 'two-files', 'angled-radiograph', 'cbct-reading')
		),
		result: mostly(fc.constantFrom('positive', 'negative', 'unclear')),
		pair: mostly(fc.constantFrom('MB-ML', 'MB1-MB2'))
	}),
	{ maxLength: 4, selector: ({ test: name }) => JSON.stringify(name) }
);
const filters = fc.record(
	{
		methods: mostly(fc.subarray(['cbct', 'clearing', 'micro-ct'])),
		countries: mostly(fc.subarray(['BRA', 'CHN'])),
		yearFrom: mostly(fc.integer({ min: 1899, max: 2020 })),
		minTotal: mostly(fc.integer({ min: 0, max: 1000 }))
	},
	maybe
);
const question = fc
	.tuple(
		place,
		fc.record(
			{
				canals: mostly(fc.integer({ min: 2, max: 3 })),
				findings: mostly(findings),
				orifices: mostly(fc.integer({ min: 1, max: 3 })),
				search: mostly(fc.constantFrom('unaided', 'microscope', 'cbct')),
				threshold: mostly(fc.double({ min: 0.49, max: 1, noNaN: true })),
				filters: mostly(filters)
			},
			{ requiredKeys: ['canals', 'findings'] }
		)
	)
	.map(([where, rest]): unknown => ({ ...where, ...rest }));

const events = fc.oneof(fc.integer({ min: 0, max: 300 }), fc.constantFrom(0, 1, 300));
const total = fc.oneof(fc.integer({ min: 300, max: 900 }), fc.constantFrom(300, 10_000_000, 0));
const studies = fc.array(fc.record({ events: mostly(events), total: mostly(total) }), { maxLength: 6 });
const pooled = fc
	.record(
		{ studies: mostly(studies), level: mostly(fc.double({ min: 0.49, max: 1, noNaN: true })) },
		{ requiredKeys: ['studies'] }
	)
	.map((body): unknown => body);

/** A number in a range, ends included, or now and then anything. */
const within = (min: number, max: number) => mostly(fc.double({ min, max, noNaN: true }));
const shape = fc.record({ tip: within(0.06, 1.4), taper: within(0.005, 0.2) });
const level = fc
	.record(
		{
			workingLengths: mostly(fc.record({ first: within(5, 40), second: within(5, 40) })),
			measurements: mostly(
				fc.array(
					fc.record({
						kind: mostly(fc.constantFrom('cone-mark', 'cone-shortfall', 'file-contact', 'cbct')),
						value: within(0, 8)
					}),
					{ maxLength: 4 }
				)
			),
			canal: mostly(shape),
			cone: mostly(shape),
			secondShapedTo: mostly(fc.constantFrom('full', 'confluence', 'unknown'))
		},
		{ requiredKeys: ['workingLengths', 'measurements'] }
	)
	.map((body): unknown => body);

/** Whether a body was answered; if not, it was refused as it should be. */
async function answered(request: APIRequestContext, address: string, body: unknown): Promise<boolean> {
	const response = await request.post(address, {
		headers: { 'content-type': 'application/json' },
		data: Buffer.from(JSON.stringify(body))
	});
	const text = await response.text();
	const status = response.status();
	if (status === 200) {
		expect(JSON.parse(text)).toBeInstanceOf(Object);
		return true;
	}
	expect([400, 404, 422], text).toContain(status);
	expectProblem({ status, headers: response.headers(), text }, status);
	return false;
}

for (const [name, address, bodies, numRuns, leastAnswered] of [
	['questions whether canals join', '/api/v1/confluence', question, 200, 40],
	['studies to pool', '/api/v1/pool', pooled, 200, 40],
	['levels', '/api/v1/confluence-level', level, 200, 40],
	['values of any kind where a question is asked', '/api/v1/confluence', anything, 50, 0],
	['values of any kind where studies are pooled', '/api/v1/pool', anything, 50, 0]
] as const) {
	test(`${numRuns} random ${name} are answered or refused, never a failure`, async ({ request }) => {
		let good = 0;
		await fc.assert(
			fc.asyncProperty(bodies as fc.Arbitrary<unknown>, async (body) => {
				if (await answered(request, address, body)) good += 1;
			}),
			{ numRuns, seed: SEED }
		);
		// Else the bodies would only ever try the schema.
		expect(good).toBeGreaterThanOrEqual(leastAnswered);
	});
}
