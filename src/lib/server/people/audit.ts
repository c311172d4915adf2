import { getRequestEvent } from '$app/server';
import type { RequestEvent } from '@sveltejs/kit';
import type { Transaction } from 'sequelize';
import type { AuditAction } from '$lib/schemas/terms';
import { Audit } from '../db/models/people';
import { now } from './secrets';

/** Longest text of a column: what a stranger typed is kept short. */
const LENGTH = 500;

/** Who did something. */
interface Actor {
	id: string | null;
	name: string;
}

/** One thing that was done. */
export interface Deed {
	action: AuditAction;
	/** What it was done to, in words: an address, a name, `entry 12`. Never a secret. */
	subject?: string;
	/** What changed, in words. Never a secret. */
	detail?: string;
	/** Default: the person who makes the request, else "visitor" within one and "server" outside. */
	actor?: Actor;
}

/**
 * Writes a line of the audit log. Within a transaction it stands or falls with what it reports.
 * @param deed who is the request's person, and where its address, unless the deed says otherwise
 */
export async function recordAudit(
	{ action, subject = '', detail = '', actor }: Deed,
	transaction?: Transaction
): Promise<void> {
	const event = currentEvent();
	const user = event?.locals.user;
	const who = actor ?? { id: user?.id ?? null, name: user?.name ?? (event ? 'visitor' : 'server') };
	await Audit.create(
		{
			at: now(),
			action,
			actorId: who.id,
			actorName: who.name.slice(0, LENGTH),
			subject: subject.slice(0, LENGTH),
			detail: detail.slice(0, LENGTH),
			address: event?.getClientAddress() ?? ''
		},
		{ transaction }
	);
}

/** The request being answered, if there is one: the server does things by itself too. */
function currentEvent(): RequestEvent | null {
	try {
		return getRequestEvent();
	} catch {
		return null;
	}
}
