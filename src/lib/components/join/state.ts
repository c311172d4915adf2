import { RESULTS, TESTS } from '$lib/schemas/terms';
import { readFilterFields, type FilterFields } from '$lib/filterQuery';
import { confluence as words } from '$lib/strings/confluence';
import { levelFields, readLevel, type LevelState } from './levelState';

/** The question of the page as its address writes it. Values are as typed: the schema says what is wrong with them. */
export interface JoinState {
	/** Whether anything was asked yet: an address without canals is the empty form. */
	asked: boolean;
	canals?: number;
	orifices?: number;
	rootsSeen?: string;
	search?: string;
	threshold?: number;
	/** In the order they were made in: that of the address, or of the `order` that a form without JavaScript sends. */
	findings: { test: string; result: string; pair?: string }[];
	/** What was typed of the level of the confluence. */
	level: LevelState;
	/** Filters of the samples, as typed. */
	filters: FilterFields;
}

/** The probability from which canals are treated as joined, and where it comes from. */
export interface DecisionLine {
	value: number;
	from: 'address' | 'device' | 'usual';
}
/** The line that holds while the address gives none. */
export type UnsetLine = DecisionLine & { from: 'device' | 'usual' };

type Test = (typeof TESTS)[number];
type Result = (typeof RESULTS)[number];

/** A finding in words, such as "Cone mark: positive (MB-ML)". */
export function findingName({ test, result, pair }: { test: Test; result: Result; pair?: string }): string {
	return `${words.tests[test].name}: ${words.results[result].toLowerCase()}${pair ? ` (${pair})` : ''}`;
}

/** Id of the form of the findings; buttons elsewhere on the page belong to it by this. */
export const JOIN_FORM = 'join-form';

/** Names that only a form without JavaScript sends: the order of its findings, the line in percent, a button pressed. */
const FORM_FIELDS = ['order', 'line', 'do'] as const;

const isTest = (name: string): name is Test => (TESTS as readonly string[]).includes(name);

/**
 * Reads the state of the estimator's page from its address: `?canals=2&search=microscope&cone-mark=positive`.
 * Blank fields, which a form without JavaScript sends too, are as if absent; a button that it was sent with (`do=up:draw`) is done.
 */
export function readState(query: URLSearchParams): JoinState {
	return withAction(readFields(query), query.get('do') ?? '');
}

/** Whether an address is one that a form without JavaScript made, which `writeState` writes shorter. */
export function isFormAddress(query: URLSearchParams): boolean {
	return FORM_FIELDS.some((name) => query.has(name));
}

function readFields(query: URLSearchParams): JoinState {
	const text = (name: string) => query.get(name)?.trim() || undefined;
	const number = (name: string) => (text(name) === undefined ? undefined : Number(text(name)));
	const findings: JoinState['findings'] = [];
	for (const [name, value] of query) {
		if (!isTest(name) || value.trim() === '') continue;
		const pair = text(`${name}-pair`);
		findings.push({ test: name, result: value, ...(pair && { pair }) });
	}
	const order = text('order')?.split(',') ?? [];
	const placeOf = ({ test }: { test: string }) => (order.includes(test) ? order.indexOf(test) : order.length);
	findings.sort((a, b) => placeOf(a) - placeOf(b));
	const line = number('line');
	const state: JoinState = {
		asked: text('canals') !== undefined,
		findings,
		level: readLevel(query),
		filters: readFilterFields(query)
	};
	const optional = {
		canals: number('canals'),
		orifices: number('orifices'),
		rootsSeen: text('rootsSeen'),
		search: text('search'),
		threshold: number('threshold') ?? (line === undefined ? undefined : line / 100)
	};
	return Object.assign(
		state,
		Object.fromEntries(Object.entries(optional).filter(([, value]) => value !== undefined))
	);
}

/** The question without the level, as names and values of an address, findings in their order. */
export function questionFields(state: JoinState): [string, string][] {
	const fields: [string, string][] = [];
	for (const name of ['canals', 'orifices', 'rootsSeen', 'search', 'threshold'] as const) {
		if (state[name] !== undefined) fields.push([name, String(state[name])]);
	}
	for (const { test, result, pair } of state.findings) {
		fields.push([test, result]);
		if (pair) fields.push([`${test}-pair`, pair]);
	}
	return fields;
}

/** Writes a state as the query of an address; `readState` of it gives the state back. */
export function writeState(state: JoinState): string {
	return new URLSearchParams([
		...questionFields(state),
		...levelFields(state.level),
		...state.filters
	]).toString();
}

/** The state with one finding set, changed in place of an earlier one, or taken out (`result` empty). */
export function withFinding(
	state: JoinState,
	test: Test,
	result: '' | (typeof RESULTS)[number],
	pair?: string
): JoinState {
	const finding = { test, result, ...(pair && { pair }) };
	const made = state.findings.some((one) => one.test === test);
	const findings = made
		? state.findings.flatMap((one) => (one.test !== test ? [one] : result === '' ? [] : [finding]))
		: result === ''
			? state.findings
			: [...state.findings, finding];
	return { ...state, findings };
}

/** The state with one finding a place earlier or later in the account; the same where there is no such place. */
function withMoved(state: JoinState, test: Test, by: -1 | 1): JoinState {
	const from = state.findings.findIndex((one) => one.test === test);
	const to = from + by;
	if (from < 0 || to < 0 || to >= state.findings.length) return state;
	const findings = [...state.findings];
	[findings[from], findings[to]] = [findings[to], findings[from]];
	return { ...state, findings };
}

/** What a button of the page does: `up:draw`, `down:draw`, `remove:draw`, or a result to enter, `positive:draw`. */
export type JoinAction = `${'up' | 'down' | 'remove' | Result}:${Test}`;

/** The state after a button was pressed; the same for anything that is none of its actions. */
export function withAction(state: JoinState, action: string): JoinState {
	const [what, test] = action.split(':');
	if (!isTest(test)) return state;
	if (what === 'up' || what === 'down') return withMoved(state, test, what === 'up' ? -1 : 1);
	if (what === 'remove') return withFinding(state, test, '');
	const result = RESULTS.find((one) => one === what);
	const pair = state.findings.find((one) => one.test === test)?.pair;
	return result ? withFinding(state, test, result, pair) : state;
}
