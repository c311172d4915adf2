import type { ParamMatcher } from '@sveltejs/kit';
import { teeth } from '$lib/anatomy/teeth';

const roots = new Set<string>(teeth.flatMap((tooth) => tooth.roots));

/** Matches the id of a root of some tooth; the page's load checks that it is this tooth's. */
export const match: ParamMatcher = (param) => roots.has(param);
