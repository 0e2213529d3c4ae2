import 'server-only';
import { cookies } from 'next/headers';
import { forbidden, notFound, redirect } from 'next/navigation';
import { cache } from 'react';
import { DomainError } from '@/lib/domain/errors';
import { mayByRole } from '@/lib/domain/policy';
import type { Action } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import { SESSION_COOKIE, viewerOfCookie } from './session-cookie';

/** Who looks at this page; asked once per page however often it is called. */
export const findPageViewer = cache(async (): Promise<Viewer | null> =>
  viewerOfCookie((await cookies()).get(SESSION_COOKIE)?.value),
);

/** The viewer of a page that needs one; others are sent to sign in, or told that it is not theirs. */
export async function pageViewer(action: Action): Promise<Viewer> {
  const viewer = await findPageViewer();
  if (!viewer) redirect('/sign-in');
  if (!mayByRole(viewer, action)) forbidden();
  return viewer;
}

/** Loads what a page shows; what is absent or not the viewer's to see becomes the matching page. */
export async function load<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (error instanceof DomainError && error.code === 'not-found') notFound();
    if (error instanceof DomainError && error.code === 'forbidden') forbidden();
    throw error;
  }
}
