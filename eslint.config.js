import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import svelte from 'eslint-plugin-svelte';
import { defineConfig } from 'eslint/config';
import globals from 'globals';
import ts from 'typescript-eslint';

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
		languageOptions: { parserOptions: { parser: ts.parser } },
		rules: {
			// The product is served at the root of its origin, and its addresses are written without JavaScript too.
			'svelte/no-navigation-without-resolve': 'off'
		}
	},
	{
		// Published coefficients stand with all their digits, as their source prints them.
		files: ['src/lib/server/inference/normal.ts'],
		rules: { 'no-loss-of-precision': 'off' }
	},
	{ files: ['src/**'], ignores: ['src/cli/**'], rules: { 'no-console': 'error' } },
	{
		// What the browser runs takes its words from schemas/terms and only types from the schemas:
		// zod is large and probes whether it may evaluate code, which the content security policy forbids.
		files: ['src/lib/components/**', 'src/lib/strings/**', 'src/lib/drawing/**', 'src/routes/**/*.svelte'],
		ignores: ['**/*.test.ts'],
		rules: {
			'@typescript-eslint/no-restricted-imports': [
				'error',
				{
					patterns: [
						{
							group: ['zod', '$lib/schemas/*', '!$lib/schemas/terms', '!$lib/schemas/appraisal'],
							allowTypeImports: true
						}
					]
				}
			]
		}
	},
	{
		files: PURE_ROOMS,
		ignores: ['**/*.test.ts'],
		rules: { 'no-restricted-imports': ['error', { patterns: IMPURE }] }
	}
);
