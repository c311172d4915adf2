import fc from 'fast-check';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { LEAVES } from '$lib/anatomy/sequence';
import { readLiteratureFiles } from '$lib/server/table/literatureFiles';
import { checkEntry, type CheckContext } from './checks';
import { entryText, type EntryText } from './content';

/** A sample of 100 roots in three classes, with what a test changes about it. */
function typed(change: Partial<EntryText> = {}): EntryText {
	const figure = (category: string, count: string) => ({ category, count, percent: '', note: '' });
	return {
		...{ source: 'adams-2001', locator: 'table 2', tooth: 'maxillary-first-molar', root: 'MB', scope: 'all' },
		...{ country: 'BRA', method: 'cbct', subgroup: 'all', total: '100', measure: 'configuration' },
		provenance: 'read',
		figures: [figure('1', '40'), figure('2', '25'), figure('2-1', '35')],
		...change
	};
}
const one = (category: string, count: string, percent = '', more = {}) => [
	{ category, count, percent, note: '', ...more }
];

const remarksOf = (text: EntryText, level: string, context?: CheckContext) =>
	checkEntry(text, context)
		.remarks.filter((remark) => remark.level === level)
		.map((remark) => remark.path);

describe('an entry as typed', () => {
	it('that is complete is read without a word but the shares', () => {
		const { content, remarks } = checkEntry(typed());
		expect(content).toMatchObject({ source: 'adams-2001', total: 100, measure: 'configuration' });
		expect(content!.figures.map(({ count }) => count)).toEqual([40, 25, 35]);
		expect(remarks.map(({ level }) => level)).toEqual(['note', 'note', 'note']);
		expect(remarks[0].message).toContain('40 %');
	});

	it.each<[string, Partial<EntryText>, string]>([
		['without a source', { source: ' ' }, 'source'],
		['without a locator', { locator: '' }, 'locator'],
		['without a scope', { scope: '' }, 'scope'],
		['with a tooth nobody has', { tooth: 'upper-tusk' }, 'tooth'],
		['with a root nobody has', { root: 'Q' }, 'root'],
		['with a country in small letters', { country: 'bra' }, 'country'],
		['with a country that does not exist', { country: 'BRA+QQQ' }, 'country'],
		['with a method that is none', { method: 'telescope' }, 'method'],
		['with a measure that is none', { measure: 'weight' }, 'measure'],
		['with half a tooth', { total: '100.5' }, 'total'],
		['with thousands set apart', { total: '1,000' }, 'total'],
		['with a total of nothing', { total: '0' }, 'total'],
		['with a negative total', { total: '-3' }, 'total'],
		['without a category', { figures: [] }, 'figures'],
		['with an unnamed category', { figures: one('', '3') }, 'figures.0.category'],
		['with a category twice', { figures: [...one('2-1', '3'), ...one('2 - 1', '4')] }, 'figures.1.category'],
		['with a sequence that is none', { figures: one('2-2', '3') }, 'figures.0.category'],
		['with no number at all', { figures: one('2', '') }, 'figures.0.count'],
		['with a count above the total', { figures: one('2', '101') }, 'figures.0.count'],
		['with a percentage above 100', { figures: one('2', '', '101') }, 'figures.0.percent'],
		['with a word for joined', { measure: 'confluence', figures: one('fused', '3') }, 'figures.0.category'],
		['with zero canals', { measure: 'canal-count', figures: one('0', '3') }, 'figures.0.category'],
		['with a feature in capitals', { measure: 'feature', figures: one('MB2', '3') }, 'figures.0.category']
	])('%s is refused at that field', (_, change, field) => {
		expect(remarksOf(typed(change), 'error')).toEqual([field]);
		expect(checkEntry(typed(change)).content).toBeNull();
	});

	it.each<[string, Partial<EntryText>, string]>([
		['whose classes sum to too much', { figures: [...one('1', '80'), ...one('2', '40')] }, 'figures'],
		['whose classes leave many out', { figures: one('1', '60') }, 'figures'],
		[
			'whose percentage does not fit',
			{ measure: 'feature', figures: one('c-shape', '20', '30') },
			'figures.0.percent'
		],
		['from memory', { provenance: 'memory' }, 'provenance'],
		['of pooled teeth', { tooth: '' }, 'tooth'],
		['of a root without estimates', { root: 'fused' }, 'root'],
		['without a country', { country: '' }, 'country'],
		['without a total', { total: '' }, 'total']
	])('%s is kept with a warning there', (_, change, field) => {
		expect(remarksOf(typed(change), 'warning')).toEqual([field]);
		expect(checkEntry(typed(change)).content).not.toBeNull();
	});

	it('is compared with the table where there is one', () => {
		const other = { id: 7, content: checkEntry(typed({ locator: 'abstract' })).content! };
		const context: CheckContext = {
			hasSource: (id) => id === 'adams-2001',
			shown: () => new Set(['1', '2']),
			others: [other]
		};
		expect(remarksOf(typed(), 'warning', context)).toEqual(['figures.2.category', 'source']);
		expect(remarksOf(typed({ source: 'nobody-1999' }), 'error', context)).toEqual(['source']);
		expect(remarksOf(typed({ total: '101' }), 'warning', context)).toEqual(['figures.2.category']);
		expect(remarksOf(typed(), 'warning', { shown: () => null })).toEqual([]);
	});

	it('reads a sequence however its hyphens are written', () => {
		const { content } = checkEntry(typed({ figures: one(' 2 – 1 ', '100') }));
		expect(content!.figures[0].category).toBe('2-1');
	});

	it('allows a printed percentage its rounding and no more', () => {
		const fits = (percent: string) =>
			!remarksOf(
				typed({ measure: 'feature', figures: one('c-shape', '33', percent), total: '99' }),
				'warning'
			).length;
		expect([fits('33'), fits('33.3'), fits('33.33'), fits('33,3')]).toEqual([true, true, true, true]);
		expect([fits('34'), fits('33.4'), fits('33.34')]).toEqual([false, false, false]);
	});
});

