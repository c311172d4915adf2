import { LEAVES, type Leaf } from '$lib/anatomy/sequence';
import { PATHS } from './distribution';
import type { QuestionId } from './types';

/** The tree of questions as a nested structure, for showing it: a question with its two answers, or a leaf. */
export type QuestionNode = { leaf: Leaf } | { question: QuestionId; yes: QuestionNode; no: QuestionNode };

/** Builds the tree from the paths of its leaves. */
export function questionTree(leaves: readonly Leaf[] = LEAVES, depth = 0): QuestionNode {
	const step = PATHS[leaves[0]][depth];
	if (!step) return { leaf: leaves[0] };
	const answering = (answer: boolean) => leaves.filter((leaf) => PATHS[leaf][depth].answer === answer);
	return {
		question: step.question,
		yes: questionTree(answering(true), depth + 1),
		no: questionTree(answering(false), depth + 1)
	};
}
