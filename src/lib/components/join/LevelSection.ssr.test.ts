import type { ConfluenceDto } from '$lib/schemas/confluence';
import type { LevelDto } from '$lib/schemas/level';
import { level as words } from '$lib/strings/level';
import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import LevelSection from './LevelSection.svelte';
import type { LevelErrors } from './levelState';
import { readState } from './state';

const ADDRESS =
	'canals=2&search=microscope&draw=negative&cone-mark=positive&wl1=20.5&wl2=19.5&mark=3&shortfall=1.2&shapedTo=full&tip=25&taper=6+%25';

const answer: LevelDto = {
	tableRevision: 1,
	level: { mean: 2.39, sd: 0.41, interval: [1.59, 3.19] },
	prior: 'flat',
	measurements: [
		{ kind: 'cone-mark', level: 3, sd: 0.5, assumed: true, sources: [] },
		{ kind: 'cone-shortfall', level: 1.2, sd: 0.7, assumed: false, sources: ['someone-2020'] }
	],
	secondLength: { mean: 17.11, interval: [16.31, 17.91] },
	coneCutFromTip: 2.39,
	diameterAtConfluence: 0.3934,
	coneNotes: [],
	disagreement: { pValue: 0.0364, consistent: false },
	assumed: ['cone-mark'],
	notes: ['A note.'],
	cautions: []
};
type Advice = NonNullable<ConfluenceDto['decision']>['advice'];

function html(
	advice: Advice,
	changes: { answer?: LevelDto | null; errors?: LevelErrors; address?: string } = {}
) {
	const confluence = { decision: { threshold: 0.9, advice, furtherTestingCanChangeIt: true } };
	const { body } = render(LevelSection, {
		props: {
			state: readState(new URLSearchParams(changes.address ?? ADDRESS)),
			answer: changes.answer === undefined ? answer : changes.answer,
			errors: changes.errors ?? {},
			confluence: confluence as ConfluenceDto,
			published: { mm: 2.5, range: [1, 4], source: 'weine-1969', locator: 'summary' },
			sources: {},
			here: '/teeth/maxillary-first-molar/MB/join',
			show: () => undefined
		}
	});
	return body.replaceAll('\u00a0', ' ').replaceAll(/<!--.*?-->/g, '');
}
const text = (body: string) =>
	body
		.replaceAll(/<[^>]*>/g, ' ')
		.replaceAll(/\s+/g, ' ')
		.trim();

describe('the level of the confluence', () => {
	it('says level, second length and cut with their ranges', () => {
		const said = text(html('treat-as-joined'));
		expect(said).toContain('2.4 mm above the common end (1.6 to 3.2 mm)');
		expect(said).toContain('17.1 mm (16.3 to 17.9 mm)');
		expect(said).toContain(words.looksShort);
		expect(said).toContain('Cut 2.4 mm off its tip: the canal is 0.39 mm wide');
	});

	it('warns first unless the advice is to treat the canals as joined', () => {
		expect(text(html('treat-as-joined'))).not.toContain(words.onlyIf);
		for (const advice of ['treat-as-separate', 'undecided', null] as const) {
			const said = text(html(advice));
			const warning = said.indexOf(words.warnings[advice ?? 'none']);
			expect(warning).toBeGreaterThan(0);
			expect(said.indexOf('above the common end (')).toBeGreaterThan(warning);
			expect(said).toContain(words.onlyIf);
		}
	});

	it('says that measurements contradict each other, or agree', () => {
		expect(text(html('treat-as-joined'))).toContain('contradict each other (p = 0.036)');
		const agreeing = { ...answer, disagreement: { pValue: 0.4, consistent: true } };
		const said = text(html('treat-as-joined', { answer: agreeing }));
		expect(said).toContain('agree with each other (p = 0.40)');
		expect(said).not.toContain('contradict');
	});

	it('marks assumed standard deviations, and only these', () => {
		const said = text(html('treat-as-joined'));
		expect(said).toContain(
			'Mark on the cone: level 3 mm, standard deviation 0.5 mm (assumed, not published)'
		);
		expect(said).toMatch(/Second cone stops short: level 1.2 mm, standard deviation 0.7 mm(?! \()/);
		expect(said).toContain('Published for this root: 1 to 4 mm above the apex');
	});

	it('draws the picture with a text alternative that says its numbers', () => {
		const body = html('treat-as-joined');
		expect(body).toContain('role="img"');
		expect(body).toContain(words.describe(2.39, [1.59, 3.19], 17.11, 2.39).replaceAll('\u00a0', ' '));
		expect(body).not.toMatch(/ style=/);
	});

	it('asks where no cut can be proposed', () => {
		const open = { ...answer, coneCutFromTip: null, diameterAtConfluence: null };
		expect(text(html('treat-as-joined', { answer: open }))).toContain(words.askSizes);
		const unknown = ADDRESS.replace('&shapedTo=full', '');
		expect(text(html('treat-as-joined', { answer: open, address: unknown }))).toContain(words.askShaped);
	});
});

describe('its form', () => {
	it('keeps the findings in their order and what was typed', () => {
		const body = html('undecided');
		const hidden = [...body.matchAll(/<input type="hidden" name="([^"]+)" value="([^"]+)"/g)].map((m) =>
			m.slice(1)
		);
		expect(hidden).toEqual([
			['canals', '2'],
			['search', 'microscope'],
			['draw', 'negative'],
			['cone-mark', 'positive']
		]);
		for (const value of ['20.5', '19.5', '1.2', '6 %']) expect(body).toContain(`value="${value}"`);
		expect(body).toMatch(/value="full"[^>]* checked/);
		expect(body).toContain('action="/teeth/maxillary-first-molar/MB/join#level"');
	});

	it('puts an error at its field', () => {
		const body = html('undecided', { answer: null, errors: { wl2: ['Give the working length.'] } });
		expect(body).toMatch(/name="wl2"[^>]*aria-describedby="wl2-error"[^>]*aria-invalid="true"/);
		expect(body).toMatch(/id="wl2-error"[^>]*>\s*<p>Give the working length\./);
		expect(text(body)).toContain(words.wholeError);
	});

	it('waits where nothing was typed', () => {
		const said = text(html('undecided', { answer: null, address: 'canals=3' }));
		expect(said).toContain(words.waiting);
		expect(said).toContain(words.leadThree);
	});
});
