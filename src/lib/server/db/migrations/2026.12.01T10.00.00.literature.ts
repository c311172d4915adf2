import type { Migration } from '../migrate';

/** The literature table: sources, samples, entries with their figures and revisions, measurements, diagnostics, characteristics, standards. */
export const migration: Migration = {
	name: '2026.12.01T10.00.00.literature',
	up: [
		`CREATE TABLE source (
			id TEXT PRIMARY KEY,
			csl TEXT NOT NULL,
			title TEXT,
			type TEXT NOT NULL,
			journal TEXT,
			year INTEGER,
			doi TEXT,
			pmid TEXT,
			pmcid TEXT,
			citable INTEGER NOT NULL,
			authors_known INTEGER NOT NULL,
			retracted INTEGER NOT NULL DEFAULT 0,
			seed_hash TEXT
		)`,
		`CREATE TABLE sample (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			source_id TEXT NOT NULL REFERENCES source (id),
			tooth TEXT NOT NULL,
			root TEXT NOT NULL,
			scope TEXT NOT NULL,
			country TEXT NOT NULL,
			method TEXT NOT NULL,
			subgroup TEXT NOT NULL,
			total INTEGER CHECK (total > 0),
			poolable INTEGER,
			seed_key TEXT UNIQUE,
			UNIQUE (id, source_id)
		)`,
		'CREATE INDEX sample_place ON sample (tooth, root)',
		'CREATE INDEX sample_source ON sample (source_id)',
		// The source stands on the entry as well, tied to its sample's by the two-column key: an entry without a source cannot exist.
		`CREATE TABLE entry (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			sample_id INTEGER NOT NULL,
			source_id TEXT NOT NULL,
			locator TEXT NOT NULL CHECK (length(trim(locator)) > 0),
			measure TEXT NOT NULL,
			state TEXT NOT NULL CHECK (state IN ('draft', 'in-review', 'published', 'withdrawn')),
			provenance TEXT NOT NULL CHECK (provenance IN ('read', 'secondary', 'memory')),
			confirmed INTEGER NOT NULL DEFAULT 0,
			seed_key TEXT UNIQUE,
			seed_hash TEXT,
			FOREIGN KEY (sample_id, source_id) REFERENCES sample (id, source_id)
		)`,
		'CREATE INDEX entry_sample ON entry (sample_id)',
		'CREATE INDEX entry_source ON entry (source_id)',
		`CREATE TABLE figure (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			entry_id INTEGER NOT NULL REFERENCES entry (id) ON DELETE CASCADE,
			position INTEGER NOT NULL,
			category TEXT NOT NULL,
			count INTEGER CHECK (count >= 0),
			percent REAL CHECK (percent >= 0 AND percent <= 100),
			count_derived INTEGER NOT NULL,
			note TEXT NOT NULL,
			UNIQUE (entry_id, position)
		)`,
		`CREATE TABLE revision (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			entry_id INTEGER NOT NULL REFERENCES entry (id),
			number INTEGER NOT NULL,
			at TEXT NOT NULL,
			who TEXT NOT NULL,
			before TEXT,
			after TEXT,
			why TEXT NOT NULL,
			UNIQUE (entry_id, number)
		)`,
		`CREATE TRIGGER revision_no_update BEFORE UPDATE ON revision BEGIN SELECT RAISE(ABORT, 'revisions are append-only'); END`,
		`CREATE TRIGGER revision_no_delete BEFORE DELETE ON revision BEGIN SELECT RAISE(ABORT, 'revisions are append-only'); END`,
		`CREATE TABLE measurement (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			source_id TEXT NOT NULL REFERENCES source (id),
			locator TEXT NOT NULL CHECK (length(trim(locator)) > 0),
			tooth TEXT NOT NULL,
			root TEXT NOT NULL,
			scope TEXT NOT NULL,
			country TEXT NOT NULL,
			method TEXT NOT NULL,
			quantity TEXT NOT NULL,
			n INTEGER,
			mean REAL,
			sd REAL,
			min REAL,
			max REAL,
			unit TEXT NOT NULL,
			provenance TEXT NOT NULL CHECK (provenance IN ('read', 'secondary', 'memory')),
			note TEXT NOT NULL
		)`,
		'CREATE INDEX measurement_place ON measurement (tooth, root, quantity)',
		`CREATE TABLE diagnostic (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			source_id TEXT NOT NULL REFERENCES source (id),
			locator TEXT NOT NULL CHECK (length(trim(locator)) > 0),
			test TEXT NOT NULL,
			target TEXT NOT NULL,
			tooth TEXT NOT NULL,
			root TEXT NOT NULL,
			reference_standard TEXT NOT NULL,
			n INTEGER,
			tp INTEGER,
			fp INTEGER,
			fn INTEGER,
			tn INTEGER,
			sensitivity REAL,
			specificity REAL,
			kappa REAL,
			provenance TEXT NOT NULL CHECK (provenance IN ('read', 'secondary', 'memory')),
			note TEXT NOT NULL
		)`,
		`CREATE TABLE finding_characteristic (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			finding TEXT NOT NULL,
			parameter TEXT NOT NULL,
			tooth_group TEXT NOT NULL,
			beta_a REAL CHECK (beta_a > 0),
			beta_b REAL CHECK (beta_b > 0),
			sd_mm REAL CHECK (sd_mm > 0),
			basis TEXT NOT NULL CHECK (basis IN ('derived', 'assumed')),
			source_ids TEXT NOT NULL,
			note TEXT NOT NULL,
			UNIQUE (finding, parameter, tooth_group)
		)`,
		`CREATE TABLE standard (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			source_id TEXT NOT NULL REFERENCES source (id),
			standard TEXT NOT NULL,
			item TEXT NOT NULL,
			value TEXT NOT NULL,
			lower REAL,
			upper REAL,
			unit TEXT NOT NULL,
			provenance TEXT NOT NULL CHECK (provenance IN ('read', 'secondary', 'memory')),
			note TEXT NOT NULL
		)`,
		`CREATE TABLE unplaced_row (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			file TEXT NOT NULL,
			line INTEGER NOT NULL,
			source_id TEXT NOT NULL,
			summary TEXT NOT NULL,
			reason TEXT NOT NULL
		)`,
		`CREATE TABLE table_revision (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			at TEXT NOT NULL,
			why TEXT NOT NULL,
			seed_digest TEXT
		)`
	]
};
