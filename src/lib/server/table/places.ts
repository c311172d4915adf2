import { QueryTypes } from 'sequelize';
import { serverDatabase } from '../db/server';

/** Countries that samples of a tooth come from, each by itself where a sample joins several, in order of their codes. */
export async function countriesOf(tooth: string): Promise<string[]> {
	const db = await serverDatabase();
	const rows = await db.query<{ country: string }>(
		`SELECT DISTINCT sample.country FROM sample JOIN entry ON entry.sample_id = sample.id
			WHERE sample.tooth = $tooth AND entry.state = 'published'`,
		{ type: QueryTypes.SELECT, bind: { tooth } }
	);
	const codes = rows.flatMap(({ country }) => country.split('+')).filter((code) => /^[A-Z]{3}$/.test(code));
	return [...new Set(codes)].sort();
}
