import { gatherLenders } from './borrowing';
import { characteristicsFor } from './characteristics';
import {
	answerConfluence,
	confluenceOutlook,
	type ConfluenceAnswer,
	type ConfluenceOutlook
} from './confluence';
import type { ConfluenceQuestion } from './confluenceQuestion';
import { rootCoverage, type RootCoverage } from './coverage';
import { gatherCounts, type CountSample } from './counts';
import { expectRoot, type Expectation } from './expectation';
import { gatherFeatures } from './features';
import { observedSequences, type ObservedSequence } from './observed';
import { pool } from './pool';
import { changedRoot, type ChangedRoot, type TableChange } from './preview';
import { buildRootModel } from './rootModel';
import { indexTable } from './tableIndex';
import type {
	Filters,
	FindingCharacteristic,
	ObservationRow,
	Pooled,
	QuestionStudy,
	RootModel,
	SourceFacts,
	Study
} from './types';

/** A feature's prevalence with the studies behind it. */
export interface PooledFeature extends Omit<Pooled, 'grid'> {
	id: string;
	evidence: QuestionStudy[];
}

/** All that a root's page and its further questions need. */
export interface RootAnswer {
	model: RootModel;
	expectation: Expectation;
	/** Every sequence the table names for the root, a rare one by its own name. */
	named: ObservedSequence[];
	features: PooledFeature[];
}

/** What the table has on a tooth as a whole. */
export interface ToothAnswer {
	rootCounts: CountSample[];
	canalCounts: CountSample[];
	features: PooledFeature[];
}

/** The calculations a worker does; each argument and result can be cloned from thread to thread. */
export interface Tasks {
	root(tooth: string, root: string, filters: Filters): RootAnswer;
	coverage(tooth: string, root: string, filters: Filters): RootCoverage;
	tooth(tooth: string): ToothAnswer;
	/** What becomes of the canals, without the rest of an answer. */
	outlook(model: RootModel, question: ConfluenceQuestion): ConfluenceOutlook;
	confluence(model: RootModel, question: ConfluenceQuestion, known?: ConfluenceOutlook[]): ConfluenceAnswer;
	pool(studies: Study[], level: number | undefined): Omit<Pooled, 'grid'>;
	/** A root as it would be if the table were changed. */
	changed(change: TableChange, place: { tooth: string; root: string; entry: number }): ChangedRoot;
}

/** Makes the tasks over one revision of the table. The index over the rows is made once, by the first task that needs it. */
export function createTasks(table: {
	rows: ObservationRow[];
	sources: SourceFacts[];
	characteristics: FindingCharacteristic[];
}): Tasks {
	let index: ReturnType<typeof indexTable> | undefined;
	const indexed = () => (index ??= indexTable(table.rows, table.sources));
	// The lenders depend on the filters alone, and most requests have none.
	let unfiltered: ReturnType<typeof gatherLenders> | undefined;
	const lendersFor = (filters: Filters) =>
		Object.keys(filters).length > 0
			? gatherLenders(indexed(), filters)
			: (unfiltered ??= gatherLenders(indexed(), {}));
	const features = (tooth: string, root: string | null, filters: Filters) =>
		gatherFeatures(indexed(), tooth, root, filters).map(({ id, studies }): PooledFeature => {
			const { grid: _, ...figures } = pool(studies);
			return { id, evidence: studies, ...figures };
		});
	const characteristicsOf = ({ tooth, root }: RootModel) =>
		characteristicsFor(table.characteristics, tooth, root);

	return {
		root(tooth, root, filters) {
			const model = buildRootModel(indexed(), tooth, root, filters, { lenders: lendersFor(filters) });
			return {
				model,
				expectation: expectRoot(model),
				named: observedSequences(indexed(), tooth, root, filters),
				features: features(tooth, root, filters)
			};
		},
		coverage: (tooth, root, filters) => rootCoverage(indexed(), tooth, root, filters, lendersFor(filters)),
		tooth: (tooth) => ({
			rootCounts: gatherCounts(indexed(), tooth, 'root-count', {}),
			canalCounts: gatherCounts(indexed(), tooth, 'canal-count', {}),
			features: features(tooth, null, {})
		}),
		outlook: (model, question) => confluenceOutlook(model, characteristicsOf(model), question),
		confluence: (model, question, known) =>
			answerConfluence(model, characteristicsOf(model), question, known),
		pool(studies, level) {
			const { grid: _, ...figures } = pool(studies, { level });
			return figures;
		},
		changed: (change, place) => changedRoot(table, change, place)
	};
}
