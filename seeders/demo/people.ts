import type { Role } from '@/lib/domain/roles';
import { environment } from '@/lib/config/env';
import { hashPassword } from '@/lib/services/accounts';
import { UserModel } from '@/models/user';

/** Larkmoor College is invented; so is everybody in it. */
const PEOPLE: readonly { name: string; mailbox: string; roles: Role[]; approvalLimitMinor?: number }[] = [
  { name: 'Ines Calloway', mailbox: 'instructor', roles: ['instructor'] },
  { name: 'Tobias Renwick', mailbox: 't.renwick', roles: ['instructor'] },
  { name: 'Priya Oakhurst', mailbox: 'prep', roles: ['prep'] },
  { name: 'Dunstan Vale', mailbox: 'd.vale', roles: ['prep'] },
  { name: 'Marguerite Thorne', mailbox: 'purchasing', roles: ['purchasing'], approvalLimitMinor: 500_00 },
  { name: 'Osric Bell', mailbox: 'o.bell', roles: ['purchasing'], approvalLimitMinor: 2500_00 },
  { name: 'Halina Marsh', mailbox: 'safety', roles: ['safety'] },
  { name: 'Corwin Ashdown', mailbox: 'c.ashdown', roles: ['safety', 'instructor'] },
  { name: 'Lettice Boone', mailbox: 'admin', roles: ['admin'] },
];

/** @returns the accounts by mailbox name */
export async function seedPeople(): Promise<Map<string, UserModel>> {
  const passwordHash = await hashPassword(environment().DEMO_PASSWORD);
  const users = await UserModel.bulkCreate(
    PEOPLE.map(({ name, mailbox, roles, approvalLimitMinor = 0 }) => ({
      name,
      email: `${mailbox}@larkmoor.example`,
      roles,
      approvalLimitMinor,
      passwordHash,
    })),
  );
  return new Map(users.map((user) => [user.email.split('@')[0] ?? user.email, user]));
}
