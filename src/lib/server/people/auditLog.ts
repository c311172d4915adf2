import { stringify } from 'csv-stringify';
import { Op, type WhereOptions } from 'sequelize';
import type { AuditLine, AuditQuery } from '$lib/schemas/people';
import { Audit } from '../db/models/people';
import { decodeCursor, encodeCursor, likePattern } from '../table/paging';

const ORDER = 'newest';
const EXPORT_CHUNK = 1000;

/** A query of the audit log without its page. */
export type AuditFilter = Omit<AuditQuery, 'cursor' | 'limit'>;

/**
 * Lines of the audit log, the newest first, filtered and cut into pages.
 * @throws Problem 422 for a cursor that is not of this list
 */
export async function listAudit({ cursor, limit, ...filter }: AuditQuery) {
	const where = conditions(filter);
	const total = await Audit.count({ where });
	const before = cursor ? Number(decodeCursor(cursor, ORDER).id) : null;
	const rows = await linesBefore(where, before, limit + 1);
	const lines = rows.slice(0, limit);
	const last = lines.at(-1);
	return {
		lines,
		total,
		nextCursor: rows.length > limit && last ? encodeCursor(ORDER, last.id, last.id) : null
	};
}

/** The filtered log as CSV, read in chunks while it is sent; cells that a spreadsheet would run are made harmless. */
export function exportAudit(filter: AuditFilter): ReadableStream<Uint8Array> {
	const where = conditions(filter);
	const header = ['id', 'at', 'action', 'who', 'who id', 'subject', 'detail', 'address'];
	let before: number | null = null;
	let begun = false;
	return new ReadableStream({
		async pull(controller) {
			const lines = await linesBefore(where, before, EXPORT_CHUNK);
			const rows = lines.map(({ id, at, action, who, subject, detail, address }) => [
				...[id, at, action, who.name, who.id, subject, detail, address]
			]);
			const text = await csv(begun ? rows : [header, ...rows]);
			if (text) controller.enqueue(new TextEncoder().encode(text));
			begun = true;
			before = lines.at(-1)?.id ?? null;
			if (lines.length < EXPORT_CHUNK) controller.close();
		}
	});
}

const csv = (rows: (string | number | null)[][]) =>
	new Promise<string>((resolve, reject) => {
		// A cell that begins like a formula gets an apostrophe before it.
		stringify(rows, { escape_formulas: true, record_delimiter: 'windows' }, (error, text) =>
			error ? reject(error) : resolve(text)
		);
	});

async function linesBefore(where: WhereOptions, before: number | null, limit: number): Promise<AuditLine[]> {
	const rows = await Audit.findAll({
		where: before === null ? where : { [Op.and]: [where, { id: { [Op.lt]: before } }] },
		order: [['id', 'DESC']],
		limit
	});
	return rows.map(({ id, at, action, actorId, actorName, subject, detail, address }) => ({
		...{ id, at, action, subject, detail, address },
		who: { id: actorId, name: actorName }
	}));
}

function conditions({ action, q, from, to }: AuditFilter): WhereOptions {
	const all: WhereOptions[] = [];
	if (action) all.push({ action });
	if (from) all.push({ at: { [Op.gte]: from } });
	// Every moment of the last day sorts before the day with this letter behind it.
	if (to) all.push({ at: { [Op.lt]: `${to}U` } });
	if (q) {
		const like = { [Op.like]: likePattern(q) };
		all.push({
			[Op.or]: [{ actorName: like }, { subject: like }, { detail: like }, { address: like }, { actorId: q }]
		});
	}
	return { [Op.and]: all };
}
