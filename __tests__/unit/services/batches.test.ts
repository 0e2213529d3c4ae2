import { addDays, formatISO } from 'date-fns';
import { toMicro } from '@/lib/domain/quantities';
import type { Batch } from '@/lib/schemas/batches';
import {
  checkBatch,
  discardBatch,
  enterTake,
  setBatchHold,
  startBatch,
  tickStep,
} from '@/lib/services/batch-making';
import { createBatch } from '@/lib/services/batch-planning';
import { getBatch, listBatches } from '@/lib/services/batches';
import { findPublicBottle, labelsOfBatch } from '@/lib/services/bottle-labels';
import { bottleBatch, changeBottle, handOver, printLabels, revokeBottle } from '@/lib/services/bottles';
import { getLot, setLotHold } from '@/lib/services/lots';
import { listNeeds } from '@/lib/services/needs';
import { BatchModel } from '@/models/batch';
import { BottleModel } from '@/models/bottle';
import { LotModel } from '@/models/lot';
import { MovementModel } from '@/models/movement';
import { RecordEntryModel } from '@/models/record-entry';
import { RequestModel } from '@/models/request';
import { ShortageModel } from '@/models/shortage';
import {
  buildAgreedRequest,
  buildLot,
  buildPerson,
  buildSolution,
  openPrepRoom,
} from '../../support/prep-room';
import type { PrepRoom } from '../../support/prep-room';

let house: PrepRoom;
beforeAll(async () => {
  house = await openPrepRoom();
});
afterAll(() => house.close());

const day = (offset: number) => formatISO(addDays(new Date(), offset), { representation: 'date' });
const ALL_NEEDS = {
  page: 1,
  pageSize: 200,
  sort: 'makeBy',
  search: '',
  format: 'json',
  show: 'all',
} as const;
const stateOf = async (id: string) => (await RequestModel.findByPk(id, { rejectOnEmpty: true })).state;
const balanceOf = async (id: string) => (await LotModel.findByPk(id, { rejectOnEmpty: true })).balanceMicro;

/** IUPAC abridged standard atomic weights (2021): Na 22.990, Cl 35.45; Cu 63.546, S 32.06, O 15.999, H 1.008. */
const NACL = 22.99 + 35.45;
const COPPER_SULFATE_PENTAHYDRATE = 63.546 + 32.06 + 9 * 15.999 + 10 * 1.008;

/** A planned batch of one solution for one request of its own. */
async function planOne(
  about: { substanceId?: string; molarity?: number; volumeMl?: number; conditions?: string[] } = {},
) {
  const solution = await buildSolution({
    substanceId: about.substanceId ?? 'sodium-chloride',
    molarity: about.molarity ?? 0.1,
  });
  const volumeMl = about.volumeMl ?? 500;
  const request = await buildAgreedRequest(house, [{ solution, volumeMl }], { conditions: about.conditions });
  const batch = await createBatch(
    house.prep,
    { solutionId: solution.id, requestIds: [request.id], makeOn: day(0) },
    null,
  );
  return { solution, request, batch };
}

async function started(batch: Batch): Promise<Batch> {
  return startBatch(house.prep, batch.id, batch.version);
}

/** Enters the target on every line and ticks every step. */
async function madeAsPlanned(batch: Batch): Promise<Batch> {
  const making = batch.state === 'planned' ? await started(batch) : batch;
  for (const take of making.takes) {
    await enterTake(house.prep, batch.id, take.id, {
      amount: take.target,
      explanation: '',
      version: take.version,
    });
  }
  for (const step of making.steps) await tickStep(house.prep, batch.id, step.id, true);
  return getBatch(house.prep, batch.id);
}

async function checked(batch: Batch): Promise<Batch> {
  const made = await madeAsPlanned(batch);
  return checkBatch(house.prep, batch.id, { note: '', version: made.version });
}

