import { z } from 'zod';
import { LEDGER_UNITS } from '@/lib/domain/quantities';
import { SHORTAGE_STATES } from '@/lib/domain/states';
import { endpoint } from './endpoint';
import { moneyField } from './fields';
import { listQuery, pageOf } from './list';

export const shortageRowSchema = z.object({
  id: z.uuid(),
  substanceId: z.string(),
  substanceName: z.string(),
  amount: z.number(),
  unit: z.enum(LEDGER_UNITS),
  neededOn: z.string(),
  orderBy: z.string(),
  state: z.enum(SHORTAGE_STATES),
  requestId: z.uuid().nullable(),
  requestCode: z.string().nullable(),
  orderId: z.uuid().nullable(),
  orderCode: z.string().nullable(),
});
export type ShortageRow = z.infer<typeof shortageRowSchema>;
export const shortageListQuerySchema = listQuery(['orderBy', 'neededOn', 'state'], 'orderBy', {
  state: z.enum(SHORTAGE_STATES).optional(),
});
export type ShortageListQuery = z.output<typeof shortageListQuerySchema>;

export const proposalSchema = z.object({
  status: z.enum(['nothing-short', 'planned', 'over-budget', 'no-plan']),
  message: z.string(),
  currency: z.string(),
  totalMinor: moneyField,
  naiveMinor: moneyField.nullable(),
  savedMinor: moneyField.nullable(),
  gap: z.number(),
  suppliers: z.array(
    z.object({
      supplierId: z.uuid(),
      supplierName: z.string(),
      goodsMinor: moneyField,
      extrasMinor: moneyField,
      totalMinor: moneyField,
      lines: z.array(
        z.object({
          offerId: z.uuid(),
          substanceName: z.string(),
          stockNumber: z.string(),
          packs: z.number().int(),
          packSize: z.string(),
          lineTotalMinor: moneyField,
          reason: z.string(),
        }),
      ),
    }),
  ),
  uncovered: z.array(z.string()),
});
export type Proposal = z.infer<typeof proposalSchema>;

export const shortageEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/shortages',
    action: 'order:read',
    summary: 'What planned use lacks, and by when to order',
    query: shortageListQuerySchema,
    response: pageOf(shortageRowSchema),
    columns: [
      { key: 'substanceName', header: 'Substance' },
      { key: 'amount', header: 'Short' },
      { key: 'unit', header: 'Unit' },
      { key: 'neededOn', header: 'Needed on' },
      { key: 'orderBy', header: 'Order by' },
      { key: 'requestCode', header: 'For' },
      { key: 'state', header: 'State' },
    ],
  }),
  proposal: endpoint({
    method: 'GET',
    path: '/api/order-proposal',
    action: 'order:read',
    summary: 'The order of least cost for all open shortages',
    response: proposalSchema,
    cost: 'heavy',
  }),
};
