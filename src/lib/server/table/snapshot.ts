import { QueryTypes, type Sequelize } from 'sequelize';
import type { FindingCharacteristic, ObservationRow, SourceFacts } from '../inference/types';
import { TableRevision } from '../db/models/literature';
import { findingCharacteristics } from './characteristics';

/** The published table as the estimator reads it, at one revision. */
export interface TableSnapshot {
	revision: number;
	rows: ObservationRow[];
	sources: SourceFacts[];
	characteristics: FindingCharacteristic[];
}

type RawRow = Omit<ObservationRow, 'verified' | 'poolable'> & { confirmed: number; poolable: number | null };

/** Number of the newest table revision; 0 before the first seeding. */
export async function tableRevision(): Promise<number> {
	return (await TableRevision.max<number | null, TableRevision>('id')) ?? 0;
}

/** Reads the whole published table: about two thousand figures, in one query. */
export async function readSnapshot(db: Sequelize): Promise<TableSnapshot> {
	const revision = await tableRevision();
	const raw = await db.query<RawRow>(
		`SELECT entry.id AS entry, entry.source_id AS source, entry.locator, sample.tooth, sample.root, sample.scope, sample.country,
			sample.method, sample.subgroup, entry.measure, figure.category, figure.count, sample.total, figure.percent,
			entry.provenance, entry.confirmed, sample.poolable, figure.note
		FROM figure JOIN entry ON entry.id = figure.entry_id JOIN sample ON sample.id = entry.sample_id
		WHERE entry.state = 'published' ORDER BY entry.id, figure.position`,
		{ type: QueryTypes.SELECT }
	);
	const sources = await db.query<
		Omit<SourceFacts, 'citable' | 'retracted'> & { citable: number; retracted: number }
	>(
		`SELECT source.id, citable, year, retracted, source_appraisal.grade AS appraisal
			FROM source LEFT JOIN source_appraisal ON source_appraisal.source_id = source.id ORDER BY source.id`,
		{ type: QueryTypes.SELECT }
	);
	return {
		revision,
		rows: raw.map(({ confirmed, poolable, ...row }) => ({
			...row,
			verified: row.provenance !== 'memory' || confirmed === 1,
			poolable: poolable === null ? null : poolable === 1
		})),
		sources: sources.map((source) => ({
			...source,
			citable: source.citable === 1,
			retracted: source.retracted === 1
		})),
		characteristics: await findingCharacteristics()
	};
}
