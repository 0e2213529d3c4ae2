import { addDays, formatISO } from 'date-fns';
import type { Batch } from '@/lib/schemas/batches';
import type { LabSession, RoomRow } from '@/lib/schemas/lab-sessions';
import type { RequestDetail } from '@/lib/schemas/requests';
import { bodyOf, signIn } from './api';
import type { Caller } from './api';
import { recipe } from './asking';

/** Far enough ahead to be made, near enough that no lot has expired. */
const DAYS_AHEAD = 12;

/** A late hour in the demonstration theatre, where nothing else stands. */
async function buildEvening(instructor: Caller): Promise<LabSession> {
  const { items } = bodyOf<{ items: RoomRow[] }>(await instructor.get('/api/rooms'));
  const day = formatISO(addDays(new Date(), DAYS_AHEAD), { representation: 'date' });
  return bodyOf<LabSession>(
    await instructor.post('/api/lab-sessions', {
      course: 'CH 901',
      title: 'Printed matter',
      startsAt: `${day}T21:00:00Z`,
      endsAt: `${day}T22:00:00Z`,
      roomId: items.find(({ name }) => name === 'Demonstration theatre')?.id,
      benches: 10,
    }),
    201,
  );
}

interface LabelRow {
  readonly bottleCode: string;
  readonly address: string;
}

/** A batch of a harmless solution, asked for, made to the target and bottled, all over the interface. */
export async function makeBottledBatch(): Promise<{ batchId: string; bottles: readonly LabelRow[] }> {
  const instructor = await signIn('instructor');
  const prep = await signIn('prep');
  const solution = await recipe(instructor, 'Potassium bromide 0.1 mol/L');
  const session = await buildEvening(instructor);
  const draft = bodyOf<RequestDetail>(
    await instructor.post('/api/requests', {
      sessionId: session.id,
      note: null,
      lines: [{ kind: 'solution', solutionId: solution.id, volumePerBenchMl: 20, spareBenches: 0 }],
    }),
    201,
  );
  bodyOf(await instructor.post(`/api/requests/${draft.id}/submit`, { version: draft.version }));
  const makeOn = formatISO(addDays(new Date(draft.startsAt), -1), { representation: 'date' });
  let batch = bodyOf<Batch>(
    await prep.post('/api/batches', { solutionId: solution.id, requestIds: [draft.id], makeOn }),
    201,
  );
  batch = bodyOf<Batch>(await prep.post(`/api/batches/${batch.id}/start`, { version: batch.version }));
  batch = await takeAndTick(prep, batch);
  batch = bodyOf<Batch>(
    await prep.post(`/api/batches/${batch.id}/check`, { note: '', version: batch.version }),
  );
  batch = bodyOf<Batch>(
    await prep.post(`/api/batches/${batch.id}/bottles`, {
      bottles: [
        { volumeMl: batch.volumeMl / 2, requestId: draft.id },
        { volumeMl: batch.volumeMl / 2, requestId: draft.id },
      ],
      version: batch.version,
    }),
    201,
  );
  const { labels } = bodyOf<{ labels: LabelRow[] }>(await prep.get(`/api/batches/${batch.id}/labels`));
  return { batchId: batch.id, bottles: labels };
}

async function takeAndTick(prep: Caller, planned: Batch): Promise<Batch> {
  let batch = planned;
  for (const take of planned.takes) {
    const amount = Number.parseFloat(take.targetText.replaceAll(/[^\d.]/g, ''));
    batch = bodyOf<Batch>(
      await prep.put(`/api/batches/${batch.id}/takes/${take.id}`, {
        amount,
        explanation: '',
        version: take.version,
      }),
    );
  }
  for (const step of planned.steps) {
    batch = bodyOf<Batch>(await prep.put(`/api/batches/${batch.id}/steps/${step.id}`, { isDone: true }));
  }
  return batch;
}
