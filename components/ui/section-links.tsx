import type { Route } from 'next';
import Link from 'next/link';
import { classNames } from './class-names';

interface SectionLinksProps<Href extends string> {
  /** What the pages belong to, for those who can't see it. */
  readonly label: string;
  readonly links: readonly (readonly [name: string, href: Href])[];
  readonly here: Href;
}

/** Links between the pages of one part of the house; the page that is open is marked. */
export function SectionLinks<Href extends string>({ label, links, here }: SectionLinksProps<Href>) {
  return (
    <nav aria-label={label} className="no-print mb-6 flex flex-wrap gap-x-6 border-b border-line">
      {links.map(([name, href]) => (
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
