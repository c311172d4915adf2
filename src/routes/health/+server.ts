import { endpoint } from '$lib/server/api/endpoint';
import { health } from '$lib/server/health';

export const GET = endpoint(health);
