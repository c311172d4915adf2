import { error, json } from '@sveltejs/kit';
import { findImport, importDto } from '$lib/server/intake/imports';
import { requireRole } from '$lib/server/people/roles';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ params }) => {
	const person = requireRole(['educator', 'administrator']);
	const row = (await findImport(person.id, params.id)) ?? error(404, 'Unknown import.');
	return json(importDto(row), { headers: { 'cache-control': 'no-store' } });
};
