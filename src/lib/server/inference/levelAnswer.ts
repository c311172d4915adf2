import { secondCone, secondLength } from '$lib/geometry/joined';
import type { LevelDto, LevelRequest } from '$lib/schemas/level';
import { pValue } from '$lib/strings/format';
import { level as words } from '$lib/strings/level';
import type { Characteristics } from './characteristics';
import {
	HIGHEST_LEVEL_MM,
	disagreementOf,
	highestLevel,
	levelPosterior,
	measuredLevel,
	type LevelMeasurement,
	type WorkingLengths
} from './level';

/** A field of a request that cannot be answered, and why. */
interface LevelProblem {
	path: string;
	message: string;
}

/** The published prior of a root with its place; null: flat. */
type PlacedPrior = Exclude<LevelDto['prior'], 'flat'> | null;

function problemOf({ kind, value, coneShortBy }: LevelMeasurement, lengths: WorkingLengths) {
	const { problems } = words;
	if (kind !== 'cone-mark' && coneShortBy !== undefined)
		return { field: 'coneShortBy', message: problems.shortByElsewhere };
	if (kind === 'file-contact')
		return value > lengths.second
			? { field: 'value', message: problems.contactBeyond(lengths.second) }
			: null;
	const measured = measuredLevel({ kind, value, coneShortBy }, lengths);
	// A mark lies on the first canal's cone; what the second cone or a CBCT shows must lie within both canals.
	const within: ('first' | 'second')[] =
		kind === 'cone-mark' ? ['first'] : kind === 'cone-shortfall' ? ['second'] : ['first', 'second'];
	const exceeded = within.find((which) => measured >= lengths[which]);
	return exceeded
		? { field: 'value', message: problems.aboveWorkingLength(exceeded, lengths[exceeded]) }
		: null;
}

/**
 * What is wrong with a request beyond what its schema checks: measurements that the working lengths rule out, and kinds
 * whose standard deviation the table does not hold.
 */
export function levelProblems(request: LevelRequest, characteristics: Characteristics): LevelProblem[] {
	return request.measurements.flatMap((measurement, index) => {
		const found = characteristics.sdMm(`level-${measurement.kind}`)
			? problemOf(measurement, request.workingLengths)
			: { field: 'kind', message: words.problems.noSd };
		return found ? [{ path: `measurements.${index}.${found.field}`, message: found.message }] : [];
	});
}

/**
 * The answer to a request that `levelProblems` finds nothing wrong with.
 * @throws RangeError for a kind without a standard deviation
 */
export function answerLevel(
	request: LevelRequest,
	characteristics: Characteristics,
	prior: PlacedPrior
): Omit<LevelDto, 'tableRevision'> {
	const { workingLengths, canal, cone, secondShapedTo = 'unknown' } = request;
	const measurements = request.measurements.map((measurement) => {
		const sd = characteristics.sdMm(`level-${measurement.kind}`);
		if (!sd) throw new RangeError(`No standard deviation for ${measurement.kind}.`);
		const level = measuredLevel(measurement, workingLengths);
		return {
			kind: measurement.kind,
			level,
			sd: sd.value,
			assumed: sd.assumed,
			sources: sd.sourceIds
		};
	});
	const level = levelPosterior(measurements, prior, highestLevel(workingLengths));
	const [lower, upper] = level.interval;
	const lengthAt = (height: number) => secondLength(workingLengths.second, height);
	const disagreement = disagreementOf(measurements);
	const contradiction =
		disagreement && !disagreement.consistent ? [words.disagree(pValue(disagreement.pValue))] : [];
	const prepared = secondCone(level.mean, secondShapedTo, canal, cone);
	const notes = [
		prior ? words.notes.prior(`${prior.source}, ${prior.locator}`) : words.notes.flat,
		words.notes.straight
	];
	if (measurements.length > 1) notes.push(words.notes.independent);
	if (measurements.some((one) => one.level > HIGHEST_LEVEL_MM))
		notes.push(words.notes.beyond(HIGHEST_LEVEL_MM));
	return {
		level,
		prior: prior ?? 'flat',
		measurements,
		secondLength: { mean: lengthAt(level.mean), interval: [lengthAt(upper), lengthAt(lower)] },
		coneCutFromTip: prepared.cutFromTip,
		diameterAtConfluence: prepared.diameterAtConfluence,
		coneNotes: prepared.remarks.map((remark) => words.remarks[remark]),
		disagreement,
		assumed: [...new Set(measurements.filter(({ assumed }) => assumed).map(({ kind }) => kind))],
		notes,
		cautions: [...contradiction, ...words.cautions]
	};
}
