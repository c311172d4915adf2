/** How educators change sources: every change with its revision, none over another's. */
import { isDeepStrictEqual } from 'node:util';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import { gradeOf, profileOf, type AppraisalAnswers } from '$lib/schemas/appraisal';
import { sourceDesk as words } from '$lib/strings/sourceDesk';
import type { KeptSource } from '$lib/schemas/sources';
import type { AuditAction } from '$lib/schemas/terms';
import { Problem } from '../api/problem';
import { SourceAppraisal, SourceRetraction, SourceRevision } from '../db/models/intake';
import { Source } from '../db/models/literature';
import { recordAudit } from '../people/audit';
import { now } from '../people/secrets';
import { normaliseDoi } from './doi';
import { citable, yearOf } from './citable';
import type { CslSource } from './literatureFiles';
import { plain } from './duplicates';
import { placesOf, type Estimate, type Place } from './estimates';
import { changeTable } from './publishing';
import { findSource } from './sources';

/** Who changes something. */
export interface Editor {
	id: string;
	name: string;
}

/** What a revision of a source holds, before and after. */
export interface SourceState {
	csl: CslSource;
	retraction: { reason: string; notice: string | null } | null;
	appraisal: { answers: AppraisalAnswers; note: string } | null;
}

export interface SourceChange extends Partial<SourceState> {
	why: string;
}

/** A change that was not made because another came before it. `current` is what stands now. */
export interface Stale {
	stale: true;
	current: SourceState;
	revision: number;
}

const columnsOf = (csl: CslSource) => ({
	csl: JSON.stringify(csl),
	title: csl.title ?? null,
	type: csl.type ?? 'article',
	journal: csl['container-title'] ?? null,
	year: yearOf(csl),
	doi: csl.DOI ?? null,
	pmid: csl.PMID ?? null,
	pmcid: csl.PMCID ?? null,
	citable: citable(csl),
	authorsKnown: (csl.author?.length ?? 0) > 0
});

/** Identifiers in the form in which they are kept and compared. */
function tidied(csl: CslSource): CslSource {
	const doi = csl.DOI ? normaliseDoi(csl.DOI) : null;
	return {
		...csl,
		...(doi !== null && { DOI: doi }),
		...(csl.PMID && { PMID: csl.PMID.trim() }),
		...(csl.PMCID && { PMCID: csl.PMCID.trim().toUpperCase() })
	};
}

/** An id people can recognise, `author-year`, with a letter after it if it is taken. */
async function newSourceId(csl: CslSource, transaction: Transaction): Promise<string> {
	const [first] = csl.author ?? [];
	const name = plain(first?.family ?? first?.literal ?? csl.title ?? 'source')
		.split(' ')
		.slice(0, 4)
		.join('-');
	const base = `${name.slice(0, 60) || 'source'}-${yearOf(csl) ?? 'n-d'}`;
	for (let number = 0; ; number++) {
		const id =
			number === 0 ? base : `${base}${number <= 25 ? String.fromCharCode(97 + number) : `-${number}`}`;
		const taken =
			(await Source.findByPk(id, { transaction })) ??
			(await SourceRevision.findOne({ where: { sourceId: id }, transaction }));
		if (!taken) return id;
	}
}

/** Number of the newest revision of a source; 0 before anybody changed it. */
async function sourceRevisionNumber(id: string, transaction?: Transaction): Promise<number> {
	const where = { sourceId: id };
	return (await SourceRevision.max<number | null, SourceRevision>('number', { where, transaction })) ?? 0;
}

async function stateOf(source: Source, transaction?: Transaction): Promise<SourceState> {
	const [retraction, appraisal] = await Promise.all([
		SourceRetraction.findByPk(source.id, { transaction }),
		SourceAppraisal.findByPk(source.id, { transaction })
	]);
	return {
		csl: JSON.parse(source.csl) as CslSource,
		retraction: retraction && { reason: retraction.reason, notice: retraction.notice },
		appraisal: appraisal && {
			answers: JSON.parse(appraisal.answers) as AppraisalAnswers,
			note: appraisal.note
		}
	};
}

/** Roots that published entries of a source speak of; null if there are none, so that a change of it does not move the table. */
async function rootsOf(db: Sequelize, id: string): Promise<Place[] | null> {
	const rows = await db.query<Place>(
		`SELECT DISTINCT sample.tooth, sample.root FROM entry JOIN sample ON sample.id = entry.sample_id
			WHERE entry.source_id = $id AND entry.state = 'published'`,
		{ type: QueryTypes.SELECT, bind: { id } }
	);
	return rows.length > 0 ? placesOf(rows) : null;
}

