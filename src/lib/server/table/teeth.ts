import { QueryTypes } from 'sequelize';
import { positions } from '$lib/anatomy/numbers';
import { rootOf, teeth, type Tooth } from '$lib/anatomy/teeth';
import type { ToothDto, ToothSummary } from '$lib/schemas/teeth';
import { serverDatabase } from '../db/server';
import { toFeatureDto } from '../inference/expectationRequest';
import { estimator } from '../inference/estimator';
import { measurementsOf } from './measurements';

interface PlaceCount {
	tooth: string;
	root: string;
	entries: number;
	studies: number;
}

/** The sixteen teeth with their numbers, and how much the table has on each root. */
export async function listTeeth(): Promise<ToothSummary[]> {
	const db = await serverDatabase();
	const counts = await db.query<PlaceCount>(
		`SELECT sample.tooth, sample.root, COUNT(DISTINCT entry.id) AS entries, COUNT(DISTINCT entry.source_id) AS studies
			FROM entry JOIN sample ON sample.id = entry.sample_id WHERE entry.state = 'published' GROUP BY sample.tooth, sample.root`,
		{ type: QueryTypes.SELECT }
	);
	const byPlace = new Map(counts.map((count) => [`${count.tooth}|${count.root}`, count]));
	return teeth.map((tooth) => summaryOf(tooth, byPlace));
}

/** One tooth: its numbers, what was counted in it as a whole, its pooled features, its lengths. */
export async function describeTooth(tooth: Tooth): Promise<ToothDto> {
	const [summaries, current, measured] = await Promise.all([
		listTeeth(),
		estimator(),
		measurementsOf(tooth.id)
	]);
	const { rootCounts, canalCounts, features } = await current.tooth(tooth.id);
	return {
		...summaries.find(({ id }) => id === tooth.id)!,
		tableRevision: current.revision,
		usualForms: tooth.usualForms,
		rootCounts,
		canalCounts,
		features: features.map(toFeatureDto),
		lengths: measured
	};
}

function summaryOf(tooth: Tooth, counts: ReadonlyMap<string, PlaceCount>): ToothSummary {
	const numbers = tooth.iso.map((iso) => positions.find((position) => position.iso === iso)!);
	return {
		id: tooth.id,
		name: tooth.name,
		iso: [...tooth.iso],
		universal: numbers.map(({ universal }) => universal),
		palmer: {
			letters: numbers.map(({ palmer }) => palmer),
			bracket: numbers.map(({ palmerBracket }) => palmerBracket)
		},
		roots: tooth.roots.map((id) => {
			// Of incisors and canines `whole` and `single` name one root.
			const names = tooth.kind === 'incisor' || tooth.kind === 'canine' ? ['single', 'whole'] : [id];
			const here = names.flatMap((name) => counts.get(`${tooth.id}|${name}`) ?? []);
			return {
				id,
				name: rootOf(tooth.id, id)!.name,
				entries: here.reduce((sum, { entries }) => sum + entries, 0),
				studies: here.reduce((sum, { studies }) => sum + studies, 0)
			};
		})
	};
}
