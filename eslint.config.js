import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import svelte from 'eslint-plugin-svelte';
import { defineConfig } from 'eslint/config';
import globals from 'globals';
import ts from 'typescript-eslint';
import svelteConfig from './svelte.config.js';

/** Rooms that only compute: no database, kit, DOM or components (DEVELOPERS.md). */
const PURE_ROOMS = ['src/lib/anatomy/**', 'src/lib/geometry/**', 'src/lib/drawing/**', 'src/lib/strings/**'];
const IMPURE = [
	'$app/*',
	'$lib/server/*',
	'$lib/components/*',
	'@sveltejs/*',
	'svelte',
	'svelte/*',
	'sequelize',
	'node:*'
];

export default defineConfig(
	{ ignores: ['build/', '.svelte-kit/', 'data/', 'test-results/', 'playwright-report/', 'node_modules/'] },
	{ linterOptions: { reportUnusedDisableDirectives: 'error' } },
	js.configs.recommended,
	ts.configs.recommendedTypeChecked,
	svelte.configs.recommended,
	prettier,
	svelte.configs.prettier,
	{
		languageOptions: {
			globals: { ...globals.browser, ...globals.node },
			parserOptions: { projectService: true, extraFileExtensions: ['.svelte'] }
		},
		rules: {
			// The compiler knows every global; this rule does not (typescript-eslint's own advice).
			'no-undef': 'off',
			eqeqeq: 'error',
			'@typescript-eslint/consistent-type-imports': 'error',
			'@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
			'@typescript-eslint/switch-exhaustiveness-check': 'error',
			'@typescript-eslint/no-non-null-assertion': 'off'
		}
	},
	{
		files: ['**/*.svelte', '**/*.svelte.ts'],
		languageOptions: { parserOptions: { parser: ts.parser, svelteConfig } },
		rules: {
			// The product is served at the root of its origin, and its addresses are written without JavaScript too.
			'svelte/no-navigation-without-resolve': 'off'
		}
	},
	{ files: ['src/**'], ignores: ['src/cli/**'], rules: { 'no-console': 'error' } },
	{
		files: PURE_ROOMS,
		ignores: ['**/*.test.ts'],
		rules: { 'no-restricted-imports': ['error', { patterns: IMPURE }] }
	}
);
