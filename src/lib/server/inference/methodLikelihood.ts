/**
 * The samples' likelihood when the method of a study shifts its logit: logit p_s ~ N(mu + delta_g, tau²), delta_g
 * ~ N(0, 0.5²) for every group g but the reference, integrated out. Given (mu, tau) the groups are independent, and a
 * group's likelihood at m = mu + delta is convolved with the normal: one more one-dimensional quadrature a group.
 */
import type { Likelihood } from './fitGrid';
import { GroupColumn, modeOf, OFFSET_PRECISION } from './groupColumn';
import type { Convolved } from './groupColumn';
import { StudyLikelihood } from './studyLikelihood';
import type { LogLikelihood } from './studyLikelihood';
import { OFFSET_GROUPS } from './types';
import type { OffsetGroup, Study } from './types';

/** The reference, CBCT, has no offset. */
type MethodGroup = OffsetGroup | 'cbct';

const GROUP_OF: Readonly<Record<string, OffsetGroup>> = {
	'micro-ct': 'laboratory',
	clearing: 'laboratory',
	sectioning: 'laboratory',
	clinical: 'clinical',
	microscope: 'clinical',
	radiograph: 'radiograph'
};

/** The group of a method. `mixed` and any method without a group of its own go with the reference. */
export function groupOfMethod(method: string): MethodGroup {
	return GROUP_OF[method] ?? 'cbct';
}

interface Group {
	likelihood: StudyLikelihood;
	/** Place of its first distinct study among all. */
	firstRow: number;
	/** By tau; a fit asks for the same few again and again. */
	columns: Map<number, GroupColumn>;
	/** Mode of m at the last rough look. */
	roughMode: number | null;
}

/** The likelihood of samples with their methods, for `fitGrid`. mu is the reference population's. */
export class MethodLikelihood implements Likelihood {
	readonly rows: { rowOf: Int32Array };
	readonly size: number;
	private readonly reference: StudyLikelihood;
	private readonly groups = new Map<OffsetGroup, Group>();
	private readonly smallest: number;

	/** @param studies samples with their methods (names of the table) */
	constructor(studies: readonly (Study & { method: string })[]) {
		const places = (group: MethodGroup) =>
			studies.flatMap(({ method }, i) => (groupOfMethod(method) === group ? [i] : []));
		const pick = (indices: number[]) => new StudyLikelihood(indices.map((i) => studies[i]));
		const rowOf = new Int32Array(studies.length);
		const record = (indices: number[], likelihood: StudyLikelihood, firstRow: number) =>
			indices.forEach((i, place) => (rowOf[i] = firstRow + likelihood.rows.rowOf[place]));
		this.reference = pick(places('cbct'));
		record(places('cbct'), this.reference, 0);
		this.smallest = this.reference.smallestError();
		let firstRow = this.reference.size;
		for (const group of OFFSET_GROUPS) {
			const indices = places(group);
			const likelihood = pick(indices);
			record(indices, likelihood, firstRow);
			this.groups.set(group, { likelihood, firstRow, columns: new Map(), roughMode: null });
			this.smallest = Math.min(this.smallest, likelihood.smallestError());
			firstRow += likelihood.size;
		}
		this.rows = { rowOf };
		this.size = firstRow;
	}

	smallestError(): number {
		return this.smallest;
	}

	save(): ReturnType<StudyLikelihood['save']> {
		return this.reference.save();
	}

	restore(saved: ReturnType<StudyLikelihood['save']>): void {
		this.reference.restore(saved);
	}

	/**
	 * As StudyLikelihood's. A term is what the study adds to the others' likelihood at (mu, tau), its group's offset
	 * integrated: dividing it out leaves the others.
	 */
	evaluate(mu: number, tau: number, size: number, terms?: Float64Array, at = 0): LogLikelihood {
		const out = this.reference.evaluate(mu, tau, size, terms, at);
		for (const group of this.groups.values()) {
			if (group.likelihood.size === 0) continue;
			const column = this.columnOf(group, mu, tau, size);
			const { value, moments } = column.convolve(mu);
			const [mean, square] = moments;
			out.value += value;
			out.slope += mean * OFFSET_PRECISION;
			out.curvature += (square - mean * mean) * OFFSET_PRECISION * OFFSET_PRECISION - OFFSET_PRECISION;
			if (!terms) continue;
			for (let row = 0; row < group.likelihood.size; row++)
				terms[at + group.firstRow + row] = value - restOf(group, column, mu, row);
		}
		return out;
	}

