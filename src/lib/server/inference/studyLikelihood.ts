/**
 * The binomial likelihood of every study with its random effect integrated out, as a function of (mu, tau).
 */
import { gaussHermite } from './quadrature';
import type { Study } from './types';

/** Identical studies share one row: their terms are equal, so they are computed once and multiplied. */
interface StudyRows {
	events: Float64Array;
	total: Float64Array;
	copies: Float64Array;
	/** y ln(y/n) + (n - y) ln(1 - y/n), subtracted so that ten million roots leave a number of order 1. */
	saturated: Float64Array;
	/** Row of each study in the order it was given. */
	rowOf: Int32Array;
}

/** y ln(y / n), 0 at y = 0. */
const xlogx = (y: number, n: number) => (y > 0 ? y * Math.log(y / n) : 0);

/** Sorted by total and events, so that the order in which studies arrive cannot change a digit of any sum. */
function collectRows(studies: readonly Study[]): StudyRows {
	for (const { events, total } of studies) {
		if (!(Number.isFinite(total) && total > 0 && events >= 0 && events <= total)) {
			throw new RangeError(`a study needs 0 <= events <= total and total > 0, not ${events} of ${total}`);
		}
	}
	const order = studies.map((_, i) => i);
	order.sort((i, j) => studies[i].total - studies[j].total || studies[i].events - studies[j].events);
	const rowOf = new Int32Array(studies.length);
	const distinct: Study[] = [];
	const copies: number[] = [];
	for (const i of order) {
		const last = distinct[distinct.length - 1];
		if (last && last.total === studies[i].total && last.events === studies[i].events) {
			copies[copies.length - 1]++;
		} else {
			distinct.push(studies[i]);
			copies.push(1);
		}
		rowOf[i] = distinct.length - 1;
	}
	return {
		events: Float64Array.from(distinct, (s) => s.events),
		total: Float64Array.from(distinct, (s) => s.total),
		copies: Float64Array.from(copies),
		saturated: Float64Array.from(
			distinct,
			({ events, total }) => xlogx(events, total) + xlogx(total - events, total)
		),
		rowOf
	};
}

/** Value, slope and curvature in mu of a log likelihood. */
export interface LogLikelihood {
	value: number;
	slope: number;
	curvature: number;
}

interface ScaledRule {
	nodes: Float64Array;
	/** Gauss-Hermite weight divided by the normal density of its node, to be multiplied with a bare integrand. */
	weights: Float64Array;
}

function scaledRule(size: number): ScaledRule {
	const { nodes, weights } = gaussHermite(size);
	const root = Math.sqrt(2 * Math.PI);
	return { nodes, weights: weights.map((w, k) => w * root * Math.exp((nodes[k] * nodes[k]) / 2)) };
}

/** Largest step of one Newton iteration, logits: the logistic curve sends a longer one astray. */
const MAX_STEP_LOGITS = 2;

/**
 * ln ∫ Binomial(y | n, expit(η)) N(η; mu, tau²) dη summed over studies, each term relative to the largest
 * binomial likelihood of its study. The integral is adaptive Gauss-Hermite (J. C. Pinheiro and D. M. Bates,
 * J. Comput. Graph. Stat. 4 (1995) 12-35): nodes around the mode of the integrand, scaled by its curvature
 * there, so n = 5 and n = 5,000,000 are the same work and equally right.
 * An object remembers where each mode was and starts the next search there; results do not depend on it
 * beyond the error of the rule.
 */
export class StudyLikelihood {
	readonly rows: StudyRows;
	/** Mode of each row's random effect at the last (mu, tau), and its derivative with respect to mu. */
	private readonly mode: Float64Array;
	private readonly pull: Float64Array;
	private lastMu = 0;

	constructor(studies: readonly Study[]) {
		this.rows = collectRows(studies);
		const { events, total } = this.rows;
		this.mode = events.map((y, s) => Math.log((y + 0.5) / (total[s] - y + 0.5)));
		this.pull = new Float64Array(events.length);
	}

	/** Number of distinct rows. */
	get size(): number {
		return this.rows.events.length;
	}

	/** Standard error of the best-known study's logit, the smallest scale on which tau can matter; at most 1. */
	smallestError(): number {
		const { events, total } = this.rows;
		let most = 1;
		for (let s = 0; s < this.size; s++) {
			const p = (events[s] + 0.5) / (total[s] + 1);
			most = Math.max(most, (total[s] + 1) * p * (1 - p));
		}
		return 1 / Math.sqrt(most);
	}

	/** Modes as they are now, to come back to with `restore`. */
	save(): { mode: Float64Array; pull: Float64Array; lastMu: number } {
		return { mode: this.mode.slice(), pull: this.pull.slice(), lastMu: this.lastMu };
	}

	restore(saved: ReturnType<StudyLikelihood['save']>): void {
		this.mode.set(saved.mode);
		this.pull.set(saved.pull);
		this.lastMu = saved.lastMu;
	}

