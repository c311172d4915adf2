import { mailFooter, type MailWords } from '$lib/strings/mail';

/** A message as it goes out. */
export interface Rendered {
	subject: string;
	text: string;
	html: string;
}

/** Plain text and HTML of a message, both from the same words, so that neither says what the other does not. */
export function renderMail(words: MailWords, product: string, origin: string): Rendered {
	const { subject, paragraphs, points = [], action, after = [] } = words;
	const footer = mailFooter(product, origin);
	const text = [
		...paragraphs,
		...(points.length > 0 ? [points.map((point) => `- ${point}`).join('\n')] : []),
		...(action ? [`${action.label}:\n${action.link}`] : []),
		...after,
		`--\n${footer}`
	].join('\n\n');
	const paragraph = (words: string) => `<p style="margin:0 0 16px">${lines(words)}</p>`;
	const html = [
		`<!doctype html><html lang="en"><head><meta charset="utf-8"><title>${escape(subject)}</title></head>`,
		'<body style="margin:0;padding:24px;font-family:sans-serif;font-size:16px;line-height:1.6;color:#14263b;background:#fffefa">',
		'<div style="max-width:560px">',
		...paragraphs.map(paragraph),
		...(points.length > 0 ? [`<ul>${points.map((point) => `<li>${lines(point)}</li>`).join('')}</ul>`] : []),
		...(action
			? [
					`<p style="margin:24px 0"><a href="${escape(action.link)}" style="display:inline-block;padding:12px 20px;border-radius:6px;background:#1d5c94;color:#fffefa;font-weight:600;text-decoration:none">${escape(action.label)}</a></p>`,
					`<p style="margin:0 0 16px;font-size:14px">${escape(action.link)}</p>`
				]
			: []),
		...after.map(paragraph),
		`<p style="margin:24px 0 0;padding-top:16px;border-top:1px solid #d8cfbc;font-size:14px;color:#44566b">${escape(footer)}</p>`,
		'</div></body></html>'
	].join('\n');
	return { subject, text, html };
}

const ENTITIES: Record<string, string> = {
	'&': '&amp;',
	'<': '&lt;',
	'>': '&gt;',
	'"': '&quot;',
	"'": '&#39;'
};
const escape = (text: string) => text.replace(/[&<>"']/g, (character) => ENTITIES[character]);
const lines = (text: string) => escape(text).replace(/\r?\n/g, '<br>');
