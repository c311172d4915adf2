import { requireRole } from '$lib/server/people/roles';
import { listCharacteristics } from '$lib/server/table/characteristicDesk';
import { toCharacteristicDto } from '$lib/server/table/characteristicPage';
import { sourcesById } from '$lib/server/table/sources';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async () => {
	requireRole('educator');
	const characteristics = (await listCharacteristics()).map(toCharacteristicDto);
	const ids = characteristics.flatMap(({ inForce }) => inForce.sourceIds.split(';').filter(Boolean));
	return { characteristics, sources: await sourcesById([...new Set(ids)]) };
};
