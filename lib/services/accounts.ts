import 'server-only';
import bcrypt from 'bcryptjs';
import { DomainError, invalid } from '@/lib/domain/errors';
import type { Role, Viewer } from '@/lib/domain/roles';
import type { Page } from '@/lib/schemas/list';
import type { User, UserCreate, UserListQuery, UserPatch } from '@/lib/schemas/users';
import { write } from '@/models/db';
import { UserModel } from '@/models/user';
import { Op } from 'sequelize';
import { contains, orderOf, pageOfRows } from './lists';
import { record } from './record';

const HASH_ROUNDS = 12;
const FAILURES_BEFORE_LOCK = 8;
const LOCK_MINUTES = 15;
/** Compared with where no such account exists, so that the answer takes as long. */
let decoyHash: Promise<string> | undefined;

export function hashPassword(password: string): Promise<string> {
  return bcrypt.hash(password, HASH_ROUNDS);
}

function viewerOf(user: UserModel): Viewer {
  const { id, name, email, roles, approvalLimitMinor } = user;
  return { id, name, email, roles, approvalLimitMinor };
}

function present(user: UserModel): User {
  const { id, name, email, roles, approvalLimitMinor, version } = user;
  return {
    id,
    name,
    email,
    roles,
    approvalLimitMinor,
    version,
    isDisabled: user.disabledAt !== null,
    isLocked: user.lockedUntil !== null && user.lockedUntil.getTime() > Date.now(),
  };
}

/** The person behind a session, or null where it ended, was ended everywhere, or the account is closed. */
export async function findViewer(userId: string, sessionVersion: number): Promise<Viewer | null> {
  const user = await UserModel.findByPk(userId);
  if (!user || user.disabledAt || user.sessionVersion !== sessionVersion) return null;
  return viewerOf(user);
}

/**
 * @throws DomainError `wrong-password`, the same for an unknown address and a wrong password;
 *   `locked-out` after too many failures
 */
export async function signIn(
  email: string,
  password: string,
): Promise<{ viewer: Viewer; sessionVersion: number }> {
  const user = await UserModel.findOne({ where: { email } });
  const refused = new DomainError('wrong-password', 'The e-mail address or the password is not right.');
  if (!user || user.disabledAt) {
    decoyHash ??= hashPassword('no such account');
    await bcrypt.compare(password, await decoyHash);
    throw refused;
  }
  await checkPassword(user, password, refused);
  return { viewer: viewerOf(user), sessionVersion: user.sessionVersion };
}

/**
 * Confirms that a signed-in person is who they say, for a signature.
 * @throws DomainError `invalid` on the password field; `locked-out` after too many failures
 */
export async function confirmPassword(viewer: Viewer, password: string): Promise<void> {
  const user = await UserModel.findByPk(viewer.id);
  if (!user) throw new DomainError('not-found', 'The account is gone.');
  await checkPassword(
    user,
    password,
    invalid([{ pointer: '#/password', detail: 'The password is not right.' }]),
  );
}

/** Counts failures per account. The count is kept by a write of its own, so a refusal does not undo it. */
async function checkPassword(user: UserModel, password: string, refused: DomainError): Promise<void> {
  const now = Date.now();
  if (user.lockedUntil && user.lockedUntil.getTime() > now) {
    const retryAfterSeconds = Math.ceil((user.lockedUntil.getTime() - now) / 1000);
    throw new DomainError(
      'locked-out',
      `Too many wrong passwords. Try again in ${Math.ceil(retryAfterSeconds / 60)} minutes.`,
      {
        retryAfterSeconds,
      },
    );
  }
  if (await bcrypt.compare(password, user.passwordHash)) {
    if (user.failedSignIns > 0) await write(() => user.update({ failedSignIns: 0, lockedUntil: null }));
    return;
  }
  await write(async () => {
    await user.increment('failedSignIns');
    await user.reload();
    if (user.failedSignIns >= FAILURES_BEFORE_LOCK) {
      await user.update({ failedSignIns: 0, lockedUntil: new Date(now + LOCK_MINUTES * 60_000) });
      await record(null, {
        subjectType: 'user',
        subjectId: user.id,
        subjectLabel: user.email,
        action: 'locked after wrong passwords',
      });
    }
  });
  throw refused;
}