describe('needs', () => {
  it('say what an agreed request needs, what covers it, and when it may be made', async () => {
    await buildLot(house, { substanceId: 'sodium-chloride', amount: 500 });
    const solution = await buildSolution({ substanceId: 'sodium-chloride', molarity: 0.2, shelfLifeDays: 3 });
    const request = await buildAgreedRequest(house, [{ solution, volumeMl: 750 }], { inDays: 5 });
    const [before] = (await listNeeds(house.prep, { ...ALL_NEEDS, requestId: request.id })).items;
    expect(before).toMatchObject({ neededMl: 750, coveredMl: 0, openMl: 750, notBefore: day(2) });
    const early = createBatch(
      house.prep,
      { solutionId: solution.id, requestIds: [request.id], makeOn: day(1) },
      null,
    );
    await expect(early).rejects.toMatchObject({
      code: 'invalid',
      extra: { errors: [{ pointer: '#/makeOn' }] },
    });
    await createBatch(
      house.prep,
      { solutionId: solution.id, requestIds: [request.id], makeOn: day(3) },
      null,
    );
    const [after] = (await listNeeds(house.prep, { ...ALL_NEEDS, requestId: request.id })).items;
    expect(after).toMatchObject({ coveredMl: 750, openMl: 0 });
    expect((await listNeeds(house.prep, { ...ALL_NEEDS, show: 'open', requestId: request.id })).total).toBe(
      0,
    );
  });
});

describe('planning a batch', () => {
  it('takes from the usable lot that expires first and corrects the target for its assay', async () => {
    await buildLot(house, {
      substanceId: 'potassium-chloride',
      amount: 100,
      assayPercent: 99.9,
      expiresInDays: 200,
    });
    const soon = await buildLot(house, {
      substanceId: 'potassium-chloride',
      amount: 100,
      assayPercent: 98,
      expiresInDays: 20,
    });
    await buildLot(house, { substanceId: 'potassium-chloride', amount: 100, expiresInDays: -1 });
    const { batch } = await planOne({ substanceId: 'potassium-chloride' });
    expect(batch.takes).toHaveLength(1);
    expect(batch.takes[0]?.lotId).toBe(soon.id);
    // 0.1 mol/L × 0.5 L × 74.55 g/mol / 0.98 (K 39.098, Cl 35.45)
    expect(batch.takes[0]?.target).toBeCloseTo((0.05 * (39.098 + 35.45)) / 0.98, 2);
  });

  it('weighs the hydrate that stands on the shelf', async () => {
    await buildLot(house, { substanceId: 'copper-sulfate', amount: 100, assayPercent: 100 });
    const { batch } = await planOne({ substanceId: 'copper-sulfate', molarity: 0.2 });
    expect(batch.takes[0]?.formula).toContain('5H2O');
    expect(batch.takes[0]?.target).toBeCloseTo(0.1 * COPPER_SULFATE_PENTAHYDRATE, 1);
  });

  it('takes the requests it serves into work and is planned once under one key', async () => {
    const solution = await buildSolution({ substanceId: 'sodium-chloride', molarity: 0.3 });
    const [first, second] = await Promise.all([
      buildAgreedRequest(house, [{ solution, volumeMl: 300 }]),
      buildAgreedRequest(house, [{ solution, volumeMl: 200 }]),
    ]);
    const input = { solutionId: solution.id, requestIds: [first.id, second.id], makeOn: day(0) };
    const once = await createBatch(house.prep, input, 'intention-0001');
    const twice = await createBatch(house.prep, input, 'intention-0001');
    expect(twice.id).toBe(once.id);
    expect(await BatchModel.count({ where: { solutionId: solution.id } })).toBe(1);
    expect(once.volumeMl).toBe(500);
    expect([await stateOf(first.id), await stateOf(second.id)]).toEqual(['in-work', 'in-work']);
    await expect(createBatch(house.prep, input, 'intention-0002')).rejects.toMatchObject({
      code: 'wrong-state',
    });
  });

  it('plans nothing where the shelves hold too little, and tells purchasing what is short', async () => {
    await buildLot(house, { substanceId: 'nickel-sulfate', amount: 4, assayPercent: 100 });
    const solution = await buildSolution({ substanceId: 'nickel-sulfate', molarity: 0.1 });
    const request = await buildAgreedRequest(house, [{ solution, volumeMl: 1000 }]);
    const input = { solutionId: solution.id, requestIds: [request.id], makeOn: day(0) };
    for (const key of ['short-0001', 'short-0002']) {
      await expect(createBatch(house.prep, input, key)).rejects.toMatchObject({
        code: 'not-enough',
        message: expect.stringContaining('ickel'),
      });
    }
    expect(await stateOf(request.id)).toBe('agreed');
    expect(await BatchModel.count({ where: { solutionId: solution.id } })).toBe(0);
    const shortages = await ShortageModel.findAll({ where: { requestId: request.id } });
    expect(shortages).toHaveLength(1);
    expect(shortages[0]).toMatchObject({ substanceId: 'nickel-sulfate', unit: 'g', state: 'open' });
    // NiSO4·6H2O 262.84 g/mol: 26.28 g wanted, 4 g there.
    expect((shortages[0]?.neededMicro ?? 0) / 1e6).toBeCloseTo(22.28, 1);
    await buildLot(house, { substanceId: 'nickel-sulfate', amount: 100, assayPercent: 100 });
    await createBatch(house.prep, input, 'short-0001');
    expect((await ShortageModel.findOne({ where: { requestId: request.id } }))?.state).toBe('covered');
  });

  it('does not count the same stock on for two batches', async () => {
    await buildLot(house, { substanceId: 'potassium-bromide', amount: 8, assayPercent: 100 });
    await planOne({ substanceId: 'potassium-bromide' });
    await expect(planOne({ substanceId: 'potassium-bromide' })).rejects.toMatchObject({ code: 'not-enough' });
  });

  it('refuses requests that are not agreed, and what they do not need', async () => {
    const solution = await buildSolution({ substanceId: 'sodium-chloride', molarity: 0.4 });
    const other = await buildSolution({ substanceId: 'sodium-chloride', molarity: 0.5 });
    const request = await buildAgreedRequest(house, [{ solution, volumeMl: 100 }]);
    await expect(
      createBatch(house.prep, { solutionId: other.id, requestIds: [request.id], makeOn: day(0) }, null),
    ).rejects.toMatchObject({ code: 'invalid' });
    await expect(
      createBatch(
        house.prep,
        { solutionId: solution.id, requestIds: [request.id], makeOn: day(0), volumeMl: 50 },
        null,
      ),
    ).rejects.toMatchObject({
      extra: { errors: [{ pointer: '#/volumeMl' }] },
    });
    await request.update({ state: 'in-review' });
    await expect(
      createBatch(house.prep, { solutionId: solution.id, requestIds: [request.id], makeOn: day(0) }, null),
    ).rejects.toMatchObject({ code: 'wrong-state' });
  });
});

