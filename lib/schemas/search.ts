import { z } from 'zod';
import { endpoint } from './endpoint';

export const SEARCH_KINDS = [
  'substance',
  'solution',
  'session',
  'request',
  'batch',
  'bottle',
  'lot',
  'order',
] as const;

export const searchHitSchema = z.object({
  kind: z.enum(SEARCH_KINDS),
  id: z.string(),
  label: z.string(),
  detail: z.string(),
  href: z.string(),
});
export type SearchHit = z.infer<typeof searchHitSchema>;

export const searchEndpoints = {
  search: endpoint({
    method: 'GET',
    path: '/api/search',
    action: 'search:read',
    summary: 'Finds sessions, substances, bottles, batches, orders by name, formula, CAS number or code',
    query: z.strictObject({ text: z.string().trim().min(1).max(80) }),
    response: z.object({ hits: z.array(searchHitSchema) }),
  }),
};
