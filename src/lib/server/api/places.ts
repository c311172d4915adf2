import { rootOf, toothOf, type Root, type Tooth } from '$lib/anatomy/teeth';
import { Problem } from './problem';

/**
 * The tooth of a slug.
 * @throws Problem 404 naming the field
 */
export function knownTooth(id: string): Tooth {
	const tooth = toothOf(id);
	if (!tooth) {
		throw new Problem(404, `There is no tooth "${id}". GET /api/v1/teeth lists them.`, [
			{ path: 'tooth', message: 'Unknown tooth.' }
		]);
	}
	return tooth;
}

/**
 * A root of a tooth.
 * @throws Problem 404 naming the field
 */
export function knownRoot(toothId: string, rootId: string): { tooth: Tooth; root: Root } {
	const tooth = knownTooth(toothId);
	const root = rootOf(toothId, rootId);
	if (!root) {
		throw new Problem(
			404,
			`The ${tooth.name.toLowerCase()} has no root "${rootId}" here. Its roots are ${tooth.roots.join(', ')}.`,
			[{ path: 'root', message: 'Unknown root.' }]
		);
	}
	return { tooth, root };
}
