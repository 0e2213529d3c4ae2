'use client';

import { DropdownMenu } from 'radix-ui';
import Link from 'next/link';
import type { Route } from 'next';
import { usePathname } from 'next/navigation';
import { classNames } from '../ui/class-names';

interface PartLink {
  readonly name: string;
  readonly href: Route;
}

const ITEM =
  'block min-h-11 px-4 py-2.5 text-ink no-underline outline-none data-[highlighted]:bg-copper-wash';

/** A phone's bar has room for so many; the rest go under "More" there. */
const ON_A_PHONE = 4;

/** The parts: a line of words on a desk, a bar at the bottom of a phone. */
export function PartLinks({
  daily,
  more,
}: {
  readonly daily: readonly PartLink[];
  readonly more: readonly PartLink[];
}) {
  const pathname = usePathname();
  const isHere = (href: string) =>
    href === '/' ? pathname === '/' : pathname === href || pathname.startsWith(`${href}/`);
  const isInMore = more.some(({ href }) => isHere(href));

  return (
    <nav
      aria-label="Parts"
      className="max-md:fixed max-md:inset-x-0 max-md:bottom-0 max-md:z-30 max-md:overflow-x-auto max-md:border-t-4 max-md:border-double max-md:border-line max-md:bg-paper"
    >
      <ul className="flex max-md:justify-between">
        {daily.map(({ name, href }, index) => (
          <li key={href} className={index >= ON_A_PHONE ? 'max-md:hidden' : undefined}>
            <Link
              href={href}
              aria-current={isHere(href) ? 'page' : undefined}
              className={classNames(
                'flex min-h-12 items-center px-3 text-[0.95rem] whitespace-nowrap no-underline max-md:px-2.5 max-md:text-sm',
                isHere(href)
                  ? 'font-bold text-ink shadow-[inset_0_-3px_0_var(--verdigris)] max-md:shadow-[inset_0_3px_0_var(--verdigris)]'
                  : 'text-soft hover:text-ink',
              )}
            >
              {name}
            </Link>
          </li>
        ))}
        {more.length > 0 && (
          <li>
            <DropdownMenu.Root>
              <DropdownMenu.Trigger
                className={classNames(
                  'flex min-h-12 items-center gap-1 px-3 text-[0.95rem] max-md:px-2.5 max-md:text-sm',
                  isInMore ? 'font-bold text-ink' : 'text-soft hover:text-ink',
                )}
              >
                More <span aria-hidden>▾</span>
              </DropdownMenu.Trigger>
              <DropdownMenu.Portal>
                <DropdownMenu.Content
                  sideOffset={6}
                  collisionPadding={8}
                  className="z-50 min-w-44 rounded border border-line bg-raised py-1 shadow-md"
                >
                  {daily.slice(ON_A_PHONE).map(({ name, href }) => (
                    <DropdownMenu.Item key={href} asChild>
                      <Link href={href} className={`${ITEM} md:hidden`}>
                        {name}
                      </Link>
                    </DropdownMenu.Item>
                  ))}
                  {more.map(({ name, href }) => (
                    <DropdownMenu.Item key={href} asChild>
                      <Link href={href} className={ITEM}>
                        {name}
                      </Link>
                    </DropdownMenu.Item>
                  ))}
                </DropdownMenu.Content>
              </DropdownMenu.Portal>
            </DropdownMenu.Root>
          </li>
        )}
      </ul>
    </nav>
  );
}