/**
 * Adds a source.
 * @param retraction marks it retracted from the first moment, as where its notice was found with it
 * @returns its id
 */
export async function createSource(
	db: Sequelize,
	editor: Editor,
	csl: CslSource,
	why: string,
	retraction: SourceState['retraction'] = null
): Promise<string> {
	return db.transaction(async (transaction) => {
		const id = await newSourceId(csl, transaction);
		const kept = { ...tidied(csl), id };
		await Source.create(
			{ id, ...columnsOf(kept), retracted: retraction !== null, seedHash: null },
			{ transaction }
		);
		if (retraction)
			await SourceRetraction.create(
				{ sourceId: id, at: now(), who: editor.name, ...retraction },
				{ transaction }
			);
		const after: SourceState = { csl: kept, retraction, appraisal: null };
		await writeRevision(id, 1, editor, null, after, why, transaction);
		await recordAudit({ action: 'source added', subject: id, detail: why }, transaction);
		return id;
	});
}

/**
 * Changes the citation, the retraction or the appraisal of a source, or several of them. What the estimates rest on makes a revision of the
 * table in the same transaction, so no answer can be given from the old state after this returns.
 * @param expected number of the revision that was edited
 * @returns the number of the new revision (the old one if nothing differs); what stands now if somebody else was first; null for an unknown id
 */
export async function changeSource(
	db: Sequelize,
	editor: Editor,
	id: string,
	expected: number,
	change: SourceChange,
	estimate?: Estimate
): Promise<number | Stale | null> {
	const source = await Source.findByPk(id);
	if (!source) return null;
	const before = await stateOf(source);
	const places = movesEstimates(before, changed(before, change, id)) ? await rootsOf(db, id) : null;
	let revision = expected;
	try {
		if (places === null) {
			await db.transaction(async (transaction) => {
				revision = await writeChange(editor, id, expected, change, transaction);
			});
		} else {
			const write = async (transaction: Transaction) => {
				revision = await writeChange(editor, id, expected, change, transaction);
				return { why: words.record(id, change.why), who: editor.name };
			};
			await changeTable(db, places, write, estimate);
		}
		return revision;
	} catch (error) {
		if (error instanceof Beaten) return error.stale;
		throw error;
	}
}

/** Undoes a transaction in which somebody else turns out to have been first. */
class Beaten extends Error {
	constructor(readonly stale: Stale) {
		super('The source was changed meanwhile.');
	}
}

function changed(before: SourceState, { why: _, ...change }: SourceChange, id: string): SourceState {
	const after = { ...before, ...change };
	return { ...after, csl: { ...tidied(after.csl), id } };
}

/** @throws Beaten if the revision is not the one expected */
async function writeChange(
	editor: Editor,
	id: string,
	expected: number,
	change: SourceChange,
	transaction: Transaction
): Promise<number> {
	const source = await Source.findByPk(id, { transaction, rejectOnEmpty: true });
	const revision = await sourceRevisionNumber(id, transaction);
	const before = await stateOf(source, transaction);
	if (revision !== expected) throw new Beaten({ stale: true, current: before, revision });
	const after = changed(before, change, id);
	if (isDeepStrictEqual(before, after)) return revision;
	await source.update({ ...columnsOf(after.csl), retracted: after.retraction !== null }, { transaction });
	const actions = [
		!isDeepStrictEqual(before.csl, after.csl) && ('source changed' as const),
		...(await writeRetraction(id, editor, before, after, transaction)),
		await writeAppraisal(id, editor, before, after, transaction)
	].filter((action): action is AuditAction => action !== false);
	await writeRevision(id, revision + 1, editor, before, after, change.why, transaction);
	for (const action of actions) await recordAudit({ action, subject: id, detail: change.why }, transaction);
	return revision + 1;
}

/** Whether the estimates, or a filter on them, read something that differs. */
function movesEstimates(before: SourceState, after: SourceState): boolean {
	const read = ({ csl, retraction, appraisal }: SourceState) => [
		citable(csl),
		yearOf(csl),
		retraction !== null,
		appraisal && gradeOf(appraisal.answers)
	];
	return !isDeepStrictEqual(read(before), read(after));
}

async function writeRetraction(
	sourceId: string,
	editor: Editor,
	before: SourceState,
	after: SourceState,
	transaction: Transaction
): Promise<AuditAction[]> {
	if (isDeepStrictEqual(before.retraction, after.retraction)) return [];
	await SourceRetraction.destroy({ where: { sourceId }, transaction });
	if (!after.retraction) return ['retraction lifted'];
	await SourceRetraction.create(
		{ sourceId, at: now(), who: editor.name, ...after.retraction },
		{ transaction }
	);
	return ['source retracted'];
}

