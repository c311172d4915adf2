import adapter from '@sveltejs/adapter-node';
import { vitePreprocess } from '@sveltejs/vite-plugin-svelte';

/** @type {import('@sveltejs/kit').Config} */
const config = {
	preprocess: vitePreprocess(),
	kit: {
		adapter: adapter(),
		// The one style sheet (5 kB packed) travels in the page: a round trip less before a phone draws anything.
		inlineStyleThreshold: 50_000,
		typescript: {
			// The tools' own settings are checked and linted as everything else is.
			config: (config) => ({
				...config,
				include: [.../** @type {{ include: string[] }} */ (config).include, '../*.js', '../*.ts']
			})
		},
		// Kit's own origin check answers before any hook; hooks/originGuard.ts does its work and more, in the API's words.
		csrf: { trustedOrigins: ['*'] },
		csp: {
			mode: 'nonce',
			directives: {
				'default-src': ['self'],
				'script-src': ['self'],
				'style-src': ['self'],
				// Kit's route announcer (an aria-live region) carries a style attribute of its own; allowed by its hash, not by 'unsafe-inline'.
				'style-src-attr': ['unsafe-hashes', 'sha256-S8qMpvofolR8Mpjy4kQvEm7m1q8clzU4dfDH0AmvZjo='],
				'img-src': ['self', 'data:'],
				'font-src': ['self'],
				'connect-src': ['self'],
				'object-src': ['none'],
				'base-uri': ['self'],
				'form-action': ['self'],
				'frame-ancestors': ['none']
			}
		}
	}
};

export default config;
