import { expect, test } from '@playwright/test';
import { NO_EVIDENCE, ROOT } from './support/places';
import { testRefusals, type Refused } from './support/refused';

const API = '/api/v1';
const JSON_TYPE = { 'content-type': 'application/json' };

const place = { tooth: 'maxillary-first-molar', root: 'MB' };
const confluence = (name: string, change: object, fields: string[], status = 422): Refused => ({
	name,
	address: '/confluence',
	body: { ...place, canals: 2, findings: [], ...change },
	status,
	fields
});
const PREMOLAR = { tooth: 'maxillary-first-premolar', root: 'whole' };
const finding = (change: object = {}) => ({ test: 'cone-mark', result: 'positive', ...change });
const pool = (name: string, body: unknown, fields: string[]): Refused => ({
	name,
	address: '/pool',
	body,
	status: 422,
	fields
});
const raw = (name: string, text: string, status: number, fields?: string[]): Refused => ({
	name,
	address: '/pool',
	method: 'POST',
	raw: text,
	headers: JSON_TYPE,
	status,
	fields
});
const expectation = (query: string) => `/teeth/maxillary-first-molar/roots/MB/expectation?${query}`;
const MB = 1024 * 1024;

const CASES: Refused[] = [
	// Addresses
	{ name: 'an unknown tooth', address: '/teeth/wisdom-tooth', status: 404, fields: ['tooth'] },
	{
		name: 'an unknown root',
		address: '/teeth/maxillary-first-molar/roots/X/expectation',
		status: 404,
		fields: ['root']
	},
	{
		name: 'a root of another tooth',
		address: '/teeth/maxillary-canine/roots/MB/expectation',
		status: 404,
		fields: ['root']
	},
	{ name: 'an unknown source', address: '/sources/nobody-1900', status: 404, fields: ['id'] },
	{ name: 'a source with a NUL', address: '/sources/%00', status: 404, fields: ['id'] },
	{ name: 'an unknown entry', address: '/entries/999999999', status: 404, fields: ['id'] },
	{ name: 'an entry id that is none', address: '/entries/1e3', status: 404, fields: ['id'] },
	{ name: 'an unmatched route', address: '/nothing/here', status: 404 },
	{ name: 'the root of the API', address: '', status: 404 },
	{ name: 'an undecodable tooth', address: '/teeth/%E0%A4%A', status: 400 },
	{ name: 'an undecodable source', address: '/sources/%FF%FE', status: 400 },
	{ name: 'an undecodable address that no route has', address: '/%C3%28', status: 400 },
	{ name: 'a prototype property as tooth', address: '/teeth/__proto__', status: 404, fields: ['tooth'] },
	{
		name: 'a prototype property as root',
		address: '/teeth/maxillary-first-molar/roots/constructor/expectation',
		status: 404,
		fields: ['root']
	},
	// Methods
	{ name: 'DELETE of what only answers POST', method: 'DELETE', address: '/pool', status: 405 },
	{ name: 'GET of what only answers POST', address: '/confluence', status: 405 },
	{ name: 'POST to what only answers GET', method: 'POST', address: '/teeth', body: {}, status: 405 },
	// Filters
	{ name: 'an unknown filter', address: expectation('colour=blue'), status: 422, fields: ['colour'] },
	{
		name: 'an unknown method',
		address: expectation('method=cbct&method=guess'),
		status: 422,
		fields: ['method.1']
	},
	{ name: 'reviews as a method', address: expectation('method=review'), status: 422, fields: ['method.0'] },
	{
		name: 'a country nobody sampled',
		address: expectation('country=ATA'),
		status: 422,
		fields: ['country.0']
	},
	{ name: 'a country in words', address: expectation('country=Brazil'), status: 422, fields: ['country.0'] },
	{
		name: 'an unknown source to leave out',
		address: expectation('exclude=nobody-1900'),
		status: 422,
		fields: ['exclude.0']
	},
	{ name: 'a year in words', address: expectation('yearFrom=abc'), status: 422, fields: ['yearFrom'] },
	{
		name: 'years in the wrong order',
		address: expectation('yearFrom=2010&yearTo=2000'),
		status: 422,
		fields: ['yearTo']
	},
	{ name: 'a negative size', address: expectation('minTotal=-5'), status: 422, fields: ['minTotal'] },
	{
		name: 'a size that is no number',
		address: expectation('minTotal=NaN'),
		status: 422,
		fields: ['minTotal']
	},
	{
		name: 'a size given twice',
		address: expectation('minTotal=5&minTotal=6'),
		status: 422,
		fields: ['minTotal']
	},
	// Lists
	{ name: 'entries of an unknown tooth', address: '/entries?tooth=16', status: 422, fields: ['tooth'] },
	{ name: 'entries of an unknown root', address: '/entries?root=XX', status: 422, fields: ['root'] },
	{
		name: 'entries of an unknown measure',
		address: '/entries?measure=hue',
		status: 422,
		fields: ['measure']
	},
	{ name: 'entries by an unknown method', address: '/entries?method=guess', status: 422, fields: ['method'] },
	{
		name: 'entries from an unknown country',
		address: '/entries?country=ATA',
		status: 422,
		fields: ['country']
	},
	{
		name: 'entries of an unknown source',
		address: '/entries?source=nobody-1900',
		status: 422,
		fields: ['source']
	},
	{
		name: 'two slips at once',
		address: '/entries?tooth=16&source=%00',
		status: 422,
		fields: ['tooth', 'source']
	},
	{
		name: 'a search longer than a sentence',
		address: `/entries?q=${'a'.repeat(201)}`,
		status: 422,
		fields: ['q']
	},
	{ name: 'a search given twice', address: '/entries?q=a&q=b', status: 422, fields: ['q'] },
	{
		name: 'an undecodable method',
		address: '/entries?method=%E0%A4%A',
		status: 422,
		fields: ['method']
	},
	{ name: 'a cursor of no list', address: '/entries?cursor=abc', status: 422, fields: ['cursor'] },
	{
		name: 'a cursor that is text of ours, spoilt',
		address: '/sources?cursor=eyJvcmRlciI6ImlkIn0',
		status: 422,
		fields: ['cursor']
	},
	{
		name: 'a cursor that is far too long',
		address: `/entries?cursor=${'a'.repeat(600)}`,
		status: 422,
		fields: ['cursor']
	},
	{ name: 'an unknown order', address: '/entries?sort=colour', status: 422, fields: ['sort'] },
	{ name: 'a page of no entries', address: '/entries?limit=0', status: 422, fields: ['limit'] },
	{ name: 'a page of too many', address: '/entries?limit=100000', status: 422, fields: ['limit'] },
	{ name: 'an unknown field of a list', address: '/sources?colour=blue', status: 422, fields: ['colour'] },
	// The estimator
	confluence('an unknown tooth in a body', { tooth: 'wisdom-tooth' }, ['tooth'], 404),
	confluence('an unknown root in a body', { root: 'X' }, ['root'], 404),
	confluence('more canals than the anatomy allows', { canals: 4 }, ['canals']),
	confluence('no canal', { canals: 0 }, ['canals']),
	confluence('half a canal', { canals: 1.5 }, ['canals']),
	confluence('a negative number of canals', { canals: -2 }, ['canals']),
	confluence('a number of canals as text', { canals: '2' }, ['canals']),
	confluence('canals that are yes', { canals: true }, ['canals']),
	confluence('canals in words', { canals: 'two' }, ['canals']),
	confluence('canals that are a list', { canals: [2] }, ['canals']),
	confluence('canals left out', { canals: undefined }, ['canals']),
	confluence('canals that are null, as NaN is written in JSON', { canals: NaN }, ['canals']),
	confluence('a huge number of canals', { canals: 1e300 }, ['canals']),
	confluence('more orifices than the anatomy allows', { orifices: 9 }, ['orifices']),
	confluence('no orifice', { orifices: 0 }, ['orifices']),
	confluence('orifices that no sequence of one canal has', { canals: 1, orifices: 4 }, ['orifices']),
	confluence('orifices as text', { orifices: '2' }, ['orifices']),
	confluence('a tooth that is a number', { tooth: 16 }, ['tooth']),
	confluence('a tooth left out', { tooth: undefined }, ['tooth']),
	confluence('a root that is null', { root: null }, ['root']),
	confluence('the root of another tooth', { root: 'DL' }, ['root'], 404),
	confluence('an unknown search', { search: 'telepathy' }, ['search']),
	confluence('a threshold below a half', { threshold: 0.2 }, ['threshold']),
	confluence('a threshold of one', { threshold: 1 }, ['threshold']),
	confluence('a threshold as text', { threshold: '0.9' }, ['threshold']),
	confluence('an extra field', { colour: 'blue' }, ['colour']),
	confluence('findings that are no list', { findings: 'cone-mark' }, ['findings']),
	confluence('findings left out', { findings: undefined }, ['findings']),
	confluence('a finding that is null', { findings: [null] }, ['findings.0']),
	confluence('a finding without its result', { findings: [{ test: 'draw' }] }, ['findings.0.result']),
	confluence('thirteen findings', { findings: Array.from({ length: 13 }, () => finding()) }, ['findings']),
	confluence('an unknown test', { findings: [finding({ test: 'dowsing' })] }, ['findings.0.test']),
	confluence('an unknown result', { findings: [finding({ result: 'maybe' })] }, ['findings.0.result']),
	confluence('an extra field of a finding', { findings: [finding({ colour: 'blue' })] }, [
		'findings.0.colour'
	]),
	confluence('two findings of one kind', { findings: [finding(), finding({ result: 'negative' })] }, [
		'findings.1.test'
	]),
	confluence('a joining finding with one canal', { canals: 1, findings: [finding()] }, ['findings.0.test']),
	confluence('three canals without naming the two', { canals: 3, findings: [finding()] }, [
		'findings.0.pair'
	]),
	confluence('a pair of one canal', { canals: 3, findings: [finding({ pair: 'MB1-MB1' })] }, [
		'findings.0.pair'
	]),
	confluence('a pair that is a list', { canals: 3, findings: [finding({ pair: ['MB1', 'MB2'] })] }, [
		'findings.0.pair'
	]),
	confluence('an unknown number of roots', { ...PREMOLAR, rootsSeen: 'three' }, ['rootsSeen']),
	confluence('two roots of a whole premolar', { ...PREMOLAR, rootsSeen: 'two' }, ['rootsSeen']),
	confluence('the buccal root of a premolar with one', { ...PREMOLAR, root: 'B', rootsSeen: 'one' }, [
		'rootsSeen'
	]),
	confluence('roots seen of a molar', { rootsSeen: 'two' }, ['rootsSeen']),
	confluence('a filter of a body that is unknown', { filters: { colour: 'blue' } }, ['filters.colour']),
	confluence('years in the wrong order, in a body', { filters: { yearFrom: 2010, yearTo: 2000 } }, [
		'filters.yearTo'
	]),
	confluence('numbers of a filter as text', { filters: { yearFrom: '1990', minTotal: '50' } }, [
		'filters.yearFrom',
		'filters.minTotal'
	]),
	confluence('an unknown method in a body', { filters: { methods: ['cbct', 'guess'] } }, [
		'filters.methods.1'
	]),
	confluence('an unknown source in a body', { filters: { exclude: ['nobody-1900'] } }, ['filters.exclude.0']),
	confluence('filters that are a list', { filters: [] }, ['filters']),
	confluence('a country nobody sampled, in a body', { filters: { countries: ['ATA'] } }, [
		'filters.countries.0'
	]),
	// Pooling
	pool('more events than the total', { studies: [{ events: 5, total: 3 }] }, ['studies.0.events']),
	pool('negative events', { studies: [{ events: -1, total: 3 }] }, ['studies.0.events']),
	pool('a total of none', { studies: [{ events: 0, total: 0 }] }, ['studies.0.total']),
	pool('a total beyond reason', { studies: [{ events: 1, total: 1e12 }] }, ['studies.0.total']),
	pool('half a root', { studies: [{ events: 0.5, total: 3 }] }, ['studies.0.events']),
	pool('numbers as text', { studies: [{ events: '1', total: '3' }] }, [
		'studies.0.events',
		'studies.0.total'
	]),
	pool('no study', { studies: [] }, ['studies']),
	pool('too many studies', { studies: Array.from({ length: 2001 }, () => ({ events: 1, total: 2 })) }, [
		'studies'
	]),
	pool('a level of two', { studies: [{ events: 1, total: 2 }], level: 2 }, ['level']),
	pool('a level as text', { studies: [{ events: 1, total: 2 }], level: '0.95' }, ['level']),
	pool('an extra field of a study', { studies: [{ events: 1, total: 2, weight: 3 }] }, ['studies.0.weight']),
	pool('studies left out', {}, ['studies']),
	pool('a level of one', { studies: [{ events: 1, total: 2 }], level: 1 }, ['level']),
	pool('a body that is a list', [], ['']),
	pool('a body that is null', null, ['']),
	raw('a number beyond any', '{"studies":[{"events":1e999,"total":3}]}', 422, ['studies.0.events']),
	raw('NaN, which JSON does not have', '{"studies":[{"events":NaN,"total":3}]}', 400),
	raw('malformed JSON', '{"studies":', 400),
	raw('an empty body', '', 400),
	raw('1 MB of JSON', JSON.stringify({ studies: [], padding: 'x'.repeat(MB) }), 413),
	raw('more than the server takes at all', JSON.stringify({ studies: [], padding: 'x'.repeat(3 * MB) }), 413),
	raw('JSON nested ten thousand deep', `{"studies":${'['.repeat(10_000)}${']'.repeat(10_000)}}`, 422, [
		'studies.0'
	]),
	// Senders
	{
		name: 'text instead of JSON',
		address: '/pool',
		method: 'POST',
		raw: '{}',
		headers: { 'content-type': 'text/csv' },
		status: 415
	},
	{
		name: 'a form',
		address: '/pool',
		method: 'POST',
		raw: 'a=1',
		headers: { 'content-type': 'application/x-www-form-urlencoded' },
		status: 415
	},
	{
		name: 'a body without a type',
		address: '/confluence',
		method: 'POST',
		raw: '{}',
		headers: { 'content-type': '' },
		status: 415
	},
	{
		name: 'a page of another site',
		address: '/pool',
		body: { studies: [] },
		headers: { origin: 'https://elsewhere.example' },
		status: 403
	},
	{
		name: 'a sandboxed page',
		address: '/pool',
		body: { studies: [] },
		headers: { origin: 'null' },
		status: 403
	}
];

