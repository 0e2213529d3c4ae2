import type { RecordEntry } from '@/lib/schemas/records';
import { Details } from '../ui/details';
import { Moment } from '../ui/moment';

/** What happened to a thing, line by line. */
export function Story({ entries }: { readonly entries: readonly RecordEntry[] }) {
  if (entries.length === 0) return null;
  return (
    <div className="no-print mt-6">
      <Details summary={`What happened so far (${entries.length})`}>
        <ol>
          {entries.map(({ id, at, actorName, action, reason }) => (
            <li key={id} className="grid grid-cols-[9rem_1fr] gap-x-4 border-b py-1.5">
              <span className="text-sm text-soft">
                <Moment at={at} />
              </span>
              <span>
                <strong>{action}</strong> by {actorName}
                {reason && <span className="block text-sm text-soft">{reason}</span>}
              </span>
            </li>
          ))}
        </ol>
      </Details>
    </div>
  );
}
