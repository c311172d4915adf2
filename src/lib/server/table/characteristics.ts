import type { FindingCharacteristic } from '../inference/types';
import { Characteristic } from '../db/models/supplements';

/** The table of finding characteristics, as its editors keep it. */
export async function findingCharacteristics(): Promise<FindingCharacteristic[]> {
	const rows = await Characteristic.findAll({ order: ['id'] });
	return rows.map((row) => ({
		finding: row.finding,
		parameter: row.parameter,
		toothGroup: row.toothGroup,
		betaA: row.betaA,
		betaB: row.betaB,
		sdMm: row.sdMm,
		basis: row.basis,
		sourceIds: row.sourceIds.split(';').filter(Boolean),
		note: row.note
	}));
}