describe('making a batch', () => {
  it('lets stock fall once by what was entered, however often it is sent', async () => {
    const lot = await buildLot(house, { substanceId: 'sodium-nitrate', amount: 100, assayPercent: 100 });
    const { batch } = await planOne({ substanceId: 'sodium-nitrate' });
    const [take] = (await started(batch)).takes;
    if (!take) throw new Error('no line');
    const entry = { amount: take.target, explanation: '', version: take.version };
    await Promise.allSettled([1, 2, 3].map(() => enterTake(house.prep, batch.id, take.id, entry)));
    await enterTake(house.prep, batch.id, take.id, entry);
    expect(await MovementModel.count({ where: { batchId: batch.id } })).toBe(1);
    expect(await balanceOf(lot.id)).toBe(toMicro(100) - toMicro(take.target));
  });

  it('corrects an entry by giving back and taking anew; an entry made on an old page is refused', async () => {
    const lot = await buildLot(house, { substanceId: 'sodium-sulfate', amount: 100, assayPercent: 100 });
    const { batch } = await planOne({ substanceId: 'sodium-sulfate' });
    const [take] = (await started(batch)).takes;
    if (!take) throw new Error('no line');
    await enterTake(house.prep, batch.id, take.id, { amount: take.target, explanation: '', version: 0 });
    await expect(
      enterTake(house.prep, batch.id, take.id, { amount: take.low, explanation: '', version: 0 }),
    ).rejects.toMatchObject({ code: 'conflict' });
    await enterTake(house.prep, batch.id, take.id, { amount: take.low, explanation: '', version: 1 });
    const lines = await MovementModel.findAll({
      where: { batchId: batch.id },
      order: [['createdAt', 'ASC']],
    });
    expect(lines.map(({ kind }) => kind).sort()).toEqual(['corrected', 'taken', 'taken']);
    expect(await balanceOf(lot.id)).toBe(toMicro(100) - toMicro(take.low));
  });

  it('asks for an explanation outside the allowed range, and writes nothing without one', async () => {
    const { batch } = await planOne();
    const [take] = (await started(batch)).takes;
    if (!take) throw new Error('no line');
    const entry = { amount: take.target * 1.015, version: take.version };
    await expect(
      enterTake(house.prep, batch.id, take.id, { ...entry, explanation: '' }),
    ).rejects.toMatchObject({ code: 'invalid', extra: { errors: [{ pointer: '#/explanation' }] } });
    expect(await MovementModel.count({ where: { batchId: batch.id } })).toBe(0);
    const after = await enterTake(house.prep, batch.id, take.id, {
      ...entry,
      explanation: 'Spatula slipped',
    });
    expect(after.takes[0]).toMatchObject({ verdict: 'explain', explanation: 'Spatula slipped' });
  });

  it('is not checked before every line is entered and every condition ticked', async () => {
    const { batch } = await planOne({ conditions: ['Fume cupboard 2 only'] });
    const condition = batch.steps.find(({ kind }) => kind === 'condition');
    expect(condition?.text).toContain('Fume cupboard 2 only');
    const making = await started(batch);
    await expect(
      checkBatch(house.prep, batch.id, { note: '', version: making.version }),
    ).rejects.toMatchObject({ code: 'wrong-state' });
    const made = await madeAsPlanned(making);
    await tickStep(house.prep, batch.id, condition?.id ?? '', false);
    await expect(checkBatch(house.prep, batch.id, { note: '', version: made.version })).rejects.toMatchObject(
      { message: expect.stringContaining('Fume cupboard 2 only') },
    );
    await tickStep(house.prep, batch.id, condition?.id ?? '', true);
    const done = await checkBatch(house.prep, batch.id, { note: '', version: made.version });
    expect(done.state).toBe('checked');
    expect(
      await RecordEntryModel.count({ where: { subjectId: batch.id, action: 'condition met' } }),
    ).toBeGreaterThan(0);
  });

  it('states the real strength with its uncertainty: c = m w / (M V)', async () => {
    const { batch } = await planOne({ volumeMl: 1000 });
    const making = await started(batch);
    const [take] = making.takes;
    if (!take) throw new Error('no line');
    const taken = Number((take.target * 1.005).toFixed(3));
    await enterTake(house.prep, batch.id, take.id, { amount: taken, explanation: '', version: take.version });
    for (const step of making.steps) await tickStep(house.prep, batch.id, step.id, true);
    const done = await checkBatch(house.prep, batch.id, { note: '', version: making.version });
    const strength = done.actual?.strengths[0];
    const assay = Number(/corrected for ([\d.]+) %/.exec(take.note)?.[1]) / 100;
    expect(strength?.molarity).toBeCloseTo((taken * assay) / NACL / 1, 5);
    expect(strength?.expandedUncertainty).toBeGreaterThan(0);
    expect(strength?.expandedUncertainty).toBeLessThan(0.002);
  });

  it('must be made again where the real strength is far off, even if explained', async () => {
    const { batch, request } = await planOne();
    const making = await started(batch);
    const [take] = making.takes;
    if (!take) throw new Error('no line');
    await enterTake(house.prep, batch.id, take.id, {
      amount: take.target * 1.2,
      explanation: 'Wrong mark',
      version: take.version,
    });
    for (const step of making.steps) await tickStep(house.prep, batch.id, step.id, true);
    await expect(
      checkBatch(house.prep, batch.id, { note: 'Known', version: making.version }),
    ).rejects.toMatchObject({ code: 'wrong-state', message: expect.stringContaining('make it again') });
    const now = await getBatch(house.prep, batch.id);
    await discardBatch(house.prep, batch.id, { reason: 'Too strong', version: now.version });
    const [need] = (await listNeeds(house.prep, { ...ALL_NEEDS, requestId: request.id })).items;
    expect(need?.openMl).toBe(500);
  });
});

