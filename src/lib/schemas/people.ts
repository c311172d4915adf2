import { z } from 'zod';
import { AUDIT_ACTIONS, MAIL_STATES, ROLES, SCOPES } from './terms';

const PERSON_SORTS = ['name', 'email', 'created', 'seen'] as const;

const limit = z.coerce
	.number('Give a number from 1 to 200.')
	.int('Give a number from 1 to 200.')
	.min(1, 'Give a number from 1 to 200.')
	.max(200, 'Give a number from 1 to 200.')
	.default(50);
const cursor = z.string().max(500, 'This cursor is not one of ours.').optional();
const words = z.string().trim().max(200, 'This is too long.').optional();
const role = z.enum(ROLES, `The role must be one of ${ROLES.join(', ')}.`);

/** An e-mail address as people type it. */
export const emailSchema = z
	.string('Give an e-mail address.')
	.trim()
	.max(254, 'This address is too long.')
	.pipe(z.email('Give an e-mail address such as name@example.org.'));

export const nameSchema = z
	.string('Give a name.')
	.trim()
	.min(1, 'Give a name.')
	.max(100, 'A name has at most 100 characters.')
	.regex(/^[^\p{Cc}]*$/u, 'A name stands on one line.');

export const rolesSchema = z.array(role).max(ROLES.length);

export const tokenSchema = z.object({
	name: z.string().trim().min(1, 'Give the token a name.').max(100, 'A name has at most 100 characters.'),
	scopes: z.array(z.enum(SCOPES)).min(1, 'Choose at least one scope.'),
	days: z.coerce.number().int().min(1).max(365)
});

export const settingsSchema = z.object({
	name: z
		.string()
		.trim()
		.max(80, 'The name has at most 80 characters.')
		.regex(/^[^\p{Cc}]*$/u, 'The name stands on one line.'),
	tableOpen: z.boolean()
});

export const peopleQuerySchema = z.strictObject({
	q: words.describe('Words looked for in name and address'),
	role: role.optional(),
	state: z.enum(['active', 'deactivated'], 'The state must be active or deactivated.').optional(),
	sort: z
		.enum([...PERSON_SORTS, ...PERSON_SORTS.map((name) => `-${name}` as const)], 'This order is not known.')
		.default('name')
		.describe('A leading - reverses the order'),
	cursor,
	limit
});
export type PeopleQuery = z.infer<typeof peopleQuerySchema>;

const personSchema = z.object({
	id: z.string(),
	name: z.string(),
	email: z.string(),
	roles: z.array(z.enum(ROLES)),
	secondFactor: z.boolean(),
	createdAt: z.iso.datetime(),
	seenAt: z.iso.datetime().nullable().describe('Last sign-in'),
	deactivatedAt: z.iso.datetime().nullable()
});
export type PersonDto = z.infer<typeof personSchema>;

export const peopleSchema = z.object({
	people: z.array(personSchema),
	total: z.number().int(),
	nextCursor: z.string().nullable()
});

export const meSchema = z.object({
	id: z.string(),
	name: z.string(),
	email: z.string(),
	roles: z.array(z.enum(ROLES)),
	secondFactor: z.boolean(),
	scopes: z
		.array(z.enum(SCOPES))
		.nullable()
		.describe('What the token may be used for; null for a browser session')
});

/** The address of one's own account takes no parameter. */
export const noQuerySchema = z.strictObject({});

export const auditQuerySchema = z.strictObject({
	action: z.enum(AUDIT_ACTIONS, 'This action is not known.').optional(),
	q: words.describe('Words looked for in who, subject, detail and address'),
	from: z.iso.date('Give a date such as 2026-12-01.').optional().describe('First day, UTC'),
	to: z.iso.date('Give a date such as 2026-12-01.').optional().describe('Last day, UTC'),
	cursor,
	limit
});
export type AuditQuery = z.infer<typeof auditQuerySchema>;

const auditLineSchema = z.object({
	id: z.number().int(),
	at: z.iso.datetime(),
	action: z.string(),
	who: z.object({ id: z.string().nullable(), name: z.string() }),
	subject: z.string(),
	detail: z.string(),
	address: z.string()
});
export type AuditLine = z.infer<typeof auditLineSchema>;

export const auditSchema = z.object({
	lines: z.array(auditLineSchema),
	total: z.number().int(),
	nextCursor: z.string().nullable()
});

export const mailQuerySchema = z.strictObject({ state: z.enum(MAIL_STATES).optional(), cursor });