describe('properties of the checks', () => {
	const total = fc.integer({ min: 1, max: 100_000 });

	it('a count is worked out from a percentage to within half a root, and marked', () => {
		fc.assert(
			fc.property(total, fc.integer({ min: 0, max: 1000 }), (all, permille) => {
				const percent = permille / 10;
				const { content, remarks } = checkEntry(
					typed({ total: String(all), measure: 'feature', figures: one('c-shape', '', String(percent)) })
				);
				const [figure] = content!.figures;
				expect(figure.countDerived).toBe(true);
				expect(Math.abs(figure.count! - (all * percent) / 100)).toBeLessThanOrEqual(0.5 + 1e-6);
				expect(remarks.find(({ path: at }) => at === 'figures.0.count')?.level).toBe('note');
			})
		);
	});

	it('classes that sum to their total raise no warning, and one root too many beyond rounding does', () => {
		const counts = fc.array(fc.integer({ min: 0, max: 500 }), { minLength: 1, maxLength: LEAVES.length });
		fc.assert(
			fc.property(counts, (list) => {
				const sum = list.reduce((all, each) => all + each, 0);
				fc.pre(sum > 0);
				const figures = list.map((each, i) => ({
					category: LEAVES[i],
					count: String(each),
					percent: '',
					note: ''
				}));
				expect(remarksOf(typed({ total: String(sum), figures }), 'warning')).toEqual([]);
				const beyond = sum + Math.floor(Math.max(1, 0.01 * sum)) + 2;
				const more = [...figures, { category: 'other', count: String(beyond - sum), percent: '', note: '' }];
				if (beyond - sum <= sum)
					expect(remarksOf(typed({ total: String(sum), figures: more }), 'warning')).toEqual(['figures']);
			})
		);
	});

	it('checking what was checked changes nothing', () => {
		const figure = fc.record({
			category: fc.constantFrom(...LEAVES),
			count: fc.oneof(fc.constant(''), fc.integer({ min: 0, max: 50 }).map(String)),
			percent: fc.oneof(
				fc.constant(''),
				fc.integer({ min: 0, max: 999 }).map((tenths) => String(tenths / 10))
			),
			note: fc.string({ maxLength: 20 })
		});
		const figures = fc.uniqueArray(figure, { selector: ({ category }) => category, minLength: 1 });
		fc.assert(
			fc.property(figures, (list) => {
				const { content } = checkEntry(typed({ figures: list }));
				fc.pre(content !== null);
				expect(checkEntry(entryText(content)).content).toEqual(content);
			})
		);
	});

	it('whatever is typed, there is an answer, and content exactly without an error', () => {
		const text = fc.string({ maxLength: 12 });
		const any = fc.record({
			...{ source: text, locator: text, tooth: text, root: text, scope: text, country: text, method: text },
			...{
				subgroup: text,
				total: text,
				measure: fc.constantFrom('configuration', 'feature', 'x'),
				provenance: text
			},
			figures: fc.array(fc.record({ category: text, count: text, percent: text, note: text }), {
				maxLength: 4
			})
		});
		fc.assert(
			fc.property(any, (entry) => {
				const { content, remarks } = checkEntry(entry);
				expect(content === null).toBe(remarks.some(({ level }) => level === 'error'));
				for (const { message } of remarks) expect(message).toMatch(/[.]$/);
			})
		);
	});
});

describe('the shipped table', () => {
	it('passes the checks wherever a row can be placed, so that an export can be imported', async () => {
		const { observations } = await readLiteratureFiles(path.resolve('data/literature'));
		const groups = new Map<string, EntryText>();
		for (const { cells } of observations) {
			if (cells.locator.trim() === '') continue;
			const {
				source_id: source,
				category,
				count,
				percent,
				count_derived: countDerived,
				note,
				...sample
			} = cells;
			const key = JSON.stringify([source, sample]);
			const entry = groups.get(key) ?? ({ ...sample, source, figures: [] } as unknown as EntryText);
			groups.set(key, entry);
			entry.figures.push({ category, count, percent, countDerived, note });
		}
		const refused = [...groups.values()].flatMap((entry) =>
			checkEntry(entry)
				.remarks.filter(({ level }) => level === 'error')
				.map((remark) => ({ ...remark, entry }))
		);
		expect(groups.size).toBeGreaterThan(1200);
		expect(refused).toEqual([]);
	});
});