describe('bottles', () => {
  it('make the request ready when all stands bottled, and handed over when all left', async () => {
    const { batch, request } = await planOne();
    const done = await checked(batch);
    await expect(
      bottleBatch(house.prep, batch.id, {
        bottles: [{ volumeMl: 600, requestId: request.id }],
        version: done.version,
      }),
    ).rejects.toMatchObject({ code: 'invalid' });
    const bottled = await bottleBatch(house.prep, batch.id, {
      bottles: [
        { volumeMl: 250, requestId: request.id },
        { volumeMl: 250, requestId: request.id },
      ],
      version: done.version,
    });
    expect(bottled.bottles.map(({ code }) => code)).toEqual([`${batch.code}/1`, `${batch.code}/2`]);
    expect(new Set(bottled.bottles.map(({ publicToken }) => publicToken)).size).toBe(2);
    expect(await stateOf(request.id)).toBe('ready');
    const [one, two] = bottled.bottles;
    expect(
      (await handOver(house.prep, { requestId: request.id, bottleIds: [one?.id ?? ''] })).requestState,
    ).toBe('ready');
    expect(
      (await handOver(house.prep, { requestId: request.id, bottleIds: [two?.id ?? ''] })).requestState,
    ).toBe('handed-over');
  });

  it('stay where they are while their lot is on hold, and are found from it', async () => {
    const lot = await buildLot(house, { substanceId: 'zinc-sulfate', amount: 100, assayPercent: 100 });
    const { batch, request } = await planOne({ substanceId: 'zinc-sulfate' });
    const done = await checked(batch);
    const bottled = await bottleBatch(house.prep, batch.id, {
      bottles: [{ volumeMl: 500, requestId: request.id }],
      version: done.version,
    });
    const bottleIds = bottled.bottles.map(({ id }) => id);
    const before = await getLot(house.prep, lot.id);
    expect(before.usedIn[0]?.bottleCodes).toEqual([`${batch.code}/1`]);
    const held = await setLotHold(house.safety, lot.id, true, {
      reason: 'Certificate doubted',
      version: before.version,
    });
    await expect(handOver(house.prep, { requestId: request.id, bottleIds })).rejects.toMatchObject({
      message: expect.stringContaining('Certificate doubted'),
    });
    expect((await getBatch(house.prep, batch.id)).isHeld).toBe(true);
    const token = bottled.bottles[0]?.publicToken ?? '';
    expect(await findPublicBottle(token)).toMatchObject({ kind: 'bottle', isHeld: true });
    await setLotHold(house.safety, lot.id, false, { reason: 'Certificate came', version: held.version });
    expect((await handOver(house.prep, { requestId: request.id, bottleIds })).requestState).toBe(
      'handed-over',
    );
  });

  it('that are discarded put the request back to work', async () => {
    const { batch, request } = await planOne();
    const done = await checked(batch);
    const bottled = await bottleBatch(house.prep, batch.id, {
      bottles: [{ volumeMl: 500, requestId: request.id }],
      version: done.version,
    });
    const [bottle] = bottled.bottles;
    await changeBottle(house.prep, bottle?.id ?? '', {
      state: 'discarded',
      reason: 'Dropped',
      version: bottle?.version ?? 0,
    });
    expect(await stateOf(request.id)).toBe('in-work');
    expect((await getBatch(house.prep, batch.id)).state).toBe('spent');
  });

  it('carry a label of the solution as diluted; a revoked address says nothing more', async () => {
    const { batch, request } = await planOne();
    const done = await checked(batch);
    const bottled = await bottleBatch(house.prep, batch.id, {
      bottles: [{ volumeMl: 500, requestId: request.id }],
      version: done.version,
    });
    const [bottle] = bottled.bottles;
    if (!bottle) throw new Error('no bottle');
    const [label] = (await labelsOfBatch(house.prep, batch.id)).labels;
    expect(label?.address).toMatch(new RegExp(`/b/${bottle.publicToken}$`));
    expect(label?.classification.hazards).toEqual([]);
    await printLabels(house.prep, { bottleIds: [bottle.id], reason: '' });
    await expect(printLabels(house.prep, { bottleIds: [bottle.id], reason: '' })).rejects.toMatchObject({
      code: 'invalid',
    });
    await revokeBottle(house.prep, bottle.id, { reason: 'Label lost', version: bottle.version });
    expect(await findPublicBottle(bottle.publicToken)).toMatchObject({ kind: 'revoked' });
    expect(await findPublicBottle('no-such-token')).toBeNull();
  });
});

