import { addDays, formatISO, isValid, parseISO } from 'date-fns';
import type { Route } from 'next';
import { DayPage } from '@/components/today/day-page';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';
import { getDay } from '@/lib/services/today';

export const metadata = { title: 'Today' };

const isoDay = (date: Date) => formatISO(date, { representation: 'date' });

export default async function TodayPage({ searchParams }: PageProps<'/'>) {
  const viewer = await pageViewer('today:read');
  const { day: asked } = await searchParams;
  const today = isoDay(new Date());
  const day =
    typeof asked === 'string' && /^\d{4}-\d\d-\d\d$/.test(asked) && isValid(parseISO(asked)) ? asked : today;
  const { lines, margin } = await getDay(viewer, day);
  const week = Array.from({ length: 7 }, (_, offset) => isoDay(addDays(parseISO(day), offset - 2)));
  const named = new Intl.DateTimeFormat('en-GB', {
    weekday: 'long',
    day: 'numeric',
    month: 'long',
    timeZone: 'UTC',
  }).format(new Date(day));
  const kinds = [...new Set(lines.map(({ kind }) => kind.toLowerCase()))];
  const counts = kinds.map((kind) => {
    const count = lines.filter((line) => line.kind.toLowerCase() === kind).length;
    return `${count} ${kind}${count === 1 ? '' : kind.endsWith('batch') ? 'es' : 's'}`;
  });
  return (
    <>
      <PageHeader
        title={`${named}: ${counts.length > 0 ? counts.join(', ') : 'nothing due'}`}
        actions={
          viewer.roles.includes('instructor') ? (
            <LinkButton href={'/requests/new' as Route} look="primary">
              Ask for a session
            </LinkButton>
          ) : null
        }
      />
      <DayPage
        day={day}
        today={today}
        week={week}
        lines={lines}
        margin={margin}
        empty={
          <EmptyState title="Nothing is due on this day">
            Look at another day above, or find anything with the search at the top.
          </EmptyState>
        }
      />
    </>
  );
}
