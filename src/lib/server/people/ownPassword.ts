import { account as words } from '$lib/strings/account';
import { signIn } from '$lib/strings/people';
import { field } from '../forms';
import { isOwnPassword } from './accounts';
import { ownPasswordLimit } from './limits';

/** What is wrong with the present password that a form asks for again (field `own-password`), as an error at its field. */
export async function ownPasswordErrors(personId: string, form: FormData): Promise<Record<string, string>> {
	const name = 'own-password';
	const seconds = await ownPasswordLimit.take(personId);
	if (seconds > 0) return { [name]: signIn.wait(seconds) };
	if (!(await isOwnPassword(personId, field(form, name)))) return { [name]: words.ownPasswordWrong };
	await ownPasswordLimit.forget(personId);
	return {};
}
