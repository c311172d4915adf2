import type { Role, Scope } from '../../src/lib/schemas/terms.ts';

/** Who may use a route. */
type Access =
	/** Everybody, always. */
	| 'everybody'
	/** Everybody, unless an administrator has closed the table; then people with an account. */
	| 'table'
	/** People with an account. */
	| 'account'
	/** People with one of the roles. */
	| readonly Role[];

export interface Expectation {
	access: Access;
	/** For the API: what a token needs. Without one, tokens are refused wherever an account is needed. */
	scope?: Scope;
	/** Values of the address; those every route shares have theirs (PARAMETERS). */
	parameters?: Record<string, string>;
	/** Sent with an action, so that it changes nothing even where it is allowed. Default: an empty form. */
	form?: Record<string, string>;
}

/** Values of addresses, by the name of the parameter. Nobody has the id or the secret: what is allowed in finds nothing and changes nothing. */
export const PARAMETERS: Record<string, string> = {
	tooth: 'maxillary-first-molar',
	root: 'MB',
	id: '999999999',
	entry: '1',
	secret: 'no-such-secret',
	name: 'no-such-name',
	file: 'no-such-file',
	revision: '999999999'
};

const everybody: Expectation = { access: 'everybody' };
const table: Expectation = { access: 'table' };
const account: Expectation = { access: 'account' };
const administrator: Expectation = { access: ['administrator'] };
const educator: Expectation = { access: ['educator'] };
const importer: Expectation = { access: ['educator', 'administrator'] };
const writer: Expectation = { access: ['educator'], scope: 'table:write' };
const aRevision: Expectation = { access: 'table', parameters: { revision: '1' } };

/**
 * The wall: who may use each page, each action of a page, and each method of an endpoint. A route that is not here fails the test
 * (tests/e2e/wall.spec.ts), so whoever adds one decides here who it is for.
 */
