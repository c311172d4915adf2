import type { Role } from '../../../src/lib/schemas/terms.ts';
import { linkIn, type Mailbox } from './mailbox';
import type { OwnServer } from './server';

/** A password every rule accepts. */
export const PASSWORD = 'two rivers become one';

interface Sent {
	method?: string;
	form?: Record<string, string> | [string, string][];
	json?: unknown;
	headers?: Record<string, string>;
}

/** Somebody who asks over HTTP as a browser without scripts does, with cookies of their own, or as a script with a token. */
export class Caller {
	private readonly cookies = new Map<string, string>();

	constructor(
		readonly origin: string,
		private readonly token?: string
	) {}

	/** Asks, without following where the answer leads. A form is sent as the site's own pages do. */
	async ask(address: string, { method, form, json, headers = {} }: Sent = {}): Promise<Response> {
		const response = await fetch(new URL(address, this.origin), {
			method: method ?? (form || json !== undefined ? 'POST' : 'GET'),
			redirect: 'manual',
			headers: {
				accept: 'text/html',
				...(form && { origin: this.origin }),
				...(json !== undefined && { 'content-type': 'application/json' }),
				...(this.cookies.size > 0 && {
					cookie: [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ')
				}),
				...(this.token && { authorization: `Bearer ${this.token}` }),
				...headers
			},
			body: form ? new URLSearchParams(form) : json === undefined ? undefined : JSON.stringify(json)
		});
		for (const cookie of response.headers.getSetCookie()) {
			const [, name, value] = /^([^=]+)=([^;]*)/.exec(cookie) ?? [];
			if (value === '' || /max-age=0/i.test(cookie)) this.cookies.delete(name);
			else this.cookies.set(name, value);
		}
		return response;
	}

	/** Sends a form that must be taken. */
	async send(address: string, form: Sent['form']): Promise<string> {
		const response = await this.ask(address, { form });
		const text = await response.text();
		if (response.status >= 400) throw new Error(`${address}: ${response.status} ${text.slice(0, 2000)}`);
		return text;
	}

	/** Makes a token with scopes. */
	async makeToken(scopes: readonly string[]): Promise<Caller> {
		const fields: [string, string][] = [
			['name', 'test'],
			['days', '7'],
			...scopes.map((scope): [string, string] => ['scopes', scope])
		];
		const token = /wm_[\w-]{43}/.exec(await this.send('/account/tokens?/make', fields))?.[0];
		if (!token) throw new Error('No token was shown.');
		return new Caller(this.origin, token);
	}
}

/** Makes the first administrator by the link the server printed. */
export async function firstAdministrator(server: OwnServer, email: string): Promise<Caller> {
	const [, key] = await server.printed(/\/set-up\?key=([\w-]+)/);
	const caller = new Caller(server.origin);
	await caller.send('/set-up', { key, email, name: 'First', password: PASSWORD });
	return caller;
}

/** Invites somebody and accepts the invitation from the mail. */
export async function invited(by: Caller, mailbox: Mailbox, email: string, roles: Role[]): Promise<Caller> {
	const fields: [string, string][] = [
		['email', email],
		...roles.map((role): [string, string] => ['roles', role])
	];
	await by.send('/administration/invitations?/invite', fields);
	const caller = new Caller(by.origin);
	await caller.send(linkIn(await mailbox.wait(email)), { name: email.split('@')[0], password: PASSWORD });
	return caller;
}
