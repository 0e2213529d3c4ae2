import { DomainError } from './errors';
import type { Role, Viewer } from './roles';

/**
 * Who may do what: the one table. `roles` can be answered without a record and hides buttons;
 * `when` needs the record and is checked by the service inside the transaction that loaded it.
 * `anyone` needs no sign-in; `everyone` any signed-in person.
 */
export interface Rule<R = unknown> {
  readonly roles: readonly Role[] | 'anyone' | 'everyone';
  readonly when?: (viewer: Viewer, record: R) => boolean;
}

interface Owned {
  readonly ownerId: string | null;
}
interface Approvable extends Owned {
  readonly totalMinor: number;
}
interface Served {
  readonly requesterIds: readonly string[];
}

const staff: readonly Role[] = ['prep', 'purchasing', 'safety', 'admin'];
const has = (viewer: Viewer, ...roles: Role[]) => roles.some((role) => viewer.roles.includes(role));
const owns = (viewer: Viewer, record: Owned) => record.ownerId === viewer.id;
/** Nobody judges their own request, order or review. */
const isAnothers = (viewer: Viewer, record: Owned) => record.ownerId !== null && !owns(viewer, record);
/** Nor moves more money than their limit. */
const isAnothersWithinLimit = (viewer: Viewer, record: Approvable) =>
  isAnothers(viewer, record) && record.totalMinor <= viewer.approvalLimitMinor;

export const POLICY = {
  'session:sign-in': { roles: 'anyone' },
  'session:read': { roles: 'anyone' },
  'session:sign-out': { roles: 'anyone' },
  'password:reset': { roles: 'anyone' },
  'bottle:public': { roles: 'anyone' },
  'health:read': { roles: 'anyone' },
  'webhook:receive': { roles: 'anyone' },
  'account:own': { roles: 'everyone' },
  'catalogue:read': { roles: 'everyone' },
  'mix:compute': { roles: 'everyone' },
  'search:read': { roles: 'everyone' },
  'today:read': { roles: 'everyone' },
  'data-sheet:upload': { roles: ['prep', 'safety', 'admin'] },
  'substance:hold': { roles: ['prep', 'safety', 'admin'] },
  'recipe:create': { roles: ['instructor', 'prep'] },
  'recipe:update': {
    roles: ['instructor', 'prep'],
    when: (viewer: Viewer, record: Owned) => has(viewer, 'prep') || owns(viewer, record),
  },
  'lab-session:read': { roles: 'everyone' },
  'lab-session:create': { roles: ['instructor', 'prep'] },
  'lab-session:update': {
    roles: ['instructor', 'prep'],
    when: (viewer: Viewer, record: Owned) => has(viewer, 'prep') || owns(viewer, record),
  },
  'request:read': { roles: 'everyone' },
  'request:create': {
    roles: ['instructor', 'prep'],
    when: (viewer: Viewer, record: Owned) => has(viewer, 'prep') || owns(viewer, record),
  },
  'request:update': {
    roles: ['instructor', 'prep'],
    when: (viewer: Viewer, record: Owned) => has(viewer, 'prep') || owns(viewer, record),
  },
  'review:read': { roles: 'everyone' },
  'review:list': { roles: ['safety', 'prep', 'admin'] },
  'review:answer': {
    roles: ['instructor', 'prep', 'safety'],
    when: (viewer: Viewer, record: Owned) => has(viewer, 'prep', 'safety') || owns(viewer, record),
  },
  'review:decide': { roles: ['safety'], when: isAnothers },
  'batch:read': {
    roles: 'everyone',
    when: (viewer: Viewer, record: Served) =>
      has(viewer, ...staff) || record.requesterIds.includes(viewer.id),
  },
  'batch:list': { roles: 'everyone' },
  'batch:write': { roles: ['prep'] },
  'stock:read': { roles: staff },
  'stock:write': { roles: ['prep'] },
  'stock:hold': { roles: ['prep', 'safety', 'admin'] },
  'waste:read': { roles: staff },
  'waste:write': { roles: ['prep'] },
  'order:read': { roles: ['prep', 'purchasing', 'admin'] },
  'order:draft': { roles: ['prep', 'purchasing'] },
  'order:update': { roles: ['prep', 'purchasing'], when: owns },
  'order:cancel': {
    roles: ['prep', 'purchasing'],
    when: (viewer: Viewer, record: Owned) => has(viewer, 'purchasing') || owns(viewer, record),
  },
  'order:approve': { roles: ['purchasing'], when: isAnothersWithinLimit },
  'order:refuse': { roles: ['purchasing'], when: isAnothers },
  'order:send': { roles: ['purchasing'], when: isAnothersWithinLimit },
  'order:pay': { roles: ['purchasing'], when: isAnothersWithinLimit },
  'order:receive': { roles: ['prep', 'purchasing'] },
  'outbox:read': { roles: ['purchasing', 'admin'] },
  'outbox:resend': { roles: ['purchasing', 'admin'] },
  'record:read': { roles: ['safety', 'admin'] },
  'user:manage': { roles: ['admin'] },
  'place:read': { roles: 'everyone' },
} as const satisfies Record<string, Rule<never>>;

export type Action = keyof typeof POLICY;
type RecordOf<A extends Action> = A extends Action
  ? (typeof POLICY)[A] extends { when: (viewer: Viewer, record: infer R) => boolean }
    ? R
    : undefined
  : never;

/** Whether the roles alone allow it; true for a rule that also needs the record. */
export function mayByRole(viewer: Viewer | null, action: Action): boolean {
  const { roles } = POLICY[action] as Rule;
  if (roles === 'anyone') return true;
  if (!viewer) return false;
  return roles === 'everyone' || roles.some((role) => viewer.roles.includes(role));
}

/** Whether the viewer may do it to this record. A rule with `when` and no record throws: it fails closed. */
export function may<A extends Action>(viewer: Viewer, action: A, record: RecordOf<A>): boolean {
  if (!mayByRole(viewer, action)) return false;
  const { when } = POLICY[action] as Rule<RecordOf<A>>;
  if (!when) return true;
  if (record === undefined || record === null) throw new TypeError(`${action} needs its record`);
  return when(viewer, record);
}

/** @throws DomainError `forbidden` unless the viewer may do it to this record */
export function authorise<A extends Action>(
  viewer: Viewer,
  action: A,
  record: RecordOf<A>,
  why?: string,
): void {
  if (!may(viewer, action, record)) {
    throw new DomainError('forbidden', why ?? 'Your role does not allow this here.');
  }
}
