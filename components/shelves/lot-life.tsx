import type { Lot } from '@/lib/schemas/lots';
import { dayNumber, isoDayOf } from '@/lib/planning/days';
import { Moment } from '../ui/moment';

const WIDTH = 1000;
const LINE_Y = 46;
const EDGE = 20;

interface Mark {
  readonly day: string;
  readonly words: string;
  readonly isStop: boolean;
}

function marksOf(lot: Lot, today: string): Mark[] {
  const held = lot.story
    .filter(({ action }) => action === 'put on hold')
    .map(({ at }) => ({ day: at.slice(0, 10), words: 'held', isStop: true }));
  return [
    { day: lot.receivedOn, words: 'received', isStop: false },
    ...(lot.openedOn ? [{ day: lot.openedOn, words: 'opened', isStop: false }] : []),
    ...lot.usedIn.map(({ at, batchCode }) => ({ day: at.slice(0, 10), words: batchCode, isStop: false })),
    ...held,
    { day: today, words: 'today', isStop: false },
    ...(lot.expiresOn ? [{ day: lot.expiresOn, words: 'expires', isStop: true }] : []),
  ].sort((a, b) => a.day.localeCompare(b.day));
}

/** The life of a lot as a line from the day it came to the day it expires. */
export function LotLife({ lot, today }: { readonly lot: Lot; readonly today: string }) {
  const marks = marksOf(lot, today);
  const days = marks.map(({ day }) => dayNumber(day));
  const first = Math.min(...days);
  const last = Math.max(...days, first + 1);
  const xOf = (day: string) => EDGE + ((dayNumber(day) - first) / (last - first)) * (WIDTH - 2 * EDGE);
  return (
    <figure>
      <svg viewBox={`0 0 ${WIDTH} 96`} aria-hidden className="hidden w-full sm:block">
        <path d={`M${EDGE} ${LINE_Y}H${WIDTH - EDGE}`} stroke="var(--rule)" strokeWidth="6" />
        <path
          d={`M${EDGE} ${LINE_Y}H${xOf(isoDayOf(Math.min(last, Math.max(first, dayNumber(today)))))}`}
          stroke="var(--verdigris)"
          strokeWidth="6"
        />
        {marks.map(({ day, words, isStop }, index) => {
          const x = xOf(day);
          const isAbove = index % 2 === 0;
          return (
            <g key={`${day}${words}${index}`} fill={isStop ? 'var(--signal)' : 'var(--ink)'}>
              <circle cx={x} cy={LINE_Y} r="7" stroke="var(--paper)" strokeWidth="2" />
              <text
                x={x}
                y={isAbove ? LINE_Y - 16 : LINE_Y + 28}
                fontSize="17"
                textAnchor={x < 60 ? 'start' : x > WIDTH - 60 ? 'end' : 'middle'}
              >
                {words}
              </text>
            </g>
          );
        })}
      </svg>
      <figcaption className="sm:sr-only">
        <ol>
          {marks.map(({ day, words }, index) => (
            <li key={`${day}${words}${index}`}>
              <Moment at={day} style="short-day" />: {words}
            </li>
          ))}
        </ol>
      </figcaption>
    </figure>
  );
}
