import Stripe from 'stripe';
import { listBudgets } from '@/lib/services/budgets';
import { getOrder } from '@/lib/services/orders';
import { payOrder, receivePaymentEvent } from '@/lib/services/payments';
import { PaymentModel } from '@/models/payment';
import { WebhookEventModel } from '@/models/webhook-event';
import type { OrderDetail } from '@/lib/schemas/orders';
import { approvedOrder, openPurchasing, WEBHOOK_SECRET } from '../../support/purchasing';
import type { Purchasing } from '../../support/purchasing';

let room: Purchasing;
beforeAll(async () => {
  room = await openPurchasing();
});
afterAll(() => room.close());
afterEach(() => room.standIns.modes.set('payments', 'ok'));

const approved = () => approvedOrder(room, [{ offer: room.silver, packs: 1 }]);
const pay = ({ id, version }: Pick<OrderDetail, 'id' | 'version'>) =>
  payOrder(room.buyer, id, { version, reason: '' });
const read = (id: string) => getOrder(room.buyer, id);
const paidLines = (order: OrderDetail) => order.story.filter(({ action }) => action === 'paid');

/** Waits until so many events came in altogether. */
async function eventsCame(count: number): Promise<void> {
  const until = Date.now() + 5000;
  while (room.events.length < count) {
    if (Date.now() > until) throw new Error(`${room.events.length} of ${count} events came`);
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}

/** An event as the service would send it. */
function signed(event: object, about: { secret?: string; timestamp?: number } = {}) {
  const payload = JSON.stringify(event);
  const { secret = WEBHOOK_SECRET, timestamp = Math.floor(Date.now() / 1000) } = about;
  return { payload, signature: Stripe.webhooks.generateTestHeaderString({ payload, secret, timestamp }) };
}
const succeeded = (paymentId: string, id = `evt_${paymentId}`) => ({
  id,
  object: 'event',
  type: 'payment_intent.succeeded',
  created: Math.floor(Date.now() / 1000),
  data: { object: { id: 'pi_told', object: 'payment_intent', metadata: { payment: paymentId } } },
});

it('pays through the service; the answer and the signed event of the same payment are one payment', async () => {
  const before = room.events.length;
  const order = await approved();
  const paid = await pay(order);
  expect(paid).toMatchObject({
    isPaid: true,
    payment: { state: 'succeeded', failure: null, reference: expect.stringMatching(/^pi_/) as string },
  });
  await eventsCame(before + 1);
  expect(room.events.at(-1)?.refusal).toBeNull();
  const after = await read(order.id);
  expect(paidLines(after)).toHaveLength(1);
  expect(await PaymentModel.findAll({ where: { orderId: order.id } })).toMatchObject([
    { amountMinor: order.totalMinor, currency: 'GBP', state: 'succeeded' },
  ]);
});

it('a double click pays once', async () => {
  const before = room.events.length;
  const order = await approved();
  await Promise.allSettled([pay(order), pay(order), pay(order)]);
  expect(paidLines(await read(order.id))).toHaveLength(1);
  expect(await PaymentModel.count({ where: { orderId: order.id } })).toBe(1);
  await eventsCame(before + 1);
  await new Promise((resolve) => setTimeout(resolve, 200));
  // the service made one payment, so it told of one
  expect(room.events).toHaveLength(before + 1);
  await expect(pay(await read(order.id))).rejects.toMatchObject({ code: 'wrong-state' });
});

it.each(['down', 'garbage'] as const)(
  'with a service that is %s nothing is paid twice: the second try asks for the same payment',
  async (mode) => {
    const order = await approved();
    room.standIns.modes.set('payments', mode);
    await expect(pay(order)).rejects.toMatchObject({ code: 'unavailable' });
    expect(await read(order.id)).toMatchObject({ isPaid: false, payment: { state: 'requested' } });
    room.standIns.modes.set('payments', 'ok');
    expect(await pay(await read(order.id))).toMatchObject({ isPaid: true });
    expect(await PaymentModel.count({ where: { orderId: order.id } })).toBe(1);
  },
);

it('a declined payment is told with its reason, once, and can be tried again', async () => {
  const before = room.events.length;
  const order = await approved();
  room.standIns.modes.set('payments', 'refuse');
  expect(await pay(order)).toMatchObject({
    isPaid: false,
    payment: { state: 'failed', failure: expect.stringMatching(/declined/) as string },
  });
  await eventsCame(before + 1);
  expect((await read(order.id)).story.filter(({ action }) => action === 'payment failed')).toHaveLength(1);
  room.standIns.modes.set('payments', 'ok');
  expect(await pay(await read(order.id))).toMatchObject({ isPaid: true, payment: { state: 'succeeded' } });
});

describe('an event', () => {
  /** A payment whose outcome is not known, as after a cut line. */
  async function unknown(): Promise<{ order: OrderDetail; paymentId: string }> {
    const order = await approved();
    room.standIns.modes.set('payments', 'down');
    await pay(order).catch(() => undefined);
    room.standIns.modes.set('payments', 'ok');
    const payment = await PaymentModel.findOne({ where: { orderId: order.id }, rejectOnEmpty: true });
    return { order, paymentId: payment.id };
  }

  it('settles a payment whose answer was lost, and coming three times pays once', async () => {
    const { order, paymentId } = await unknown();
    const { payload, signature } = signed(succeeded(paymentId));
    for (let time = 0; time < 3; time += 1) await receivePaymentEvent(payload, signature);
    const after = await read(order.id);
    expect(after).toMatchObject({ isPaid: true, payment: { state: 'succeeded', reference: 'pi_told' } });
    expect(paidLines(after)).toHaveLength(1);
    expect(await WebhookEventModel.count({ where: { id: `evt_${paymentId}` } })).toBe(1);
  });

  it('of a failure that comes after the success changes nothing', async () => {
    const { order, paymentId } = await unknown();
    const success = signed(succeeded(paymentId));
    await receivePaymentEvent(success.payload, success.signature);
    const late = signed({ ...succeeded(paymentId, 'evt_late'), type: 'payment_intent.payment_failed' });
    await receivePaymentEvent(late.payload, late.signature);
    expect(await read(order.id)).toMatchObject({ isPaid: true, payment: { state: 'succeeded' } });
  });

  it.each<[string, (paymentId: string) => { payload: string; signature: string }]>([
    ['signed with another secret', (id) => signed(succeeded(id), { secret: 'whsec_of_somebody_else' })],
    ['ten minutes old', (id) => signed(succeeded(id), { timestamp: Math.floor(Date.now() / 1000) - 600 })],
    ['unsigned', (id) => ({ payload: JSON.stringify(succeeded(id)), signature: '' })],
    [
      'changed after it was signed',
      (id) => ({
        payload: JSON.stringify(succeeded(id)).replace('pi_told', 'pi_mine'),
        signature: signed(succeeded(id)).signature,
      }),
    ],
  ])('that is %s is refused and pays nothing', async (_name, make) => {
    const { order, paymentId } = await unknown();
    const { payload, signature } = make(paymentId);
    await expect(receivePaymentEvent(payload, signature)).rejects.toMatchObject({ code: 'forbidden' });
    expect((await read(order.id)).isPaid).toBe(false);
    expect(await WebhookEventModel.count({ where: { id: `evt_${paymentId}` } })).toBe(0);
  });

  it.each([
    ['of a kind that is nothing to us', { ...succeeded('x', 'evt_other'), type: 'customer.created' }],
    ['of a payment that is not ours', succeeded('11111111-1111-4111-8111-111111111111', 'evt_foreign')],
    [
      'without our mark',
      {
        ...succeeded('x', 'evt_unmarked'),
        data: { object: { id: 'pi_x', object: 'payment_intent', metadata: {} } },
      },
    ],
  ])('%s is taken in and changes nothing', async (_name, event) => {
    const before = await PaymentModel.count({ where: { state: 'succeeded' } });
    const { payload, signature } = signed(event);
    await receivePaymentEvent(payload, signature);
    expect(await PaymentModel.count({ where: { state: 'succeeded' } })).toBe(before);
  });
});

it('what is paid is spent and no longer promised', async () => {
  const budgetNow = async () => (await listBudgets()).find(({ id }) => id === room.budget.id);
  const order = await approved();
  const before = await budgetNow();
  await pay(order);
  const after = await budgetNow();
  expect(after?.spentMinor).toBe((before?.spentMinor ?? NaN) + order.totalMinor);
  expect(after?.committedMinor).toBe((before?.committedMinor ?? NaN) - order.totalMinor);
});
