import { Op } from 'sequelize';
import type { SourceFact } from '$lib/schemas/table';
import { toothOf } from '$lib/anatomy/teeth';
import { count, percent } from '$lib/strings/format';
import { source as words } from '$lib/strings/source';
import { Characteristic, Diagnostic, Standard } from '../db/models/supplements';

/** Diagnostics, standards and starting values that rest on a source, each in words with its place and standing. */
export async function supplementsOfSource(sourceId: string) {
	const [diagnostics, standards, characteristics] = await Promise.all([
		Diagnostic.findAll({ where: { sourceId }, order: ['id'] }),
		Standard.findAll({ where: { sourceId }, order: ['id'] }),
		Characteristic.findAll({ where: { sourceIds: { [Op.ne]: '' } }, order: ['id'] })
	]);
	return {
		diagnostics: diagnostics.map(diagnosticFact),
		standards: standards.map(standardFact),
		characteristics: characteristics
			.filter(({ sourceIds }) => sourceIds.split(';').includes(sourceId))
			.map(characteristicFact)
	};
}

const listed = (parts: (string | false | null)[], between: string) => parts.filter(Boolean).join(between);
const spaced = (slug: string) => slug.replaceAll('-', ' ');

function diagnosticFact(row: Diagnostic): SourceFact {
	const cells = (['tp', 'fp', 'fn', 'tn'] as const).map(
		(name) => row[name] !== null && `${name.toUpperCase()} ${count(row[name])}`
	);
	return {
		head: listed([row.test, row.target], ': '),
		figures: listed(
			[
				row.sensitivity !== null && `sensitivity ${percent(row.sensitivity)}`,
				row.specificity !== null && `specificity ${percent(row.specificity)}`,
				row.kappa !== null && `kappa ${row.kappa}`,
				...cells,
				row.n !== null && `n = ${count(row.n)}`
			],
			', '
		),
		detail: listed(
			[
				toothOf(row.tooth)?.name ?? (row.tooth === '' ? null : row.tooth),
				row.root,
				row.referenceStandard && `against ${row.referenceStandard}`,
				row.locator,
				row.note
			],
			'; '
		),
		provenance: row.provenance,
		verified: row.provenance !== 'memory'
	};
}

function standardFact(row: Standard): SourceFact {
	const limits = row.lower !== null && row.upper !== null && `${row.lower} to ${row.upper}`;
	return {
		head: row.item,
		figures: listed([row.value, limits && `(${limits})`, row.unit], ' '),
		detail: listed([row.standard, row.note], '; '),
		provenance: row.provenance,
		verified: row.provenance !== 'memory'
	};
}

function characteristicFact(row: Characteristic): SourceFact {
	const { betaA, betaB } = row;
	return {
		head: listed([spaced(row.finding), spaced(row.parameter)], ': '),
		figures: listed(
			[
				betaA !== null && betaB !== null && words.betaShape(betaA, betaB),
				row.sdMm !== null && `sd ${row.sdMm} mm`
			],
			', '
		),
		detail: listed(
			[words.derivedFrom, row.toothGroup === 'any' ? null : spaced(row.toothGroup), row.note],
			'; '
		),
		provenance: null,
		verified: row.basis === 'derived'
	};
}
