import { mkdir, rename, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { createTransport } from 'nodemailer';
import { environment } from '../config';
import type { Rendered } from './render';

const CONNECT_TIMEOUT_MS = 10_000;
const SILENCE_TIMEOUT_MS = 20_000;

/** A message with its addresses. The id stays the same over all attempts, so that a server that got it twice can tell. @internal for its test */
export interface Outgoing extends Rendered {
	to: string;
	messageId: string;
}

/** Hands a message over; throws when it could not be. */
export type Deliver = (message: Outgoing) => Promise<void>;

/**
 * Where mail goes: to the SMTP server of SMTP_URL; as files into DATA_DIR/outbox with SMTP_URL=outbox, and in development and tests; or
 * nowhere, where nothing is set.
 */
export type MailRoute = 'smtp' | 'outbox' | 'none';

/** The route of an environment. */
export function mailRoute({
	SMTP_URL,
	NODE_ENV
}: Pick<typeof environment, 'SMTP_URL' | 'NODE_ENV'> = environment): MailRoute {
	if (SMTP_URL) return SMTP_URL === 'outbox' ? 'outbox' : 'smtp';
	return NODE_ENV === 'production' ? 'none' : 'outbox';
}

/** The way out under the server's environment, or null where there is none. */
export function mailDelivery(): Deliver | null {
	const route = mailRoute();
	if (route === 'none') return null;
	return route === 'smtp'
		? overSmtp(environment.SMTP_URL!)
		: intoFolder(path.join(environment.DATA_DIR, 'outbox'));
}

/** Delivery over SMTP; the connection is encrypted where the server offers it, and always with smtps. @internal for its test */
export function overSmtp(url: string, from = environment.MAIL_FROM): Deliver {
	const { hostname, port, protocol, username, password } = new URL(url);
	const transport = createTransport({
		host: hostname,
		port: port ? Number(port) : undefined,
		secure: protocol === 'smtps:',
		...(username && { auth: { user: decodeURIComponent(username), pass: decodeURIComponent(password) } }),
		connectionTimeout: CONNECT_TIMEOUT_MS,
		greetingTimeout: CONNECT_TIMEOUT_MS,
		socketTimeout: SILENCE_TIMEOUT_MS,
		disableFileAccess: true,
		disableUrlAccess: true
	});
	return async (message) => {
		await transport.sendMail({ ...message, from });
	};
}

/** The local fake: each message becomes a file that any mail program opens. @internal for its test */
export function intoFolder(folder: string, from = environment.MAIL_FROM): Deliver {
	const transport = createTransport({ streamTransport: true, buffer: true });
	return async (message) => {
		const { message: bytes } = await transport.sendMail({ ...message, from });
		await mkdir(folder, { recursive: true });
		const name = path.join(folder, `${message.messageId.replace(/[^\w.-]/g, '')}.eml`);
		// A reader never sees half a message.
		await writeFile(`${name}.part`, bytes as Buffer, { mode: 0o600 });
		await rename(`${name}.part`, name);
	};
}
