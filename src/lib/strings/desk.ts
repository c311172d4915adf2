/** Words of the desk that the server says too: refusals, and what the record and the revisions keep. */
export const desk = {
	unknown: 'There is no such entry.',
	nothing: 'nothing',
	noAction: 'There is no such action.',
	stale: (who: string) => `${who} has saved this meanwhile. Compare the two versions and choose.`,
	moved: (who: string) => `${who} has moved this on meanwhile. Look at it as it stands now, and try again.`,
	staleAt: (yours: string, theirs: string) =>
		`Yours: ${yours || 'empty'}. Saved meanwhile: ${theirs || 'empty'}.`,
	hindrances: {
		role: 'Only educators may do this.',
		state: 'The entry is not in the state for this; somebody may have moved it on meanwhile.',
		own: 'You have written in it yourself: somebody else has to check it.',
		'not-own': 'Only somebody who has written in it may take it back.'
	},
	needs: {
		reasons: 'Say why it goes back: at least one reason.',
		reason: 'Say why.',
		revision: 'Say which revision.',
		locator: 'Say where in the source the figures stand.',
		poolable: 'Say whether the sample is pooled.',
		ifMatch: 'Send If-Match with the number of the revision you edited, in quotes.'
	},
	why: {
		created: 'New draft.',
		saved: 'Draft saved.',
		restored: (number: number) => `Revision ${number} restored as a draft.`,
		asked: 'Sent to a second person.',
		takenBack: 'Taken back from review.',
		returned: (reasons: readonly string[]) => `Returned: ${reasons.join('; ')}`,
		discarded: 'Draft put away.',
		published: 'Checked against the source and published.',
		replaced: 'Checked against the source; replaces what was published.',
		confirmed: (locator: string) => `Recalled figures found in the source at ${locator}.`,
		poolable: (poolable: boolean | null, reason: string) =>
			`${poolable === null ? 'Pooled or not as its scope says' : poolable ? 'Marked to be pooled' : 'Marked not to be pooled'}: ${reason}`
	},
	record: {
		characteristic: (finding: string, parameter: string, group: string) =>
			`The characteristic of a finding was changed: ${finding}, ${parameter}, ${group}.`,
		published: (id: number, replaced: boolean) =>
			replaced ? `Entry ${id} was corrected.` : `Entry ${id} was published.`,
		withdrawn: (id: number, reason: string) => `Entry ${id} was withdrawn: ${reason}`,
		confirmed: (id: number) => `Entry ${id}, recalled from memory, was confirmed against its source.`,
		poolable: (id: number, poolable: boolean | null, reason: string) =>
			`The sample of entry ${id} ${poolable === null ? 'is pooled as its scope says' : poolable ? 'was marked to be pooled' : 'was marked not to be pooled'}: ${reason}`
	}
};
