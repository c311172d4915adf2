import { beforeAll, describe, expect, it } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { cslSource, literature } from '../../../../tests/support/madeUpLiterature';
import { seedLiterature } from './seed';
import { supplementsOfSource } from './supplementsOfSource';

const diagnostic = {
	...{
		source_id: 'adams-2001',
		locator: 'table 2',
		test: 'CBCT',
		target: 'second canal',
		tooth: '',
		root: 'MB'
	},
	...{ reference_standard: 'sectioning', n: '40', tp: '18', fp: '2', fn: '2', tn: '18' },
	...{ sensitivity: '0.9', specificity: '0.9', kappa: '0.8', provenance: 'secondary', note: '' }
};
const standard = {
	...{
		source_id: 'adams-2001',
		standard: 'Norm 1',
		item: 'size 25',
		value: '0.25',
		lower: '0.23',
		upper: '0.27'
	},
	...{ unit: 'mm', provenance: 'memory', note: 'at D0' }
};
const characteristic = (finding: string, sources: string, basis = 'derived') => ({
	...{ finding, parameter: 'each-canal', tooth_group: 'any', beta_a: '4', beta_b: '5', sd_mm: '' },
	...{ basis, source_ids: sources, note: '' }
});

beforeAll(async () => {
	const db = await temporaryDatabase();
	await seedLiterature(
		db,
		literature({
			sources: [cslSource('adams-2001'), cslSource('adams-2001b')],
			diagnostics: [diagnostic],
			standards: [standard],
			characteristics: [
				characteristic('one', 'adams-2001;adams-2001b'),
				characteristic('two', 'adams-2001b'),
				characteristic('three', '', 'assumed')
			]
		})
	);
});

describe('what the table took from a source besides entries', () => {
	it('is its diagnostics and standards with place and standing, and the values worked out from it', async () => {
		const { diagnostics, standards, characteristics } = await supplementsOfSource('adams-2001');
		expect(diagnostics).toEqual([
			{
				head: 'CBCT: second canal',
				figures: 'sensitivity 90\u00a0%, specificity 90\u00a0%, kappa 0.8, TP 18, FP 2, FN 2, TN 18, n = 40',
				detail: 'MB; against sectioning; table 2',
				provenance: 'secondary',
				verified: true
			}
		]);
		expect(standards).toEqual([
			{
				...{ head: 'size 25', figures: '0.25 (0.23 to 0.27) mm', detail: 'Norm 1; at D0' },
				...{ provenance: 'memory', verified: false }
			}
		]);
		expect(characteristics.map(({ head, figures }) => `${head} ${figures}`)).toEqual([
			'one: each canal Beta(4, 5)'
		]);
	});

	it('is nothing for a source that gave none, and ids that only begin alike are told apart', async () => {
		const { diagnostics, characteristics } = await supplementsOfSource('adams-2001b');
		expect(diagnostics).toEqual([]);
		expect(characteristics).toHaveLength(2);
		expect((await supplementsOfSource('adams')).characteristics).toEqual([]);
	});
});
