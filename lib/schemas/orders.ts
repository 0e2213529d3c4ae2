import { z } from 'zod';
import { INVOICE_STATES, ORDER_STATES, OUTBOX_STATES, PAYMENT_STATES } from '@/lib/domain/states';
import { endpoint } from './endpoint';
import { dayField, idField, idParams, moneyField, noteField, versionField } from './fields';
import { listQuery, pageOf } from './list';
import { recordEntrySchema } from './records';

export const orderRowSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  state: z.enum(ORDER_STATES),
  supplierName: z.string(),
  draftedByName: z.string(),
  totalMinor: moneyField,
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
  goodsMinor: moneyField,
  surchargeMinor: moneyField,
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
      priceMinor: moneyField,
      lineTotalMinor: moneyField,
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
    z.object({ id: z.uuid(), number: z.string(), amountMinor: moneyField, state: z.enum(INVOICE_STATES) }),
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
  yourLimitMinor: moneyField,
  budgetLeftMinor: moneyField,
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
};
