/** Who may do what with an entry, or with a finding's characteristic, in which state. Pure; the one place that decides it. */
import type { Role } from '$lib/schemas/terms';

/** Where something of the table stands for everybody. */
export type Standing = 'never' | 'published' | 'withdrawn';

/** What stands beside it on the desk. */
interface Work {
	state: 'draft' | 'in-review';
	/** Ids of everyone who has changed the draft. */
	editors: readonly string[];
}

export interface Situation {
	standing: Standing;
	work: Work | null;
	/** Published, recalled from memory and not confirmed yet. */
	unverified?: boolean;
	/** Who wrote the published figures; null for the shipped table. */
	publishedBy?: string | null;
}

export const ACTIONS = [
	'save',
	'ask-review',
	'take-back',
	'return',
	'publish',
	'withdraw',
	'discard',
	'restore',
	'confirm',
	'mark-poolable'
] as const;
export type Action = (typeof ACTIONS)[number];

/** Why something may not be done: not by this role, not in this state, or not by somebody whose own work it is. */
export type Hindrance = 'role' | 'state' | 'own' | 'not-own';

/**
 * What hinders a person from an action; null if nothing does.
 *
 * | action        | when                                             | who (educators only)               |
 * | ------------- | ------------------------------------------------ | ---------------------------------- |
 * | save          | no draft yet (of something ever published), or a draft | anyone                       |
 * | ask-review    | a draft                                          | anyone                             |
 * | take-back     | in review                                        | who has written in it              |
 * | return        | in review                                        | who has not                        |
 * | publish       | in review                                        | who has not                        |
 * | withdraw      | published                                        | anyone, with a reason              |
 * | discard       | a draft                                          | anyone: revisions keep it          |
 * | restore       | not in review                                    | anyone: it makes a draft           |
 * | confirm       | published from memory, not yet confirmed         | who did not write it               |
 * | mark-poolable | published                                        | anyone, with a reason              |
 */
export function hindrance(
	action: Action,
	{ standing, work, unverified = false, publishedBy = null }: Situation,
	person: { id: string; roles: readonly Role[] }
): Hindrance | null {
	if (!person.roles.includes('educator')) return 'role';
	const own = work?.editors.includes(person.id) ?? false;
	switch (action) {
		case 'save':
			return work?.state === 'draft' || (work === null && standing !== 'never') ? null : 'state';
		case 'ask-review':
		case 'discard':
			return work?.state === 'draft' ? null : 'state';
		case 'take-back':
			if (work?.state !== 'in-review') return 'state';
			return own ? null : 'not-own';
		case 'return':
		case 'publish':
			if (work?.state !== 'in-review') return 'state';
			return own ? 'own' : null;
		case 'withdraw':
		case 'mark-poolable':
			return standing === 'published' ? null : 'state';
		case 'restore':
			return work?.state === 'in-review' ? 'state' : null;
		case 'confirm':
			if (standing !== 'published' || !unverified) return 'state';
			return publishedBy === person.id ? 'own' : null;
	}
}

/** Everything a person may do. */
export const allowedActions = (
	situation: Situation,
	person: { id: string; roles: readonly Role[] }
): Action[] => ACTIONS.filter((action) => hindrance(action, situation, person) === null);
