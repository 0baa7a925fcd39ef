import { endpoint, json } from '#server/endpoint.ts';
import { openApi } from '#server/openapi.ts';

export const { GET, ALL } = endpoint({ GET: () => json(openApi(), 200, { 'cache-control': 'public, max-age=3600' }) });