describe('holds and sight', () => {
  it('a held batch takes no entries and no bottles until the hold is lifted', async () => {
    const { batch } = await planOne();
    const making = await started(batch);
    const held = await setBatchHold(house.safety, batch.id, true, {
      reason: 'Spill',
      version: making.version,
    });
    const [take] = making.takes;
    const entry = { amount: take?.target ?? 1, explanation: '', version: 0 };
    await expect(enterTake(house.prep, batch.id, take?.id ?? '', entry)).rejects.toMatchObject({
      code: 'wrong-state',
    });
    await setBatchHold(house.safety, batch.id, false, { reason: 'Cleaned', version: held.version });
    await expect(enterTake(house.prep, batch.id, take?.id ?? '', entry)).resolves.toBeDefined();
  });

  it('an instructor sees the batches made for their own requests and no others', async () => {
    const { batch } = await planOne();
    const stranger = await buildPerson(['instructor']);
    const query = { page: 1, pageSize: 200, sort: 'makeOn', search: '', format: 'json' } as const;
    expect((await listBatches(stranger, query)).total).toBe(0);
    expect((await listBatches(house.instructor, query)).items.map(({ id }) => id)).toContain(batch.id);
    await expect(getBatch(stranger, batch.id)).rejects.toMatchObject({ code: 'not-found' });
    expect(await BottleModel.count()).toBeGreaterThan(0);
  });
});
