/** What the estimator needs to keep answers: one key for equal filters, one calculation for equal questions. Pure. */
import type { Filters } from './types';

/** A map, or anything that keeps values by key and may forget them. */
interface Keep<Value> {
	get(key: string): Value | undefined;
	set(key: string, value: Value): unknown;
	delete(key: string): unknown;
}

/** Computes once what is asked for under a key, also when it is asked for again before it is there; a failure is not kept. */
export function remember<Value>(
	kept: Keep<Promise<Value>>,
	key: string,
	compute: () => Promise<Value>
): Promise<Value> {
	const known = kept.get(key);
	if (known) return known;
	const value = compute();
	kept.set(key, value);
	value.catch(() => {
		// The key may have been forgotten and asked for again since: another's calculation stays.
		if (kept.get(key) === value) kept.delete(key);
	});
	return value;
}

/** Filters in one order and without repeats or empty lists, so that equal filters are one key. */
export function canonical(filters: Filters): Filters {
	const list = (values?: string[]) => (values?.length ? [...new Set(values)].sort() : undefined);
	const all: Filters = {
		methods: list(filters.methods),
		countries: list(filters.countries),
		yearFrom: filters.yearFrom,
		yearTo: filters.yearTo,
		minTotal: filters.minTotal,
		exclude: list(filters.exclude),
		appraisal: filters.appraisal
	};
	return Object.fromEntries(Object.entries(all).filter(([, value]) => value !== undefined));
}
