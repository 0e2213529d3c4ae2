import { database, write } from '@/models/db';
import { UserModel } from '@/models/user';
import { seedDemonstrations } from './demo/demonstrations';
import { seedHouse } from './demo/house';
import { seedPeople } from './demo/people';
import { seedRequests } from './demo/requests';
import { seedRooms } from './demo/rooms';
import { seedSessions } from './demo/sessions';
import { seedSolutions } from './demo/solutions';
import { seedStock } from './demo/stock';
import { seedSuppliers } from './demo/suppliers';

/**
 * Fills an empty house with Larkmoor College: all of it or nothing.
 * @returns whether it was filled; false where somebody lives in it already
 */
export async function seedDemo(): Promise<boolean> {
  await database().authenticate();
  if ((await UserModel.count()) > 0) return false;
  await write(async () => {
    await seedHouse();
    const people = await seedPeople();
    const rooms = await seedRooms();
    const instructor = people.get('instructor');
    const prep = people.get('prep');
    if (!instructor || !prep) throw new Error('The demo lacks its people');
    const suppliers = await seedSuppliers();
    await seedStock(prep, rooms.places, suppliers);
    const solutions = await seedSolutions(prep.id);
    const demonstrations = await seedDemonstrations(instructor.id, solutions);
    const sessions = await seedSessions(people, rooms);
    await seedRequests({ people, sessions, solutions, demonstrations });
  });
  return true;
}
