/** Addresses the tests visit; the ids are those of the shipped table. */
export const ROOT = '/teeth/maxillary-first-molar/MB';
export const JOIN = `${ROOT}/join`;
/** Two roots side by side. */
export const COMPARE =
	'/compare?a=maxillary-first-molar/MB&a-method=cbct&b=mandibular-first-molar/M&b-method=clearing';
/** No sample of this root answers any question. */
export const NO_EVIDENCE = '/teeth/mandibular-third-molar/DL';

/** One address for each kind of page. */
export const PAGES = {
	home: '/',
	'search results': '/?q=molar',
	'search without results': '/?q=zzzz',
	tooth: '/teeth/maxillary-first-molar',
	premolar: '/teeth/maxillary-first-premolar',
	root: ROOT,
	'root under filters': `${ROOT}?method=cbct&minTotal=100`,
	'root, a sequence alone': `${ROOT}?show=2-1&sort=year&group=method&open=q4`,
	'root with wrong filters': `${ROOT}?yearFrom=abc&minTotal=-3`,
	'root without evidence': NO_EVIDENCE,
	'join, empty': JOIN,
	'join, answered': `${JOIN}?canals=2&search=microscope&cone-mark=positive&draw=negative`,
	'join, refused': `${JOIN}?canals=1&cone-mark=positive`,
	'join, three canals': `${JOIN}?canals=3&draw=positive&draw-pair=MB1-MB2`,
	'join, no evidence': `${NO_EVIDENCE}/join?canals=2`,
	compare: COMPARE,
	table: '/table?limit=5&column=figures&column=total&column=source&column=year&column=standing',
	'table with wrong filters': '/table?tooth=16&method=guess&q=zzzz',
	entry: '/table/40',
	'record of the table': '/table/revisions',
	sources: '/sources?q=vertucci',
	source: '/sources/cleghorn-2007',
	'source without authors': '/sources/anon-canine-2023',
	about: '/about',
	api: '/api',
	'rows not placed': '/table/not-placed',
	'nothing there': '/nothing-here'
} as const;
