import pino from 'pino';
import { environment } from './config';

/** The server's log: one JSON line an event, on standard output. No addresses, no bodies, no personal data. */
export const log = pino({ level: environment.LOG_LEVEL, base: undefined });
