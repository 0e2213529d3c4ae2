import { z } from 'zod';
import { endpoint } from './endpoint';
import { idParams, slugParams } from './fields';

/** Largest data sheet taken; suppliers' sheets are a few hundred kilobytes. */
export const DATA_SHEET_LIMIT_BYTES = 8 * 1024 * 1024;

export const dataSheetSchema = z.object({
  id: z.uuid(),
  fileName: z.string(),
  sizeBytes: z.number().int(),
  uploadedBy: z.string(),
  uploadedAt: z.string(),
});
export type DataSheet = z.infer<typeof dataSheetSchema>;

export const dataSheetEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/substances/{id}/data-sheets',
    action: 'catalogue:read',
    summary: 'Safety data sheets of a substance, newest first',
    params: slugParams,
    response: z.object({ items: z.array(dataSheetSchema) }),
  }),
  upload: endpoint({
    method: 'POST',
    path: '/api/substances/{id}/data-sheets',
    action: 'data-sheet:upload',
    summary: 'Add a safety data sheet (PDF, in the form field `file`)',
    params: slugParams,
    takes: 'form',
    response: dataSheetSchema,
    status: 201,
    maxBodyBytes: DATA_SHEET_LIMIT_BYTES,
  }),
  download: endpoint({
    method: 'GET',
    path: '/api/data-sheets/{id}',
    action: 'catalogue:read',
    summary: 'The PDF',
    params: idParams,
    response: 'file',
  }),
};
