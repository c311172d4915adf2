import { error, type RequestEvent } from '@sveltejs/kit';
import { emailSchema } from '$lib/schemas/people';
import { signIn as words } from '$lib/strings/people';
import { field, refused } from '../forms';
import { signIn, signInWithCode, type SignInOutcome } from './signIn';

const TOO_MANY = 429;

/** The form of a request. */
export const readFormData = (event: RequestEvent): Promise<FormData> =>
	event.request.formData().catch(() => error(400, 'This is not a form of this page.'));

type Failure = ReturnType<typeof refused>;

/** The first step of a sign-in: address and password. A failure to answer with, or what is next. */
export async function passwordStep(
	event: RequestEvent,
	form: FormData
): Promise<Failure | 'signed in' | 'code needed'> {
	const address = emailSchema.safeParse(field(form, 'email'));
	const password = field(form, 'password');
	const errors = {
		...(!address.success && { email: address.error.issues[0].message }),
		...(!password && { password: words.errors.password })
	};
	if (!address.success || !password) return refused('password', form, errors);
	return outcomeOf(event, 'password', form, await signIn(event, address.data, password), words.refused);
}

/** The second step: the code. */
export async function codeStep(
	event: RequestEvent,
	form: FormData
): Promise<Failure | 'signed in' | 'code needed'> {
	const code = field(form, 'code');
	if (!code.trim()) return refused('code', form, { code: words.errors.code });
	return outcomeOf(event, 'code', form, await signInWithCode(event, code), words.code.refused);
}

function outcomeOf(event: RequestEvent, at: string, form: FormData, result: SignInOutcome, no: string) {
	if (result.outcome === 'wait') {
		event.setHeaders({ 'retry-after': String(result.seconds) });
		return refused(at, form, { '': words.wait(result.seconds) }, TOO_MANY);
	}
	return result.outcome === 'refused' ? refused(at, form, { '': no }, 401) : result.outcome;
}
