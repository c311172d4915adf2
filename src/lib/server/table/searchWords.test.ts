import fc from 'fast-check';
import type { Sequelize } from 'sequelize';
import { beforeAll, describe, expect, it } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { matchExpression } from './searchWords';

let db: Sequelize;
beforeAll(async () => {
	db = await temporaryDatabase();
});

describe('what is looked for', () => {
	it.each([
		['molar', '"molar" *'],
		['  molar   cbct ', '"molar" * AND "cbct" *'],
		['"table 1" molar', '"table 1" * AND "molar" *'],
		['upper', '("upper" * OR "maxillary" *)'],
		['brazil', '("brazil" * OR "BRA")'],
		['AND OR NOT', '"AND" * AND "OR" * AND "NOT" *'],
		['%', null],
		['" "', null],
		['', null]
	])('of %j is %j', (typed, expression) => {
		expect(matchExpression(typed)).toBe(expression);
	});

	it('is a question the index can answer, whatever is typed', async () => {
		const typed = fc.oneof(
			fc.string({ unit: 'binary', maxLength: 40 }),
			fc.string({
				unit: fc.constantFrom('"', '*', '^', '(', ')', ':', '-', '+', '{', '}', 'a', ' ', '\0'),
				maxLength: 20
			})
		);
		await fc.assert(
			fc.asyncProperty(typed, async (text) => {
				const words = matchExpression(text);
				if (words === null) return;
				const [rows] = await db.query('SELECT rowid FROM entry_search WHERE entry_search MATCH $words', {
					bind: { words }
				});
				expect(rows).toEqual([]);
			})
		);
	});
});
