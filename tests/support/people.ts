import type { Role } from '$lib/schemas/terms';
import { Person, PersonRole } from '$lib/server/db/models/people';

interface Wanted {
	id?: string;
	name?: string;
	email?: string;
	roles?: Role[];
	/** Default: a text that is no hash, so that no password fits. */
	passwordHash?: string;
}

let made = 0;

/** An account in the test's database, without the work of a password; its address is ID@example.org unless given. */
export async function newPerson({ id = `person-${++made}`, ...wanted }: Wanted = {}): Promise<string> {
	const email = wanted.email ?? `${id}@example.org`;
	await Person.create({
		...{ id, email, emailKey: email.toLowerCase(), name: wanted.name ?? id },
		passwordHash: wanted.passwordHash ?? 'none',
		createdAt: new Date().toISOString()
	});
	for (const role of wanted.roles ?? []) await PersonRole.create({ personId: id, role });
	return id;
}
