import { level as words } from '$lib/strings/level';

/** Fields of the level as the address writes them, in their order on the page. */
const LEVEL_FIELDS = [
	'wl1',
	'wl2',
	'mark',
	'markShort',
	'shortfall',
	'contact',
	'cbct',
	'shapedTo',
	'tip',
	'taper',
	'coneTip',
	'coneTaper'
] as const;
export type LevelField = (typeof LEVEL_FIELDS)[number];

/** What was typed into the level's form, as typed; a blank field is absent. */
export type LevelState = Partial<Record<LevelField, string>>;

/** A published level of the root with its place, for comparison. */
export interface PublishedPlace {
	mm: number;
	range: [number, number] | null;
	source: string | null;
	locator: string | null;
}

/** What is wrong with each field; `measured`: with the measurements together. */
export type LevelErrors = Partial<Record<LevelField | 'measured', string[]>>;

/** The values a person need not have typed to have asked nothing: a choice stands there from the start. */
const UNKNOWN = 'unknown';
/** Hundredths of a mm in a mm: ISO 3630-1 sizes are tip diameters in hundredths. */
const SIZES_PER_MM = 100;

/** Reads the level's fields of an address; blank ones, which a form without JavaScript sends too, are as if absent. */
export function readLevel(query: URLSearchParams): LevelState {
	const state: LevelState = {};
	for (const field of LEVEL_FIELDS) {
		const text = query.get(field)?.trim();
		if (text && !(field === 'shapedTo' && text === UNKNOWN)) state[field] = text;
	}
	return state;
}

/** The level's fields as they stand in an address. */
export function levelFields(state: LevelState): [string, string][] {
	return LEVEL_FIELDS.flatMap((field) => {
		const text = state[field];
		return text === undefined ? [] : [[field, text] satisfies [string, string]];
	});
}

/** A length as it is typed: `20.5`, `20,5`, `20.5 mm`; NaN for anything else. */
function lengthOf(text: string): number {
	return Number(text.replace(/\s*mm$/i, '').replace(',', '.'));
}

/** A tip diameter in mm from a size as on the package: `25` is 0.25; NaN for anything else. */
function tipOf(text: string): number {
	return Number(text.replace(',', '.')) / SIZES_PER_MM;
}

/** A taper in mm per mm from `.06`, `0.06`, `6 %` or `6`; NaN for anything else. */
function taperOf(text: string): number {
	const number = Number(text.replace(/\s*%$/, '').replace(',', '.'));
	return text.endsWith('%') || number >= 1 ? number / 100 : number;
}

/** The request that a state makes, not yet validated, and the field of the page that each of its paths speaks of. */
export interface LevelQuestion {
	request: Record<string, unknown>;
	fieldOf(path: string): LevelField | 'measured';
}

/**
 * The request that the typed fields make; what they leave out is left out, so that the schema names it.
 * @returns null as long as nothing was typed
 */
export function questionOf(state: LevelState): LevelQuestion | null {
	if (levelFields(state).length === 0) return null;
	const length = (field: LevelField) => (state[field] === undefined ? undefined : lengthOf(state[field]));
	const fields: LevelField[] = [];
	const measurements: Record<string, unknown>[] = [];
	const measure = (field: LevelField, kind: string, more: Record<string, unknown> = {}) => {
		fields.push(field);
		measurements.push({ kind, value: length(field), ...more });
	};
	const coneShortBy = length('markShort');
	if (state.mark !== undefined || coneShortBy !== undefined)
		measure('mark', 'cone-mark', coneShortBy === undefined ? {} : { coneShortBy });
	if (state.shortfall !== undefined) measure('shortfall', 'cone-shortfall');
	if (state.contact !== undefined) measure('contact', 'file-contact');
	if (state.cbct !== undefined) measure('cbct', 'cbct');
	const shape = (tip?: string, taper?: string) =>
		tip === undefined && taper === undefined
			? undefined
			: { tip: tip && tipOf(tip), taper: taper && taperOf(taper) };
	const canal = shape(state.tip, state.taper);
	const cone = shape(state.coneTip, state.coneTaper);
	return {
		request: {
			workingLengths: { first: length('wl1'), second: length('wl2') },
			measurements,
			...(canal && { canal }),
			...(cone && { cone }),
			...(state.shapedTo && { secondShapedTo: state.shapedTo })
		},
		fieldOf(path) {
			const measured = /^measurements\.(\d+)\.(\w+)$/.exec(path);
			if (measured) return measured[2] === 'coneShortBy' ? 'markShort' : fields[Number(measured[1])];
			return PATHS[path] ?? 'measured';
		}
	};
}

const PATHS: Record<string, LevelField> = {
	'workingLengths.first': 'wl1',
	'workingLengths.second': 'wl2',
	'canal.tip': 'tip',
	'canal.taper': 'taper',
	'cone.tip': 'coneTip',
	'cone.taper': 'coneTaper',
	secondShapedTo: 'shapedTo'
};

/** Sizes and tapers are typed as on the package, so what is wrong with them is said in these terms. */
const TYPED_OTHERWISE: LevelErrors = {
	tip: [words.sizeError],
	coneTip: [words.sizeError],
	taper: [words.taperError],
	coneTaper: [words.taperError]
};

/** Errors of a request at the fields of the page. */
export function errorsAtFields(
	question: LevelQuestion,
	errors: readonly { path: string; message: string }[]
): LevelErrors {
	const at: LevelErrors = {};
	for (const { path, message } of errors) {
		const field = question.fieldOf(path);
		at[field] = TYPED_OTHERWISE[field] ?? [...(at[field] ?? []), message];
	}
	return at;
}
