/** States of the things that move through the house, and which change may follow which. */

export const REQUEST_STATES = [
  'draft',
  'asked',
  'in-review',
  'agreed',
  'in-work',
  'ready',
  'handed-over',
  'closed',
  'returned',
  'withdrawn',
] as const;
export type RequestState = (typeof REQUEST_STATES)[number];

export const REVIEW_STATES = [
  'waiting',
  'agreed',
  'agreed-with-conditions',
  'returned',
  'refused',
  'lapsed',
] as const;
export type ReviewState = (typeof REVIEW_STATES)[number];

export const BATCH_STATES = ['planned', 'making', 'checked', 'bottled', 'spent', 'discarded'] as const;
export type BatchState = (typeof BATCH_STATES)[number];

export const ORDER_STATES = [
  'draft',
  'for-approval',
  'approved',
  'sent',
  'acknowledged',
  'part-received',
  'received',
  'closed',
  'refused',
  'cancelled',
] as const;
export type OrderState = (typeof ORDER_STATES)[number];

export const BOTTLE_STATES = ['filled', 'handed-over', 'returned', 'discarded'] as const;
export type BottleState = (typeof BOTTLE_STATES)[number];

export const SHORTAGE_STATES = ['open', 'on-order', 'covered'] as const;
export type ShortageState = (typeof SHORTAGE_STATES)[number];

export const INVOICE_STATES = ['received', 'matched', 'disputed'] as const;
export type InvoiceState = (typeof INVOICE_STATES)[number];

export const PAYMENT_STATES = ['requested', 'succeeded', 'failed'] as const;
export type PaymentState = (typeof PAYMENT_STATES)[number];

export const OUTBOX_STATES = ['waiting', 'sent', 'dead'] as const;
export type OutboxState = (typeof OUTBOX_STATES)[number];
export const OUTBOX_CHANNELS = ['mail', 'supplier-order'] as const;
export type OutboxChannel = (typeof OUTBOX_CHANNELS)[number];

export const MOVEMENT_KINDS = ['received', 'taken', 'put-back', 'corrected', 'discarded'] as const;
export type MovementKind = (typeof MOVEMENT_KINDS)[number];

export const REQUEST_LINE_KINDS = ['solution', 'demonstration'] as const;
export type RequestLineKind = (typeof REQUEST_LINE_KINDS)[number];

export const BATCH_STEP_KINDS = ['protection', 'condition', 'work', 'check'] as const;
export type BatchStepKind = (typeof BATCH_STEP_KINDS)[number];

export const EQUIPMENT_KINDS = [
  'balance',
  'flask',
  'cylinder',
  'pipette',
  'burette',
  'beaker',
  'bottle',
] as const;
export type EquipmentKind = (typeof EQUIPMENT_KINDS)[number];

export const REQUEST_MOVES: Readonly<Record<RequestState, readonly RequestState[]>> = {
  draft: ['asked', 'withdrawn'],
  asked: ['in-review', 'agreed', 'returned', 'withdrawn'],
  'in-review': ['agreed', 'returned', 'withdrawn', 'asked'],
  agreed: ['in-work', 'in-review', 'withdrawn', 'returned', 'asked'],
  'in-work': ['ready', 'withdrawn', 'in-review', 'asked'],
  ready: ['handed-over', 'withdrawn', 'in-work'],
  'handed-over': ['closed'],
  closed: [],
  returned: ['asked', 'withdrawn'],
  withdrawn: [],
};

export const REVIEW_MOVES: Readonly<Record<ReviewState, readonly ReviewState[]>> = {
  waiting: ['agreed', 'agreed-with-conditions', 'returned', 'refused', 'lapsed'],
  agreed: ['lapsed'],
  'agreed-with-conditions': ['lapsed'],
  returned: ['lapsed'],
  refused: ['lapsed'],
  lapsed: [],
};

export const BATCH_MOVES: Readonly<Record<BatchState, readonly BatchState[]>> = {
  planned: ['making', 'discarded'],
  making: ['checked', 'discarded'],
  checked: ['bottled', 'discarded'],
  bottled: ['spent', 'discarded'],
  spent: [],
  discarded: [],
};

export const ORDER_MOVES: Readonly<Record<OrderState, readonly OrderState[]>> = {
  draft: ['for-approval', 'cancelled'],
  'for-approval': ['approved', 'refused', 'draft', 'cancelled'],
  approved: ['sent', 'cancelled'],
  sent: ['acknowledged', 'part-received', 'received', 'cancelled'],
  acknowledged: ['part-received', 'received', 'cancelled'],
  'part-received': ['part-received', 'received', 'closed'],
  received: ['closed'],
  closed: [],
  refused: [],
  cancelled: [],
};

export const BOTTLE_MOVES: Readonly<Record<BottleState, readonly BottleState[]>> = {
  filled: ['handed-over', 'discarded'],
  'handed-over': ['returned', 'discarded'],
  returned: ['handed-over', 'discarded'],
  discarded: [],
};

/** State names as people read them. */
export function stateWords(state: string): string {
  return state.replaceAll('-', ' ');
}

/** States with their words, for a choice. */
export function stateChoices(
  states: readonly string[],
): readonly (readonly [state: string, words: string])[] {
  return states.map((state) => [state, stateWords(state)]);
}
