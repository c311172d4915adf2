import { QueryTypes } from 'sequelize';
import type { PeopleQuery, PersonDto } from '$lib/schemas/people';
import type { Role } from '$lib/schemas/terms';
import { Person } from '../db/models/people';
import { decodeCursor, encodeCursor, likePattern } from '../table/paging';

/** Sort keys as SQL; somebody who never signed in sorts first. */
const SORT_SQL: Record<string, string> = {
	name: 'LOWER(person.name)',
	email: 'person.email_key',
	created: 'person.created_at',
	seen: "COALESCE(person.seen_at, '')"
};

interface Row {
	id: string;
	name: string;
	email: string;
	roles: string | null;
	secondFactor: number;
	createdAt: string;
	seenAt: string | null;
	deactivatedAt: string | null;
	sortKey: string;
}

const COLUMNS = `person.id, person.name, person.email, person.created_at AS createdAt, person.seen_at AS seenAt,
	person.deactivated_at AS deactivatedAt, person.totp_secret IS NOT NULL AS secondFactor,
	(SELECT group_concat(role, ' ') FROM (SELECT role FROM person_role WHERE person_id = person.id ORDER BY role)) AS roles`;

/**
 * Lists people, filtered, sorted and cut into pages by key.
 * @throws Problem 422 for a cursor that is not of this list
 */
export async function listPeople(query: PeopleQuery) {
	const db = Person.sequelize!;
	const where = ['1 = 1'];
	const bind: Record<string, string | number> = {};
	if (query.q) {
		where.push(`(person.name LIKE $q ESCAPE '\\' OR person.email LIKE $q ESCAPE '\\')`);
		bind.q = likePattern(query.q);
	}
	if (query.role) {
		where.push('EXISTS (SELECT 1 FROM person_role WHERE person_id = person.id AND role = $role)');
		bind.role = query.role;
	}
	if (query.state) where.push(`person.deactivated_at IS ${query.state === 'active' ? '' : 'NOT '}NULL`);
	const [{ total }] = await db.query<{ total: number }>(
		`SELECT COUNT(*) AS total FROM person WHERE ${where.join(' AND ')}`,
		{ type: QueryTypes.SELECT, bind }
	);
	const descending = query.sort.startsWith('-');
	const key = SORT_SQL[query.sort.replace('-', '')];
	const [order, beyond] = descending ? ['DESC', '<'] : ['ASC', '>'];
	if (query.cursor) {
		const cursor = decodeCursor(query.cursor, query.sort);
		where.push(`(${key} ${beyond} $afterKey OR (${key} = $afterKey AND person.id ${beyond} $afterId))`);
		bind.afterKey = cursor.key;
		bind.afterId = cursor.id;
	}
	const rows = await db.query<Row>(
		`SELECT ${COLUMNS}, ${key} AS sortKey FROM person WHERE ${where.join(' AND ')}
			ORDER BY ${key} ${order}, person.id ${order} LIMIT $limit`,
		{ type: QueryTypes.SELECT, bind: { ...bind, limit: query.limit + 1 } }
	);
	const page = rows.slice(0, query.limit);
	const last = page.at(-1);
	return {
		people: page.map(toPersonDto),
		total,
		nextCursor: rows.length > query.limit && last ? encodeCursor(query.sort, last.sortKey, last.id) : null
	};
}

/** One person as administrators see them, or null. */
export async function findPerson(id: string): Promise<PersonDto | null> {
	const [row] = await Person.sequelize!.query<Row>(`SELECT ${COLUMNS} FROM person WHERE person.id = $id`, {
		type: QueryTypes.SELECT,
		bind: { id }
	});
	return row ? toPersonDto(row) : null;
}

const toPersonDto = ({
	id,
	name,
	email,
	roles,
	secondFactor,
	createdAt,
	seenAt,
	deactivatedAt
}: Row): PersonDto => ({
	...{ id, name, email, createdAt, seenAt, deactivatedAt },
	roles: roles ? (roles.split(' ') as Role[]) : [],
	secondFactor: secondFactor === 1
});
