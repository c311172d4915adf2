import type { Migration } from '../migrate';

/** What educators do to sources (revisions, retraction, appraisal, attached pages), and imports. */
export const migration: Migration = {
	name: '2026.12.03T10.00.00.intake',
	up: [
		// No key to source: what was done to a source stays readable after an unused one was removed.
		`CREATE TABLE source_revision (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			source_id TEXT NOT NULL,
			number INTEGER NOT NULL,
			at TEXT NOT NULL,
			who TEXT NOT NULL,
			who_id TEXT,
			before TEXT,
			after TEXT,
			why TEXT NOT NULL CHECK (length(trim(why)) > 0),
			UNIQUE (source_id, number)
		)`,
		`CREATE TRIGGER source_revision_no_update BEFORE UPDATE ON source_revision BEGIN SELECT RAISE(ABORT, 'revisions are append-only'); END`,
		`CREATE TRIGGER source_revision_no_delete BEFORE DELETE ON source_revision BEGIN SELECT RAISE(ABORT, 'revisions are append-only'); END`,
		`CREATE TABLE source_retraction (
			source_id TEXT PRIMARY KEY REFERENCES source (id) ON DELETE CASCADE,
			at TEXT NOT NULL,
			who TEXT NOT NULL,
			reason TEXT NOT NULL CHECK (length(trim(reason)) > 0),
			notice TEXT
		)`,
		`CREATE TABLE source_appraisal (
			source_id TEXT PRIMARY KEY REFERENCES source (id) ON DELETE CASCADE,
			at TEXT NOT NULL,
			who TEXT NOT NULL,
			answers TEXT NOT NULL,
			note TEXT NOT NULL,
			grade TEXT NOT NULL CHECK (grade IN ('low', 'some', 'high'))
		)`,
		`CREATE TABLE attachment (
			id TEXT PRIMARY KEY,
			source_id TEXT NOT NULL REFERENCES source (id),
			name TEXT NOT NULL,
			caption TEXT NOT NULL,
			stored TEXT NOT NULL UNIQUE,
			type TEXT NOT NULL,
			bytes INTEGER NOT NULL,
			added_by TEXT NOT NULL,
			added_at TEXT NOT NULL
		)`,
		'CREATE INDEX attachment_source ON attachment (source_id)',
		`CREATE TABLE table_import (
			id TEXT PRIMARY KEY,
			file TEXT NOT NULL,
			stored TEXT NOT NULL,
			kind TEXT NOT NULL CHECK (kind IN ('csv', 'xlsx')),
			mapping TEXT NOT NULL,
			state TEXT NOT NULL CHECK (state IN ('preview', 'writing', 'finishing', 'done', 'cancelled', 'failed')),
			publish INTEGER NOT NULL DEFAULT 0,
			person_id TEXT NOT NULL,
			person_name TEXT NOT NULL,
			at TEXT NOT NULL,
			ended_at TEXT,
			rows INTEGER NOT NULL DEFAULT 0,
			entries INTEGER NOT NULL DEFAULT 0,
			message TEXT NOT NULL DEFAULT ''
		)`,
		'CREATE INDEX table_import_person ON table_import (person_id, at)',
		// What an import has written so far, so that it can be undone as a whole.
		`CREATE TABLE import_entry (
			entry_id INTEGER PRIMARY KEY REFERENCES entry (id) ON DELETE CASCADE,
			import_id TEXT NOT NULL REFERENCES table_import (id)
		)`,
		'CREATE INDEX import_entry_import ON import_entry (import_id)',
		`CREATE TABLE import_sample (
			sample_id INTEGER PRIMARY KEY REFERENCES sample (id) ON DELETE CASCADE,
			import_id TEXT NOT NULL REFERENCES table_import (id)
		)`,
		'CREATE INDEX import_sample_import ON import_sample (import_id)'
	]
};
