import { Readable } from 'node:stream';
import { error } from '@sveltejs/kit';
import { requireRole } from '$lib/server/people/roles';
import { openAttachment } from '$lib/server/table/attachments';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ params, url }) => {
	requireRole('educator');
	const file = await openAttachment(params.id, params.file);
	if (!file) error(404, 'Unknown file.');
	const inline = file.type.startsWith('image/') && !url.searchParams.has('save');
	return new Response(Readable.toWeb(file.stream) as ReadableStream, {
		headers: {
			'content-type': file.type,
			'content-length': String(file.size),
			'content-disposition': `${inline ? 'inline' : 'attachment'}; filename*=UTF-8''${encodeURIComponent(file.name)}`,
			'content-security-policy': "default-src 'none'; sandbox",
			'cache-control': 'private, no-store'
		}
	});
};
