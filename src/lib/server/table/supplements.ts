import { Op, type ModelStatic, type Model, type Sequelize } from 'sequelize';
import { characteristicName } from '$lib/entry/characteristic';
import type { Provenance } from '../db/models/literature';
import { CharacteristicRevision } from '../db/models/desk';
import { Characteristic, Diagnostic, Measurement, Standard } from '../db/models/supplements';
import type { CsvRow, LiteratureFiles } from './literatureFiles';
import { describeUnplaced, numberOrNull, whyNotCited, type Unplaced } from './plan';

/**
 * Replaces measurements, diagnostics, characteristics and standards by those of the files, each file in one transaction.
 * @returns rows that could not be placed, with the reason
 */
export async function replaceSupplements(
	db: Sequelize,
	files: LiteratureFiles,
	sources: ReadonlySet<string>
): Promise<Unplaced[]> {
	const cited = (cells: Record<string, string>) => whyNotCited(cells, sources);
	const parameters = new Set<string>();
	return [
		...(await replace(db, Measurement, 'measurements.csv', files.measurements, cited, toMeasurement)),
		...(await replace(db, Diagnostic, 'diagnostics.csv', files.diagnostics, cited, toDiagnostic)),
		...(await replace(db, Standard, 'standards.csv', files.standards, cited, toStandard)),
		...(await replace(
			db,
			Characteristic,
			'finding-characteristics.csv',
			files.characteristics,
			(cells) => whyNotCharacteristic(cells, sources, parameters),
			toCharacteristic,
			await editedCharacteristics()
		))
	];
}

type Row = Record<string, string | number | null>;

/** Rows that stay as they are, whatever the file says. */
interface Keep {
	ids: number[];
	has: (row: Row) => boolean;
}

async function replace(
	db: Sequelize,
	model: ModelStatic<Model>,
	file: string,
	rows: CsvRow[],
	whyNot: (cells: Record<string, string>) => string | null,
	convert: (cells: Record<string, string>) => Row,
	keep: Keep = { ids: [], has: () => false }
): Promise<Unplaced[]> {
	const placed: Row[] = [];
	const unplaced: Unplaced[] = [];
	for (const row of rows) {
		const values = convert(row.cells);
		const notANumber = Object.entries(values).find(([, value]) => Number.isNaN(value));
		const reason = whyNot(row.cells) ?? (notANumber ? `${notANumber[0]} is not a number.` : null);
		if (reason) unplaced.push(describeUnplaced(file, row, reason));
		else if (!keep.has(values)) placed.push(values);
	}
	await db.transaction(async (transaction) => {
		await model.destroy({ where: { id: { [Op.notIn]: keep.ids } }, transaction });
		await model.bulkCreate(placed, { transaction });
	});
	return unplaced;
}

/** Characteristics that people have published since. */
async function editedCharacteristics(): Promise<Keep> {
	const revisions = await CharacteristicRevision.findAll({ attributes: ['name'], group: ['name'] });
	const names = new Set(revisions.map(({ name }) => name));
	const rows = (await Characteristic.findAll()).filter((row) => names.has(characteristicName(row)));
	const kept = new Set(rows.map(characteristicName));
	return {
		ids: rows.map(({ id }) => id),
		has: (row) => kept.has(characteristicName(row as unknown as Characteristic))
	};
}

/** @param parameters those that earlier rows gave; this row's is added if it can be placed */
function whyNotCharacteristic(
	cells: Record<string, string>,
	sources: ReadonlySet<string>,
	parameters: Set<string>
): string | null {
	const ids = cells.source_ids.split(';').filter(Boolean);
	const missing = ids.find((id) => !sources.has(id));
	if (missing) return `The source ${missing} is not among the sources.`;
	if (cells.basis !== 'assumed' && ids.length === 0) return `A ${cells.basis} value must name its sources.`;
	if (!['published', 'derived', 'assumed'].includes(cells.basis))
		return `The basis "${cells.basis}" is unknown.`;
	const notPositive = ['beta_a', 'beta_b', 'sd_mm'].find((column) => {
		const value = numberOrNull(cells[column]);
		return value !== null && !(value > 0);
	});
	if (notPositive) return `${notPositive} must be a number above zero.`;
	const parameter = JSON.stringify([cells.finding, cells.parameter, cells.tooth_group]);
	if (parameters.has(parameter)) return 'An earlier row gives this parameter of the finding.';
	parameters.add(parameter);
	return null;
}

const toMeasurement = (cells: Record<string, string>) => ({
	sourceId: cells.source_id,
	locator: cells.locator,
	tooth: cells.tooth,
	root: cells.root,
	scope: cells.scope,
	country: cells.country,
	method: cells.method,
	quantity: cells.quantity,
	n: numberOrNull(cells.n),
	mean: numberOrNull(cells.mean),
	sd: numberOrNull(cells.sd),
	min: numberOrNull(cells.min),
	max: numberOrNull(cells.max),
	unit: cells.unit,
	provenance: cells.provenance as Provenance,
	note: cells.note
});

const toDiagnostic = (cells: Record<string, string>) => ({
	sourceId: cells.source_id,
	locator: cells.locator,
	test: cells.test,
	target: cells.target,
	tooth: cells.tooth,
	root: cells.root,
	referenceStandard: cells.reference_standard,
	n: numberOrNull(cells.n),
	tp: numberOrNull(cells.tp),
	fp: numberOrNull(cells.fp),
	fn: numberOrNull(cells.fn),
	tn: numberOrNull(cells.tn),
	sensitivity: numberOrNull(cells.sensitivity),
	specificity: numberOrNull(cells.specificity),
	kappa: numberOrNull(cells.kappa),
	provenance: cells.provenance as Provenance,
	note: cells.note
});

const toStandard = (cells: Record<string, string>) => ({
	sourceId: cells.source_id,
	standard: cells.standard,
	item: cells.item,
	value: cells.value,
	lower: numberOrNull(cells.lower),
	upper: numberOrNull(cells.upper),
	unit: cells.unit,
	provenance: cells.provenance as Provenance,
	note: cells.note
});

const toCharacteristic = (cells: Record<string, string>) => ({
	finding: cells.finding,
	parameter: cells.parameter,
	toothGroup: cells.tooth_group,
	betaA: numberOrNull(cells.beta_a),
	betaB: numberOrNull(cells.beta_b),
	sdMm: numberOrNull(cells.sd_mm),
	basis: cells.basis,
	sourceIds: cells.source_ids,
	note: cells.note
});
