import Link from 'next/link';
import type { Route } from 'next';
import type { ReactNode } from 'react';
import { classNames } from '../ui/class-names';
import { Moment } from '../ui/moment';
import { Section } from '../ui/section';
import { StateMark } from '../ui/state-mark';

interface Line {
  readonly at: string | null;
  readonly kind: string;
  readonly text: string;
  readonly state: string | null;
  readonly href: string;
}

interface DayPageProps {
  readonly day: string;
  readonly today: string;
  readonly week: readonly string[];
  readonly lines: readonly Line[];
  readonly margin: readonly Line[];
  readonly empty: ReactNode;
}

/** A page of the day book: the hours down the page, what presses in the margin. */
export function DayPage({ day, today, week, lines, margin, empty }: DayPageProps) {
  return (
    <>
      <nav aria-label="Days" className="mb-6 overflow-x-auto">
        <ol className="flex min-w-max border border-line">
          {week.map((other) => (
            <li key={other} className="flex-1 border-l border-line first:border-l-0">
              <Link
                href={(other === today ? '/' : `/?day=${other}`) as Route}
                aria-current={other === day ? 'date' : undefined}
                className={classNames(
                  'block min-h-11 px-3 py-2 text-center whitespace-nowrap no-underline',
                  other === day ? 'bg-ink font-bold text-paper' : 'text-ink hover:bg-sunken',
                )}
              >
                {other === today ? 'Today' : shortDay(other)}
              </Link>
            </li>
          ))}
        </ol>
      </nav>
      <div className="grid gap-8 lg:grid-cols-[1fr_20rem]">
        <section aria-label="The day" className="min-w-0">
          {lines.length === 0 && empty}
          <ol>
            {lines.map((line) => (
              <li
                key={`${line.kind}${line.href}${line.at}`}
                className="grid grid-cols-[4.5rem_1fr] gap-x-4 border-b py-1"
              >
                <span className="py-2.5 font-mono text-soft">
                  {line.at && <Moment at={line.at} style="time" />}
                </span>
                <Link
                  href={line.href as Route}
                  className="flex min-h-11 flex-wrap items-center gap-x-3 gap-y-1 py-2 text-ink no-underline hover:bg-raised"
                >
                  <span className="w-28 shrink-0 text-sm text-soft">{line.kind}</span>
                  <span className="min-w-0 font-semibold underline decoration-rule underline-offset-4">
                    {line.text}
                  </span>
                  {line.state && <StateMark state={line.state} />}
                </Link>
              </li>
            ))}
          </ol>
        </section>
        {margin.length > 0 && (
          <aside aria-label="In the margin" className="border-signal/40 lg:border-l-2 lg:pl-5">
            <Section title="In the margin">
              <ul>
                {margin.map((line) => (
                  <li key={`${line.kind}${line.href}${line.text}`} className="border-b py-2">
                    <span className="text-sm text-soft">{line.kind}</span>
                    <Link href={line.href as Route} className="block">
                      {line.text} {line.at && <Moment at={line.at} style="short-day" />}
                    </Link>
                  </li>
                ))}
              </ul>
            </Section>
          </aside>
        )}
      </div>
    </>
  );
}

function shortDay(day: string): string {
  return new Intl.DateTimeFormat('en-GB', {
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    timeZone: 'UTC',
  }).format(new Date(day));
}
