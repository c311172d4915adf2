import { newPassword as words } from '$lib/strings/people';
import { site } from '$lib/strings/site';
import { passwordMistake } from './passwords';
import { readSettings } from './settings';

/**
 * What is wrong with a new password, as an error at its field; nothing if it is good.
 * @param own what else a stranger would try: name and address
 */
export async function passwordErrors(
	password: string,
	own: readonly string[]
): Promise<{ password?: string }> {
	const { name } = await readSettings();
	const mistake = passwordMistake(password, [site.name, ...(name ? [name] : []), ...own]);
	return mistake ? { password: words.mistakes[mistake] } : {};
}
