import type { RecordEntry } from '@/lib/schemas/records';
import { Moment } from '../ui/moment';

/** The story of one thing as a line of dated steps. */
export function Story({ entries }: { readonly entries: readonly RecordEntry[] }) {
  return (
    <ol className="border-l-2 border-line pl-4">
      {entries.map(({ id, at, actorName, action, reason }) => (
        <li
          key={id}
          className="relative pb-3 before:absolute before:top-2 before:-left-[1.4rem] before:size-2.5 before:rounded-full before:bg-line"
        >
          <span className="font-semibold">{action}</span> by {actorName}, <Moment at={at} />
          {reason && <span className="block text-soft">{reason}</span>}
        </li>
      ))}
    </ol>
  );
}
