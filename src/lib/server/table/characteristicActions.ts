import type { Sequelize } from 'sequelize';
import { desk as words } from '$lib/strings/desk';
import { Problem } from '../api/problem';
import { moveCharacteristic, publishCharacteristic, restoreCharacteristic } from './characteristicDesk';
import type { DeskPerson } from './entryDrafts';

interface ActionRequest {
	name: string;
	action: string;
	person: DeskPerson;
	expected: number;
	note: string;
	reasons: readonly string[];
	revision: number | undefined;
}

/**
 * Does what a form of the page of a characteristic asks for.
 * @returns the revision of the table it made, or null
 * @throws Problem 400 for an unknown action, 403, 404, 409, or 422 at the field where something is missing
 */
export async function actOnCharacteristic(db: Sequelize, request: ActionRequest): Promise<number | null> {
	const { action, note } = request;
	const reasons = request.reasons.map((one) => one.trim()).filter(Boolean);
	switch (action) {
		case 'publish':
			return (await publishCharacteristic(db, request, note.trim())).revision;
		case 'restore':
			await restoreCharacteristic(db, request, request.revision ?? 0);
			return null;
		case 'return':
			if (reasons.length === 0)
				throw new Problem(422, words.needs.reasons, [{ path: 'reasons', message: words.needs.reasons }]);
			await moveCharacteristic(db, request, { action, reasons });
			return null;
		case 'ask-review':
		case 'take-back':
		case 'discard':
			await moveCharacteristic(db, request, { action, note: note.trim() });
			return null;
		default:
			throw new Problem(400, words.noAction);
	}
}
