import Link from 'next/link';
import type { ReactNode } from 'react';
import { mayByRole } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import { PARTS } from './parts';
import { PartLinks } from './part-links';
import { PersonMenu } from './person-menu';
import { Palette } from './palette';

/** At most this many parts stand in view; the rest are under "More". */
const IN_VIEW = 6;

/** The notebook's head, the page, and the caution at its foot. */
export function Shell({ viewer, children }: { readonly viewer: Viewer; readonly children: ReactNode }) {
  const seen = PARTS.filter(({ action }) => mayByRole(viewer, action));
  const daily = seen
    .filter((part) => part.daily.some((role) => viewer.roles.includes(role)))
    .slice(0, IN_VIEW);
  const more = seen.filter((part) => !daily.includes(part));
  const link = ({ name, href }: (typeof PARTS)[number]) => ({ name, href });

  return (
    <>
      <a href="#page" className="sr-only z-50 bg-raised p-3 focus:not-sr-only focus:absolute">
        Skip to the page
      </a>
      <header className="no-print sticky top-0 z-30 border-b-4 border-double border-line bg-paper">
        <div className="mx-auto flex max-w-[88rem] items-center gap-x-5 gap-y-1 px-4 py-2 max-lg:flex-wrap">
          <Link href="/" className="flex shrink-0 items-center gap-2 text-lg font-bold text-ink no-underline">
            <Mark />
            Benchwright
          </Link>
          <PartLinks daily={daily.map(link)} more={more.map(link)} />
          <div className="ml-auto flex items-center gap-2">
            <Palette />
            <PersonMenu name={viewer.name} roles={viewer.roles} />
          </div>
        </div>
      </header>
      <main id="page" className="mx-auto max-w-[88rem] px-4 pt-6 pb-28 md:pb-12 print:p-0">
        {children}
      </main>
      <footer className="mx-auto max-w-[88rem] border-t px-4 py-4 text-sm text-soft max-md:pb-24 print:hidden">
        Predictions are at equilibrium from published constants. They replace no risk assessment, data sheet
        or local rule; a competent person decides.
      </footer>
    </>
  );
}

/** A beaker with two graduation lines. */
function Mark() {
  return (
    <svg viewBox="0 0 28 28" aria-hidden className="size-7">
      <path
        d="M5 4h18M7 4v16a4 4 0 0 0 4 4h6a4 4 0 0 0 4-4V4"
        fill="none"
        stroke="var(--ink)"
        strokeWidth="2.2"
      />
      <path
        d="M8.200 13h11.600v7a2.800 2.800 0 0 1-2.800 2.800h-6a2.800 2.800 0 0 1-2.800-2.800z"
        fill="var(--verdigris)"
      />
      <path d="M16 8.500h3.500M17 11h2.500" stroke="var(--ink)" strokeWidth="1.400" />
    </svg>
  );
}
