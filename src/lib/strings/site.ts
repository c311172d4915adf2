/** Words of the frame around every page, and of the pages that hold no figures. */
export const site = {
	name: 'Watersmeet',
	tagline: 'Root canals in the literature: what to expect, and whether two canals join',
	skip: 'Skip to the content',
	nav: {
		label: 'Main',
		teeth: 'Find a tooth',
		table: 'Table',
		sources: 'Sources',
		how: 'How it works',
		aboutShort: 'About',
		about: 'What this is and is not'
	},
	search: {
		label: 'Look up a tooth, root, feature, source or country',
		placeholder: '16, #14, UL6, upper first molar, mb2, vertucci 84',
		placeholderShort: '16, UL6, mb2',
		button: 'Look up'
	},
	preferences: {
		title: 'On this device',
		theme: 'Light or dark',
		themes: { system: 'As the device', light: 'Light', dark: 'Dark' },
		numbers: 'Tooth numbers',
		systems: { iso: 'ISO 3950 (16)', universal: 'Universal (3)', palmer: 'Palmer (UR6)' },
		threshold: 'Treat as joined from',
		unitsOf: 'Probabilities',
		units: { percent: 'in % (35 to 88 %)', 'in-100': 'in 100 (35 to 88 in 100)' },
		save: 'Keep',
		note: 'Kept in one cookie on this device; no account needed.'
	},
	footer: {
		caution:
			'A probability from published samples is not a finding in this patient. Image when in doubt, follow local imaging and treatment guidance, and treat under your own licence.',
		identity: 'No patient identity belongs in this product.',
		api: 'The HTTP API',
		notPlaced: 'Rows that could not be placed'
	},
	error: {
		notFound: 'There is nothing at this address',
		notFoundHint: 'Look up a tooth by its number or name, or start from the chart of all teeth.',
		broken: 'Something went wrong',
		brokenHint:
			'Nothing you typed was stored or changed. Try again; if it stays, tell whoever runs this server the number below.',
		id: 'Number',
		back: 'Go to the chart of all teeth'
	}
};
