import type { MEASUREMENT_KINDS, SHAPED_TO } from '$lib/schemas/terms';
import type { CutRemark } from '$lib/geometry/joined';
import { diameter, mm, mmRange } from './format';

type Kind = (typeof MEASUREMENT_KINDS)[number];

const kinds: Record<Kind, { name: string; ask: string; hint: string }> = {
	'cone-mark': {
		name: 'Mark on the cone',
		ask: 'Mark on the cone, from its tip',
		hint: 'The cone to length in the first canal, a size 10 or 15 file in the second.'
	},
	'cone-shortfall': {
		name: 'Second cone stops short',
		ask: 'Second cone stops short by',
		hint: 'Of its working length, with the first cone in place.'
	},
	'file-contact': {
		name: 'File contact',
		ask: 'Length of the second file at contact',
		hint: 'The length, not the distance from the end: with a file at length in the first canal.'
	},
	cbct: {
		name: 'CBCT',
		ask: 'Level on the CBCT',
		hint: 'Above the common end, on a CBCT that you already have.'
	}
};

/** Words about the level of a confluence: its part of the page and the sentences of its answer. */
export const level = {
	title: 'Where do they join?',
	lead: 'Give what you measured; one measurement is enough, two check each other.',
	leadThree: 'With three canals: of the two canals that you measured.',
	kinds,
	workingLengths: 'Working lengths',
	first: 'First canal',
	second: 'Second canal',
	firstHint: 'First: the canal with the straighter, wider way to the common end.',
	measured: 'What was measured',
	markShort: 'That cone stopped short by',
	markShortHint: 'Of its working length; leave blank if it went to length.',
	shapes: 'The second canal and its cone',
	shapesHint: 'Only for the cut. Size as on the package (25), taper as .06 or 6 %.',
	shapedTo: 'How far was the second canal shaped?',
	shapedToOptions: {
		full: 'To its full working length',
		confluence: 'Only to the confluence',
		unknown: 'Not known'
	} satisfies Record<(typeof SHAPED_TO)[number], string>,
	preparationSize: 'Preparation, ISO size',
	preparationTaper: 'Its taper, mm/mm or %',
	coneSize: 'Cone, ISO size',
	coneTaper: 'Its taper, mm/mm or %',
	unit: 'mm',
	submit: 'Work out the level',
	waiting: 'The level, the length of the second cone and its cut appear here.',
	wholeError:
		'The level cannot be worked out yet: something is missing or does not fit together, see the fields marked.',
	sizeError: 'Give the size as on the package, from 6 to 140, such as 25.',
	taperError: 'Give the taper such as .06 or 6 %, up to 20 %.',

	resultTitle: 'The level',
	isAt: (mean: number, interval: readonly [number, number]) =>
		`${mm(mean)} above the common end (${mmRange(interval)})`,
	rangeMeaning: 'The range holds the level with 95 %, if each measurement is right.',
	secondLength: 'Length of the second cone',
	lengthIs: (mean: number, interval: readonly [number, number]) => `${mm(mean)} (${mmRange(interval)})`,
	looksShort: 'It will look short: that is right.',
	onlyIf: 'Only if they share one exit:',
	coneTitle: 'Preparing the second cone',
	cut: (cut: number, end: number | null) =>
		`Cut ${mm(cut)} off its tip${end === null ? '' : `: the canal is ${diameter(end)} wide at the confluence`}. Then it goes to the same length.`,
	uncut: 'Leave it uncut.',
	askShaped: 'How far was the second canal shaped? Without that no cut is proposed.',
	askSizes: 'Give size and taper of the preparation and of the cone to have the cut worked out.',
	remarks: {
		'too-thick':
			'The cone is already thicker than the canal at the confluence: it will stop above it, and cutting makes it thicker. Choose a smaller cone.',
		'steeper-cone': 'The cone tapers more than the preparation: it may bind higher up and stop short.',
		'cut-too-long':
			'The cut would take more than the tapered part of the cone (usually 16 mm; common practice, no source). Choose a thicker cone.',
		'beyond-taper':
			'The preparation keeps its taper only to below the confluence: the diameter there is an extrapolation.',
		'if-matched': 'Uncut holds for the cone that matches the preparation of the second canal.'
	} satisfies Record<CutRemark, string>,
	fillFirst:
		'Fill the canal with the straighter, wider way to the common end first, its cone to full working length. Shape the shared part through that canal only (common practice).',
	contradict: 'These measurements contradict each other: measure again before you shorten anything.',
	disagree: (p: string) =>
		`These measurements contradict each other (${p}): one number is wrong, or something other than a confluence stops the cone. Measure again before you shorten anything.`,
	agree: (p: string) => `The measurements agree with each other (${p}).`,
	published: (range: string) => `Published for this root: ${range} above the apex`,
	warnings: {
		'treat-as-separate':
			'The findings speak against one shared exit: shape, clean and fill each canal to its own full length. The length below would leave the second canal unfilled; it holds only if they do share one exit.',
		undecided:
			'One shared exit is not settled: plan each canal to its full length. The length below holds only if they share one exit.',
		none: 'Nothing here says that the canals share one exit. The length below holds only if they do.'
	},
	meetAndPart:
		'Canals that meet and part again have more than one exit: a meeting never shortens a canal by itself.',
	measurementsTitle: 'What each measurement says',
	speaksOf: (value: number, sd: number) => `level ${mm(value)}, standard deviation ${mm(sd)}`,
	assumed: 'assumed, not published',
	prior: (mean: number, sd: number) =>
		`Published level of this root, counted in: ${mm(mean)}, standard deviation ${mm(sd)}`,

	picture: 'The last millimetres of the two canals, to scale',
	pictureWords: {
		first: 'first',
		second: 'second',
		commonEnd: 'common end',
		meet: (mean: number) => ['meet at', mm(mean)],
		coneEnds: (length: number) => ['second cone', `ends: ${mm(length)}`],
		cut: (cut: number) => ['cut off', mm(cut)]
	},
	describe: (mean: number, interval: readonly [number, number], end: number, cut: number | null) =>
		`The second canal joins the first ${mm(mean)} above the common end, range ${mmRange(interval)}. Its cone ends there, at a length of ${mm(end)}.` +
		(cut === null ? '' : cut === 0 ? ' It is not cut.' : ` ${mm(cut)} are cut off its tip.`),
	legend: {
		band: 'Band: where the confluence lies, 95 %.',
		measured: 'Diamonds: what each measurement says.',
		cone: 'Filled: the second cone, down to where it ends.',
		cut: 'Dashed: what is cut off its tip.',
		scale: 'Heights are to scale in mm above the common end; widths are not.'
	},

	notes: {
		flat: 'No mean with a standard deviation is published for the level in this root: before the measurements every level was taken as equally likely.',
		prior: (source: string) =>
			`The published level (${source}) is counted in like one more measurement. It is given from the apex, working lengths usually end a little above it; this is not corrected for.`,
		independent: 'Measurements are taken as independent of each other; a kind measured twice counts twice.',
		straight: 'Lengths are taken along the canal, the preparation as round and evenly tapered.',
		beyond: (highest: number) =>
			`A measurement lies above ${mm(highest)}, higher than a level is looked for: check it, and the working lengths.`
	},
	cautions: [
		'The second length holds only if both canals share one exit. Filling a separate canal short leaves it unfilled: with doubt, treat as separate.',
		'Canals that meet and part again have more than one exit: each needs its full length. Until the exits are shown to be one, do not shorten.'
	],
	problems: {
		aboveWorkingLength: (which: 'first' | 'second', length: number) =>
			`This lies above the whole working length of the ${which} canal (${mm(length)}).`,
		contactBeyond: (length: number) =>
			`Contact cannot show beyond the working length of the second canal (${mm(length)}). Give the length of the file at contact.`,
		shortByElsewhere: 'Only the marked cone has a distance by which it stopped short.',
		noSd: 'The table holds no standard deviation for this measurement.'
	}
};
