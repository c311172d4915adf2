import { readFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';
import { QUESTION_IDS } from '$lib/server/inference/types';
import type {
	FindingCharacteristic,
	MuPrior,
	PredictiveGrid,
	QuestionId,
	RootModel,
	Summary
} from '$lib/server/inference/types';

/** The shipped characteristics of findings, read as the seed reads them. */
export function shippedCharacteristics(): FindingCharacteristic[] {
	const text = readFileSync('data/literature/finding-characteristics.csv', 'utf8');
	const rows = parse<Record<string, string>>(text, { columns: true, skip_empty_lines: true });
	const number = (value: string) => (value === '' ? null : Number(value));
	return rows.map((row) => ({
		finding: row.finding,
		parameter: row.parameter,
		toothGroup: row.tooth_group,
		betaA: number(row.beta_a),
		betaB: number(row.beta_b),
		sdMm: number(row.sd_mm),
		basis: row.basis as FindingCharacteristic['basis'],
		sourceIds: row.source_ids === '' ? [] : row.source_ids.split(';'),
		note: row.note
	}));
}

/** A made-up predictive distribution: a normal on the logit scale, as 400 masses. */
export function inventedGrid(mean: number, sd: number): PredictiveGrid {
	const p = new Float64Array(400);
	const mass = new Float64Array(400);
	let total = 0;
	for (let i = 0; i < 400; i++) {
		const z = -5 + (10 * (i + 0.5)) / 400;
		p[i] = 1 / (1 + Math.exp(-(mean + sd * z)));
		mass[i] = Math.exp((-z * z) / 2);
		total += mass[i];
	}
	return { p, mass: mass.map((value) => value / total) };
}

/** All the mass on one probability, 0 and 1 among them. */
export function pointGrid(p: number): PredictiveGrid {
	return { p: Float64Array.of(p), mass: Float64Array.of(1) };
}

const noSummary: Summary = { mean: NaN, median: NaN, interval: [NaN, NaN] };
const noPrior: MuPrior = { mean: 0, sd: 2.5 };
const unpooled = { studies: 0, pooled: noSummary, predictive: noSummary, tau: noSummary, observed: null };

/** A made-up root from the grids of its questions; what the findings do not read is left empty. */
export function inventedRoot(
	grids: Record<QuestionId, PredictiveGrid>,
	isthmus: PredictiveGrid | null = null
): RootModel {
	return {
		tooth: 'maxillary-first-molar',
		root: 'MB',
		questions: QUESTION_IDS.map((id) => ({
			...unpooled,
			id,
			grid: grids[id],
			evidence: [],
			prior: noPrior,
			borrowed: false,
			method: { shown: 'plain', logScore: null, offsets: [] }
		})),
		isthmus: isthmus && { ...unpooled, grid: isthmus, evidence: [] },
		hasEvidence: true,
		notPooled: [],
		reviews: []
	};
}

/** Grids of a root with two canals more often than not, which join about as often as they do not. */
export function ordinaryGrids(): Record<QuestionId, PredictiveGrid> {
	const logits: Record<QuestionId, [number, number]> = {
		q1: [0.6, 0.7],
		q2: [2.4, 0.8],
		q3: [-4, 1],
		q4: [0.1, 0.6],
		q5: [-2, 0.8],
		q6: [0.4, 0.9],
		q7: [-0.5, 1.4],
		q8: [0.9, 1],
		q9: [0.3, 1.2]
	};
	const grids = QUESTION_IDS.map((id) => [id, inventedGrid(...logits[id])]);
	return Object.fromEntries(grids) as Record<QuestionId, PredictiveGrid>;
}
