import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { startFakeCrossref } from '../../../cli/fakeCrossref.js';
import { environment } from '../config';
import { lookUpDoi, normaliseDoi } from './doi';

let crossref: Awaited<ReturnType<typeof startFakeCrossref>>;
beforeAll(async () => {
	crossref = await startFakeCrossref();
	environment.CROSSREF_URL = crossref.url;
});
afterAll(async () => {
	environment.CROSSREF_URL = undefined;
	await crossref.stop();
});

describe('a DOI', () => {
	// DOI Handbook, 2.4 and 2.6: compared without regard to case; shown as an address or after "doi:".
	it.each([
		'10.5555/AbC',
		'doi:10.5555/abc',
		'https://doi.org/10.5555/abc',
		'http://dx.doi.org/10.5555%2Fabc',
		' 10.5555/abc '
	])('written as %j is one and the same', (text) => expect(normaliseDoi(text)).toBe('10.5555/abc'));
	it.each(['', '10.5555', 'abc', '11.5555/abc', '10.5555/a b'])('is not %j', (text) =>
		expect(normaliseDoi(text)).toBeNull()
	);
});

describe('looking a DOI up', () => {
	it('gives the source as CSL-JSON', async () => {
		expect(await lookUpDoi('https://doi.org/10.5555/WM.2021.001')).toEqual({
			found: true,
			retraction: null,
			csl: {
				...{ id: '', type: 'article-journal', volume: '12', issue: '3', page: '101-110' },
				...{ DOI: '10.5555/wm.2021.001', issued: { 'date-parts': [[2021, 3, 14]] } },
				title: 'Canal systems of mandibular first molars in an invented population',
				'container-title': 'Journal of Invented Anatomy',
				author: [
					{ family: 'Vandermeer', given: 'Ilse' },
					{ family: 'Quiroga', given: 'Tomás' },
					{ literal: 'Invented Root Study Group' }
				]
			}
		});
	});

	it('finds the notice that retracts it, in its own record or among those that name it', async () => {
		expect(await lookUpDoi('10.5555/wm.2016.044')).toMatchObject({
			retraction: { doi: '10.5555/wm.2019.901', kind: 'retraction', date: '2019-01-09' }
		});
		expect(await lookUpDoi('10.5555/wm.2015.017')).toMatchObject({
			retraction: { doi: '10.5555/wm.2018.900', kind: 'retraction', date: '2018-05-02' }
		});
	});

	it.each([
		['10.5555/nobody', 'unknown'],
		['10.5555/nonsense', 'nonsense'],
		['not a doi', 'not a DOI']
	])('%s is answered with "%s"', async (doi, reason) => {
		expect(await lookUpDoi(doi)).toEqual({ found: false, reason });
	});

	it('that is not answered in time, by nobody, or not set up, says so', async () => {
		const timeout = vi.spyOn(AbortSignal, 'timeout').mockReturnValue(AbortSignal.abort());
		expect(await lookUpDoi('10.5555/slow')).toEqual({ found: false, reason: 'timed out' });
		timeout.mockRestore();
		environment.CROSSREF_URL = 'http://127.0.0.1:1';
		expect(await lookUpDoi('10.5555/abc')).toEqual({ found: false, reason: 'unreachable' });
		environment.CROSSREF_URL = undefined;
		expect(await lookUpDoi('10.5555/abc')).toEqual({ found: false, reason: 'not configured' });
	});
});
