import { redirect } from '@sveltejs/kit';
import { requireRole } from '$lib/server/people/roles';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = () => {
	requireRole('administrator');
	redirect(303, '/administration/people');
};
