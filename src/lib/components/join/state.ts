import { TESTS, type RESULTS } from '$lib/schemas/terms';
import { readFilterFields, type FilterFields } from '$lib/filterQuery';
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
	/** In the order of the address, which is the order they were made in. */
	findings: { test: string; result: string; pair?: string }[];
	/** What was typed of the level of the confluence. */
	level: LevelState;
	/** Filters of the samples, as typed. */
	filters: FilterFields;
}

type Test = (typeof TESTS)[number];

const isTest = (name: string): name is Test => (TESTS as readonly string[]).includes(name);

/**
 * Reads the state of the estimator's page from its address: `?canals=2&search=microscope&cone-mark=positive`.
 * Blank fields, which a form without JavaScript sends too, are as if absent.
 */
export function readState(query: URLSearchParams): JoinState {
	const text = (name: string) => query.get(name)?.trim() || undefined;
	const number = (name: string) => (text(name) === undefined ? undefined : Number(text(name)));
	const findings: JoinState['findings'] = [];
	for (const [name, value] of query) {
		if (!isTest(name) || value.trim() === '') continue;
		const pair = text(`${name}-pair`);
		findings.push({ test: name, result: value, ...(pair && { pair }) });
	}
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
		threshold: number('threshold')
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
