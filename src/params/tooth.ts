import type { ParamMatcher } from '@sveltejs/kit';
import { toothOf } from '$lib/anatomy/teeth';

/** Matches the slug of a tooth, so that any other page address is a plain "not found". */
export const match: ParamMatcher = (param) => toothOf(param) !== undefined;