/** Ends every session of the viewer, this one too. */
export async function signOutEverywhere(viewer: Viewer): Promise<void> {
  await write(async () => {
    await UserModel.increment('sessionVersion', { where: { id: viewer.id } });
    await record(viewer, {
      subjectType: 'user',
      subjectId: viewer.id,
      subjectLabel: viewer.email,
      action: 'signed out everywhere',
    });
  });
}

/** @returns the new session version, so that the present session can go on */
export async function changePassword(viewer: Viewer, current: string, next: string): Promise<number> {
  await confirmPassword(viewer, current).catch((error: unknown) => {
    if (error instanceof DomainError && error.code === 'invalid') {
      throw invalid([{ pointer: '#/currentPassword', detail: 'The password is not right.' }]);
    }
    throw error;
  });
  return setPassword(viewer.id, next, viewer, 'changed password');
}

/** Sets a password and ends every session. */
export async function setPassword(
  userId: string,
  password: string,
  actor: Viewer | null,
  action: string,
): Promise<number> {
  const passwordHash = await hashPassword(password);
  return write(async () => {
    const user = await UserModel.findByPk(userId, { rejectOnEmpty: true });
    await user.update({
      passwordHash,
      sessionVersion: user.sessionVersion + 1,
      failedSignIns: 0,
      lockedUntil: null,
    });
    await record(actor, { subjectType: 'user', subjectId: user.id, subjectLabel: user.email, action });
    return user.sessionVersion;
  });
}

export async function listUsers(_viewer: Viewer, query: UserListQuery): Promise<Page<User>> {
  const where = query.search
    ? { [Op.or]: [contains('name', query.search), contains('email', query.search)] }
    : {};
  return pageOfRows(UserModel, query, { where, order: orderOf(query.sort) }, present);
}

/** Opens an account; its password is set through the letter that the reset call sends. */
export async function createUser(viewer: Viewer, input: UserCreate): Promise<User> {
  const passwordHash = await hashPassword(input.password);
  return write(async () => {
    if (await UserModel.findOne({ where: { email: input.email } })) {
      throw new DomainError('conflict', 'There is an account with this address.', {
        errors: [{ pointer: '#/email', detail: 'There is an account with this address.' }],
      });
    }
    const user = await UserModel.create({ ...input, roles: unique(input.roles), passwordHash });
    await record(viewer, {
      subjectType: 'user',
      subjectId: user.id,
      subjectLabel: user.email,
      action: 'created',
      detail: { roles: user.roles },
    });
    return present(user);
  });
}

/** A change of roles or a closed account ends that person's sessions at once. */
export async function updateUser(viewer: Viewer, id: string, patch: UserPatch): Promise<User> {
  return write(async () => {
    const user = await UserModel.findByPk(id);
    if (!user) throw new DomainError('not-found', 'There is no such account.');
    if (user.version !== patch.version) {
      throw new DomainError('conflict', 'Somebody changed this account meanwhile.', {
        data: { current: present(user) },
      });
    }
    if (user.id === viewer.id && (patch.isDisabled || !patch.roles.includes('admin'))) {
      throw invalid([{ pointer: '#/roles', detail: 'You cannot take away your own administration.' }]);
    }
    const roles = unique(patch.roles);
    const endsSessions = patch.isDisabled || roles.join() !== user.roles.join();
    await user.update({
      name: patch.name,
      roles,
      approvalLimitMinor: patch.approvalLimitMinor,
      disabledAt: patch.isDisabled ? (user.disabledAt ?? new Date()) : null,
      sessionVersion: user.sessionVersion + (endsSessions ? 1 : 0),
      version: user.version + 1,
    });
    await record(viewer, {
      subjectType: 'user',
      subjectId: user.id,
      subjectLabel: user.email,
      action: patch.isDisabled ? 'disabled' : 'changed',
      detail: { roles, approvalLimitMinor: patch.approvalLimitMinor },
    });
    return present(user);
  });
}

function unique(roles: readonly Role[]): Role[] {
  return [...new Set(roles)];
}
