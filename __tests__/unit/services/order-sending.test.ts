import { approveOrder } from '@/lib/services/order-approval';
import { cancelOrder, sendOrder } from '@/lib/services/order-sending';
import { getOrder } from '@/lib/services/orders';
import { drainOutbox, resend } from '@/lib/services/outbox';
import { OutboxMessageModel } from '@/models/outbox-message';
import { approvedOrder, openPurchasing, sentOrder, tryAllNow } from '../../support/purchasing';
import type { Purchasing } from '../../support/purchasing';

let room: Purchasing;
beforeAll(async () => {
  room = await openPurchasing();
});
afterAll(() => room.close());
afterEach(() => {
  jest.useRealTimers();
  room.standIns.modes.set('supplier', 'ok');
  room.standIns.modes.set('mail', 'ok');
});

const two = () => [
  { offer: room.silver, packs: 1 },
  { offer: room.copper, packs: 2 },
];
const messageOf = (orderId: string) =>
  OutboxMessageModel.findOne({
    where: { channel: 'supplier-order', subjectId: orderId },
    rejectOnEmpty: true,
  });
const lettersOf = (code: string) => room.standIns.letters.filter(({ subject }) => subject.includes(code));

/** What the supplier has under a reference. */
async function atSupplier(reference: string | null): Promise<unknown> {
  const response = await fetch(`${process.env.SUPPLIER_API_BASE}/ordering/orders/${reference}`, {
    headers: { authorization: `Bearer ${process.env.SUPPLIER_API_KEY}` },
  });
  return response.json();
}

it('reaches the supplier by its ordering service and by letter, and the answer stands on the order', async () => {
  const { id, code } = await sentOrder(room, two());
  await tryAllNow();
  const order = await getOrder(room.buyer, id);
  expect(order).toMatchObject({ state: 'acknowledged', sending: { state: 'sent', lastError: null } });
  expect(order.lines.map(({ supplierStatus }) => supplierStatus)).toEqual(['accepted', 'accepted']);
  expect(await atSupplier(order.supplierReference)).toMatchObject({
    order: code,
    lines: [
      { packs: 1, priceMinor: 84_00 },
      { packs: 2, priceMinor: 9_41 },
    ],
  });
  const [letter] = lettersOf(code);
  expect(letter).toMatchObject({ to: 'orders@fenwold.example' });
  expect(letter?.text).toContain('1 × 25 g silver nitrate');
  expect(letter?.text).toContain('in all 127.32 GBP');
});

it.each(['down', 'garbage'] as const)(
  'with a service that is %s it waits with its reason, and arrives once when that is over',
  async (mode) => {
    room.standIns.modes.set('supplier', mode);
    const { id, code } = await sentOrder(room, two());
    await tryAllNow();
    await tryAllNow();
    const waiting = await getOrder(room.buyer, id);
    expect(waiting).toMatchObject({
      state: 'sent',
      supplierReference: null,
      sending: { state: 'waiting', attempts: 2 },
    });
    expect(waiting.sending?.lastError).toMatch(/ordering service/);
    room.standIns.modes.set('supplier', 'ok');
    await tryAllNow();
    expect((await getOrder(room.buyer, id)).state).toBe('acknowledged');
    expect(await tryAllNow()).toBe(0);
    expect(lettersOf(code)).toHaveLength(1);
  },
);

it('a slow service is waited for', async () => {
  room.standIns.modes.set('supplier', 'slow');
  const { id } = await sentOrder(room, two());
  await tryAllNow();
  expect((await getOrder(room.buyer, id)).state).toBe('acknowledged');
});

it('an answer that was lost on the way does not make a second order', async () => {
  const { id } = await sentOrder(room, two());
  const message = await messageOf(id);
  const { orderCode, account, lines } = message.payload as {
    orderCode: string;
    account: string;
    lines: unknown;
  };
  const lost = await fetch(`${process.env.SUPPLIER_API_BASE}/ordering/orders`, {
    method: 'POST',
    headers: {
      'content-type': 'application/json',
      authorization: `Bearer ${process.env.SUPPLIER_API_KEY}`,
      'idempotency-key': message.id,
    },
    body: JSON.stringify({ order: orderCode, account, lines }),
  });
  const { reference } = (await lost.json()) as { reference: string };
  await tryAllNow();
  expect((await getOrder(room.buyer, id)).supplierReference).toBe(reference);
});

