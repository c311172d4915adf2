/** Finding characteristics at the desk: drafts beside what is in force, review by another, revisions. */
import type { Sequelize, Transaction } from 'sequelize';
import { characteristicName, type CharacteristicContent } from '$lib/entry/characteristic';
import { hindrance, type Action, type Situation } from '$lib/entry/workflow';
import { desk as words } from '$lib/strings/desk';
import { CharacteristicRevision, CharacteristicWork } from '../db/models/desk';
import { Characteristic } from '../db/models/supplements';
import { now } from '../people/secrets';
import { hindered, StaleEdit, unknownEntry } from './deskProblem';
import type { DeskPerson } from './entryDrafts';
import type { Estimate } from './estimates';
import { changeTable, type Published } from './publishing';

/** A characteristic with what stands beside it. */
export interface CharacteristicNow {
	name: string;
	finding: string;
	parameter: string;
	toothGroup: string;
	kind: 'beta' | 'sd';
	inForce: CharacteristicContent;
	/** The draft; without one what is in force. */
	content: CharacteristicContent;
	work: CharacteristicWork | null;
	/** Number of the newest revision; 0 while nobody has touched what was shipped. */
	number: number;
	who: string;
}

const contentOf = ({
	betaA,
	betaB,
	sdMm,
	basis,
	sourceIds,
	note
}: CharacteristicContent): CharacteristicContent => ({
	...{ betaA, betaB, sdMm, basis, sourceIds, note }
});

interface Recorded extends CharacteristicContent {
	state: 'draft' | 'in-review' | 'discarded' | 'published';
}

/** Every characteristic, as the shipped file orders them. */
export async function listCharacteristics(): Promise<CharacteristicNow[]> {
	const rows = await Characteristic.findAll({ order: ['id'] });
	const all: CharacteristicNow[] = [];
	for (const row of rows) all.push(await readRow(row));
	return all;
}

/** One by its name; null for an unknown one. */
export async function readCharacteristic(
	name: string,
	transaction?: Transaction
): Promise<CharacteristicNow | null> {
	const [finding, parameter, toothGroup] = name.split('.');
	const row = await Characteristic.findOne({
		where: { finding: finding ?? '', parameter: parameter ?? '', toothGroup: toothGroup ?? '' },
		transaction
	});
	return row && readRow(row, transaction);
}

async function readRow(row: Characteristic, transaction?: Transaction): Promise<CharacteristicNow> {
	const name = characteristicName(row);
	const work = await CharacteristicWork.findByPk(name, { transaction });
	const last = await CharacteristicRevision.findOne({
		where: { name },
		order: [['number', 'DESC']],
		transaction
	});
	const draft =
		work && (await CharacteristicRevision.findOne({ where: { name, number: work.number }, transaction }));
	const inForce = contentOf(row);
	return {
		...{ name, finding: row.finding, parameter: row.parameter, toothGroup: row.toothGroup, work, inForce },
		kind: row.sdMm === null ? 'beta' : 'sd',
		content: draft ? contentOf(JSON.parse(draft.after) as Recorded) : inForce,
		number: last?.number ?? 0,
		who: last?.who ?? ''
	};
}

/** The situation by which the rules decide; a characteristic is always in force. */
export const characteristicSituation = ({ work }: Pick<CharacteristicNow, 'work'>): Situation => ({
	standing: 'published',
	work: work && { state: work.state, editors: JSON.parse(work.editors) as string[] }
});

/** Revisions of a characteristic, the first first. */
export async function characteristicRevisions(name: string) {
	const rows = await CharacteristicRevision.findAll({ where: { name }, order: ['number'] });
	return rows.map(({ number, at, who, why, before, after }) => ({
		...{ number, at, who, why, state: (JSON.parse(after) as Recorded).state },
		before: before === null ? null : contentOf(JSON.parse(before) as Recorded),
		after: contentOf(JSON.parse(after) as Recorded)
	}));
}

interface Request {
	name: string;
	person: DeskPerson;
	expected: number;
}

async function nowFor(action: Action, { name, person, expected }: Request, transaction?: Transaction) {
	const now = await readCharacteristic(name, transaction);
	if (!now) throw unknownEntry();
	const why = hindrance(action, characteristicSituation(now), person);
	if (why === 'role') throw hindered(why);
	if (now.number !== expected) throw stale(now, null);
	if (why) throw hindered(why);
	return now;
}