async function writeAppraisal(
	sourceId: string,
	editor: Editor,
	before: SourceState,
	after: SourceState,
	transaction: Transaction
): Promise<AuditAction | false> {
	if (isDeepStrictEqual(before.appraisal, after.appraisal)) return false;
	await SourceAppraisal.destroy({ where: { sourceId }, transaction });
	if (after.appraisal) {
		const { answers, note } = after.appraisal;
		await SourceAppraisal.create(
			{
				...{ sourceId, at: now(), who: editor.name, note },
				answers: JSON.stringify(answers),
				grade: gradeOf(answers)
			},
			{ transaction }
		);
	}
	return 'source appraised';
}

async function writeRevision(
	sourceId: string,
	number: number,
	editor: Editor,
	before: SourceState | null,
	after: SourceState | null,
	why: string,
	transaction: Transaction
) {
	await SourceRevision.create(
		{
			...{ sourceId, number, at: now(), who: editor.name, whoId: editor.id, why },
			before: before && JSON.stringify(before),
			after: after && JSON.stringify(after)
		},
		{ transaction }
	);
}

/** Tables whose rows name a source. */
const REFERRING = ['entry', 'sample', 'measurement', 'diagnostic', 'standard', 'attachment'];

/**
 * Removes a source nothing rests on; its revisions stay.
 * @returns false if it is in use, null for an unknown id, what stands now if somebody changed it meanwhile
 */
export async function removeSource(
	db: Sequelize,
	editor: Editor,
	id: string,
	expected: number,
	why: string
): Promise<true | false | null | Stale> {
	return db.transaction(async (transaction) => {
		const source = await Source.findByPk(id, { transaction });
		if (!source) return null;
		const revision = await sourceRevisionNumber(id, transaction);
		const before = await stateOf(source, transaction);
		if (revision !== expected) return { stale: true, current: before, revision };
		const uses = REFERRING.map((table) => `EXISTS (SELECT 1 FROM ${table} WHERE source_id = $id)`);
		const [{ used }] = await db.query<{ used: number }>(
			`SELECT ${uses.join(' OR ')} OR EXISTS
				(SELECT 1 FROM finding_characteristic WHERE instr(';' || source_ids || ';', ';' || $id || ';') > 0) AS used`,
			{ type: QueryTypes.SELECT, bind: { id }, transaction }
		);
		// A shipped source would come back with the next change of its file.
		if (used === 1 || source.seedHash !== null) return false;
		await writeRevision(id, revision + 1, editor, before, null, why, transaction);
		await source.destroy({ transaction });
		await recordAudit({ action: 'source removed', subject: id, detail: why }, transaction);
		return true;
	});
}

/** A source with everything that is kept about it but its files; null for an unknown id. */
export async function findKeptSource(db: Sequelize, id: string): Promise<KeptSource | null> {
	const source = await findSource(db, id);
	if (!source) return null;
	const [revision, retraction, appraisal] = await Promise.all([
		sourceRevisionNumber(id),
		SourceRetraction.findByPk(id),
		SourceAppraisal.findByPk(id)
	]);
	const answers = appraisal && (JSON.parse(appraisal.answers) as AppraisalAnswers);
	return {
		...source,
		revision,
		retraction: retraction && { at: retraction.at, reason: retraction.reason, notice: retraction.notice },
		appraisal:
			appraisal && answers
				? {
						at: appraisal.at,
						grade: appraisal.grade,
						profile: profileOf(answers),
						answers,
						note: appraisal.note
					}
				: null
	};
}

/** The revisions of a source, the newest first. */
export async function revisionsOfSource(id: string) {
	const rows = await SourceRevision.findAll({ where: { sourceId: id }, order: [['number', 'DESC']] });
	return rows.map(({ number, at, who, why, before, after }) => ({
		...{ number, at, who, why },
		before: before === null ? null : (JSON.parse(before) as SourceState),
		after: after === null ? null : (JSON.parse(after) as SourceState)
	}));
}

/** The number an If-Match header carries. */
export function expectedRevision(header: string | null): number {
	const number = /^(?:W\/)?"?(\d{1,9})"?$/.exec(header?.trim() ?? '')?.[1];
	if (number === undefined)
		throw new Problem(428, 'Send the revision you edited as If-Match, such as If-Match: "3".');
	return Number(number);
}
