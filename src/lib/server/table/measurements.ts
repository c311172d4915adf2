import type { WhereOptions } from 'sequelize';
import type { MeasurementDto } from '$lib/schemas/teeth';
import { Measurement } from '../db/models/supplements';

/** Measurements of a tooth in mm, unverified ones too (marked). */
export const measurementsOf = (tooth: string): Promise<MeasurementDto[]> => list({ tooth, unit: 'mm' });

/** Every measurement taken from a source, whatever its unit. */
export const measurementsOfSource = (sourceId: string): Promise<MeasurementDto[]> => list({ sourceId });

async function list(where: WhereOptions<Measurement>): Promise<MeasurementDto[]> {
	const rows = await Measurement.findAll({ where, order: ['tooth', 'quantity', 'sourceId', 'id'] });
	return rows.map((row) => ({
		source: row.sourceId,
		locator: row.locator,
		tooth: row.tooth,
		root: row.root,
		scope: row.scope,
		country: row.country,
		method: row.method,
		quantity: row.quantity,
		n: row.n,
		mean: row.mean,
		sd: row.sd,
		min: row.min,
		max: row.max,
		unit: row.unit,
		provenance: row.provenance,
		verified: row.provenance !== 'memory',
		note: row.note
	}));
}
