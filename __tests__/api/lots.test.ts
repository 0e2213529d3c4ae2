import { addDays, formatISO } from 'date-fns';
import type { Lot } from '@/lib/schemas/lots';
import { ABSENT_ID, signedIn, stranger } from '../support/signed-in';
import type { Agent } from '../support/signed-in';

let prep: Agent;
let instructor: Agent;
let purchasing: Agent;
let placeId: string;

beforeAll(async () => {
  [prep, instructor, purchasing] = await Promise.all([
    signedIn('prep'),
    signedIn('instructor'),
    signedIn('purchasing'),
  ]);
  placeId = (await prep.get('/api/places')).body.items[0].id;
});

const day = (offset: number) => formatISO(addDays(new Date(), offset), { representation: 'date' });
const newLot = () => ({
  substanceId: 'sodium-chloride',
  lotNumber: 'T-1',
  assayPercent: 99.5,
  amount: 100,
  receivedOn: day(0),
  expiresOn: day(300),
  placeId,
  reason: 'Found in the cellar',
});

async function someLot(): Promise<Lot> {
  const answer = await prep.post('/api/lots').send(newLot());
  expect(answer.status).toBe(201);
  return answer.body;
}

describe('lots', () => {
  it('are seen by staff and changed by prep', async () => {
    expect((await stranger().get('/api/lots')).status).toBe(401);
    expect((await instructor.get('/api/lots')).status).toBe(403);
    expect((await purchasing.get('/api/lots')).status).toBe(200);
    expect((await purchasing.post('/api/lots').send(newLot())).status).toBe(403);
    expect((await prep.get(`/api/lots/${ABSENT_ID}`)).status).toBe(404);
  });

  it.each([
    ['amount', { amount: -1 }],
    ['amount', { amount: 'lots' }],
    ['amount', { amount: 1e15 }],
    ['assayPercent', { assayPercent: 101 }],
    ['assayPercent', { assayPercent: 0 }],
    ['substanceId', { substanceId: 'no-such-thing' }],
    ['placeId', { placeId: ABSENT_ID }],
    ['expiresOn', { expiresOn: '2000-01-01' }],
    ['receivedOn', { receivedOn: '2999-01-01' }],
    ['reason', { reason: '' }],
    ['lotNumber', { lotNumber: '  ' }],
  ])('refuse a bad %s and name it (%j)', async (field, wrong) => {
    const answer = await prep.post('/api/lots').send({ ...newLot(), ...wrong });
    expect(answer.status).toBe(422);
    expect(answer.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toContain(`#/${field}`);
  });

  it('begin their ledger with what came in', async () => {
    const lot = await someLot();
    expect(lot).toMatchObject({ balance: 100, unit: 'g', assayPercent: 99.5 });
    const { body: ledger } = await prep.get('/api/movements').query({ lotId: lot.id });
    expect(ledger.items).toMatchObject([{ kind: 'received', amount: 100, balanceAfter: 100 }]);
  });

  it('are found, sorted, filtered, paged and exported on the server', async () => {
    const { body: found } = await prep.get('/api/lots').query({ search: '7647-14-5', show: 'all' });
    expect(found.total).toBeGreaterThan(0);
    expect(new Set(found.items.map(({ substanceId }: Lot) => substanceId))).toEqual(
      new Set(['sodium-chloride']),
    );
    const { body: page } = await prep.get('/api/lots').query({ pageSize: 5, sort: '-balance' });
    const balances = page.items.map(({ balance }: Lot) => balance);
    expect(balances).toEqual([...balances].sort((a: number, b: number) => b - a));
    const { body: expired } = await prep.get('/api/lots').query({ show: 'expired' });
    expect(expired.items.every(({ isExpired }: Lot) => isExpired)).toBe(true);
    expect((await prep.get('/api/lots').query({ sort: 'colour' })).status).toBe(422);
    const sheet = await prep.get('/api/lots').query({ format: 'xlsx', search: 'T-1' });
    expect(sheet.headers['content-type']).toContain('spreadsheetml');
  });

  it('on hold say why, and can be freed again', async () => {
    const lot = await someLot();
    expect(
      (await purchasing.post(`/api/lots/${lot.id}/hold`).send({ reason: 'Why not', version: lot.version }))
        .status,
    ).toBe(403);
    const held = await prep
      .post(`/api/lots/${lot.id}/hold`)
      .send({ reason: 'Doubtful', version: lot.version });
    expect(held.body).toMatchObject({ isHeld: true, heldReason: 'Doubtful' });
    expect(
      (await prep.post(`/api/lots/${lot.id}/hold`).send({ reason: 'Again', version: lot.version })).status,
    ).toBe(409);
    const { body: list } = await prep.get('/api/lots').query({ show: 'held', search: lot.code });
    expect(list.total).toBe(1);
    const lifted = await prep
      .post(`/api/lots/${lot.id}/lift`)
      .send({ reason: 'Tested', version: held.body.version });
    expect(lifted.body.isHeld).toBe(false);
  });

  it('are moved from an up-to-date page only', async () => {
    const lot = await someLot();
    const patch = {
      placeId,
      assayPercent: 98,
      openedOn: day(0),
      expiresOn: null,
      reason: 'Opened',
      version: lot.version,
    };
    expect((await prep.patch(`/api/lots/${lot.id}`).send(patch)).body).toMatchObject({
      assayPercent: 98,
      expiresOn: null,
    });
    expect((await prep.patch(`/api/lots/${lot.id}`).send(patch)).status).toBe(409);
  });
});

describe('the ledger by hand', () => {
  it('writes a count once however often it is sent, and never falls below nothing', async () => {
    const lot = await someLot();
    const count = { kind: 'counted', lotId: lot.id, amount: 92.5, reason: 'Counted' };
    const key = `count-${lot.id}`;
    const answers = await Promise.all(
      [1, 2].map(() => prep.post('/api/movements').set('idempotency-key', key).send(count)),
    );
    expect(answers.map(({ status }) => status)).toEqual([201, 201]);
    expect(answers[0]?.body.id).toBe(answers[1]?.body.id);
    const tooMuch = await prep
      .post('/api/movements')
      .send({ kind: 'discarded', lotId: lot.id, amount: 93, reason: 'Spilt' });
    expect(tooMuch.status).toBe(409);
    expect((await prep.get(`/api/lots/${lot.id}`)).body.balance).toBe(92.5);
    expect((await prep.get('/api/movements').query({ lotId: lot.id })).body.total).toBe(2);
  });

  it('is written by prep, with known kinds and sensible amounts', async () => {
    const lot = await someLot();
    const line = { kind: 'discarded', lotId: lot.id, amount: 1, reason: 'Spilt' };
    expect((await stranger().post('/api/movements').send(line)).status).toBe(401);
    expect((await purchasing.post('/api/movements').send(line)).status).toBe(403);
    for (const wrong of [
      { kind: 'stolen' },
      { amount: -1 },
      { amount: null },
      { reason: 'x' },
      { lotId: ABSENT_ID },
      { colour: 'red' },
    ]) {
      expect((await prep.post('/api/movements').send({ ...line, ...wrong })).status).toBe(422);
    }
    const parallel = await Promise.all(
      Array.from({ length: 12 }, () => prep.post('/api/movements').send({ ...line, amount: 10 })),
    );
    expect(parallel.filter(({ status }) => status === 201)).toHaveLength(10);
    expect(parallel.filter(({ status }) => status === 409)).toHaveLength(2);
    expect((await prep.get(`/api/lots/${lot.id}`)).body.balance).toBe(0);
  });
});
