import { QueryTypes, type Sequelize } from 'sequelize';
import { teeth, toothOf } from '$lib/anatomy/teeth';
import type { EntryFilters } from '$lib/schemas/table';
import { Problem, type FieldError } from '../api/problem';
import { inCountry } from './entryConditions';

/** Filters whose values no schema can list, and where the table has them. */
const KNOWN_SQL = {
	tooth: 'SELECT 1 FROM sample WHERE tooth = $tooth LIMIT 1',
	root: 'SELECT 1 FROM sample WHERE root = $root LIMIT 1',
	country: `SELECT 1 FROM sample WHERE ${inCountry('country')} LIMIT 1`,
	source: 'SELECT 1 FROM source WHERE id = $source LIMIT 1'
};

/** Places the product answers for are known even where the table has nothing of them yet. */
function isPlace(name: string, value: string): boolean {
	if (name === 'tooth') return toothOf(value) !== undefined;
	return name === 'root' && teeth.some(({ roots }) => (roots as readonly string[]).includes(value));
}

/**
 * Refuses filters that name a tooth, root, country or source nobody knows: a slip of the pen would look like an empty table.
 * @throws Problem 422 naming each field
 */
export async function checkEntryFilters(db: Sequelize, query: EntryFilters): Promise<void> {
	const errors: FieldError[] = [];
	for (const name of ['tooth', 'root', 'country', 'source'] as const) {
		const value = query[name];
		if (value === undefined || isPlace(name, value)) continue;
		const found = await db.query(KNOWN_SQL[name], { type: QueryTypes.SELECT, bind: { [name]: value } });
		if (found.length === 0) errors.push({ path: name, message: `The table knows no ${name} "${value}".` });
	}
	if (errors.length > 0) throw new Problem(422, 'A filter names something the table does not have.', errors);
}
