import { toMicro } from '@/lib/domain/quantities';
import { move } from '@/lib/services/ledger';
import { createMovement } from '@/lib/services/movements';
import { write } from '@/models/db';
import { LotModel } from '@/models/lot';
import { MovementModel } from '@/models/movement';
import { buildLot, openPrepRoom } from '../../support/prep-room';
import type { PrepRoom } from '../../support/prep-room';

let house: PrepRoom;
beforeAll(async () => {
  house = await openPrepRoom();
});
afterAll(() => house.close());

/** A repeatable row of numbers in [0, 1), so that a failing sequence can be run again (Park and Miller, 1988). */
function randomRow(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48_271) % 2_147_483_647;
    return state / 2_147_483_647;
  };
}

const balanceOf = async (id: string) => (await LotModel.findByPk(id, { rejectOnEmpty: true })).balanceMicro;
const sumOf = async (id: string) =>
  (await MovementModel.findAll({ where: { lotId: id } })).reduce(
    (sum, { amountMicro }) => sum + amountMicro,
    0,
  );

describe('the stock ledger', () => {
  it.each([1, 2, 3, 4, 5])(
    'keeps the balance equal to the sum of its lines and never below nothing (sequence %i)',
    async (seed) => {
      const random = randomRow(seed);
      const lot = await buildLot(house, { substanceId: 'sodium-chloride', amount: 20 });
      let model = toMicro(20);
      let refused = 0;
      for (let step = 0; step < 60; step += 1) {
        const amountMicro = Math.ceil(random() * 9_000_000) * (random() < 0.7 ? -1 : 1);
        const isPossible = model + amountMicro >= 0;
        const work = write(() =>
          move(house.prep, { lotId: lot.id, kind: amountMicro < 0 ? 'taken' : 'put-back', amountMicro }),
        );
        if (isPossible) {
          model += amountMicro;
          expect((await work).balanceAfterMicro).toBe(model);
        } else {
          refused += 1;
          await expect(work).rejects.toMatchObject({ code: 'not-enough' });
        }
        expect(await balanceOf(lot.id)).toBe(model);
      }
      expect(refused).toBeGreaterThan(0);
      expect(await sumOf(lot.id)).toBe(model);
    },
  );

  it('loses nothing when fifty take at once: as many succeed as there is stock for', async () => {
    const lot = await buildLot(house, { substanceId: 'sodium-chloride', amount: 30 });
    const takes = await Promise.allSettled(
      Array.from({ length: 50 }, () =>
        write(() => move(house.prep, { lotId: lot.id, kind: 'taken', amountMicro: -toMicro(1) })),
      ),
    );
    expect(takes.filter(({ status }) => status === 'fulfilled')).toHaveLength(30);
    for (const take of takes)
      if (take.status === 'rejected') expect(take.reason).toMatchObject({ code: 'not-enough' });
    expect(await balanceOf(lot.id)).toBe(0);
    expect(await sumOf(lot.id)).toBe(0);
  });

  it('keeps neither line nor balance of a write that fails afterwards', async () => {
    const lot = await buildLot(house, { substanceId: 'sodium-chloride', amount: 5 });
    const work = write(async () => {
      await move(house.prep, { lotId: lot.id, kind: 'taken', amountMicro: -toMicro(2) });
      throw new Error('power cut');
    });
    await expect(work).rejects.toThrow('power cut');
    expect(await balanceOf(lot.id)).toBe(toMicro(5));
    expect(await sumOf(lot.id)).toBe(toMicro(5));
  });

  it('refuses to move outside a write, nothing, or parts of a millionth', async () => {
    const lot = await buildLot(house, { substanceId: 'sodium-chloride', amount: 5 });
    await expect(move(house.prep, { lotId: lot.id, kind: 'taken', amountMicro: -1 })).rejects.toThrow(
      TypeError,
    );
    await expect(
      write(() => move(house.prep, { lotId: lot.id, kind: 'taken', amountMicro: 0 })),
    ).rejects.toThrow(RangeError);
    await expect(
      write(() => move(house.prep, { lotId: lot.id, kind: 'taken', amountMicro: -0.5 })),
    ).rejects.toThrow(RangeError);
  });

  it('writes a count down as the difference to what it said before', async () => {
    const lot = await buildLot(house, { substanceId: 'sodium-chloride', amount: 12.5 });
    const line = await createMovement(house.prep, {
      kind: 'counted',
      lotId: lot.id,
      amount: 11.9,
      reason: 'Counted',
    });
    expect(line).toMatchObject({ kind: 'corrected', amount: -0.6, balanceAfter: 11.9 });
    await expect(
      createMovement(house.prep, { kind: 'counted', lotId: lot.id, amount: 11.9, reason: 'Again' }),
    ).rejects.toMatchObject({ code: 'invalid' });
    await expect(
      createMovement(house.prep, { kind: 'discarded', lotId: lot.id, amount: 12, reason: 'Wet' }),
    ).rejects.toMatchObject({ code: 'not-enough' });
  });
});
