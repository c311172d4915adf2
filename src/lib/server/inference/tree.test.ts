import { describe, expect, it } from 'vitest';
import { questionTree, type QuestionNode } from './tree';

/** Leaves with the answers that lead to them, by walking the tree. */
function walk(node: QuestionNode, path: string[] = []): Record<string, string> {
	if ('leaf' in node) return { [node.leaf]: path.join(' ') };
	return {
		...walk(node.yes, [...path, `${node.question}+`]),
		...walk(node.no, [...path, `${node.question}-`])
	};
}

describe('questionTree', () => {
	// By hand from METHOD.md, section 2.
	it('leads to each leaf by the answers of the specification', () => {
		expect(walk(questionTree())).toEqual({
			'1': 'q1-',
			'2': 'q1+ q2+ q3- q4-',
			'2-1': 'q1+ q2+ q3- q4+ q5-',
			'2-1-2': 'q1+ q2+ q3- q4+ q5+',
			'1-2-1': 'q1+ q2- q6+',
			'1-2-1-2': 'q1+ q2- q6- q7+',
			'1-2': 'q1+ q2- q6- q7-',
			'3': 'q1+ q2+ q3+ q8-',
			'3-1': 'q1+ q2+ q3+ q8+ q9+',
			'3-2': 'q1+ q2+ q3+ q8+ q9-'
		});
	});
});
