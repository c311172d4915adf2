import type { ConfluenceDto } from '$lib/schemas/confluence';
import { SEARCHES, TESTS } from '$lib/schemas/terms';
import type { LevelDto } from '$lib/schemas/level';
import { confluence } from '$lib/strings/confluence';
import { drawing } from '$lib/strings/drawing';
import type { Format } from '$lib/strings/format';
import { join as words } from '$lib/strings/join';
import { level as levelWords } from '$lib/strings/level';
import { toFateList } from '$lib/components/root/fateList';
import { adviceOf } from './advice';
import { findingName, type DecisionLine, type JoinState } from './state';

/** What the text for the record is made from. */
export interface RecordInput {
	tooth: string;
	root: string;
	/** Names of the canals negotiated. */
	canals: readonly string[];
	state: JoinState;
	line: DecisionLine;
	answer: ConfluenceDto;
	/** The level of the confluence, if it was worked out. */
	level: LevelDto | null;
	/** ISO date, UTC. */
	date: string;
	/** The address that gives this answer again. */
	address: string;
	/** Figures as the screen writes them. */
	format: Format;
}

/** The name of what was assumed: a test, a way of searching, or the isthmus. */
export function assumedName(id: string): string {
	const test = TESTS.find((one) => one === id);
	if (test) return confluence.tests[test].name.toLowerCase();
	const search = SEARCHES.find((one) => `search-${one}` === id);
	return search ? words.searchNamed(confluence.searches[search]) : (words.assumedNames[id] ?? id);
}

const figureWriter =
	({ percent, range }: Format) =>
	({ mean, interval }: { mean: number; interval: [number, number] }) =>
		`${percent(mean)} (${range(interval)})`;

const searchName = (search: string | undefined) =>
	confluence.searches[SEARCHES.find((one) => one === search) ?? 'unaided'];

/** What a person said, as names and values; what was not asked of this root is left out. */
export function saidOf({ state, canals }: Pick<RecordInput, 'state' | 'canals'>): [string, string][] {
	const said: [string, string][] = [
		[words.said.canals, `${state.canals ?? ''} (${canals.join(', ')})`],
		[words.said.orifices, state.orifices === undefined ? words.notStated : String(state.orifices)],
		[words.said.search, state.search === undefined ? words.notStated : searchName(state.search)]
	];
	if (state.rootsSeen) said.push([words.said.roots, state.rootsSeen]);
	if (state.filters.length > 0)
		said.push([words.said.samples, state.filters.map(([name, value]) => `${name} ${value}`).join(', ')]);
	return said;
}

function findingLines({ steps }: ConfluenceDto): string[] {
	if (steps.length === 0) return [`${words.said.findings}: ${words.said.none}`];
	return [
		`${words.said.findings}:`,
		...steps.map(({ finding, expected }, index) => {
			const shown = finding.result === 'unclear' ? '' : `, ${confluence.tests[finding.test][finding.result]}`;
			const mark = expected?.assumed ? ` [${words.record.assumedMark}]` : '';
			return `${index + 1}. ${findingName(finding)}${shown}${mark}`;
		})
	];
}

function estimateLines(answer: ConfluenceDto, format: Format): string[] {
	const figure = figureWriter(format);
	const { posterior, prior, steps } = answer;
	const before = steps.length > 0 ? `, ${words.record.before(figure(prior.meet))}` : '';
	const { anotherCanal } = posterior;
	return [
		words.record.estimate,
		`${words.meet}: ${figure(posterior.meet)}${before}`,
		...toFateList(posterior.fates).map(
			({ fate, mean, interval }) => `- ${drawing.fates[fate]}: ${figure({ mean, interval })}`
		),
		anotherCanal ? `${words.hidden}: ${figure(anotherCanal)}` : words.hiddenUnknown
	];
}

function adviceLines(answer: ConfluenceDto, line: DecisionLine, { percent }: Format): string[] {
	const advice = adviceOf(answer);
	const lines = [`${words.record.advice}: ${advice.head}. ${advice.sentence}`, ...advice.cautions];
	if (advice.heldBack) lines.push(words.advice.heldBack);
	if (advice.open !== null) lines.push(words.advice.line(percent(line.value), line.from));
	return lines;
}

function levelLines(level: LevelDto | null, joined: boolean): string[] {
	if (!level) return [];
	const { mean, interval } = level.level;
	const condition = joined ? '' : `${levelWords.onlyIf} `;
	const cut = level.coneCutFromTip;
	const lines = [
		`${words.record.level}: ${levelWords.isAt(mean, interval)}`,
		`${words.record.cone}: ${condition}${levelWords.lengthIs(level.secondLength.mean, level.secondLength.interval)}`
	];
	if (cut !== null) lines.push(cut > 0 ? levelWords.cut(cut, level.diameterAtConfluence) : levelWords.uncut);
	for (const { kind, assumed } of level.measurements)
		if (assumed) lines.push(`${levelWords.kinds[kind].name}: ${levelWords.assumed}`);
	if (level.disagreement && !level.disagreement.consistent) lines.push(levelWords.contradict);
	return ['', ...lines];
}

function basisLines({ evidence, assumed, notes }: ConfluenceDto): string[] {
	const lines = [words.record.basis, words.evidence(evidence.studies)];
	if (evidence.borrowed.length > 0) lines.push(words.borrowed(evidence.borrowed.length));
	if (assumed.length > 0) lines.push(words.assumed(assumed.map(assumedName).join(', ')));
	return [...lines, ...notes];
}

/**
 * A plain-text summary of an answer for a record: what was said, what follows with its ranges, what it rests on, and the cautions.
 * It holds nothing that identifies a patient. Figures read as on the screen, but for its unbreakable spaces.
 */
export function recordText(input: RecordInput): string {
	const { answer, state, line, level } = input;
	const own = adviceOf(answer).cautions;
	const cautions = [...answer.cautions, ...(level?.cautions ?? [])].filter((one) => !own.includes(one));
	return [
		words.record.heading,
		`${input.tooth}, ${input.root.toLowerCase()}`,
		words.record.dated(input.date, answer.tableRevision),
		'',
		...saidOf(input).map(([name, value]) => `${name}: ${value}`),
		...(state.canals === 1 ? [] : findingLines(answer)),
		'',
		...estimateLines(answer, input.format),
		'',
		...adviceLines(answer, line, input.format),
		...levelLines(level, answer.decision?.advice === 'treat-as-joined'),
		'',
		...basisLines(answer),
		'',
		words.record.cautions,
		...[...new Set(cautions)].map((caution) => `- ${caution}`),
		`- ${words.record.identity}`,
		'',
		`${words.record.address}: ${input.address}`
	]
		.join('\n')
		.replaceAll('\u00a0', ' ');
}
