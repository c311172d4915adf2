import path from 'node:path';
import { expect, test } from '@playwright/test';
import { ROLES, SCOPES, type Role } from '../../src/lib/schemas/terms';
import { freePort } from '../support/freePort.js';
import { routesOf } from '../support/routes';
import { PARAMETERS, WALL, type Expectation } from '../support/wall';
import { Caller, firstAdministrator, invited } from './support/caller';
import { Mailbox } from './support/mailbox';
import { OwnServer } from './support/server';

const routes = routesOf(path.resolve('src/routes'));
/** Signing out ends what the walk goes on with. */
const walked = Object.entries(WALL).filter(([route]) => route !== 'POST /sign-out');

let server: OwnServer;
let mailbox: Mailbox;
let visitor: Caller;
const people = {} as Record<Role, Caller>;
/** Has every role, so that only the scopes of a token hold it back. */
let everything: Caller;

test.describe.configure({ mode: 'serial' });

test.beforeAll(async () => {
	test.setTimeout(180_000);
	mailbox = new Mailbox(await freePort());
	await mailbox.up();
	server = await OwnServer.start({ SMTP_URL: mailbox.url, RATE_LIMIT_PER_MINUTE: '1000000' });
	visitor = new Caller(server.origin);
	people.administrator = await firstAdministrator(server, 'first@example.org');
	for (const role of ['student', 'dentist', 'educator'] as const)
		people[role] = await invited(people.administrator, mailbox, `${role}@example.org`, [role]);
	everything = await invited(people.administrator, mailbox, 'everything@example.org', [...ROLES]);
});
test.afterAll(async () => {
	await mailbox?.down();
	await server?.stop();
});

/** What a caller meets at a route: let through, sent to the sign-in, or refused. */
async function meet(caller: Caller, route: string, { parameters, form = {} }: Expectation) {
	const [kind, pattern] = route.split(' ');
	const address = pattern.replace(
		/\[(\w+)(=\w+)?\]/g,
		(_, name: string) => ({ ...PARAMETERS, ...parameters })[name]
	);
	const isForm = kind === 'action' || route === 'POST /preferences' || route === 'POST /sign-out';
	const response = await caller.ask(address, {
		...(kind !== 'page' && kind !== 'action' && { method: kind }),
		...(isForm ? { form } : /^(POST|PUT|PATCH)$/.test(kind) ? { json: {} } : {})
	});
	await response.arrayBuffer();
	const { status } = response;
	expect(status, `${route}: ${status}`).toBeLessThan(500);
	const to = response.headers.get('location') ?? '';
	if (status === 401 && response.headers.get('content-type') === 'application/problem+json') return 'who?';
	if (status === 303 && to.startsWith('/sign-in?to=') && !pattern.startsWith('/sign-in')) return 'sign in';
	if (status === 307 && to.startsWith('/sign-in/again?/carry&to=')) return 'sign in again';
	if (status === 403) return 'no';
	return 'through';
}

/** What a visitor meets where an account is needed. */
function turnedAway(route: string): string {
	if (route.includes(' /api/v1/')) return 'who?';
	return route.startsWith('action') ? 'sign in again' : 'sign in';
}

const isApi = (route: string) => route.includes(' /api/v1/');

test('every route and every method stands in the table of expectations, and nothing else does', () => {
	expect(routes.length).toBeGreaterThan(50);
	expect(
		routes.filter((route) => !(route in WALL)),
		'routes nobody has decided on'
	).toEqual([]);
	expect(
		Object.keys(WALL).filter((route) => !routes.includes(route)),
		'expectations without a route'
	).toEqual([]);
});

test('visitors, students, dentists, educators and administrators meet what the table says', async () => {
	test.setTimeout(180_000);
	const met: string[] = [];
	const wanted: string[] = [];
	for (const [route, expectation] of walked) {
		const { access } = expectation;
		const closed = access !== 'everybody' && access !== 'table';
		met.push(`visitor ${route}: ${await meet(visitor, route, expectation)}`);
		wanted.push(`visitor ${route}: ${closed ? turnedAway(route) : 'through'}`);
		for (const role of ROLES) {
			const may = !Array.isArray(access) || access.includes(role);
			met.push(`${role} ${route}: ${await meet(people[role], route, expectation)}`);
			wanted.push(`${role} ${route}: ${may ? 'through' : 'no'}`);
		}
	}
	expect(met).toEqual(wanted);
});

