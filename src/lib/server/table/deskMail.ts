/** The mails of the desk. A mail that cannot be queued never undoes what it tells of. */
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import type { EntryContent } from '$lib/entry/content';
import { environment } from '../config';
import { Person, PersonRole } from '../db/models/people';
import { sendMail } from '../mail/queue';
import { log } from '../log';

const nameOf = ({ source, tooth, root }: EntryContent): string =>
	[source, toothOf(tooth)?.name, rootOf(tooth, root)?.name ?? root].filter(Boolean).join(', ');

const linkTo = (address: string) => new URL(address, environment.ORIGIN).href;

async function quietly(work: () => Promise<void>): Promise<void> {
	try {
		await work();
	} catch (error) {
		log.error({ err: error }, 'a mail of the desk could not be queued');
	}
}

/** Addresses of the educators who may review: active, and not among those who wrote it. */
async function reviewersBut(editors: readonly string[]): Promise<string[]> {
	const roles = await PersonRole.findAll({ where: { role: 'educator' } });
	const ids = roles.map(({ personId }) => personId).filter((id) => !editors.includes(id));
	return (await Person.findAll({ where: { id: ids, deactivatedAt: null } })).map(({ email }) => email);
}

/** Tells everyone who may review that something waits. */
export const mailReviewAsked = (
	content: EntryContent,
	{
		address,
		author,
		editors,
		note
	}: { address: string; author: string; editors: readonly string[]; note: string }
) =>
	quietly(async () => {
		const data = { author, entry: nameOf(content), note, link: linkTo(address) };
		for (const to of await reviewersBut(editors)) await sendMail('review asked', to, data);
	});

/** Tells the author that it came back, and why. */
export const mailReturned = (
	content: EntryContent,
	{
		address,
		authorId,
		reviewer,
		reasons
	}: { address: string; authorId: string; reviewer: string; reasons: readonly string[] }
) =>
	quietly(async () => {
		const author = await Person.findOne({ where: { id: authorId, deactivatedAt: null } });
		const data = { reviewer, entry: nameOf(content), reasons, link: linkTo(address) };
		if (author) await sendMail('entry returned', author.email, data);
	});

/** Tells the author that it was published. */
export const mailPublished = (
	content: EntryContent,
	{ address, authorId, reviewer }: { address: string; authorId: string; reviewer: string }
) =>
	quietly(async () => {
		const author = await Person.findOne({ where: { id: authorId, deactivatedAt: null } });
		const data = { reviewer, entry: nameOf(content), link: linkTo(address) };
		if (author) await sendMail('entry published', author.email, data);
	});
