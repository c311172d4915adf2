import type { Cookies } from '@sveltejs/kit';

interface Kept {
	value: string;
	options: Parameters<Cookies['set']>[2];
}

/** Cookies of one browser, in memory, with the options they were last set with. */
export function cookieJar() {
	const kept = new Map<string, Kept>();
	const cookies = {
		get: (name: string) => kept.get(name)?.value || undefined,
		getAll: () => [...kept].map(([name, { value }]) => ({ name, value })),
		set: (name: string, value: string, options: Kept['options']) => void kept.set(name, { value, options }),
		delete: (name: string) => void kept.delete(name),
		serialize: () => ''
	} satisfies Cookies;
	return { cookies, kept };
}
