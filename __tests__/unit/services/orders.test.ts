import fc from 'fast-check';
import { toMicro } from '@/lib/domain/quantities';
import { listBudgets } from '@/lib/services/budgets';
import { approveOrder, refuseOrder } from '@/lib/services/order-approval';
import { cancelOrder, sendOrder } from '@/lib/services/order-sending';
import { createOrder, getOrder, submitOrder, updateOrder } from '@/lib/services/orders';
import { payOrder } from '@/lib/services/payments';
import { write } from '@/models/db';
import { OfferModel } from '@/models/offer';
import { OrderModel } from '@/models/order';
import { ShortageModel } from '@/models/shortage';
import { SupplierModel } from '@/models/supplier';
import { buildPerson } from '../../support/prep-room';
import {
  approvedOrder,
  draftOrder,
  openPurchasing,
  orderForApproval,
  sentOrder,
} from '../../support/purchasing';
import type { Purchasing } from '../../support/purchasing';

let room: Purchasing;
beforeAll(async () => {
  room = await openPurchasing();
});
afterAll(() => room.close());

const one = () => [{ offer: room.silver, packs: 1 }];

describe('money', () => {
  it('adds up in whole pennies: goods, carriage, and one surcharge where anything is hazardous', async () => {
    const order = await draftOrder(room, [
      { offer: room.silver, packs: 2 },
      { offer: room.copper, packs: 3 },
    ]);
    // 2 x 84.00 + 3 x 9.41; carriage 9.50 + 15.00
    expect(order).toMatchObject({ goodsMinor: 19_623, surchargeMinor: 2_450, totalMinor: 22_073 });
    const harmless = await draftOrder(room, [{ offer: room.copper, packs: 3 }]);
    expect(harmless).toMatchObject({ goodsMinor: 2_823, surchargeMinor: 950, totalMinor: 3_773 });
  });

  it('stays whole for any packs at any price', async () => {
    const offer = await OfferModel.create({ ...room.copper.get(), id: undefined, stockNumber: 'any-price' });
    await fc.assert(
      fc.asyncProperty(
        fc.integer({ min: 1, max: 500 }),
        fc.integer({ min: 20_00, max: 9_999_99 }),
        async (packs, priceMinor) => {
          await offer.update({ priceMinor });
          const order = await draftOrder(room, [{ offer, packs }]);
          expect(Number.isSafeInteger(order.totalMinor)).toBe(true);
          expect(order.totalMinor).toBe(packs * priceMinor + 950);
          expect(order.lines.map(({ lineTotalMinor }) => lineTotalMinor)).toEqual([packs * priceMinor]);
        },
      ),
      { numRuns: 25 },
    );
  });

  it('keeps the price it was drafted at when the list changes', async () => {
    const offer = await OfferModel.create({
      ...room.copper.get(),
      id: undefined,
      stockNumber: 'to-rise',
      priceMinor: 30_00,
    });
    const draft = await draftOrder(room, [{ offer, packs: 1 }]);
    await offer.update({ priceMinor: 45_00 });
    expect((await getOrder(room.buyer, draft.id)).totalMinor).toBe(39_50);
  });

  it('is promised to its budget once approved, and no longer once cancelled', async () => {
    const promised = async () =>
      (await listBudgets()).find(({ id }) => id === room.budget.id)?.committedMinor ?? NaN;
    const before = await promised();
    await orderForApproval(room, one());
    expect(await promised()).toBe(before);
    const approved = await approvedOrder(room, one());
    expect(await promised()).toBe(before + approved.totalMinor);
    await cancelOrder(room.buyer, approved.id, { version: approved.version, reason: 'Found some.' });
    expect(await promised()).toBe(before);
  });
});

describe('what can not be drafted', () => {
  it('names each line that does not fit', async () => {
    const other = await SupplierModel.create({
      name: 'Elsewhere',
      email: 'desk@elsewhere.example',
      accountCode: 'E',
      leadDays: 1,
    });
    const foreign = await OfferModel.create({
      ...room.copper.get(),
      id: undefined,
      supplierId: other.id,
      stockNumber: 'foreign',
    });
    const closed = await OfferModel.create({
      ...room.copper.get(),
      id: undefined,
      stockNumber: 'closed',
      active: false,
    });
    const lines = [room.silver, foreign, closed, room.silver].map(({ id }) => ({ offerId: id, packs: 1 }));
    await expect(
      createOrder(room.drafter, {
        supplierId: room.supplier.id,
        budgetId: room.budget.id,
        note: null,
        lines,
      }),
    ).rejects.toMatchObject({
      code: 'invalid',
      extra: {
        errors: [
          { pointer: '#/lines/1/offerId' },
          { pointer: '#/lines/2/offerId' },
          { pointer: '#/lines/3/offerId' },
        ],
      },
    });
  });

  it('refuses an order below the supplier’s minimum', async () => {
    await expect(draftOrder(room, [{ offer: room.copper, packs: 2 }])).rejects.toMatchObject({
      code: 'invalid',
      extra: { errors: [{ pointer: '#/lines' }] },
    });
  });
});

