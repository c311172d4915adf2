import { describe, expect, it } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { literature, measurement } from '../../../../tests/support/madeUpLiterature';
import { rootShapeOf } from './rootShape';
import { seedLiterature } from './seed';

// What the shipped table says of the level stands in shippedSeed.test.ts.

async function shapeOf(measurements: Record<string, string>[], root: 'MB' | 'P' = 'MB') {
	await seedLiterature(await temporaryDatabase(), literature({ measurements }));
	return rootShapeOf('maxillary-first-molar', root);
}

const published = measurement({ mean: '12.5', locator: 'published' });
const ofTheTooth = measurement({ root: 'whole', mean: '13.5', locator: 'of the tooth' });
const recalled = measurement({ provenance: 'memory', mean: '11', locator: 'recalled' });

describe('the length of a root', () => {
	it('is the published one of the root itself, before that of the tooth and a recalled one', async () => {
		expect((await shapeOf([recalled, ofTheTooth, published])).length).toEqual({
			...{ mm: 12.5, range: null, source: 'adams-2001', locator: 'published', verified: true }
		});
	});

	it('is that of the tooth before a recalled one of the root', async () => {
		expect((await shapeOf([recalled, ofTheTooth])).length).toMatchObject({ mm: 13.5, verified: true });
	});

	it('is a recalled one, marked as such, before an assumed one', async () => {
		expect((await shapeOf([recalled])).length).toMatchObject({
			mm: 11,
			verified: false,
			source: 'adams-2001'
		});
	});

	it('is assumed where nothing fits: another tooth, root, quantity or unit, or no figure', async () => {
		const { length } = await shapeOf([
			measurement({ tooth: 'maxillary-second-molar' }),
			measurement({ root: 'P' }),
			measurement({ quantity: 'tooth-length' }),
			measurement({ unit: '%' }),
			measurement({ mean: '', min: '9' })
		]);
		expect(length).toEqual({ mm: 13, range: null, source: null, locator: null, verified: false });
	});

	it('is the middle of a range without a mean, and keeps the range; beside a mean it does not', async () => {
		const range = { min: '10', max: '14' };
		expect((await shapeOf([measurement({ ...range, mean: '' })])).length).toMatchObject({
			mm: 12,
			range: [10, 14]
		});
		expect((await shapeOf([measurement({ ...range, mean: '11' })])).length).toMatchObject({
			mm: 11,
			range: null
		});
	});
});

describe('the level of the confluence', () => {
	const level = (change: Record<string, string>) =>
		measurement({ quantity: 'confluence-distance-from-apex', mean: '3', ...change });

	it('is the published one of this root', async () => {
		const rows = [level({ root: 'P', mean: '5' }), level({ provenance: 'memory', mean: '4' }), level({})];
		expect((await shapeOf(rows)).confluence).toMatchObject({ mm: 3, verified: true });
	});

	it('is never a recalled one, nor that of another root or the whole tooth', async () => {
		const rows = [level({ provenance: 'memory' }), level({ root: 'P' }), level({ root: 'whole' })];
		expect((await shapeOf(rows)).confluence).toBeNull();
	});
});
