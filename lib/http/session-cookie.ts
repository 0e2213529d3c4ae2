import 'server-only';
import { sealData, unsealData } from 'iron-session';
import { environment } from '@/lib/config/env';
import { DomainError } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import { findViewer } from '@/lib/services/accounts';

export const SESSION_COOKIE = 'benchwright_session';
/** A working day and a half: long enough for a shift, short enough for a shared bench computer. */
const LIFE_SECONDS = 12 * 60 * 60;

interface SessionData {
  readonly userId: string;
  readonly sessionVersion: number;
}

function secret(): string {
  const value = environment().SESSION_SECRET;
  if (!value) throw new Error('SESSION_SECRET is not set');
  return value;
}

function attributes(maxAge: number): string {
  const secure = environment().BASE_URL.startsWith('https:') ? '; Secure' : '';
  return `Path=/; HttpOnly; SameSite=Lax; Max-Age=${maxAge}${secure}`;
}

/** The Set-Cookie value that signs a person in. */
export async function sessionCookie(session: SessionData): Promise<string> {
  const sealed = await sealData(session, { password: secret(), ttl: LIFE_SECONDS });
  return `${SESSION_COOKIE}=${sealed}; ${attributes(LIFE_SECONDS)}`;
}

/** The Set-Cookie value that signs a person out. */
export function clearedCookie(): string {
  return `${SESSION_COOKIE}=; ${attributes(0)}`;
}

/** Who holds this cookie value; null where it is absent, forged, too old or no longer valid. */
export async function viewerOfCookie(value: string | undefined): Promise<Viewer | null> {
  if (!value) return null;
  const data = await unsealData<Partial<SessionData>>(value, { password: secret(), ttl: LIFE_SECONDS });
  if (!data.userId || data.sessionVersion === undefined) return null;
  return findViewer(data.userId, data.sessionVersion);
}

export async function viewerOfRequest(request: Request): Promise<Viewer | null> {
  const cookies = request.headers.get('cookie') ?? '';
  const pair = cookies.split(/;\s*/).find((entry) => entry.startsWith(`${SESSION_COOKIE}=`));
  return viewerOfCookie(pair?.slice(SESSION_COOKIE.length + 1));
}

/** @throws DomainError `foreign-origin` where a browser says the call comes from another site */
export function refuseForeignOrigin(request: Request): void {
  const site = request.headers.get('sec-fetch-site');
  if (site && site !== 'same-origin' && site !== 'none') {
    throw new DomainError('foreign-origin', 'Calls that change something must come from this site.');
  }
  const origin = request.headers.get('origin');
  if (!origin) return;
  const own = [new URL(environment().BASE_URL).host, request.headers.get('host')];
  let host: string;
  try {
    host = new URL(origin).host;
  } catch {
    host = '';
  }
  if (!own.includes(host)) {
    throw new DomainError('foreign-origin', 'Calls that change something must come from this site.');
  }
}
