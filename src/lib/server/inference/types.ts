/**
 * The shapes that pass between the pure modules of the inference room.
 * Nothing here imports the database, kit or the DOM.
 */
import type { Leaf } from '$lib/anatomy/sequence';
import type { AppraisalGrade } from '$lib/schemas/terms';

/** The nine yes/no questions of the tree, in order. */
export const QUESTION_IDS = ['q1', 'q2', 'q3', 'q4', 'q5', 'q6', 'q7', 'q8', 'q9'] as const;
export type QuestionId = (typeof QUESTION_IDS)[number];

/** One sample's answer to a yes/no question: `events` of `total` roots say yes. */
export interface Study {
	events: number;
	total: number;
}

/** Normal prior of the middle population's logit. */
export interface MuPrior {
	mean: number;
	sd: number;
}

/** Posterior summary of one quantity; `interval` is equal-tailed at the level asked for. */
export interface Summary {
	mean: number;
	median: number;
	interval: [number, number];
}

/**
 * A predictive distribution of a proportion, as point masses: `p` ascending in (0, 1), `mass` sums to 1.
 * Fine enough (several hundred nodes) that sums over it are exact to the digits the product shows.
 */
export interface PredictiveGrid {
	p: Float64Array;
	mass: Float64Array;
}

/** A pooled proportion (inference, section 1). */
export interface Pooled {
	studies: number;
	pooled: Summary;
	predictive: Summary;
	tau: Summary;
	/** Smallest and largest observed events/total; null without a study. */
	observed: { min: number; max: number } | null;
	grid: PredictiveGrid;
}

/** One CSV row of the observations, joined with its database ids. Numbers are null where the source gave none. */
export interface ObservationRow {
	/** Database id of the entry this row belongs to (a CSV-only test may number groups itself). */
	entry: number;
	source: string;
	locator: string;
	/** Tooth slug; '' where the sample pooled tooth types. */
	tooth: string;
	root: string;
	scope: string;
	country: string;
	method: string;
	subgroup: string;
	measure: string;
	category: string;
	count: number | null;
	total: number | null;
	percent: number | null;
	provenance: 'read' | 'secondary' | 'memory';
	/** True once an editor has confirmed a row of provenance `memory`. */
	verified: boolean;
	/** An editor's mark on the sample: true/false overrides the scope rule; null leaves it to the rule. */
	poolable: boolean | null;
	note: string;
}

/** What the inference needs to know of a source. */
export interface SourceFacts {
	id: string;
	/** A DOI, PMID or PMCID, or a title with a journal or an author. */
	citable: boolean;
	year: number | null;
	retracted: boolean;
	/** Concern that its appraisal leaves; null or absent where it has none. */
	appraisal?: AppraisalGrade | null;
}

/** Filters of an estimate; an absent field does not filter. */
export interface Filters {
	methods?: string[];
	countries?: string[];
	yearFrom?: number;
	yearTo?: number;
	minTotal?: number;
	exclude?: string[];
	/** Only sources with an appraisal, or with one that leaves at most this concern. */
	appraisal?: 'any' | AppraisalGrade;
}

/** A study of a question, with where it comes from. */
export interface QuestionStudy extends Study {
	source: string;
	entry: number;
	locator: string;
	country: string;
	method: string;
}

/** A sample that answers nothing, with the reason in words. */
export interface NotPooled {
	source: string;
	entry: number;
	/** A measure of the sample, e.g. 'configuration'. */
	measure: string;
	reason: string;
}

/** A published review's figure for a question, shown beside the forest plot and never pooled. */
export interface ReviewFigure {
	source: string;
	entry: number;
	question: QuestionId;
	percent: number;
}

/** Groups of methods with an offset against CBCT: microtomography, clearing and sectioning; clinical and microscope; radiograph. */
export const OFFSET_GROUPS = ['laboratory', 'clinical', 'radiograph'] as const;
export type OffsetGroup = (typeof OFFSET_GROUPS)[number];

/** How far a group of methods differs from CBCT on the logit scale; positive: it finds more. */
export interface MethodOffset {
	group: OffsetGroup;
	mean: number;
	interval: [number, number];
	studies: number;
}

/** The two models of a question: methods alike, or each group with its offset. */
export type ModelName = 'plain' | 'method';

/** Which of the two models of a question is shown, and why. */
export interface QuestionMethod {
	shown: ModelName;
	/**
	 * Sum over the samples of ln of the probability that each model, fitted to the other samples, gave to the count that
	 * was seen; nearer to 0 is better. Null where the two cannot be compared: under three samples, or one group.
	 */
	logScore: Record<ModelName, number> | null;
	/** Of the groups that have samples, if the method model is shown. */
	offsets: MethodOffset[];
}

/** A question of one root, pooled. */
export interface RootQuestion extends Pooled {
	id: QuestionId;
	evidence: QuestionStudy[];
	prior: MuPrior;
	/** With the method model shown, the figures are those of a population examined by CBCT. */
	method: QuestionMethod;
	/** True when no sample of this root answers the question, so that the figures are the prior's. */
	borrowed: boolean;
}

/** Everything the estimator knows of one root under one set of filters. */
export interface RootModel {
	tooth: string;
	root: string;
	/** All nine, in the order of QUESTION_IDS. */
	questions: RootQuestion[];
	/** Prevalence of an isthmus between two canals of this root; null: none qualifies, Beta(1, 1) is assumed. */
	isthmus: (Pooled & { evidence: QuestionStudy[] }) | null;
	/** Without a sample on any question: "no evidence", no advice. */
	hasEvidence: boolean;
	notPooled: NotPooled[];
	reviews: ReviewFigure[];
}

/** Probability of each leaf. */
export type LeafWeights = Record<Leaf, number>;

/** A row of finding-characteristics: Beta(a, b) of one parameter of a finding for a tooth group. */
export interface FindingCharacteristic {
	finding: string;
	parameter: string;
	toothGroup: string;
	betaA: number | null;
	betaB: number | null;
	sdMm: number | null;
	basis: 'published' | 'derived' | 'assumed';
	sourceIds: string[];
	note: string;
}
