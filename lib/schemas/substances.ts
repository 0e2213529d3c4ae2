import { z } from 'zod';
import { endpoint } from './endpoint';
import { slugParams, versionField } from './fields';
import { listQuery, pageOf } from './list';

export const substanceRowSchema = z.object({
  id: z.string(),
  name: z.string(),
  cas: z.string(),
  formula: z.string(),
  storageGroup: z.string(),
  restricted: z.boolean(),
  isHeld: z.boolean(),
  inStock: z.string(),
});
export type SubstanceRow = z.infer<typeof substanceRowSchema>;

export const substanceSchema = substanceRowSchema.extend({
  molarMassGPerMol: z.number().nullable(),
  form: z.string(),
  heldReason: z.string().nullable(),
  version: z.number().int(),
});
export type SubstanceDetail = z.infer<typeof substanceSchema>;

export const substanceListQuerySchema = listQuery(['name', 'cas', 'formula', 'storageGroup'], 'name', {
  storageGroup: z.string().max(40).optional(),
  held: z.enum(['yes', 'no']).optional(),
});
export type SubstanceListQuery = z.output<typeof substanceListQuerySchema>;

export const holdSchema = z.strictObject({
  isHeld: z.boolean(),
  reason: z.string().trim().min(3, 'Say why, in a few words.').max(500),
  version: versionField,
});
export type Hold = z.output<typeof holdSchema>;

export const speciesRowSchema = z.object({
  id: z.string(),
  name: z.string(),
  phase: z.string(),
  logK: z.number().nullable(),
  formedFrom: z.string(),
  source: z.string(),
});
export type SpeciesRow = z.infer<typeof speciesRowSchema>;
export const speciesListQuerySchema = listQuery(['id', 'name', 'logK'], 'id', {
  component: z.string().max(20).optional(),
});
export type SpeciesListQuery = z.output<typeof speciesListQuerySchema>;

export const substanceEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/substances',
    action: 'catalogue:read',
    summary: 'Substances by name, formula or CAS number',
    query: substanceListQuerySchema,
    response: pageOf(substanceRowSchema),
    columns: [
      { key: 'name', header: 'Name' },
      { key: 'formula', header: 'Formula' },
      { key: 'cas', header: 'CAS' },
      { key: 'storageGroup', header: 'Storage group' },
      { key: 'inStock', header: 'In stock' },
    ],
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/substances/{id}',
    action: 'catalogue:read',
    summary: 'One substance',
    params: slugParams,
    response: substanceSchema,
  }),
  hold: endpoint({
    method: 'POST',
    path: '/api/substances/{id}/hold',
    action: 'substance:hold',
    summary: 'Stop use of a substance at once, or lift that',
    params: slugParams,
    body: holdSchema,
    response: substanceSchema,
  }),
  species: endpoint({
    method: 'GET',
    path: '/api/species',
    action: 'catalogue:read',
    summary: 'Species with their formation constants and sources',
    query: speciesListQuerySchema,
    response: pageOf(speciesRowSchema),
    columns: [
      { key: 'id', header: 'Species' },
      { key: 'name', header: 'Name' },
      { key: 'formedFrom', header: 'Formed from' },
      { key: 'logK', header: 'log K' },
      { key: 'source', header: 'Source' },
    ],
  }),
};
