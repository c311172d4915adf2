import { QueryTypes } from 'sequelize';
import { Problem, type FieldError } from '../api/problem';
import { serverDatabase } from '../db/server';
import type { Filters } from './types';

/**
 * Refuses filters that name a country or source the table does not have: they would silently filter nothing, or everything.
 * @param names how the fields are called where the filters came from
 * @throws Problem 422 naming each field
 */
export async function checkFilters(
	{ countries, exclude }: Filters,
	names = { countries: 'filters.countries', exclude: 'filters.exclude' }
): Promise<void> {
	if (!countries?.length && !exclude?.length) return;
	const db = await serverDatabase();
	const known = async (sql: string) =>
		new Set((await db.query<{ name: string }>(sql, { type: QueryTypes.SELECT })).map(({ name }) => name));
	const errors: FieldError[] = [];
	if (countries?.length) {
		const samples = await known('SELECT DISTINCT country AS name FROM sample');
		const codes = new Set([...samples].flatMap((country) => country.split('+')));
		for (const [index, code] of countries.entries())
			if (!codes.has(code))
				errors.push({
					path: `${names.countries}.${index}`,
					message: `No sample of the table is from ${code}.`
				});
	}
	if (exclude?.length) {
		const sources = await known('SELECT id AS name FROM source');
		for (const [index, id] of exclude.entries())
			if (!sources.has(id))
				errors.push({ path: `${names.exclude}.${index}`, message: `The table has no source ${id}.` });
	}
	if (errors.length > 0) throw new Problem(422, 'A filter names something the table does not have.', errors);
}