describe('approval', () => {
  it('is not the drafter’s, whatever roles and limit they have', async () => {
    const rich = { ...room.drafter, approvalLimitMinor: 10_000_00 };
    const { id, version } = await orderForApproval(room, one());
    await expect(approveOrder(rich, id, { version, reason: '' })).rejects.toMatchObject({
      code: 'forbidden',
      message: expect.stringMatching(/drafted it/) as string,
    });
    await expect(refuseOrder(rich, id, { version, reason: 'Too dear.' })).rejects.toMatchObject({
      code: 'forbidden',
    });
    expect((await getOrder(room.buyer, id)).state).toBe('for-approval');
  });

  it('stops at the limit: a penny above it needs somebody else, and so do sending and paying', async () => {
    const { id, version, totalMinor } = await orderForApproval(room, one());
    const under = { ...room.buyer, approvalLimitMinor: totalMinor - 1 };
    const forbidden = { code: 'forbidden', message: expect.stringMatching(/limit/) as string };
    await expect(approveOrder(under, id, { version, reason: '' })).rejects.toMatchObject(forbidden);
    const approved = await approveOrder({ ...room.buyer, approvalLimitMinor: totalMinor }, id, {
      version,
      reason: '',
    });
    expect(approved).toMatchObject({ state: 'approved', approvedByName: room.buyer.name });
    await expect(sendOrder(under, id, { version: approved.version, reason: '' })).rejects.toMatchObject(
      forbidden,
    );
    await expect(payOrder(under, id, { version: approved.version, reason: '' })).rejects.toMatchObject(
      forbidden,
    );
  });

  it.each(['instructor', 'prep', 'safety', 'admin'] as const)('is not for %s', async (role) => {
    const person = { ...(await buildPerson([role])), approvalLimitMinor: 10_000_00 };
    const { id, version } = await orderForApproval(room, one());
    await expect(approveOrder(person, id, { version, reason: '' })).rejects.toMatchObject({
      code: 'forbidden',
    });
  });

  it('comes before sending and paying, and only once', async () => {
    const { id, version } = await orderForApproval(room, one());
    await expect(sendOrder(room.buyer, id, { version, reason: '' })).rejects.toMatchObject({
      code: 'wrong-state',
    });
    await expect(payOrder(room.buyer, id, { version, reason: '' })).rejects.toMatchObject({
      code: 'wrong-state',
    });
    const approvals = await Promise.allSettled(
      [1, 2].map(() => approveOrder(room.buyer, id, { version, reason: '' })),
    );
    expect(approvals.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    const { story } = await getOrder(room.buyer, id);
    expect(story.map(({ toState, actorName }) => [toState, actorName])).toEqual([
      ['draft', room.drafter.name],
      ['for-approval', room.drafter.name],
      ['approved', room.buyer.name],
    ]);
  });

  it('can be refused with a reason that stays in the record', async () => {
    const { id, version } = await orderForApproval(room, one());
    expect(await refuseOrder(room.buyer, id, { version, reason: 'We have two bottles.' })).toMatchObject({
      state: 'refused',
    });
    expect((await getOrder(room.drafter, id)).story.at(-1)).toMatchObject({
      toState: 'refused',
      reason: 'We have two bottles.',
    });
  });
});

describe('a draft', () => {
  it('is changed by its drafter alone, so that nobody approves lines of their own', async () => {
    const { id, version } = await draftOrder(room, one());
    const patch = {
      budgetId: room.budget.id,
      note: null,
      lines: [{ offerId: room.silver.id, packs: 5 }],
      version,
    };
    await expect(updateOrder(room.buyer, id, patch)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(submitOrder(room.buyer, id, { version, reason: '' })).rejects.toMatchObject({
      code: 'forbidden',
    });
    expect(await updateOrder(room.drafter, id, patch)).toMatchObject({
      goodsMinor: 420_00,
      totalMinor: 444_50,
    });
  });

  it('of two changes at once keeps one and tells the other', async () => {
    const { id, version } = await draftOrder(room, one());
    const change = (packs: number) =>
      updateOrder(room.drafter, id, {
        budgetId: room.budget.id,
        note: null,
        lines: [{ offerId: room.silver.id, packs }],
        version,
      });
    const results = await Promise.allSettled([change(2), change(3)]);
    expect(results.map(({ status }) => status)).toEqual(['fulfilled', 'rejected']);
    expect(results[1]).toMatchObject({
      reason: { code: 'conflict', extra: { data: { current: { goodsMinor: 168_00 } } } },
    });
  });

  it('can not be changed once it is put up for approval', async () => {
    const { id, version } = await orderForApproval(room, one());
    await expect(
      updateOrder(room.drafter, id, {
        budgetId: room.budget.id,
        note: null,
        lines: [{ offerId: room.silver.id, packs: 9 }],
        version,
      }),
    ).rejects.toMatchObject({ code: 'wrong-state' });
  });

  it('is cancelled by its drafter or by purchasing', async () => {
    const prep = await buildPerson(['prep']);
    const { id, version } = await draftOrder(room, one());
    await expect(cancelOrder(prep, id, { version, reason: '' })).rejects.toMatchObject({ code: 'forbidden' });
    expect((await cancelOrder(room.buyer, id, { version, reason: '' })).state).toBe('cancelled');
  });
});

describe('shortages', () => {
  const short = (grams: number, neededOn: string) =>
    ShortageModel.create({
      substanceId: 'silver-nitrate',
      unit: 'g',
      neededMicro: toMicro(grams),
      neededOn,
      orderBy: neededOn,
      state: 'open',
    });
  const stateOf = async ({ id }: ShortageModel) =>
    (await ShortageModel.findByPk(id, { rejectOnEmpty: true })).state;

  it('are on order only as far as the packs reach, the soonest needed first', async () => {
    const later = await short(20, '2030-02-01');
    const sooner = await short(20, '2030-01-01');
    const order = await draftOrder(room, one());
    expect(await stateOf(sooner)).toBe('on-order');
    expect(await stateOf(later)).toBe('open');
    await updateOrder(room.drafter, order.id, {
      budgetId: room.budget.id,
      note: null,
      lines: [{ offerId: room.silver.id, packs: 2 }],
      version: order.version,
    });
    expect(await stateOf(later)).toBe('on-order');
  });

  it('are open again when their order is refused or cancelled', async () => {
    const need = await short(10, '2031-01-01');
    const first = await orderForApproval(room, [{ offer: room.silver, packs: 4 }]);
    expect(await stateOf(need)).toBe('on-order');
    await refuseOrder(room.buyer, first.id, { version: first.version, reason: 'Not now.' });
    expect(await stateOf(need)).toBe('open');
    const second = await draftOrder(room, [{ offer: room.silver, packs: 4 }]);
    expect(await stateOf(need)).toBe('on-order');
    await cancelOrder(room.drafter, second.id, { version: second.version, reason: '' });
    expect(await stateOf(need)).toBe('open');
  });
});

describe('cancelling', () => {
  it('is not possible while it is not known whether a payment went through', async () => {
    room.standIns.modes.set('payments', 'down');
    const { id, version } = await approvedOrder(room, one());
    await expect(payOrder(room.buyer, id, { version, reason: '' })).rejects.toMatchObject({
      code: 'unavailable',
    });
    room.standIns.modes.set('payments', 'ok');
    const { version: now } = await getOrder(room.buyer, id);
    await expect(cancelOrder(room.buyer, id, { version: now, reason: '' })).rejects.toMatchObject({
      code: 'wrong-state',
    });
    expect((await payOrder(room.buyer, id, { version: now, reason: '' })).isPaid).toBe(true);
  });

  it('changes nothing when the transaction around it fails', async () => {
    const { id, version } = await sentOrder(room, one());
    await expect(
      write(async () => {
        await cancelOrder(room.buyer, id, { version, reason: '' });
        throw new Error('power cut');
      }),
    ).rejects.toThrow('power cut');
    expect((await OrderModel.findByPk(id, { rejectOnEmpty: true })).state).toBe('sent');
  });
});
