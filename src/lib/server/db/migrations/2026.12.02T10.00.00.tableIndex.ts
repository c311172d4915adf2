import type { Migration } from '../migrate';

/**
 * What the table's page sorts, filters and searches by, kept true by triggers: `source_row` and `entry_row` are flat and narrow, so that
 * counting and sorting a hundred thousand entries reads one small table, and `entry_search` and `source_search` are full-text indexes.
 */

/** Letters that sort with a plain one, upper and lower case: SQLite knows no alphabet but that of ASCII. */
const SORTS_WITH: Record<string, string> = {
	a: 'ÁÀÂÄÃÅĀáàâäãåāÆæ',
	c: 'ÇČĆçčć',
	e: 'ÉÈÊËéèêë',
	g: 'Ğğ',
	i: 'ÍÌÎÏİíìîïı',
	l: 'Łł',
	n: 'Ññ',
	o: 'ÓÒÔÖÕØóòôöõøŒœ',
	s: 'ŠŞŚšşś',
	u: 'ÚÙÛÜúùûü',
	z: 'ŽŻŹžżź'
};
const plainLetter = (letter: string) =>
	`CASE ${Object.entries(SORTS_WITH)
		.map(([plain, accented]) => `WHEN instr('${accented}', ${letter}) > 0 THEN '${plain}'`)
		.join(' ')} ELSE lower(${letter}) END`;

/** Name of one CSL author, a row `author` of json_each. */
const NAME = `coalesce(json_extract(author.value, '$.family'), json_extract(author.value, '$.literal'),
	json_extract(author.value, '$.given'), '')`;
const AUTHORS = (source: string) =>
	`coalesce((SELECT group_concat(${NAME}, ' ') FROM json_each(${source}.csl, '$.author') AS author), '')`;

/** A source without authors is listed under its title, as the screens name it, whatever bracket or quote it begins with. */
const sourceRow = (where: string) =>
	`INSERT INTO source_row (source_id, author, authors, title, year)
		SELECT id, ${plainLetter('substr(named, 1, 1)')} || lower(substr(named, 2)), authors, title, year
		FROM (SELECT source.id, source.year, lower(coalesce(source.title, source.id)) AS title, ${AUTHORS('source')} AS authors,
			ltrim(coalesce(nullif(trim(${AUTHORS('source')}), ''), source.title, source.id), '[("“‘ ') AS named FROM source ${where})`;
/** Between two cells, so that no phrase reaches across: a letter, hence a word for the index, that nobody types. */
const APART = ' ǀ ';
const sourceWords = (where: string) =>
	`INSERT INTO source_search (rowid, words)
		SELECT source_row.id, concat_ws('${APART}', source_row.authors, source.title, source.journal, source.year, source.doi, source.pmid, source.pmcid)
		FROM source JOIN source_row ON source_row.source_id = source.id ${where}`;
const entryRow = (where: string) =>
	`INSERT INTO entry_row (entry_id, state, source_id, author, year, tooth, root, measure, method, country, total)
		SELECT entry.id, entry.state, entry.source_id, source_row.author, coalesce(source_row.year, 0), sample.tooth, sample.root,
			entry.measure, sample.method, sample.country, coalesce(sample.total, 0)
		FROM entry JOIN sample ON sample.id = entry.sample_id JOIN source_row ON source_row.source_id = entry.source_id ${where}`;
/** The state stands among the words, as one that nobody types, so that the index alone can count what visitors may see. */
const entryWords = (where: string) =>
	`INSERT INTO entry_search (rowid, words)
		SELECT entry.id, concat_ws('${APART}', 'ǀ' || replace(entry.state, '-', ''), source_row.authors, source.title, source.journal, source.id, source.year, sample.tooth, sample.root,
			sample.scope, sample.country, sample.method, sample.subgroup, entry.measure, entry.locator,
			(SELECT group_concat(figure.category || '${APART}' || figure.note, '${APART}') FROM figure WHERE figure.entry_id = entry.id))
		FROM entry JOIN sample ON sample.id = entry.sample_id JOIN source ON source.id = entry.source_id
			JOIN source_row ON source_row.source_id = entry.source_id ${where}`;

const refreshWords = (ids: string, where: string) =>
	`DELETE FROM entry_search WHERE rowid IN (${ids}); ${entryWords(where)};`;
