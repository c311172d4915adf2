import { endpoint } from '$lib/server/api/endpoint';
import { openApiDocument } from '$lib/server/api/openapi';

export const GET = endpoint(({ url }) => openApiDocument(url.origin));
