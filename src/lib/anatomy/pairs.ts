/** Roots that are worth setting beside each other. */
import { rootOf, teeth, toothOf, type Root, type RootId, type Tooth } from './teeth';

/** The root of the other jaw that stands for one of this: opposite molars have no palatal root (common practice, no source). */
const OPPOSITE: Partial<Record<RootId, RootId>> = {
	whole: 'whole',
	single: 'single',
	B: 'B',
	P: 'L',
	L: 'P',
	MB: 'M',
	M: 'MB',
	DB: 'D',
	D: 'DB'
};

/** A root of a tooth. */
export interface Place {
	tooth: Tooth;
	root: Root;
}

/**
 * Roots to compare a root with: the other roots of its tooth, the same root of the other teeth of its kind in the jaw,
 * and its counterpart in the opposite jaw. `whole` is no root beside others of its tooth.
 *
 * @param toothId slug of the tooth
 * @param rootId id of the root
 * @returns none for a root the product does not answer for
 */
export function relatedRoots(toothId: string, rootId: RootId): Place[] {
	const tooth = toothOf(toothId);
	if (!tooth || !rootOf(toothId, rootId)) return [];
	const place = (of: Tooth, id: RootId | undefined): Place[] => {
		const root = id && rootOf(of.id, id);
		return root ? [{ tooth: of, root }] : [];
	};
	const sameTooth = rootId === 'whole' ? [] : tooth.roots.filter((id) => id !== rootId && id !== 'whole');
	const sameKind = teeth.filter(
		(each) => each.kind === tooth.kind && each.arch === tooth.arch && each !== tooth
	);
	const opposite = teeth.filter((each) => each.place === tooth.place && each.arch !== tooth.arch);
	return [
		...sameTooth.flatMap((id) => place(tooth, id)),
		...sameKind.flatMap((each) => place(each, rootId)),
		...opposite.flatMap((each) => place(each, OPPOSITE[rootId]))
	];
}
