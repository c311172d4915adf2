import type { Config } from 'tailwindcss';
import plugin from 'tailwindcss/plugin';

/**
 * The look's tokens: a river chart. Each name has one value in light and one in dark; classes use the name (`text-ink`, `fill-sand`).
 * Coral is reserved for the confluence and for nothing else; moss says published and verified, amber says assumed or unverified.
 * tests/reference/contrast.test.ts computes the WCAG contrast of every pair the screens use from these very values.
 */
export const palette = {
	light: {
		paper: '#fbf8f1',
		surface: '#fffefa',
		ink: '#14263b',
		'ink-soft': '#44566b',
		line: '#d8cfbc',
		'line-strong': '#85795f',
		sand: '#ecdfc3',
		'sand-deep': '#c7ab74',
		river: '#1d5c94',
		'river-soft': '#d6e6f3',
		coral: '#b83723',
		'coral-soft': '#f8ded8',
		moss: '#3a6530',
		'moss-soft': '#e0ecda',
		amber: '#7d5200',
		'amber-soft': '#f7e8c8'
	},
	dark: {
		paper: '#0e1a27',
		surface: '#152436',
		ink: '#eaf0f6',
		'ink-soft': '#b3c2d1',
		line: '#33475d',
		'line-strong': '#8195aa',
		sand: '#4b4331',
		'sand-deep': '#8a7a54',
		river: '#84bdec',
		'river-soft': '#1d3d5c',
		coral: '#ff917c',
		'coral-soft': '#54281f',
		moss: '#a3d093',
		'moss-soft': '#22391d',
		amber: '#f2bd60',
		'amber-soft': '#453410'
	}
} as const;

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
