import type { RootCoverageDto, TableCoverageDto } from '$lib/schemas/coverage';
import type { QuestionCoverage, RootCoverage } from './coverage';
import { estimator } from './estimator';

/** How well the whole table predicts what it has not seen, in the API's shape. Some seconds after a new revision, then at once. */
export async function coverageOfTable(): Promise<TableCoverageDto> {
	const current = await estimator();
	const { figures, roots } = await current.tableCoverage();
	return {
		tableRevision: current.revision,
		level95: figures?.level95 ?? null,
		level80: figures?.level80 ?? null,
		samples: figures?.samples ?? 0,
		logScore: figures?.logScore ?? 0,
		roots: roots.map(({ tooth, root, questions }) => ({
			tooth,
			root,
			questions: questions.map((question) => ({
				...questionDto(question),
				logScore: question.logScore,
				method: question.method
			}))
		}))
	};
}

/** Coverage of one root in the API's shape. */
export function coverageDto({ figures, questions }: RootCoverage): RootCoverageDto {
	return {
		level95: figures?.level95 ?? null,
		level80: figures?.level80 ?? null,
		samples: figures?.samples ?? 0,
		questions: questions.map(questionDto)
	};
}

function questionDto({ id, samples, level95, level80, flagged }: QuestionCoverage) {
	return { id, samples, level95, level80, flagged };
}