const refreshEntries = (ids: string, where: string) =>
	`DELETE FROM entry_row WHERE entry_id IN (${ids}); ${entryRow(where)}; ${refreshWords(ids, where)}`;
// The full-text index goes by the number of the row: a source's own rowid is not kept by VACUUM.
const forgetSource = (id: string) =>
	`DELETE FROM source_search WHERE rowid IN (SELECT id FROM source_row WHERE source_id = ${id}); DELETE FROM source_row WHERE source_id = ${id};`;

const trigger = (name: string, when: string, body: string) =>
	`CREATE TRIGGER ${name} AFTER ${when} BEGIN ${body} END`;

const WORDS = `USING fts5 (words, content = '', contentless_delete = 1, tokenize = 'unicode61 remove_diacritics 2', prefix = '1 2 3')`;
const SORTED_BY = ['source_id', 'author', 'year', 'tooth', 'root', 'measure', 'method', 'country', 'total'];

export const migration: Migration = {
	name: '2026.12.02T10.00.00.tableIndex',
	up: [
		`CREATE TABLE source_row (
			id INTEGER PRIMARY KEY AUTOINCREMENT,
			source_id TEXT NOT NULL UNIQUE,
			author TEXT NOT NULL,
			authors TEXT NOT NULL,
			title TEXT NOT NULL,
			year INTEGER
		)`,
		`CREATE TABLE entry_row (
			entry_id INTEGER PRIMARY KEY,
			state TEXT NOT NULL,
			source_id TEXT NOT NULL,
			author TEXT NOT NULL,
			year INTEGER NOT NULL,
			tooth TEXT NOT NULL,
			root TEXT NOT NULL,
			measure TEXT NOT NULL,
			method TEXT NOT NULL,
			country TEXT NOT NULL,
			total INTEGER NOT NULL
		)`,
		// The entry's id, which breaks ties, stands at the end of every index of its own accord.
		...SORTED_BY.map((key) => `CREATE INDEX entry_row_${key} ON entry_row (state, ${key})`),
		`CREATE VIRTUAL TABLE source_search ${WORDS}`,
		`CREATE VIRTUAL TABLE entry_search ${WORDS}`,

		trigger(
			'source_added',
			'INSERT ON source',
			`${sourceRow('WHERE source.id = new.id')}; ${sourceWords('WHERE source.id = new.id')};`
		),
		trigger(
			'source_changed',
			'UPDATE OF csl, title, journal, year, doi, pmid, pmcid ON source',
			`${forgetSource('new.id')}
			${sourceRow('WHERE source.id = new.id')};
			${sourceWords('WHERE source.id = new.id')};
			${refreshEntries('SELECT id FROM entry WHERE source_id = new.id', 'WHERE entry.source_id = new.id')}`
		),
		trigger('source_removed', 'DELETE ON source', forgetSource('old.id')),
		trigger(
			'sample_changed',
			'UPDATE ON sample',
			refreshEntries('SELECT id FROM entry WHERE sample_id = new.id', 'WHERE entry.sample_id = new.id')
		),
		trigger(
			'entry_added',
			'INSERT ON entry',
			`${entryRow('WHERE entry.id = new.id')}; ${entryWords('WHERE entry.id = new.id')};`
		),
		trigger('entry_changed', 'UPDATE ON entry', refreshEntries('new.id', 'WHERE entry.id = new.id')),
		trigger(
			'entry_removed',
			'DELETE ON entry',
			'DELETE FROM entry_row WHERE entry_id = old.id; DELETE FROM entry_search WHERE rowid = old.id;'
		),
		trigger(
			'figure_added',
			'INSERT ON figure',
			refreshWords('new.entry_id', 'WHERE entry.id = new.entry_id')
		),
		trigger(
			'figure_changed',
			'UPDATE OF category, note ON figure',
			refreshWords('new.entry_id', 'WHERE entry.id = new.entry_id')
		),
		trigger(
			'figure_removed',
			'DELETE ON figure',
			refreshWords('old.entry_id', 'WHERE entry.id = old.entry_id')
		),

		sourceRow(''),
		sourceWords(''),
		entryRow(''),
		entryWords('')
	]
};
