import Link from 'next/link';
import type { Route } from 'next';
import { classNames } from '../ui/class-names';

const TABS = [
  ['Substances', '/catalogue'],
  ['Solutions', '/catalogue/solutions'],
  ['Species and constants', '/catalogue/species'],
] as const;

/** The shelves of the catalogue. */
export function CatalogueTabs({ here }: { readonly here: (typeof TABS)[number][1] }) {
  return (
    <nav aria-label="Catalogue" className="no-print mb-6 flex flex-wrap gap-x-6 border-b border-line">
      {TABS.map(([name, href]) => (
        <Link
          key={href}
          href={href as Route}
          aria-current={href === here ? 'page' : undefined}
          className={classNames(
            'min-h-11 py-2 no-underline',
            href === here
              ? 'font-bold text-ink shadow-[inset_0_-3px_0_var(--verdigris)]'
              : 'text-soft hover:text-ink',
          )}
        >
          {name}
        </Link>
      ))}
    </nav>
  );
}
