import type { ConfluenceDto } from '$lib/schemas/confluence';
import { confluence } from '$lib/strings/confluence';
import { join as words } from '$lib/strings/join';

/** What an answer advises, in words. */
interface AdviceText {
	/** A few words, for the top of the answer, the short answer and whoever listens. */
	head: string;
	sentence: string;
	/** Cautions of this answer alone, which belong beside its advice. */
	cautions: string[];
	/** The line is reached, but only by findings whose accuracy is assumed. */
	heldBack: boolean;
	/** Whether a further test could change it; null where nothing is advised. */
	open: boolean | null;
}

/** Puts the advice of an answer into words. */
export function adviceOf(answer: ConfluenceDto): AdviceText {
	const { decision, evidence, posterior, cautions } = answer;
	const advice = decision?.advice ?? null;
	const key = advice ?? (evidence.studies === 0 ? 'noEvidence' : 'none');
	const general = [...confluence.cautions.joining, ...confluence.cautions.one];
	return {
		head: words.advice.heads[key],
		sentence: words.advice.sentences[key],
		cautions: cautions.filter((caution) => !general.includes(caution)),
		heldBack:
			advice === 'undecided' && (posterior.fates['shared-exit']?.mean ?? 0) >= (decision?.threshold ?? 1),
		open: advice === null ? null : (decision?.furtherTestingCanChangeIt ?? null)
	};
}