testRefusals(CASES);

test('odd words are searched for as they are', async ({ request }) => {
	for (const words of ["' OR 1=1 --", '%', '_', '\\', '\u0000', '"', ';', '🦷', '$1 :q ?'])
		for (const list of ['entries', 'sources']) {
			const response = await request.get(`${API}/${list}?q=${encodeURIComponent(words)}`);
			expect(response.status(), `${list} ${words}`).toBe(200);
		}
});

test.describe('pages', () => {
	for (const [address, status] of [
		['/teeth/wisdom-tooth', 404],
		['/teeth/maxillary-first-molar/X', 404],
		['/teeth/maxillary-first-molar/X/join', 404],
		['/sources/nobody-1900', 404],
		['/sources/%00', 404],
		['/nothing', 404],
		[`/teeth/%E0%A4%A`, 400],
		[`${ROOT}?country=Brazil&yearFrom=x&colour=blue`, 200],
		[`${ROOT}/join?canals=NaN&cone-mark=perhaps&threshold=x`, 200],
		[`${ROOT}/join?canals=99999999999999999999&orifices=-1`, 200],
		[`${NO_EVIDENCE}/join?canals=3&draw=positive&draw-pair=%00`, 200],
		[`/?q=${'x'.repeat(5000)}`, 200],
		['/?q=%00%F0%9F%A6%B7', 200]
	] as const) {
		test(`${address.slice(0, 60)} answers ${status}`, async ({ request }) => {
			const response = await request.get(address);
			expect(response.status()).toBe(status);
		});
	}
});