export const WALL: Record<string, Expectation> = {
	'page /': table,
	'page /about': everybody,
	'page /api': everybody,
	'page /how': table,
	'page /compare': table,
	'page /sources': table,
	'page /table': table,
	'page /table/[entry]': table,
	'page /table/revisions': table,
	'GET /teeth/[tooth=tooth]/[root=root]/drawing.svg': table,
	'GET /teeth/[tooth=tooth]/[root=root]/samples.csv': table,
	'page /sources/[id]': { access: 'table', parameters: { id: 'weine-1969' } },
	'page /table/not-placed': table,
	'page /teeth/[tooth=tooth]': table,
	'page /teeth/[tooth=tooth]/[root=root]': table,
	'page /teeth/[tooth=tooth]/[root=root]/join': table,
	'POST /preferences': everybody,
	'GET /health': everybody,

	'page /sign-in': everybody,
	'action /sign-in?/password': everybody,
	'action /sign-in?/code': everybody,
	'action /sign-in?/other': everybody,
	'page /sign-in/again': everybody,
	'action /sign-in/again?/carry': everybody,
	'action /sign-in/again?/password': everybody,
	'action /sign-in/again?/code': everybody,
	'action /sign-in/again?/other': everybody,
	'POST /sign-out': everybody,
	'page /set-up': everybody,
	'action /set-up': everybody,
	'page /invitation/[secret]': everybody,
	'action /invitation/[secret]': everybody,
	'page /reset': everybody,
	'action /reset': everybody,
	'page /reset/[secret]': everybody,
	'action /reset/[secret]': everybody,
	'page /confirm-email/[secret]': everybody,
	'action /confirm-email/[secret]': everybody,

	'page /account': account,
	'action /account?/name': account,
	'action /account?/email': account,
	'page /account/password': account,
	'action /account/password': account,
	'page /account/second-factor': account,
	'action /account/second-factor?/begin': account,
	'action /account/second-factor?/confirm': account,
	'action /account/second-factor?/renew': account,
	'action /account/second-factor?/remove': account,
	'page /account/devices': account,
	'action /account/devices?/end': account,
	'action /account/devices?/others': account,
	'page /account/tokens': account,
	'action /account/tokens?/make': account,
	'action /account/tokens?/revoke': account,

	'page /administration': administrator,
	'page /administration/people': administrator,
	'page /administration/people/[id]': administrator,
	'action /administration/people/[id]?/roles': administrator,
	'action /administration/people/[id]?/deactivate': administrator,
	'action /administration/people/[id]?/reactivate': administrator,
	'action /administration/people/[id]?/factor': administrator,
	'action /administration/people/[id]?/reset': administrator,
	'action /administration/people/[id]?/devices': administrator,
	'page /administration/invitations': administrator,
	'action /administration/invitations?/invite': administrator,
	'action /administration/invitations?/again': administrator,
	'action /administration/invitations?/revoke': administrator,
	'page /administration/settings': administrator,
	// A name that is too long is refused, so nothing changes.
	'action /administration/settings': { ...administrator, form: { name: 'x'.repeat(81) } },
	'page /administration/audit': administrator,
	'GET /administration/audit/export': administrator,
	'page /administration/mail': administrator,
	'action /administration/mail?/retry': administrator,
	'action /administration/mail?/drop': administrator,

	'page /desk': educator,
	'GET /desk/context': educator,
	'page /desk/characteristics': educator,
	'page /desk/characteristics/[name]': educator,
	'action /desk/characteristics/[name]?/act': educator,
	'action /desk/characteristics/[name]?/save': educator,
	'page /desk/entries/[id]': educator,
	'action /desk/entries/[id]?/act': educator,
	'action /desk/entries/[id]?/check': educator,
	'action /desk/entries/[id]?/save': educator,
	'page /desk/entries/new': educator,
	'action /desk/entries/new?/check': educator,
	'action /desk/entries/new?/save': educator,
	'page /desk/sources/[id]': educator,
	'action /desk/sources/[id]?/appraise': educator,
	'action /desk/sources/[id]?/attach': educator,
	'action /desk/sources/[id]?/check': educator,
	'action /desk/sources/[id]?/detach': educator,
	'action /desk/sources/[id]?/remove': educator,
	'action /desk/sources/[id]?/retract': educator,
	'action /desk/sources/[id]?/save': educator,
	'action /desk/sources/[id]?/unretract': educator,
	'GET /desk/sources/[id]/files/[file]': educator,
	'page /desk/sources/new': educator,
	'action /desk/sources/new?/doi': educator,
	'action /desk/sources/new?/paste': educator,
	'action /desk/sources/new?/save': educator,
	'page /desk/import': importer,
	'action /desk/import?/upload': importer,
	'page /desk/import/[id]': importer,
	'action /desk/import/[id]?/cancel': importer,
	'action /desk/import/[id]?/discard': importer,
	'action /desk/import/[id]?/map': importer,
	'action /desk/import/[id]?/start': importer,
	'GET /desk/import/[id]/progress': importer,

	'GET /api/v1/teeth': table,
	'GET /api/v1/teeth/[tooth]': table,
	'GET /api/v1/teeth/[tooth]/roots/[root]/expectation': table,
	'GET /api/v1/coverage': table,
	'GET /api/v1/entries': table,
	'GET /api/v1/entries/[id]': { access: 'table', parameters: { id: '1' } },
	'GET /api/v1/sources': table,
	'GET /api/v1/sources/[id]': { access: 'table', parameters: { id: 'weine-1969' } },
	'GET /api/v1/search': table,
	'GET /api/v1/sources.bib': table,
	'GET /api/v1/sources.json': table,
	'GET /api/v1/sources.ris': table,
	'GET /api/v1/table.csv': table,
	'GET /api/v1/table.json': table,
	'POST /api/v1/sources': writer,
	'PATCH /api/v1/sources/[id]': writer,
	'DELETE /api/v1/sources/[id]': writer,
	'GET /api/v1/table.xlsx': table,
	'GET /api/v1/table-revisions': table,
	'GET /api/v1/table-revisions/[revision]/table.csv': aRevision,
	'GET /api/v1/table-revisions/[revision]/table.json': aRevision,
	'POST /api/v1/entries': writer,
	'PATCH /api/v1/entries/[id]': writer,
	'DELETE /api/v1/entries/[id]': writer,
	'GET /api/v1/entries/[id]/draft': writer,
	'POST /api/v1/pool': table,
	'POST /api/v1/confluence': table,
	'POST /api/v1/confluence-level': table,
	'GET /api/v1/health': everybody,
	'GET /api/v1/openapi.json': everybody,
	'GET /api/v1/me': { access: 'account', scope: 'account:read' },
	'GET /api/v1/people': { access: ['administrator'], scope: 'people:read' },
	'GET /api/v1/audit': { access: ['administrator'], scope: 'audit:read' }
};
