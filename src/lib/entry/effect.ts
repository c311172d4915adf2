/** The main figures of a root, as the record of the table and the look before publishing compare them. Shapes only. */

interface Figure {
	mean: number;
	interval: [number, number];
}

export interface RootFigures {
	/** Sources behind the root's questions. */
	studies: number;
	orifices: ({ count: number } & Figure)[];
	fates: ({ fate: string } & Figure)[];
	questions: {
		id: string;
		studies: number;
		borrowed: boolean;
		pooled: Figure;
		/** Where a new population may lie. */
		predictive: [number, number];
	}[];
}

/** Whether one answer of a new sample lies where the others would have it. */
export interface OutsideCheck {
	question: string;
	events: number;
	total: number;
	/** Samples it is compared with; with none there is nothing to compare. */
	others: number;
	inside: boolean | null;
	/** 95 % predictive range of the others for a population of its kind, as proportions. */
	range: [number, number] | null;
}

/** What publishing an entry would do to a root. */
export interface Preview {
	tooth: string;
	root: string;
	before: RootFigures;
	after: RootFigures;
	/** Questions that the entry's sample would answer. */
	checks: OutsideCheck[];
	/** Why the entry would not be pooled; null if it answers something. */
	notPooled: string | null;
}
