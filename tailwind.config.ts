import type { Config } from 'tailwindcss';
import plugin from 'tailwindcss/plugin';
import { palette } from './src/lib/palette';

const names = Object.keys(palette.light) as (keyof typeof palette.light)[];

const variables = (theme: keyof typeof palette) =>
	Object.fromEntries(names.map((name) => [`--wm-${name}`, palette[theme][name]]));

export default {
	content: [],
	// A person's choice (data-theme) wins over the system's; without one the system's holds.
	darkMode: 'class',
	theme: {
		colors: {
			transparent: 'transparent',
			current: 'currentColor',
			...Object.fromEntries(names.map((name) => [name, `var(--wm-${name})`]))
		},
		fontFamily: { sans: ['"Noto Sans"', 'system-ui', 'sans-serif'] },
		// Five sizes and no more.
		fontSize: {
			small: ['0.875rem', { lineHeight: '1.5' }],
			body: ['1.0625rem', { lineHeight: '1.6' }],
			lead: ['1.25rem', { lineHeight: '1.5' }],
			title: ['1.625rem', { lineHeight: '1.3' }],
			display: ['2.25rem', { lineHeight: '1.2' }]
		},
		extend: { minHeight: { touch: '2.75rem' }, minWidth: { touch: '2.75rem' } }
	},
	plugins: [
		plugin((api) => {
			api.addBase({
				':root': { ...variables('light'), 'color-scheme': 'light' },
				'@media (prefers-color-scheme: dark)': {
					':root': { ...variables('dark'), 'color-scheme': 'dark' }
				},
				':root[data-theme="light"]': { ...variables('light'), 'color-scheme': 'light' },
				':root[data-theme="dark"]': { ...variables('dark'), 'color-scheme': 'dark' }
			});
		})
	]
} satisfies Config;
