import { join as words } from '$lib/strings/join';
import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import { inventedAnswer } from '../../../../tests/support/confluenceAnswer';
import Account from './Account.svelte';
import { adviceOf } from './advice';
import AdviceBox from './AdviceBox.svelte';
import NextTests from './NextTests.svelte';
import RecordPanel from './RecordPanel.svelte';
import { JOIN_FORM } from './state';
import StatusLine from './StatusLine.svelte';

const clean = (body: string) => body.replaceAll('\u00a0', ' ').replaceAll(/<!--.*?-->/g, '');
const text = (body: string) =>
	clean(body)
		.replaceAll(/<[^>]*>/g, ' ')
		.replaceAll(/\s+/g, ' ')
		.trim();
const buttons = (body: string) =>
	[...body.matchAll(/<button[^>]*>/g)].map(([tag]) => ({
		value: /value="([^"]*)"/.exec(tag)?.[1],
		label: /aria-label="([^"]*)"/.exec(tag)?.[1],
		form: /form="([^"]*)"/.exec(tag)?.[1],
		disabled: tag.includes('aria-disabled="true"')
	}));

describe('the account', () => {
	const { body } = render(Account, { props: { answer: inventedAnswer(), sources: {} } });
	const steps = clean(body).split('<li class="break-inside-avoid').slice(1).map(text);

	it('says what each finding left, with its range', () => {
		expect(steps).toHaveLength(4);
		expect(steps[0]).toContain(words.start);
		expect(steps[0]).toContain('60 % (27 to 88 %)');
		expect(steps[1]).toContain('1. Cone mark: positive');
		expect(steps[1]).toContain('96 % (82 to 99 %)');
		expect(steps[3]).toContain('4 % (1 to 17 %)');
	});

	it('says why, and whether that is assumed or whose it is', () => {
		expect(steps[1]).toContain('expected in 85 % of roots whose canals meet and in 5 % of those');
		expect(steps[1]).toContain(words.speaks.for);
		expect(steps[1]).toContain(words.accuracyAssumed);
		expect(steps[2]).toContain(words.unclearSays);
		expect(steps[3]).toContain(words.speaks.against);
		expect(steps[3]).toContain('A note on this step.');
		expect(steps[3]).not.toContain(words.accuracyAssumed);
		expect(body).toContain('href="/sources/someone-2020"');
	});

	it('has buttons that belong to the form and work without JavaScript; those at the ends are told to be idle', () => {
		const all = buttons(body);
		expect(all.map(({ value }) => value)).toEqual([
			...['up:cone-mark', 'down:cone-mark', 'remove:cone-mark'],
			...['up:draw', 'down:draw', 'remove:draw'],
			...['up:file-contact', 'down:file-contact', 'remove:file-contact']
		]);
		expect(new Set(all.map(({ form }) => form))).toEqual(new Set([JOIN_FORM]));
		expect(all.filter(({ disabled }) => disabled).map(({ value }) => value)).toEqual([
			'up:cone-mark',
			'down:file-contact'
		]);
		expect(new Set(all.map(({ label }) => label)).size).toBe(9);
	});
});

describe('what would settle it', () => {
	it('gives information, effort and outcome of each test, and a button for each result', () => {
		const { body } = render(NextTests, { props: { next: inventedAnswer().next } });
		const said = text(body);
		expect(said).toContain('0.02 bits');
		expect(said).toContain('little effort, no radiation');
		expect(said).toContain('probability 70 %, then a shared exit is 97 %');
		expect(buttons(body)).toEqual([
			{
				value: 'positive:two-files',
				label: 'Positive: only one at a time (two files together)',
				form: JOIN_FORM,
				disabled: false
			},
			{
				value: 'negative:two-files',
				label: 'Negative: both at length (two files together)',
				form: JOIN_FORM,
				disabled: false
			}
		]);
	});
});

describe('the advice', () => {
	const undecided = { threshold: 0.9, advice: 'undecided', furtherTestingCanChangeIt: false } as const;

	it('stands with its own cautions, the line in force and whether testing can change it', () => {
		const answer = inventedAnswer();
		const said = text(render(AdviceBox, { props: { answer, line: { value: 0.9, from: 'address' } } }).body);
		expect(said).toContain('Treat as joined');
		expect(said).toContain('A caution of this answer alone.');
		expect(said).toContain('The line is at 90 % for a shared exit, as set here.');
		expect(said).toContain(words.advice.open);
		expect(said).not.toContain(words.advice.heldBack);
	});

	it('says that assumed findings alone reach the line', () => {
		expect(adviceOf(inventedAnswer({ decision: undecided })).heldBack).toBe(true);
		expect(adviceOf(inventedAnswer({ decision: { ...undecided, threshold: 0.97 } })).heldBack).toBe(false);
	});

	it('is none without evidence, or with one canal', () => {
		const decision = { threshold: 0.9, advice: null, furtherTestingCanChangeIt: null };
		const none = inventedAnswer({ decision });
		expect(adviceOf(none)).toMatchObject({ sentence: words.advice.sentences.none, open: null });
		const evidence = { studies: 0, sources: [], borrowed: [] };
		expect(adviceOf(inventedAnswer({ decision, evidence })).sentence).toBe(words.advice.sentences.noEvidence);
	});

	it('is said in a sentence whenever it changes, with the fates worth hearing', () => {
		const { body } = render(StatusLine, { props: { answer: inventedAnswer() } });
		expect(body).toContain('role="status"');
		expect(text(body)).toBe(
			'Treat as joined. Meet and share one exit: 94 %, 81 to 99 %; Meet, then part again: 2 %, 0 to 5 %; Stay separate: 4 %, 1 to 17 %.'
		);
		expect(text(render(StatusLine, { props: { answer: null } }).body)).toBe('');
	});
});

describe('the record', () => {
	it('can be selected without JavaScript, and offers no button that would do nothing', () => {
		const { body } = render(RecordPanel, { props: { text: 'one < two\nthree' } });
		expect(body).toMatch(/<textarea[^>]* readonly[^>]*>one &lt; two\nthree<\/textarea>/);
		expect(body).not.toContain('<button');
	});
});
