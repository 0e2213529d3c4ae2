import { z } from 'zod';
import { LEDGER_UNITS } from '@/lib/domain/quantities';
import {
  INVOICE_STATES,
  ORDER_STATES,
  OUTBOX_STATES,
  PAYMENT_STATES,
  SHORTAGE_STATES,
} from '@/lib/domain/states';
import { endpoint } from './endpoint';
import { dayField, idField, idParams, noteField, versionField } from './fields';
import { listQuery, pageOf } from './list';
import { recordEntrySchema } from './records';

const money = z.number().int();

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
  totalMinor: money,
  naiveMinor: money.nullable(),
  savedMinor: money.nullable(),
  gap: z.number(),
  suppliers: z.array(
    z.object({
      supplierId: z.uuid(),
      supplierName: z.string(),
      goodsMinor: money,
      extrasMinor: money,
      totalMinor: money,
      lines: z.array(
        z.object({
          offerId: z.uuid(),
          substanceName: z.string(),
          stockNumber: z.string(),
          packs: z.number().int(),
          packSize: z.string(),
          lineTotalMinor: money,
          reason: z.string(),
        }),
      ),
    }),
  ),
  uncovered: z.array(z.string()),
});
export type Proposal = z.infer<typeof proposalSchema>;

export const orderRowSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  state: z.enum(ORDER_STATES),
  supplierName: z.string(),
  draftedByName: z.string(),
  totalMinor: money,
  currency: z.string(),
  lineCount: z.number().int(),
  isPaid: z.boolean(),
  createdAt: z.string(),
  version: z.number().int(),
});
export type OrderRow = z.infer<typeof orderRowSchema>;

export const orderSchema = orderRowSchema.extend({
  supplierId: z.uuid(),
  budgetId: z.uuid(),
  budgetName: z.string(),
  note: z.string().nullable(),
  goodsMinor: money,
  surchargeMinor: money,
  supplierReference: z.string().nullable(),
  approvedByName: z.string().nullable(),
  lines: z.array(
    z.object({
      id: z.uuid(),
      substanceId: z.string(),
      substanceName: z.string(),
      stockNumber: z.string(),
      packs: z.number().int(),
      packSize: z.string(),
      priceMinor: money,
      lineTotalMinor: money,
      receivedPacks: z.number().int(),
      supplierStatus: z.string().nullable(),
      reason: z.string().nullable(),
    }),
  ),
  payment: z
    .object({
      state: z.enum(PAYMENT_STATES),
      failure: z.string().nullable(),
      reference: z.string().nullable(),
    })
    .nullable(),
  invoices: z.array(
    z.object({ id: z.uuid(), number: z.string(), amountMinor: money, state: z.enum(INVOICE_STATES) }),
  ),
  sending: z
    .object({
      id: z.uuid(),
      state: z.enum(OUTBOX_STATES),
      attempts: z.number().int(),
      lastError: z.string().nullable(),
    })
    .nullable(),
  story: z.array(recordEntrySchema),
  /** Why this person can't approve, send or pay it; null where they can. */
  whyNotApprove: z.string().nullable(),
  /** What this person may do with it in its present state. */
  mayChange: z.boolean(),
  mayCancel: z.boolean(),
  /** The limits that apply: of this person, and what its budget has left, this order counted once it is approved. */
  yourLimitMinor: money,
  budgetLeftMinor: money,
});
export type OrderDetail = z.infer<typeof orderSchema>;

const linesField = z
  .array(
    z.strictObject({
      offerId: idField,
      packs: z.number().int('Whole packs.').min(1, 'At least one pack.').max(500, 'At most 500 packs.'),
    }),
  )
  .min(1, 'An order needs at least one line.')
  .max(60, 'At most 60 lines.');

export const orderCreateSchema = z.strictObject({
  supplierId: idField,
  budgetId: idField,
  note: noteField.nullable().default(null),
  lines: linesField,
});
export type OrderCreate = z.output<typeof orderCreateSchema>;
export const orderPatchSchema = z.strictObject({
  budgetId: idField,
  note: noteField.nullable(),
  lines: linesField,
  version: versionField,
});
export type OrderPatch = z.output<typeof orderPatchSchema>;
export const orderMoveSchema = z.strictObject({
  version: versionField,
  reason: z.string().trim().max(500).default(''),
});
export type OrderMove = z.output<typeof orderMoveSchema>;
export const orderRefuseSchema = z.strictObject({
  version: versionField,
  reason: z.string().trim().min(3, 'Say why, in a few words.').max(500),
});
export type OrderRefuse = z.output<typeof orderRefuseSchema>;

export const receiptSchema = z.strictObject({
  lineId: idField,
  packs: z.number().int('Whole packs.').min(1, 'At least one pack.').max(500),
  lotNumber: z.string().trim().min(1, 'The lot number stands on the pack.').max(60),
  assayPercent: z.number().min(0.01).max(100, 'At most 100 %.').nullable(),
  expiresOn: dayField.nullable(),
  placeId: idField,
  version: versionField,
});
export type ReceiptInput = z.output<typeof receiptSchema>;

