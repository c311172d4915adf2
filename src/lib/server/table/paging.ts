import { QueryTypes, type Sequelize } from 'sequelize';
import { z } from 'zod';
import { Problem } from '../api/problem';

const cursorSchema = z.object({
	order: z.string(),
	key: z.union([z.string(), z.number()]),
	id: z.union([z.string(), z.number()]),
	back: z.boolean().optional()
});

/**
 * Where another page starts: after the row with this key and id, in this order, or with `back` where it ends: before it.
 * Opaque to the caller.
 */
export function encodeCursor(
	order: string,
	key: string | number,
	id: string | number,
	back?: boolean
): string {
	return Buffer.from(JSON.stringify({ order, key, id, ...(back && { back }) })).toString('base64url');
}

/**
 * Reads a cursor made by `encodeCursor`.
 * @throws Problem 422 if it is none, or belongs to another order
 */
export function decodeCursor(cursor: string, order: string) {
	const refused = new Problem(422, 'This cursor does not belong to this list.', [
		{ path: 'cursor', message: 'Take the cursor from the answer before, with the same order.' }
	]);
	try {
		const value = cursorSchema.parse(JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8')));
		if (value.order !== order) throw refused;
		return value;
	} catch {
		throw refused;
	}
}

/** What a list is cut into pages by. */
interface Order {
	/** Name of the order, with a leading - where it is reversed. */
	sort: string;
	/** SQL of the key, and of the id that breaks ties. */
	key: string;
	id: string;
}

/** A list in SQL: what is selected from where, under which conditions. */
interface PagedQuery {
	columns: string;
	from: string;
	where: string[];
	bind: Record<string, string | number>;
	/** A table and condition with as many rows, where one can be counted faster. */
	counted?: { from: string; bind: Record<string, string> };
}

/** A page of rows, and the way to its neighbours. */
export interface Page<Row> {
	rows: Row[];
	total: number;
	position: number;
	nextCursor: string | null;
	previousCursor: string | null;
}

/**
 * Reads one page of a list by key: a row added or gone meanwhile shifts nothing, and a late page costs no more than the first.
 * @throws Problem 422 for a cursor that is not of this order
 */
export async function readPage<Row extends object>(
	db: Sequelize,
	{ columns, from, where, bind, counted }: PagedQuery,
	{ sort, key, id }: Order,
	{ cursor, limit }: { cursor?: string; limit: number }
): Promise<Page<Row>> {
	const at = cursor === undefined ? null : decodeCursor(cursor, sort);
	const count = async (rowsOf: string, values: PagedQuery['bind']) => {
		const sql = `SELECT COUNT(*) AS number FROM ${rowsOf}`;
		return (await db.query<{ number: number }>(sql, { type: QueryTypes.SELECT, bind: values }))[0].number;
	};
	// Read backwards from where a page ends, and turn the rows round afterwards.
	const back = at?.back === true;
	const forwards = sort.startsWith('-') ? '<' : '>';
	const backwards = sort.startsWith('-') ? '>' : '<';
	const beyond = (sign: string) => `(${key}, ${id}) ${sign} ($atKey, $atId)`;
	const direction = (back ? backwards : forwards) === '>' ? 'ASC' : 'DESC';
	const read = await db.query<Row & { sortKey: string | number; sortId: string | number }>(
		`SELECT ${columns}, ${key} AS sortKey, ${id} AS sortId FROM ${from}
			WHERE ${[...where, ...(at ? [beyond(back ? backwards : forwards)] : [])].join(' AND ')}
			ORDER BY ${key} ${direction}, ${id} ${direction} LIMIT $limit`,
		{
			type: QueryTypes.SELECT,
			bind: { ...bind, ...(at && { atKey: at.key, atId: at.id }), limit: limit + 1 }
		}
	);
	const more = read.length > limit;
	const rows = read.slice(0, limit);
	if (back) rows.reverse();
	const [first, last] = [rows.at(0), rows.at(-1)];
	// Without a cursor this is the first page: nothing needs counting to know it.
	const before =
		at && first
			? await count(`${from} WHERE ${[...where, beyond(backwards)].join(' AND ')}`, {
					...bind,
					atKey: first.sortKey,
					atId: first.sortId
				})
			: 0;
	return {
		rows: rows.map(({ sortKey: _key, sortId: _id, ...row }) => row as unknown as Row),
		total: counted
			? await count(counted.from, counted.bind)
			: await count(`${from} WHERE ${where.join(' AND ')}`, bind),
		position: first ? before + 1 : 0,
		nextCursor: last && (back || more) ? encodeCursor(sort, last.sortKey, last.sortId) : null,
		previousCursor: first && before > 0 ? encodeCursor(sort, first.sortKey, first.sortId, true) : null
	};
}

/** A LIKE pattern that finds the words as typed, with SQL's own wildcards taken literally. */
export function likePattern(words: string): string {
	return `%${words.replace(/[\\%_]/g, (character) => `\\${character}`)}%`;
}