test('a token opens the API only, and of it what its scopes and its owner allow', async () => {
	test.setTimeout(120_000);
	const { student } = people;
	const scoped = new Set(walked.flatMap(([, { scope }]) => scope ?? []));
	const token = new Map<string, Caller>();
	for (const scope of SCOPES) token.set(scope, await everything.makeToken([scope]));
	const students = await student.makeToken(SCOPES);
	for (const [route, expectation] of walked) {
		const { access, scope } = expectation;
		if (!isApi(route)) {
			if (access === 'account' || Array.isArray(access))
				expect(await meet(token.get('account:read')!, route, expectation), route).toBe(turnedAway(route));
			continue;
		}
		const open = access === 'everybody' || access === 'table';
		for (const one of SCOPES)
			expect(await meet(token.get(one)!, route, expectation), `${route} with ${one}`).toBe(
				open || one === scope ? 'through' : 'no'
			);
		const may = open || access === 'account' || access.includes('student');
		expect(await meet(students, route, expectation), `${route} by a student's token`).toBe(
			may && (open || scope) ? 'through' : 'no'
		);
	}
	expect(scoped.size).toBeGreaterThan(2);
	const wrong = await new Caller(server.origin, 'wm_wrong').ask('/api/v1/teeth');
	expect(wrong.status).toBe(401);
	expect(wrong.headers.get('www-authenticate')).toContain('Bearer');
});

test('what belongs to others is not there', async () => {
	const { administrator, educator, student } = people;
	const devices = await (await educator.ask('/account/devices')).text();
	const others = new Caller(server.origin);
	await others.send('/sign-in?/password', {
		email: 'educator@example.org',
		password: 'two rivers become one'
	});
	const handle = /name="device" value="([\w-]+)"/.exec(
		await (await educator.ask('/account/devices')).text()
	)![1];
	expect(devices).not.toContain(handle);
	expect((await student.ask('/account/devices?/end', { form: { device: handle } })).status).toBe(404);
	expect((await others.ask('/account')).status).toBe(200);
	expect((await educator.ask('/account/devices?/end', { form: { device: handle } })).status).toBe(200);
	expect((await others.ask('/account')).status).toBe(303);

	await educator.makeToken(['account:read']);
	const id = /name="id" value="(\d+)"/.exec(await (await educator.ask('/account/tokens')).text())![1];
	for (const stranger of [student, administrator])
		expect((await stranger.ask('/account/tokens?/revoke', { form: { id } })).status).toBe(404);
	expect((await educator.ask('/account/tokens?/revoke', { form: { id } })).status).toBe(200);
	for (const wrong of ['0', '-1', 'x', '9'.repeat(30)])
		expect((await educator.ask('/account/tokens?/revoke', { form: { id: wrong } })).status).toBe(404);
	expect((await administrator.ask('/administration/people/nobody')).status).toBe(404);
	expect((await administrator.ask('/administration/people/nobody?/deactivate', { form: {} })).status).toBe(
		404
	);
});

test('other sites can send nothing, with or without a form', async () => {
	const { administrator } = people;
	for (const origin of ['https://evil.example', 'null']) {
		const response = await administrator.ask('/administration/settings', {
			form: { name: 'taken over' },
			headers: { origin }
		});
		expect(response.status).toBe(403);
	}
	expect(await (await administrator.ask('/administration/settings')).text()).not.toContain('taken over');
});

test('a closed table turns visitors away everywhere but at what explains the product', async () => {
	test.setTimeout(120_000);
	const { administrator, student } = people;
	await administrator.send('/administration/settings', { name: 'Canal School' });
	for (const [route, expectation] of walked) {
		const { access } = expectation;
		const outside =
			access === 'everybody' ? 'through' : isApi(route) || access !== 'table' ? turnedAway(route) : 'sign in';
		expect(await meet(visitor, route, expectation), `visitor ${route}`).toBe(outside);
		if (access === 'table')
			expect(await meet(student, route, expectation), `student ${route}`).toBe('through');
	}
	const [reader, other] = [
		await student.makeToken(['table:read']),
		await student.makeToken(['account:read'])
	];
	for (const [route, expectation] of walked.filter(
		([route, { access }]) => isApi(route) && access === 'table'
	)) {
		expect(await meet(reader, route, expectation), route).toBe('through');
		expect(await meet(other, route, expectation), route).toBe('no');
	}
	expect(await (await visitor.ask('/about')).text()).toContain('Canal School');
	await administrator.send('/administration/settings', { name: '', tableOpen: 'on' });
	expect((await visitor.ask('/')).status).toBe(200);
	expect((await student.ask('/sign-out', { form: {} })).status).toBe(303);
	expect(await meet(student, 'page /account', WALL['page /account'])).toBe('sign in');
});