it('waits out a service that is down for an hour, and is then sent once', async () => {
  jest.useFakeTimers({
    doNotFake: [
      'hrtime',
      'nextTick',
      'performance',
      'queueMicrotask',
      'setImmediate',
      'clearImmediate',
      'setInterval',
      'clearInterval',
      'setTimeout',
      'clearTimeout',
    ],
  });
  room.standIns.modes.set('supplier', 'down');
  const { id, code } = await sentOrder(room, two());
  const start = Date.now();
  for (let minute = 0; minute <= 60; minute += 1) {
    jest.setSystemTime(start + minute * 60_000);
    await drainOutbox();
  }
  const waiting = await getOrder(room.buyer, id);
  expect(waiting).toMatchObject({ state: 'sent', sending: { state: 'waiting' } });
  expect(waiting.sending?.lastError).toMatch(/503/);
  room.standIns.modes.set('supplier', 'ok');
  jest.setSystemTime(start + 3 * 3_600_000);
  await drainOutbox();
  expect((await getOrder(room.buyer, id)).state).toBe('acknowledged');
  expect(await drainOutbox()).toBe(0);
  expect(lettersOf(code)).toHaveLength(1);
});

it('a refusal is given up at once, stands in the story, and can be sent again by a person', async () => {
  room.standIns.modes.set('supplier', 'refuse');
  const { id } = await sentOrder(room, two());
  await tryAllNow();
  const refused = await getOrder(room.buyer, id);
  expect(refused).toMatchObject({ state: 'sent', sending: { state: 'dead', attempts: 1 } });
  expect(refused.sending?.lastError).toMatch(/on hold/);
  expect(refused.story.at(-1)).toMatchObject({
    actorName: 'system',
    reason: expect.stringMatching(/on hold/) as string,
  });
  expect(await tryAllNow()).toBe(0);
  room.standIns.modes.set('supplier', 'ok');
  await resend(room.buyer, refused.sending?.id ?? '');
  await tryAllNow();
  expect((await getOrder(room.buyer, id)).state).toBe('acknowledged');
});

it('tells which lines are back-ordered and which cost more now', async () => {
  room.standIns.modes.set('supplier', 'partial');
  const partial = await sentOrder(room, two());
  await tryAllNow();
  expect((await getOrder(room.buyer, partial.id)).lines.map(({ supplierStatus }) => supplierStatus)).toEqual([
    'accepted',
    'back-ordered',
  ]);
  room.standIns.modes.set('supplier', 'price-change');
  const dearer = await sentOrder(room, two());
  await tryAllNow();
  const order = await getOrder(room.buyer, dearer.id);
  expect(order.lines.map(({ supplierStatus }) => supplierStatus)).toEqual(['price-changed', 'price-changed']);
  // 84.00 and 9.41 raised by 8 % are 90.72 and 10.16
  const { reason } = order.story.at(-1) ?? {};
  expect(reason).toMatch(/90\.72/);
  expect(reason).toMatch(/10\.16/);
});

it('is sent once, however often it is asked for', async () => {
  const { id, version } = await approvedOrder(room, two());
  const tries = await Promise.allSettled(
    [1, 2, 3].map(() => sendOrder(room.buyer, id, { version, reason: '' })),
  );
  expect(tries.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
  expect(await OutboxMessageModel.count({ where: { channel: 'supplier-order', subjectId: id } })).toBe(1);
});

it('does not reach the supplier any more when it is cancelled first', async () => {
  room.standIns.modes.set('supplier', 'down');
  const { id } = await sentOrder(room, two());
  await tryAllNow();
  const { version } = await getOrder(room.buyer, id);
  await cancelOrder(room.buyer, id, { version, reason: 'The course was dropped.' });
  room.standIns.modes.set('supplier', 'ok');
  await tryAllNow();
  expect(await getOrder(room.buyer, id)).toMatchObject({
    state: 'cancelled',
    supplierReference: null,
    sending: { state: 'dead' },
  });
  await expect(resend(room.buyer, (await messageOf(id)).id).then(tryAllNow)).resolves.toBe(0);
  expect((await getOrder(room.buyer, id)).supplierReference).toBeNull();
});

it('a supplier that has the order already is told by letter when it is cancelled', async () => {
  const { id, code } = await sentOrder(room, two());
  await tryAllNow();
  const { version } = await getOrder(room.buyer, id);
  await cancelOrder(room.buyer, id, { version, reason: 'The course was dropped.' });
  await tryAllNow();
  expect(
    lettersOf(code)
      .map(({ subject }) => subject)
      .sort(),
  ).toEqual([`Cancelled: order ${code} for account LARK-201`, `Order ${code} for account LARK-201`]);
});

it('a mailbox that is down delays the letter and nothing else', async () => {
  room.standIns.modes.set('mail', 'down');
  const { id, code } = await sentOrder(room, two());
  await tryAllNow();
  expect((await getOrder(room.buyer, id)).state).toBe('acknowledged');
  expect(lettersOf(code)).toEqual([]);
  room.standIns.modes.set('mail', 'ok');
  await tryAllNow();
  expect(lettersOf(code)).toHaveLength(1);
});

it('an order without an approval never reaches the outbox', async () => {
  const before = await OutboxMessageModel.count();
  const { id, version } = await approvedOrder(room, two());
  await expect(approveOrder(room.buyer, id, { version, reason: '' })).rejects.toMatchObject({
    code: 'wrong-state',
  });
  expect(await OutboxMessageModel.count()).toBe(before);
});
