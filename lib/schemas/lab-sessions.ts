import { z } from 'zod';
import { REQUEST_STATES } from '@/lib/domain/states';
import { endpoint } from './endpoint';
import { dayField, idField, idParams, momentField, nameField, versionField } from './fields';
import { listQuery, pageOf } from './list';

export const labSessionSchema = z.object({
  id: z.uuid(),
  course: z.string(),
  title: z.string(),
  startsAt: z.string(),
  endsAt: z.string(),
  roomId: z.uuid(),
  roomName: z.string(),
  benches: z.number().int(),
  instructorId: z.uuid(),
  instructorName: z.string(),
  isCancelled: z.boolean(),
  version: z.number().int(),
  requests: z.array(z.object({ id: z.uuid(), code: z.string(), state: z.enum(REQUEST_STATES) })),
});
export type LabSession = z.infer<typeof labSessionSchema>;

const shape = {
  course: z.string().trim().min(1, 'Which course?').max(40),
  title: nameField,
  startsAt: momentField,
  endsAt: momentField,
  roomId: idField,
  benches: z.number().int('Whole benches.').min(1, 'At least one bench.').max(60, 'At most 60 benches.'),
};
const LONGEST_HOURS = 24;
interface Times {
  readonly startsAt: string;
  readonly endsAt: string;
}
const hoursOf = ({ startsAt, endsAt }: Times) => (Date.parse(endsAt) - Date.parse(startsAt)) / 3_600_000;
const endsAfterStart = (times: Times) => hoursOf(times) > 0;
const endRule = { path: ['endsAt'], message: 'It must end after it starts.' };
const isNoLongerThanADay = (times: Times) => hoursOf(times) <= LONGEST_HOURS;
const lengthRule = { path: ['endsAt'], message: 'A session lasts a day at most. Is the date right?' };

export const labSessionCreateSchema = z
  .strictObject(shape)
  .refine(endsAfterStart, endRule)
  .refine(isNoLongerThanADay, lengthRule);
export type LabSessionCreate = z.output<typeof labSessionCreateSchema>;
export const labSessionPatchSchema = z
  .strictObject({ ...shape, isCancelled: z.boolean(), version: versionField })
  .refine(endsAfterStart, endRule)
  .refine(isNoLongerThanADay, lengthRule);
export type LabSessionPatch = z.output<typeof labSessionPatchSchema>;

export const labSessionListQuerySchema = listQuery(['startsAt', 'course', 'title'], 'startsAt', {
  from: dayField.optional(),
  to: dayField.optional(),
  whose: z.enum(['mine', 'all']).default('all'),
});
export type LabSessionListQuery = z.output<typeof labSessionListQuerySchema>;

export const roomRowSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  volumeM3: z.number(),
  airChangesPerHour: z.number(),
  fumeCupboards: z.number().int(),
  benches: z.number().int(),
});
export type RoomRow = z.infer<typeof roomRowSchema>;

export const labSessionEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/lab-sessions',
    action: 'lab-session:read',
    summary: 'Bench sessions',
    query: labSessionListQuerySchema,
    response: pageOf(labSessionSchema),
    columns: [
      { key: 'startsAt', header: 'Starts' },
      { key: 'course', header: 'Course' },
      { key: 'title', header: 'Title' },
      { key: 'roomName', header: 'Room' },
      { key: 'benches', header: 'Benches' },
      { key: 'instructorName', header: 'Instructor' },
    ],
  }),
  create: endpoint({
    method: 'POST',
    path: '/api/lab-sessions',
    action: 'lab-session:create',
    summary: 'Make a session',
    body: labSessionCreateSchema,
    response: labSessionSchema,
    status: 201,
  }),
  read: endpoint({
    method: 'GET',
    path: '/api/lab-sessions/{id}',
    action: 'lab-session:read',
    summary: 'One session',
    params: idParams,
    response: labSessionSchema,
  }),
  update: endpoint({
    method: 'PATCH',
    path: '/api/lab-sessions/{id}',
    action: 'lab-session:update',
    summary: 'Change or cancel a session',
    params: idParams,
    body: labSessionPatchSchema,
    response: labSessionSchema,
  }),
  rooms: endpoint({
    method: 'GET',
    path: '/api/rooms',
    action: 'place:read',
    summary: 'Rooms with their air',
    response: z.object({ items: z.array(roomRowSchema) }),
  }),
};
