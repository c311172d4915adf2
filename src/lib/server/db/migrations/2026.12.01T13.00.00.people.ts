import type { Migration } from '../migrate';

/** Accounts, roles, sessions, second factors, invitations, one-time links, tokens, settings, the audit log and the mail queue. Times are ISO 8601 in UTC. */
export const migration: Migration = {
	name: '2026.12.01T13.00.00.people',
	up: [
		`CREATE TABLE person (
			id TEXT PRIMARY KEY,
			email TEXT NOT NULL,
			email_key TEXT NOT NULL UNIQUE,
			name TEXT NOT NULL CHECK (length(trim(name)) > 0),
			password_hash TEXT NOT NULL,
			totp_secret TEXT,
			totp_pending TEXT,
			totp_step INTEGER,
			deactivated_at TEXT,
			created_at TEXT NOT NULL,
			seen_at TEXT
		)`,
		`CREATE TABLE person_role (
			person_id TEXT NOT NULL REFERENCES person (id) ON DELETE CASCADE,
			role TEXT NOT NULL CHECK (role IN ('student', 'dentist', 'educator', 'administrator')),
			PRIMARY KEY (person_id, role)
		)`,
		'CREATE INDEX person_role_role ON person_role (role)',
		`CREATE TABLE session (
			id_hash TEXT PRIMARY KEY,
			handle TEXT NOT NULL UNIQUE,
			person_id TEXT NOT NULL REFERENCES person (id) ON DELETE CASCADE,
			expires_at TEXT NOT NULL,
			created_at TEXT NOT NULL,
			seen_at TEXT NOT NULL,
			address TEXT NOT NULL,
			agent TEXT NOT NULL
		)`,
		'CREATE INDEX session_person ON session (person_id)',
		'CREATE INDEX session_expires ON session (expires_at)',
		`CREATE TABLE recovery_code (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			person_id TEXT NOT NULL REFERENCES person (id) ON DELETE CASCADE,
			code_hash TEXT NOT NULL,
			used_at TEXT,
			UNIQUE (person_id, code_hash)
		)`,
		`CREATE TABLE invitation (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			email TEXT NOT NULL,
			email_key TEXT NOT NULL,
			roles TEXT NOT NULL,
			token_hash TEXT NOT NULL UNIQUE,
			invited_by TEXT NOT NULL REFERENCES person (id),
			created_at TEXT NOT NULL,
			sent_at TEXT NOT NULL,
			expires_at TEXT NOT NULL,
			accepted_at TEXT,
			revoked_at TEXT
		)`,
		// One open invitation an address: a second one would leave two links alive.
		`CREATE UNIQUE INDEX invitation_open ON invitation (email_key) WHERE accepted_at IS NULL AND revoked_at IS NULL`,
		`CREATE TABLE one_time_link (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			kind TEXT NOT NULL CHECK (kind IN ('set-up', 'reset', 'email-change')),
			token_hash TEXT NOT NULL UNIQUE,
			person_id TEXT REFERENCES person (id) ON DELETE CASCADE,
			email TEXT,
			created_at TEXT NOT NULL,
			expires_at TEXT NOT NULL,
			used_at TEXT
		)`,
		'CREATE INDEX one_time_link_person ON one_time_link (person_id, kind)',
		`CREATE TABLE api_token (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			person_id TEXT NOT NULL REFERENCES person (id) ON DELETE CASCADE,
			name TEXT NOT NULL,
			token_hash TEXT NOT NULL UNIQUE,
			hint TEXT NOT NULL,
			scopes TEXT NOT NULL,
			created_at TEXT NOT NULL,
			expires_at TEXT NOT NULL,
			used_at TEXT
		)`,
		'CREATE INDEX api_token_person ON api_token (person_id)',
		// The name stands beside the id: what was done stays readable whatever becomes of the account. No key refers to person for that reason.
		`CREATE TABLE audit (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			at TEXT NOT NULL,
			action TEXT NOT NULL,
			actor_id TEXT,
			actor_name TEXT NOT NULL,
			subject TEXT NOT NULL,
			detail TEXT NOT NULL,
			address TEXT NOT NULL
		)`,
		'CREATE INDEX audit_at ON audit (at)',
		'CREATE INDEX audit_action ON audit (action)',
		'CREATE INDEX audit_actor ON audit (actor_id)',
		`CREATE TRIGGER audit_no_update BEFORE UPDATE ON audit BEGIN SELECT RAISE(ABORT, 'the audit log is append-only'); END`,
		`CREATE TRIGGER audit_no_delete BEFORE DELETE ON audit BEGIN SELECT RAISE(ABORT, 'the audit log is append-only'); END`,
		'CREATE TABLE setting (name TEXT PRIMARY KEY, value TEXT NOT NULL)',
		// The message is sealed (people/seal.ts), because it may hold a link, and is blanked once it has gone out.
		`CREATE TABLE mail (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			kind TEXT NOT NULL,
			recipient TEXT NOT NULL,
			subject TEXT NOT NULL,
			sealed TEXT,
			message_id TEXT NOT NULL UNIQUE,
			state TEXT NOT NULL CHECK (state IN ('waiting', 'sending', 'sent', 'failed', 'dropped')),
			attempts INTEGER NOT NULL DEFAULT 0,
			next_at TEXT NOT NULL,
			expires_at TEXT,
			last_error TEXT,
			created_at TEXT NOT NULL,
			sent_at TEXT
		)`,
		'CREATE INDEX mail_due ON mail (state, next_at)'
	]
};
