import { MAIL_KINDS } from '$lib/schemas/terms';
import { mailWords, type MailData } from '$lib/strings/mail';
import { describe, expect, it } from 'vitest';
import { renderMail } from './render';

const LINK = 'https://canals.example.org/x?a=1&b=2';
const examples: MailData = {
	invitation: { inviter: 'Ada', roles: ['educator', 'dentist'], link: LINK, until: 'tomorrow' },
	reset: { name: 'Ada', link: LINK, until: 'tomorrow' },
	'e-mail change': { name: 'Ada', link: LINK, until: 'tomorrow' },
	'e-mail change notice': { name: 'Ada', newAddress: 'new@example.org' },
	'review asked': { author: 'Ada', entry: 'Made-up 2001, MB root', note: 'Table 2 is unclear.', link: LINK },
	'entry returned': {
		reviewer: 'Ben',
		entry: 'Made-up 2001',
		reasons: ['Sum is 101', 'Page is missing'],
		link: LINK
	},
	'entry published': { reviewer: 'Ben', entry: 'Made-up 2001', link: LINK }
};

/** The text of HTML, as a reader sees it. */
const seen = (html: string) =>
	html
		.replace(/<head>.*<\/head>/s, '')
		.replace(/<[^>]+>/g, ' ')
		.replaceAll('&amp;', '&')
		.replaceAll('&#39;', "'")
		.replace(/\s+/g, ' ');

describe.each(MAIL_KINDS)('the mail "%s"', (kind) => {
	const words = (mailWords[kind] as (data: unknown, product: string) => ReturnType<typeof mailWords.reset>)(
		examples[kind],
		'Watersmeet at Canal School'
	);
	const { subject, text, html } = renderMail(
		words,
		'Watersmeet at Canal School',
		'https://canals.example.org'
	);

	it('says the same in text and HTML', () => {
		expect(subject).not.toBe('');
		const lines = text.split(/\n+/).filter((line) => line !== '--');
		expect(lines.length).toBeGreaterThan(2);
		for (const line of lines) expect(seen(html)).toContain(line.replace(/^- |:$/g, ''));
		expect(text).not.toMatch(/undefined|\[object/);
	});

	it('has its link written out and to press, where it has one', () => {
		const { link } = examples[kind] as { link?: string };
		expect(text.includes(LINK)).toBe(link !== undefined);
		expect(html.includes('href="https://canals.example.org/x?a=1&amp;b=2"')).toBe(link !== undefined);
	});
});

describe('a mail', () => {
	it('runs nothing that somebody typed', () => {
		const nasty = '<img src=x onerror=alert(1)> & "quotes"';
		const words = mailWords['entry returned'](
			{ reviewer: nasty, entry: nasty, reasons: [nasty, 'two\nlines'], link: LINK },
			nasty
		);
		const { html, text } = renderMail(words, nasty, 'https://canals.example.org');
		expect(html).not.toContain('<img');
		expect(html).toContain('two<br>lines');
		expect(text).toContain(nasty);
	});
});
