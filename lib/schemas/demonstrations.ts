import { z } from 'zod';
import { endpoint } from './endpoint';
import { idField, idParams, nameField, noteField, versionField, volumeMlField } from './fields';
import { listQuery, pageOf } from './list';

export const demonstrationSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  ownerId: z.uuid().nullable(),
  outcomeWanted: z.string().nullable(),
  vesselMl: z.number(),
  isArchived: z.boolean(),
  version: z.number().int(),
  portions: z.array(
    z.object({
      solutionId: z.uuid(),
      label: z.string(),
      volumeMl: z.number(),
      solutes: z.array(z.object({ substance: z.string(), molarity: z.number() })),
    }),
  ),
});
export type Demonstration = z.infer<typeof demonstrationSchema>;

const shape = {
  name: nameField,
  outcomeWanted: noteField.nullable(),
  vesselMl: z.number().min(1, 'At least 1 mL.').max(20_000, 'At most 20 L.'),
  portions: z
    .array(z.strictObject({ solutionId: idField, volumeMl: volumeMlField }))
    .min(2, 'A demonstration pours at least two solutions together.')
    .max(10, 'At most 10 portions.'),
};
export const demonstrationCreateSchema = z.strictObject(shape);
export type DemonstrationCreate = z.output<typeof demonstrationCreateSchema>;
export const demonstrationPatchSchema = z.strictObject({
  ...shape,
  isArchived: z.boolean(),
  version: versionField,
});
export type DemonstrationPatch = z.output<typeof demonstrationPatchSchema>;
export const demonstrationListQuerySchema = listQuery(['name'], 'name', {});
export type DemonstrationListQuery = z.output<typeof demonstrationListQuerySchema>;

export const demonstrationEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/demonstrations',
    action: 'catalogue:read',
    summary: 'Saved demonstrations',
    query: demonstrationListQuerySchema,
    response: pageOf(demonstrationSchema),
    columns: [
      { key: 'name', header: 'Name' },
      { key: 'outcomeWanted', header: 'Outcome wanted' },
    ],
  }),
  create: endpoint({
    method: 'POST',
    path: '/api/demonstrations',
    action: 'recipe:create',
    summary: 'Save a demonstration',
    body: demonstrationCreateSchema,
    response: demonstrationSchema,
    status: 201,
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/demonstrations/{id}',
    action: 'catalogue:read',
    summary: 'One demonstration',
    params: idParams,
    response: demonstrationSchema,
  }),
  update: endpoint({
    method: 'PATCH',
    path: '/api/demonstrations/{id}',
    action: 'recipe:update',
    summary: 'Change or archive a demonstration',
    params: idParams,
    body: demonstrationPatchSchema,
    response: demonstrationSchema,
  }),
};
