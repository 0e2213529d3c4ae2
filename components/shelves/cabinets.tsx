import Link from 'next/link';
import type { Route } from 'next';
import { formatNumber } from '@/lib/client/format';
import type { Shelf, StandingLot } from '@/lib/schemas/places';
import { Formula } from '../chemistry/formula';
import { BottleDrawing } from './bottle-drawing';

/** Whole rooms at a glance: every cabinet as a shelf, every lot as a bottle with its level. */
export function Cabinets({ shelves }: { readonly shelves: readonly Shelf[] }) {
  const rooms = [...new Set(shelves.map(({ roomName }) => roomName))];
  return (
    <div className="grid gap-8">
      {rooms.map((room) => (
        <section key={room} aria-label={room}>
          <h2 className="mb-3 text-lg">{room}</h2>
          <div className="gap-5 xl:columns-2">
            {shelves
              .filter(({ roomName }) => roomName === room)
              .map((shelf) => (
                <Cabinet key={shelf.id} shelf={shelf} />
              ))}
          </div>
        </section>
      ))}
    </div>
  );
}

function Cabinet({ shelf }: { readonly shelf: Shelf }) {
  return (
    <section aria-label={shelf.name} className="sheet mb-5 break-inside-avoid border-2 border-line">
      <h3 className="flex flex-wrap items-baseline justify-between gap-x-3 border-b-2 border-line px-3 py-1.5 text-base">
        {shelf.name}
        <span className="text-sm font-normal text-soft">
          {shelf.storageGroup.replaceAll('_', ' ')} · {shelf.lots.length}{' '}
          {shelf.lots.length === 1 ? 'lot' : 'lots'}
        </span>
      </h3>
      {shelf.lots.length === 0 ? (
        <p className="px-3 py-4 text-sm text-soft">Nothing stands here.</p>
      ) : (
        <ul className="flex flex-wrap px-2 pt-2">
          {shelf.lots.map((lot) => (
            <li key={lot.id} className="w-24 border-b-4 border-double border-line pb-1">
              <Standing lot={lot} />
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

function noteOf(lot: StandingLot): string | null {
  if (lot.isHeld) return 'on hold';
  return lot.isExpired ? 'past its date' : null;
}

function Standing({ lot }: { readonly lot: StandingLot }) {
  const note = noteOf(lot);
  return (
    <Link
      href={`/shelves/lots/${lot.id}` as Route}
      className="flex h-full flex-col items-center justify-end rounded px-1 py-1 text-center text-ink no-underline hover:bg-sunken"
    >
      <BottleDrawing fill={lot.fill} isStopped={lot.isHeld || lot.isExpired} className="h-14" />
      <span className="mt-1 max-w-full overflow-hidden text-xs leading-tight font-semibold text-ellipsis">
        {lot.formula ? <Formula id={lot.formula} name={lot.substanceName} /> : lot.substanceName}
      </span>
      <span className="font-mono text-xs">
        {formatNumber(lot.balance, 3)} {lot.unit}
      </span>
      {note && <span className="text-xs font-semibold text-signal">▲ {note}</span>}
      <span className="sr-only">lot {lot.code}</span>
    </Link>
  );
}
