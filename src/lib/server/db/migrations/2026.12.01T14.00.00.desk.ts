import type { Migration } from '../migrate';

const NO_CHANGE = (table: string) => [
	`CREATE TRIGGER ${table}_no_update BEFORE UPDATE ON ${table} BEGIN SELECT RAISE(ABORT, 'revisions are append-only'); END`,
	`CREATE TRIGGER ${table}_no_delete BEFORE DELETE ON ${table} BEGIN SELECT RAISE(ABORT, 'revisions are append-only'); END`
];

/** What is common to the work on an entry and on a finding's characteristic. */
const WORK = `state TEXT NOT NULL CHECK (state IN ('draft', 'in-review')),
	number INTEGER NOT NULL,
	author_id TEXT NOT NULL,
	author TEXT NOT NULL,
	editors TEXT NOT NULL,
	reviewer_id TEXT,
	reviewer TEXT,
	reasons TEXT,
	note TEXT NOT NULL DEFAULT '',
	at TEXT NOT NULL`;

/** The desk: drafts beside what is published, review, the record of the table, and the same for finding characteristics. */
export const migration: Migration = {
	name: '2026.12.01T14.00.00.desk',
	up: [
		'ALTER TABLE sample ADD COLUMN poolable_reason TEXT',
		'ALTER TABLE revision ADD COLUMN who_id TEXT',
		'ALTER TABLE revision ADD COLUMN author TEXT',
		'CREATE INDEX revision_entry ON revision (entry_id, number)',

		// Revisions of the seed named only the entry; its sample belongs to what a revision has to give back.
		'DROP TRIGGER revision_no_update',
		`UPDATE revision SET after = (SELECT json_set(revision.after, '$.source', sample.source_id, '$.tooth', sample.tooth, '$.root', sample.root,
				'$.scope', sample.scope, '$.country', sample.country, '$.method', sample.method, '$.subgroup', sample.subgroup, '$.total', sample.total)
			FROM entry JOIN sample ON sample.id = entry.sample_id WHERE entry.id = revision.entry_id)
			WHERE json_extract(after, '$.figures') IS NOT NULL AND json_extract(after, '$.tooth') IS NULL`,
		NO_CHANGE('revision')[0],

		// The draft itself is the revision of this number: the published entry beside it stays as it is.
		`CREATE TABLE entry_work (entry_id INTEGER PRIMARY KEY REFERENCES entry (id) ON DELETE CASCADE, ${WORK})`,
		'CREATE INDEX entry_work_state ON entry_work (state)',

		'ALTER TABLE table_revision ADD COLUMN who TEXT',
		'ALTER TABLE table_revision ADD COLUMN author TEXT',
		'ALTER TABLE table_revision ADD COLUMN last_revision INTEGER',
		`UPDATE table_revision SET last_revision = coalesce((SELECT MAX(revision.id) FROM revision WHERE revision.at <= table_revision.at), 0)`,
		// Whoever publishes: the table of a revision is what the revisions of entries up to here add up to.
		`CREATE TRIGGER table_revision_added AFTER INSERT ON table_revision WHEN new.last_revision IS NULL BEGIN
			UPDATE table_revision SET last_revision = coalesce((SELECT MAX(id) FROM revision), 0) WHERE id = new.id; END`,
		`CREATE TABLE table_effect (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			table_revision_id INTEGER NOT NULL REFERENCES table_revision (id),
			tooth TEXT NOT NULL,
			root TEXT NOT NULL,
			before TEXT NOT NULL,
			after TEXT,
			UNIQUE (table_revision_id, tooth, root)
		)`,

		`CREATE TABLE finding_characteristic_new (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			finding TEXT NOT NULL,
			parameter TEXT NOT NULL,
			tooth_group TEXT NOT NULL,
			beta_a REAL CHECK (beta_a > 0),
			beta_b REAL CHECK (beta_b > 0),
			sd_mm REAL CHECK (sd_mm > 0),
			basis TEXT NOT NULL CHECK (basis IN ('published', 'derived', 'assumed')),
			source_ids TEXT NOT NULL,
			note TEXT NOT NULL,
			UNIQUE (finding, parameter, tooth_group)
		)`,
		`INSERT INTO finding_characteristic_new SELECT id, finding, parameter, tooth_group, beta_a, beta_b, sd_mm, basis, source_ids, note
			FROM finding_characteristic`,
		'DROP TABLE finding_characteristic',
		'ALTER TABLE finding_characteristic_new RENAME TO finding_characteristic',
		// By name: the numbers of the rows are given anew whenever the shipped literature changes.
		`CREATE TABLE characteristic_revision (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			name TEXT NOT NULL,
			number INTEGER NOT NULL,
			at TEXT NOT NULL,
			who TEXT NOT NULL,
			who_id TEXT NOT NULL,
			author TEXT,
			before TEXT,
			after TEXT NOT NULL,
			why TEXT NOT NULL,
			UNIQUE (name, number)
		)`,
		...NO_CHANGE('characteristic_revision'),
		`CREATE TABLE characteristic_work (name TEXT PRIMARY KEY, ${WORK})`
	]
};
