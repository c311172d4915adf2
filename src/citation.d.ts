/** As much of @citation-js as `server/table/citations.ts` calls; the packages have no types. */
declare module '@citation-js/core' {
	export const plugins: {
		config: { get(name: '@bibtex'): { format: { useIdAsLabel: boolean; checkLabel: boolean } } };
		input: { chain(text: string, options: { forceType: string; generateGraph: boolean }): unknown };
		output: {
			format(
				name: 'bibtex' | 'bibliography',
				data: readonly object[],
				options: { format?: 'text'; template?: 'vancouver'; lang?: string }
			): string;
			format(
				name: 'ris',
				data: readonly object[],
				options: { format: 'object' }
			): Record<string, string | string[]>[];
		};
	};
}
declare module '@citation-js/plugin-csl';
declare module '@citation-js/plugin-bibtex';
declare module '@citation-js/plugin-ris';
