import Link from 'next/link';
import type { Route } from 'next';
import { classNames } from '../ui/class-names';

const PARTS = [
  ['Cabinets', '/shelves'],
  ['Lots', '/shelves/lots'],
  ['Bottles', '/shelves/bottles'],
  ['Ledger', '/shelves/ledger'],
] as const;

/** The ways of looking at what stands in the house. */
export function ShelfNav({ current }: { readonly current: (typeof PARTS)[number][0] }) {
  return (
    <nav aria-label="Shelves" className="mb-6">
      <ul className="flex flex-wrap border-b-2 border-line">
        {PARTS.map(([name, href]) => (
          <li key={name}>
            <Link
              href={href as Route}
              aria-current={name === current ? 'page' : undefined}
              className={classNames(
                'block min-h-11 px-4 py-2.5 no-underline',
                name === current ? 'bg-ink font-bold text-paper' : 'text-ink hover:bg-sunken',
              )}
            >
              {name}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