export const invoiceSchema = z.strictObject({
  number: z.string().trim().min(1, 'The number on the invoice.').max(60),
  amountMinor: z.number().int().min(1).max(100_000_00),
  version: versionField,
});
export type InvoiceInput = z.output<typeof invoiceSchema>;

export const orderListQuerySchema = listQuery(['code', 'state', 'totalMinor', 'createdAt'], '-createdAt', {
  state: z.enum(ORDER_STATES).optional(),
});
export type OrderListQuery = z.output<typeof orderListQuerySchema>;

export const offerRowSchema = z.object({
  id: z.uuid(),
  supplierId: z.uuid(),
  supplierName: z.string(),
  substanceId: z.string(),
  substanceName: z.string(),
  stockNumber: z.string(),
  packSize: z.string(),
  priceMinor: money,
  leadDays: z.number().int(),
});
export type OfferRow = z.infer<typeof offerRowSchema>;
export const offerListQuerySchema = listQuery(['priceMinor', 'stockNumber'], 'priceMinor', {
  supplierId: idField.optional(),
  substanceId: z.string().max(80).optional(),
});
export type OfferListQuery = z.output<typeof offerListQuerySchema>;

export const budgetSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  year: z.number().int(),
  amountMinor: money,
  committedMinor: money,
  spentMinor: money,
  currency: z.string(),
});
export type BudgetRow = z.infer<typeof budgetSchema>;

const move = (
  verb: string,
  summary: string,
  action: 'order:update' | 'order:cancel' | 'order:approve' | 'order:send' | 'order:pay',
  ownTransaction = false,
) =>
  endpoint({
    method: 'POST',
    path: `/api/orders/{id}/${verb}` as const,
    action,
    summary,
    params: idParams,
    body: orderMoveSchema,
    response: orderSchema,
    ownTransaction,
  });

export const orderEndpoints = {
  shortages: endpoint({
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
  offers: endpoint({
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
  budgets: endpoint({
    method: 'GET',
    path: '/api/budgets',
    action: 'order:read',
    summary: 'Budgets with what is committed and spent',
    response: z.object({ items: z.array(budgetSchema) }),
  }),
  list: endpoint({
    method: 'GET',
    path: '/api/orders',
    action: 'order:read',
    summary: 'Orders',
    query: orderListQuerySchema,
    response: pageOf(orderRowSchema),
    columns: [
      { key: 'code', header: 'Order' },
      { key: 'supplierName', header: 'Supplier' },
      { key: 'state', header: 'State' },
      { key: 'totalMinor', header: 'Total, minor units' },
      { key: 'currency', header: 'Currency' },
      { key: 'draftedByName', header: 'Drafted by' },
      { key: 'createdAt', header: 'Drafted' },
    ],
  }),
  create: endpoint({
    method: 'POST',
    path: '/api/orders',
    action: 'order:draft',
    summary: 'Draft an order to one supplier',
    body: orderCreateSchema,
    response: orderSchema,
    status: 201,
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/orders/{id}',
    action: 'order:read',
    summary: 'One order',
    params: idParams,
    response: orderSchema,
  }),
  update: endpoint({
    method: 'PATCH',
    path: '/api/orders/{id}',
    action: 'order:update',
    summary: 'Change a draft',
    params: idParams,
    body: orderPatchSchema,
    response: orderSchema,
  }),
  submit: move('submit', 'Put it up for approval', 'order:update'),
  cancel: move('cancel', 'Cancel it', 'order:cancel'),
  approve: move('approve', 'Approve it', 'order:approve'),
  refuse: endpoint({
    method: 'POST',
    path: '/api/orders/{id}/refuse',
    action: 'order:refuse',
    summary: 'Refuse it, with a reason',
    params: idParams,
    body: orderRefuseSchema,
    response: orderSchema,
  }),
  send: move('send', 'Send it to the supplier', 'order:send'),
  pay: move('pay', 'Pay it', 'order:pay', true),
  receive: endpoint({
    method: 'POST',
    path: '/api/orders/{id}/receipts',
    action: 'order:receive',
    summary: 'Take packs of a line in as a lot',
    params: idParams,
    body: receiptSchema,
    response: orderSchema,
    status: 201,
  }),
  invoice: endpoint({
    method: 'POST',
    path: '/api/orders/{id}/invoices',
    action: 'order:receive',
    summary: 'Enter the invoice and match it',
    params: idParams,
    body: invoiceSchema,
    response: orderSchema,
    status: 201,
  }),
  webhook: endpoint({
    method: 'POST',
    path: '/api/payments/webhook',
    action: 'webhook:receive',
    summary: 'Events of the payment service, signed',
    takes: 'raw',
    response: z.object({ received: z.boolean() }),
  }),
};
