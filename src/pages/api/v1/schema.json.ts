import { endpoint, json } from '#server/endpoint.ts';
import { contractSchema } from '#server/schema-document.ts';

export const { GET, ALL } = endpoint({
  GET: () => json(contractSchema(), 200, { 'cache-control': 'public, max-age=3600' }),
});
