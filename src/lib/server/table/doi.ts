/** Everything that asks Crossref's REST API: what a DOI names, and whether a notice has retracted it. */
import { z } from 'zod';
import { environment } from '../config';
import type { CslSource } from './literatureFiles';

const TIMEOUT_MS = 8_000;
/** An answer about one work is some kilobytes; with a long list of references, hundreds. */
const MOST_BYTES = 4_000_000;
/** Kinds of notice that withdraw a work, as Crossref names them. */
const RETRACTING = /^(retraction|withdrawal|removal|retracted|partial_retraction)$/i;

/** A notice that retracts a work. */
export interface RetractionNotice {
	/** DOI of the notice. */
	doi: string;
	kind: string;
	/** ISO date, or empty where none is given. */
	date: string;
}

export type DoiAnswer =
	| { found: true; csl: CslSource; retraction: RetractionNotice | null }
	| {
			found: false;
			reason: 'not configured' | 'not a DOI' | 'unknown' | 'timed out' | 'unreachable' | 'nonsense';
	  };

/**
 * A DOI in the form in which two are compared: without resolver, in small letters (DOI Handbook, 2.4: DOIs are not case-sensitive).
 * @returns null for a text that holds no DOI
 */
export function normaliseDoi(text: string): string | null {
	const bare = text
		.trim()
		.replace(/^(https?:\/\/)?(dx\.)?doi\.org\//i, '')
		.replace(/^doi:\s*/i, '');
	let decoded = bare;
	try {
		if (/%[0-9a-f]{2}/i.test(bare)) decoded = decodeURIComponent(bare);
	} catch {
		// A percent sign of its own: the text as it is.
	}
	return /^10\.\d{4,9}\/\S+$/.test(decoded) && decoded.length <= 300 ? decoded.toLowerCase() : null;
}

const dateSchema = z.object({ 'date-parts': z.array(z.array(z.number().nullable())) }).partial();
const texts = z.union([z.string(), z.array(z.string())]).optional();
const noticeSchema = z.object({
	DOI: z.string(),
	type: z.string().optional(),
	updated: dateSchema.optional()
});
const workSchema = z.object({
	DOI: z.string(),
	type: z.string().optional(),
	title: texts,
	'container-title': texts,
	author: z
		.array(
			z.object({ given: z.string().optional(), family: z.string().optional(), name: z.string().optional() })
		)
		.optional(),
	issued: dateSchema.optional(),
	volume: z.string().optional(),
	issue: z.string().optional(),
	page: z.string().optional(),
	publisher: z.string().optional(),
	'updated-by': z.array(noticeSchema).optional(),
	'update-to': z.array(noticeSchema).optional()
});
type Work = z.infer<typeof workSchema>;

/** Crossref's own names of types where CSL has another. */
const CSL_TYPES: Record<string, string> = {
	'journal-article': 'article-journal',
	'book-chapter': 'chapter',
	'proceedings-article': 'paper-conference',
	dissertation: 'thesis',
	monograph: 'book',
	'edited-book': 'book',
	'posted-content': 'article'
};

const first = (value: string | string[] | undefined): string | undefined => {
	const text = typeof value === 'string' ? value : value?.[0];
	// Titles come with the publisher's markup and line breaks.
	const plain = text
		?.replace(/<[^>]*>/g, '')
		.replace(/\s+/g, ' ')
		.trim();
	return plain === '' ? undefined : plain;
};

/** What is Crossref's of a work, as CSL-JSON. */
function toCsl(work: Work): CslSource {
	const title = first(work.title);
	const journal = first(work['container-title']);
	const author = work.author
		?.map(({ given, family, name }) =>
			name && !family ? { literal: name } : { ...(family && { family }), ...(given && { given }) }
		)
		.filter((names) => Object.keys(names).length > 0);
	const parts = work.issued?.['date-parts']?.[0]?.filter((part) => part !== null);
	const type = work.type ?? 'article-journal';
	return {
		id: '',
		type: CSL_TYPES[type] ?? type,
		...(title && { title }),
		...(author && author.length > 0 && { author }),
		...(parts && parts.length > 0 && { issued: { 'date-parts': [parts] } }),
		...(journal && { 'container-title': journal }),
		...(work.volume && { volume: work.volume }),
		...(work.issue && { issue: work.issue }),
		...(work.page && { page: work.page }),
		...(work.publisher && !journal && { publisher: work.publisher }),
		DOI: work.DOI.toLowerCase()
	};
}

function toNotice({ DOI, type = '', updated }: z.infer<typeof noticeSchema>): RetractionNotice {
	const [year, month, day] = updated?.['date-parts']?.[0] ?? [];
	const date = [year, month, day]
		.filter((part) => typeof part === 'number')
		.map((part) => String(part).padStart(2, '0'))
		.join('-');
	return { doi: DOI.toLowerCase(), kind: type, date };
}

class AskFailure extends Error {
	constructor(readonly reason: 'unknown' | 'timed out' | 'unreachable' | 'nonsense') {
		super(reason);
	}
}

/** Asks for JSON; never follows a redirect, so that only the configured host is ever asked. */
async function ask(address: string): Promise<unknown> {
	const signal = AbortSignal.timeout(TIMEOUT_MS);
	try {
		const response = await fetch(`${environment.CROSSREF_URL!.replace(/\/+$/, '')}${address}`, {
			signal,
			redirect: 'error',
			headers: { accept: 'application/json', 'user-agent': 'Watersmeet' }
		});
		if (response.status === 404) {
			await response.body?.cancel();
			throw new AskFailure('unknown');
		}
		if (!response.ok) {
			await response.body?.cancel();
			throw new AskFailure('unreachable');
		}
		return JSON.parse(await readLimited(response)) as unknown;
	} catch (error) {
		if (error instanceof AskFailure) throw error;
		if (signal.aborted) throw new AskFailure('timed out');
		throw new AskFailure(error instanceof SyntaxError ? 'nonsense' : 'unreachable');
	}
}

async function readLimited(response: Response): Promise<string> {
	const chunks: Uint8Array[] = [];
	let size = 0;
	for await (const chunk of response.body as unknown as AsyncIterable<Uint8Array>) {
		size += chunk.byteLength;
		if (size > MOST_BYTES) throw new AskFailure('nonsense');
		chunks.push(chunk);
	}
	return Buffer.concat(chunks).toString('utf8');
}

const listSchema = z.object({ message: z.object({ items: z.array(workSchema) }) });

/** The notice that retracts a work: named in its own record, or found among the notices that name it. */
async function findRetraction(work: Work): Promise<RetractionNotice | null> {
	const named = work['updated-by']?.find(({ type }) => RETRACTING.test(type ?? ''));
	if (named) return toNotice(named);
	const answer = listSchema.safeParse(
		await ask(`/works?${new URLSearchParams({ filter: `updates:${work.DOI}`, rows: '20' })}`)
	);
	// The record itself is good: a list that cannot be read is no reason to refuse it, nor to call the work retracted.
	if (!answer.success) return null;
	for (const item of answer.data.message.items) {
		const update = item['update-to']?.find(
			({ DOI, type }) => DOI.toLowerCase() === work.DOI.toLowerCase() && RETRACTING.test(type ?? '')
		);
		if (update) return { ...toNotice(update), doi: item.DOI.toLowerCase() };
	}
	return null;
}

/**
 * What Crossref knows of a DOI.
 * @param text a DOI as people write it: bare, with `doi:`, or as an address
 * @returns CSL-JSON (its `id` empty) and the retraction, if there is one; or why there is no answer. Never throws
 */
export async function lookUpDoi(text: string): Promise<DoiAnswer> {
	const doi = normaliseDoi(text);
	if (doi === null) return { found: false, reason: 'not a DOI' };
	if (!environment.CROSSREF_URL) return { found: false, reason: 'not configured' };
	try {
		const answer = z
			.object({ message: workSchema })
			.safeParse(await ask(`/works/${encodeURIComponent(doi)}`));
		if (!answer.success || normaliseDoi(answer.data.message.DOI) !== doi)
			return { found: false, reason: 'nonsense' };
		const work = answer.data.message;
		const retraction = await findRetraction(work).catch(() => null);
		return { found: true, csl: toCsl(work), retraction };
	} catch (error) {
		return { found: false, reason: error instanceof AskFailure ? error.reason : 'unreachable' };
	}
}
