import type { Route } from 'next';
import type { Action } from '@/lib/domain/policy';
import type { Role } from '@/lib/domain/roles';

export interface Part {
  readonly name: string;
  readonly href: Route;
  readonly action: Action;
  /** Roles whose daily work it is; the others find it under "More". */
  readonly daily: readonly Role[];
}

/** The parts of the house in the order of the work. */
export const PARTS: readonly Part[] = [
  {
    name: 'Today',
    href: '/',
    action: 'today:read',
    daily: ['instructor', 'prep', 'purchasing', 'safety', 'admin'],
  },
  { name: 'Sessions', href: '/sessions', action: 'lab-session:read', daily: ['instructor'] },
  { name: 'Requests', href: '/requests', action: 'request:read', daily: ['instructor', 'prep', 'safety'] },
  { name: 'Reviews', href: '/reviews', action: 'review:list', daily: ['safety'] },
  { name: 'Mix bench', href: '/mix-bench', action: 'mix:compute', daily: ['instructor', 'safety'] },
  { name: 'Batches', href: '/batches', action: 'batch:list', daily: ['prep'] },
  { name: 'Shelves', href: '/shelves', action: 'stock:read', daily: ['prep', 'purchasing'] },
  { name: 'Orders', href: '/orders', action: 'order:read', daily: ['prep', 'purchasing'] },
  {
    name: 'Catalogue',
    href: '/catalogue',
    action: 'catalogue:read',
    daily: ['instructor', 'prep', 'safety', 'purchasing'],
  },
  { name: 'Records', href: '/records', action: 'record:read', daily: ['safety', 'admin'] },
  { name: 'Outgoing', href: '/outgoing', action: 'outbox:read', daily: ['admin'] },
  { name: 'Accounts', href: '/accounts', action: 'user:manage', daily: ['admin'] },
];
