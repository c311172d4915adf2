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