	/** By Laplace's approximation of each group's integral: enough to see where the mass is, at a fifth of the cost. */
	evaluateRoughly(mu: number, tau: number, size: number): LogLikelihood {
		const out = this.reference.evaluate(mu, tau, size);
		for (const group of this.groups.values()) {
			if (group.likelihood.size === 0) continue;
			const { m, value, curvature } = modeOf(group.likelihood, mu, tau, size, group.roughMode ?? mu);
			group.roughMode = m;
			out.value += value - 0.5 * Math.log1p(-curvature / OFFSET_PRECISION);
			out.slope += (m - mu) * OFFSET_PRECISION;
			out.curvature += (curvature * OFFSET_PRECISION) / (OFFSET_PRECISION - curvature);
		}
		return out;
	}

	private columnOf(group: Group, mu: number, tau: number, size: number): GroupColumn {
		let column = group.columns.get(tau);
		if (!column) {
			column = new GroupColumn(group.likelihood, tau, size, mu);
			group.columns.set(tau, column);
		}
		return column;
	}

	/** The column a fit has left at this tau. A group without samples was never asked for: there any rule will do. */
	private fittedColumn(group: OffsetGroup, mu: number, tau: number): GroupColumn {
		return this.columnOf(this.groups.get(group)!, mu, tau, 1);
	}

	/** Raw moments 1 … 4 of a group's offset, given the group's samples and a node (mu, tau) of a grid fitted to this. */
	offsetMoments(group: OffsetGroup, mu: number, tau: number): Convolved['moments'] {
		const column = this.fittedColumn(group, mu, tau);
		return column.convolve(mu).moments;
	}

	/**
	 * A group's own population m = mu + delta at one tau: its log density, up to a constant, on the group's nodes.
	 * @param nodes mu of a fitted column, equally spaced
	 * @param logMass ln of their masses, the samples that are to be left out divided out already
	 * @param row place of the group's distinct study of which one copy is left out; null: none
	 */
	population(
		group: OffsetGroup,
		tau: number,
		nodes: Float64Array,
		logMass: Float64Array,
		row: number | null
	): { start: number; step: number; logDensity: Float64Array } {
		const of = this.groups.get(group)!;
		const heaviest = logMass.reduce((best, value, i) => (value > logMass[best] ? i : best), 0);
		const column = this.fittedColumn(group, nodes[heaviest], tau);
		const left = row === null ? -1 : row - of.firstRow;
		// The masses hold the group's likelihood as mu feels it; m is to feel it itself.
		const bare = logMass.map((log, i) => log - restOf(of, column, nodes[i], left));
		const alone = left >= 0 && isAlone(of);
		const top = bare.reduce((a, b) => Math.max(a, b));
		const log = (k: number) => {
			const m = column.at(k);
			let sum = 0;
			for (let i = 0; i < nodes.length; i++)
				sum += Math.exp(bare[i] - top - 0.5 * OFFSET_PRECISION * (m - nodes[i]) ** 2);
			return (alone ? 0 : column.logLikelihood(k, left)) + Math.log(sum);
		};
		const [first, last] = column.reach(log);
		return {
			start: column.at(first),
			step: column.step,
			logDensity: Float64Array.from({ length: last - first + 1 }, (_, i) => log(first + i) + top)
		};
	}
}

const isAlone = ({ likelihood }: Group) => likelihood.size === 1 && likelihood.rows.copies[0] === 1;

/** Log likelihood of a group at mu without one copy of a row; nothing is left of a lone study's group. */
function restOf(group: Group, column: GroupColumn, mu: number, row: number): number {
	return row >= 0 && isAlone(group) ? 0 : column.convolve(mu, row).value;
}
