import { addDays, isWeekend, set, startOfDay } from 'date-fns';
import { SessionModel } from '@/models/session';
import type { UserModel } from '@/models/user';
import type { Rooms } from './rooms';

const WEEKLY: readonly {
  day: number;
  hour: number;
  course: string;
  title: string;
  room: string;
  benches: number;
  instructor: string;
}[] = [
  {
    day: 1,
    hour: 9,
    course: 'CH 110',
    title: 'Ions in water',
    room: 'Laboratory 1',
    benches: 12,
    instructor: 'instructor',
  },
  {
    day: 1,
    hour: 14,
    course: 'CH 240',
    title: 'Complexes and colour',
    room: 'Laboratory 2',
    benches: 8,
    instructor: 't.renwick',
  },
  {
    day: 2,
    hour: 10,
    course: 'CH 110',
    title: 'Acids and bases',
    room: 'Laboratory 1',
    benches: 12,
    instructor: 'instructor',
  },
  {
    day: 3,
    hour: 14,
    course: 'CH 240',
    title: 'Solubility and complexes',
    room: 'Laboratory 2',
    benches: 8,
    instructor: 'instructor',
  },
  {
    day: 4,
    hour: 9,
    course: 'CH 130',
    title: 'Volumetric analysis',
    room: 'Laboratory 1',
    benches: 10,
    instructor: 't.renwick',
  },
  {
    day: 4,
    hour: 14,
    course: 'CH 110',
    title: 'Demonstration hour',
    room: 'Demonstration theatre',
    benches: 1,
    instructor: 'instructor',
  },
  {
    day: 5,
    hour: 11,
    course: 'CH 240',
    title: 'Qualitative analysis',
    room: 'Laboratory 2',
    benches: 8,
    instructor: 't.renwick',
  },
];
const DAYS_BACK = 21;
const DAYS_AHEAD = 63;

/** A term of sessions around today, oldest first. */
export async function seedSessions(
  people: ReadonlyMap<string, UserModel>,
  { rooms }: Rooms,
): Promise<SessionModel[]> {
  const today = startOfDay(new Date());
  const rows = [];
  for (let offset = -DAYS_BACK; offset <= DAYS_AHEAD; offset += 1) {
    const day = addDays(today, offset);
    if (isWeekend(day)) continue;
    for (const slot of WEEKLY.filter((weekly) => weekly.day === day.getDay())) {
      const roomId = rooms.get(slot.room)?.id;
      const instructorId = people.get(slot.instructor)?.id;
      if (!roomId || !instructorId) throw new Error(`The session ${slot.title} lacks its room or instructor`);
      const startsAt = set(day, { hours: slot.hour });
      rows.push({
        course: slot.course,
        title: slot.title,
        roomId,
        instructorId,
        benches: slot.benches,
        startsAt,
        endsAt: set(day, { hours: slot.hour + 2 }),
      });
    }
  }
  return SessionModel.bulkCreate(rows);
}