const stale = (now: CharacteristicNow, yours: CharacteristicContent | null) =>
	new StaleEdit(
		(Object.keys(now.content) as (keyof CharacteristicContent)[])
			.filter((part) => yours && yours[part] !== now.content[part])
			.map((part) => ({
				...{ part, base: null, yours: String(yours![part] ?? ''), theirs: String(now.content[part] ?? '') },
				...{ conflict: true, proposed: 'yours' as const }
			})),
		now.content,
		now.number,
		now.who
	);

async function append(
	{ name, number, content: before }: CharacteristicNow,
	{
		person,
		content,
		state,
		why,
		author = null
	}: {
		person: DeskPerson;
		content: CharacteristicContent;
		state: Recorded['state'];
		why: string;
		author?: string | null;
	},
	transaction: Transaction
): Promise<number> {
	await CharacteristicRevision.create(
		{
			...{ name, number: number + 1, at: now(), who: person.name, whoId: person.id, author, why },
			before: JSON.stringify(before),
			after: JSON.stringify({ state, ...content } satisfies Recorded)
		},
		{ transaction }
	);
	return number + 1;
}

/** Saves a draft beside what is in force. */
export function saveCharacteristic(
	db: Sequelize,
	request: Request,
	content: CharacteristicContent,
	why = words.why.saved
) {
	return db.transaction(async (transaction) => {
		const current = await readCharacteristic(request.name, transaction);
		if (current && current.number !== request.expected) throw stale(current, content);
		const fresh = await nowFor('save', request, transaction);
		const number = await append(fresh, { ...request, content, state: 'draft', why }, transaction);
		const { person } = request;
		if (fresh.work) {
			const editors = [...new Set([...(JSON.parse(fresh.work.editors) as string[]), person.id])];
			await fresh.work.update({ number, editors: JSON.stringify(editors), at: now() }, { transaction });
		} else {
			await CharacteristicWork.create(
				{
					...{
						name: request.name,
						state: 'draft',
						number,
						authorId: person.id,
						author: person.name,
						at: now()
					},
					editors: JSON.stringify([person.id])
				},
				{ transaction }
			);
		}
	});
}

/** Makes an old state the draft. */
export async function restoreCharacteristic(
	db: Sequelize,
	request: Request,
	revision: number
): Promise<void> {
	await nowFor('restore', request);
	const row = await CharacteristicRevision.findOne({ where: { name: request.name, number: revision } });
	if (!row) throw unknownEntry();
	const content = contentOf(JSON.parse(row.after) as Recorded);
	await saveCharacteristic(db, request, content, words.why.restored(revision));
}

/** Moves a draft on without changing what it says. */
export function moveCharacteristic(
	db: Sequelize,
	request: Request,
	step: {
		action: 'ask-review' | 'take-back' | 'return' | 'discard';
		note?: string;
		reasons?: readonly string[];
	}
) {
	const { action, note = '', reasons = [] } = step;
	return db.transaction(async (transaction) => {
		const fresh = await nowFor(action, request, transaction);
		const [state, why] = {
			'ask-review': ['in-review', note || words.why.asked],
			'take-back': ['draft', words.why.takenBack],
			return: ['draft', words.why.returned(reasons)],
			discard: ['discarded', words.why.discarded]
		}[action] as [Recorded['state'], string];
		const number = await append(fresh, { ...request, content: fresh.content, state, why }, transaction);
		if (state === 'discarded') return fresh.work!.destroy({ transaction });
		const { person } = request;
		const returned = { reasons: JSON.stringify(reasons), reviewerId: person.id, reviewer: person.name };
		return fresh.work!.update(
			{
				...{ number, state: state === 'in-review' ? state : ('draft' as const), at: now() },
				...(action === 'ask-review' && { note, reasons: null }),
				...(action === 'return' && returned)
			},
			{ transaction }
		);
	});
}

/** Puts a draft in force that somebody else has written. Probabilities of a join change with it, the table's own figures do not. */
export function publishCharacteristic(
	db: Sequelize,
	request: Request,
	note = '',
	estimate?: Estimate
): Promise<Published> {
	return changeTable(
		db,
		[],
		async (transaction) => {
			const fresh = await nowFor('publish', request, transaction);
			const { content, work, finding, parameter, toothGroup } = fresh;
			await Characteristic.update(content, { where: { finding, parameter, toothGroup }, transaction });
			const author = work!.author;
			const why = note || words.why.published;
			await append(
				{ ...fresh, content: fresh.inForce },
				{ ...request, content, state: 'published', why, author },
				transaction
			);
			await work!.destroy({ transaction });
			return {
				why: words.record.characteristic(finding, parameter, toothGroup),
				who: request.person.name,
				author
			};
		},
		estimate
	);
}
