import { downloadPastTable } from '$lib/server/api/download';
import { endpoint } from '$lib/server/api/endpoint';
import type { RequestEvent } from './$types';

export const GET = endpoint<RequestEvent>(({ params }) => downloadPastTable(params.revision, 'csv'));
