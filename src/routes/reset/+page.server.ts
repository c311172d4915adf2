import { emailSchema } from '$lib/schemas/people';
import { checkForm, done, refused } from '$lib/server/forms';
import { log } from '$lib/server/log';
import { resetLimits } from '$lib/server/people/limits';
import { sendReset } from '$lib/server/people/links';
import { readFormData } from '$lib/server/people/signInForm';
import { reset as words, signIn } from '$lib/strings/people';
import { z } from 'zod';
import type { Actions } from './$types';

const schema = z.object({ email: emailSchema });

export const actions: Actions = {
	default: async (event) => {
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, schema);
		if (!data) return refused('reset', form, errors);
		const seconds = await resetLimits.address.take(event.getClientAddress());
		if (seconds > 0) return refused('reset', form, { '': signIn.wait(seconds) }, 429);
		// Not waited for: how long it takes would tell whether there is an account.
		sendReset(data.email).catch((error: unknown) => log.error({ err: error }, 'a reset could not be sent'));
		return done('reset', words.sent(data.email));
	}
};
