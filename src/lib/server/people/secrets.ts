import { createHash, randomBytes } from 'node:crypto';

/** Bytes of a secret in a link, token or cookie: 256 bits cannot be guessed, so a fast hash keeps them safe at rest. */
const SECRET_BYTES = 32;

/** A new secret for a link, token or cookie, safe in an address. */
export const newSecret = (): string => randomBytes(SECRET_BYTES).toString('base64url');

/** A new id for a row: tells nothing and cannot be counted up. */
export const newId = (): string => randomBytes(12).toString('base64url');

/** What is kept of a secret: its SHA-256, in hex. Only for secrets of full length; passwords go through argon2id. */
export const hashSecret = (secret: string): string => createHash('sha256').update(secret).digest('hex');

/** The time as the database keeps it. */
export const now = (): string => new Date().toISOString();

/** The time so many milliseconds from now, as the database keeps it. */
export const inMs = (ms: number): string => new Date(Date.now() + ms).toISOString();
