import { z } from 'zod';
import { endpoint } from './endpoint';
import { idField, moneyField } from './fields';
import { listQuery, pageOf } from './list';

export const offerRowSchema = z.object({
  id: z.uuid(),
  supplierId: z.uuid(),
  supplierName: z.string(),
  substanceId: z.string(),
  substanceName: z.string(),
  stockNumber: z.string(),
  packSize: z.string(),
  priceMinor: moneyField,
  leadDays: z.number().int(),
});
export type OfferRow = z.infer<typeof offerRowSchema>;
export const offerListQuerySchema = listQuery(['priceMinor', 'stockNumber'], 'priceMinor', {
  supplierId: idField.optional(),
  substanceId: z.string().max(80).optional(),
});
export type OfferListQuery = z.output<typeof offerListQuerySchema>;

export const offerEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/offers',
    action: 'order:read',
    summary: 'Packs on offer',
    query: offerListQuerySchema,
    response: pageOf(offerRowSchema),
    columns: [
      { key: 'supplierName', header: 'Supplier' },
      { key: 'substanceName', header: 'Substance' },
      { key: 'stockNumber', header: 'Stock number' },
      { key: 'packSize', header: 'Pack' },
      { key: 'priceMinor', header: 'Price, minor units' },
    ],
  }),
};
