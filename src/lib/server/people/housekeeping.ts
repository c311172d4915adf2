import { log } from '../log';
import { purgeMail } from '../mail/outbox';
import { purgeLinks } from './links';
import { purgeSessions } from './sessions';

const EVERY_MS = 3_600_000;

/** Removes, once an hour, sessions and links whose time is over and mails long done with. */
export function keepHouse(): void {
	const purge = () =>
		Promise.all([purgeSessions(), purgeLinks(), purgeMail()]).catch((error: unknown) =>
			log.error({ err: error }, 'house-keeping failed')
		);
	void purge();
	setInterval(() => void purge(), EVERY_MS).unref();
}