	/**
	 * @param mu logit @param tau logit scale, >= 0 @param size number of nodes
	 * @param terms if given, receives each row's own log likelihood from index `at` on
	 */
	evaluate(mu: number, tau: number, size: number, terms?: Float64Array, at = 0): LogLikelihood {
		const rule = tau === 0 ? null : ruleOf(size);
		const { events, total, copies, saturated } = this.rows;
		const shift = mu - this.lastMu;
		const out = { value: 0, slope: 0, curvature: 0 };
		const term = { value: 0, slope: 0, curvature: 0 };
		for (let s = 0; s < events.length; s++) {
			if (rule) {
				const start = this.mode[s] + shift * this.pull[s];
				this.mode[s] = findMode(events[s], total[s], mu, tau, start);
				this.pull[s] = integrate(events[s], total[s], mu, tau, this.mode[s], rule, term);
			} else {
				binomialTerm(events[s], total[s], mu, term);
				this.mode[s] = mu;
				this.pull[s] = 1;
			}
			if (terms) terms[at + s] = term.value - saturated[s];
			out.value += copies[s] * (term.value - saturated[s]);
			out.slope += copies[s] * term.slope;
			out.curvature += copies[s] * term.curvature;
		}
		this.lastMu = mu;
		return out;
	}
}

const rules = new Map<number, ScaledRule>();

/** Rules are constants, so they are kept for the life of the process. */
function ruleOf(size: number): ScaledRule {
	let rule = rules.get(size);
	if (!rule) {
		rule = scaledRule(size);
		rules.set(size, rule);
	}
	return rule;
}

/** y η - n ln(1 + e^η) with its first two derivatives. */
function binomialTerm(y: number, n: number, eta: number, out: LogLikelihood): void {
	const e = Math.exp(-Math.abs(eta));
	const p = eta >= 0 ? 1 / (1 + e) : e / (1 + e);
	out.value = y * eta - n * (Math.max(eta, 0) + Math.log(1 + e));
	out.slope = y - n * p;
	out.curvature = (-n * e) / ((1 + e) * (1 + e));
}

/** Mode of y η - n ln(1 + e^η) - (η - mu)² / (2 tau²), within a thousandth of its width. */
function findMode(y: number, n: number, mu: number, tau: number, start: number): number {
	const precision = 1 / (tau * tau);
	let eta = start;
	for (let iteration = 0; iteration < 100; iteration++) {
		const e = Math.exp(-Math.abs(eta));
		const p = eta >= 0 ? 1 / (1 + e) : e / (1 + e);
		const curvature = (n * e) / ((1 + e) * (1 + e)) + precision;
		const step = (y - n * p - (eta - mu) * precision) / curvature;
		eta += Math.min(Math.max(step, -MAX_STEP_LOGITS), MAX_STEP_LOGITS);
		// Newton converges quadratically: a last step of 0.01 widths leaves about 0.0001.
		if (step * step * curvature < 1e-4) break;
	}
	return eta;
}

/**
 * One study's log likelihood by the rule centred at `mode`; slope and curvature in mu by differentiating under
 * the integral (with u = η - mu): E[s] and E[s'] + Var[s], s the binomial score. Returns d mode / d mu.
 */
function integrate(
	y: number,
	n: number,
	mu: number,
	tau: number,
	mode: number,
	rule: ScaledRule,
	out: LogLikelihood
): number {
	const { nodes, weights } = rule;
	const precision = 1 / (tau * tau);
	binomialTerm(y, n, mode, out);
	const top = out.value - 0.5 * (mode - mu) * (mode - mu) * precision;
	const width = 1 / Math.sqrt(precision - out.curvature);
	let sum = 0;
	let scores = 0;
	let squares = 0;
	// Nodes come in pairs ±z: e^(mode ± width z) is e^mode times or divided by one exponential. Logarithms and
	// products stay in range, as modes lie within ±40 or so and the outermost node adds at most some 350.
	const centre = Math.exp(mode);
	const last = nodes.length - 1;
	for (let k = 0; k <= last - k; k++) {
		const d = width * nodes[last - k];
		const ratio = Math.exp(d);
		for (let side = k === last - k ? 1 : 0; side < 2; side++) {
			const eta = side ? mode + d : mode - d;
			const odds = side ? centre * ratio : centre / ratio;
			const q = 1 / (1 + odds);
			const u = eta - mu;
			const w = weights[k] * Math.exp(y * eta - n * Math.log(1 + odds) - 0.5 * u * u * precision - top);
			const score = y - n * (1 - q);
			sum += w;
			scores += w * score;
			squares += w * (score * score - n * odds * q * q);
		}
	}
	const slope = scores / sum;
	out.value = top + Math.log((sum * width) / (tau * Math.sqrt(2 * Math.PI)));
	out.slope = slope;
	out.curvature = squares / sum - slope * slope;
	return width * width * precision;
}
