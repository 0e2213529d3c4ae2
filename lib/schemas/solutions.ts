import { z } from 'zod';
import { TOLERANCE_CLASSES } from '@/lib/domain/quantities';
import { endpoint } from './endpoint';
import { idParams, molarityField, nameField, noteField, versionField } from './fields';
import { listQuery, pageOf } from './list';
import { classificationSchema } from './mixes';

const soluteRow = z.object({
  substance: z.string(),
  name: z.string(),
  formula: z.string(),
  molarity: z.number(),
});

export const solutionSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  ownerId: z.uuid().nullable(),
  shelfLifeDays: z.number().int(),
  storageNote: z.string().nullable(),
  toleranceClass: z.enum(TOLERANCE_CLASSES),
  solutes: z.array(soluteRow),
  isArchived: z.boolean(),
  version: z.number().int(),
});
export type Solution = z.infer<typeof solutionSchema>;

export const solutionDetailSchema = solutionSchema.extend({
  classification: classificationSchema,
  pH: z.number().nullable(),
  /** What should be confirmed before it becomes a batch. */
  questions: z.array(z.string()).readonly(),
});
export type SolutionDetail = z.infer<typeof solutionDetailSchema>;

const solutesField = z
  .array(
    z.strictObject({
      substance: z.string().trim().min(1, 'Choose a substance.').max(80),
      molarity: molarityField,
    }),
  )
  .min(1, 'A solution needs at least one solute.')
  .max(12, 'At most 12 solutes.');

const shape = {
  name: nameField,
  shelfLifeDays: z.number().int('Whole days.').min(0).max(3650, 'At most ten years.'),
  storageNote: noteField.nullable(),
  toleranceClass: z.enum(TOLERANCE_CLASSES),
  solutes: solutesField,
};
/** Left out, the shelf life and the storage note are those the catalogue knows of the solutes. */
export const solutionCreateSchema = z.strictObject({
  ...shape,
  shelfLifeDays: shape.shelfLifeDays.optional(),
  storageNote: shape.storageNote.optional(),
});
export type SolutionCreate = z.output<typeof solutionCreateSchema>;
export const solutionPatchSchema = z.strictObject({
  ...shape,
  isArchived: z.boolean(),
  version: versionField,
});
export type SolutionPatch = z.output<typeof solutionPatchSchema>;

export const solutionPreviewSchema = z.strictObject({ solutes: solutesField });
export type SolutionPreviewBody = z.output<typeof solutionPreviewSchema>;
export const solutionPreviewAnswerSchema = z.object({
  classification: classificationSchema,
  pH: z.number().nullable(),
  questions: z.array(z.string()).readonly(),
  /** What the catalogue knows of how long it keeps; null where it knows nothing. */
  shelfLifeDays: z.number().int().nullable(),
  storageNote: z.string().nullable(),
});
export type SolutionPreview = z.infer<typeof solutionPreviewAnswerSchema>;

export const solutionListQuerySchema = listQuery(['name', 'shelfLifeDays'], 'name', {
  archived: z.enum(['no', 'yes']).default('no'),
});
export type SolutionListQuery = z.output<typeof solutionListQuerySchema>;

export const solutionEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/solutions',
    action: 'catalogue:read',
    summary: 'Recipes',
    query: solutionListQuerySchema,
    response: pageOf(solutionSchema),
    columns: [
      { key: 'name', header: 'Name' },
      { key: 'shelfLifeDays', header: 'Shelf life, days' },
      { key: 'toleranceClass', header: 'Tolerance' },
      { key: 'storageNote', header: 'Storage' },
    ],
  }),
  create: endpoint({
    method: 'POST',
    path: '/api/solutions',
    action: 'recipe:create',
    summary: 'Save a recipe',
    body: solutionCreateSchema,
    response: solutionDetailSchema,
    status: 201,
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/solutions/{id}',
    action: 'catalogue:read',
    summary: 'One recipe with its label and pH',
    params: idParams,
    response: solutionDetailSchema,
  }),
  update: endpoint({
    method: 'PATCH',
    path: '/api/solutions/{id}',
    action: 'recipe:update',
    summary: 'Change or archive a recipe',
    params: idParams,
    body: solutionPatchSchema,
    response: solutionDetailSchema,
  }),
  preview: endpoint({
    method: 'POST',
    path: '/api/solutions/preview',
    action: 'catalogue:read',
    summary: 'Label, pH, shelf life and questions of a recipe that is not saved yet',
    body: solutionPreviewSchema,
    response: solutionPreviewAnswerSchema,
  }),
};
