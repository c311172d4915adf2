import type { FilterFields } from '$lib/filterQuery';
import type { ExpectationDto } from '$lib/schemas/expectation';
import type { RootShape } from '../table/rootShape';

/** Ids of every source that the page of a root names, each once. */
export function citedBy(expectation: ExpectationDto, shape: RootShape, filters: FilterFields): string[] {
	const { questions, features, notPooled, reviews } = expectation;
	const studied = [...questions, ...features].flatMap(({ studies }) => studies);
	const measured = [shape.length, shape.confluence].flatMap((placed) => placed?.source ?? []);
	const leftOut = filters.flatMap(([name, value]) => (name === 'exclude' ? [value] : []));
	return [
		...new Set([
			...[...studied, ...notPooled, ...reviews].map(({ source }) => source),
			...measured,
			...leftOut
		])
	];
}
