import { addDays, dayNumber } from '@/lib/planning/days';
import { Moment } from '../ui/moment';
import type { Proposal } from './proposals';

const LABEL_WIDTH = 230;
const DAY_WIDTH = 46;
const ROW = 26;
const HEAD = 24;
const MOST_DAYS = 14;

/** Days across, each solution a bar from "not before" to "ready by", the batch a cut through it. */
export function MakeWindows({
  proposals,
  today,
}: {
  readonly proposals: readonly Proposal[];
  readonly today: string;
}) {
  if (proposals.length === 0) return null;
  const first = dayNumber(today);
  const lastWanted = Math.max(...proposals.map(({ notAfter }) => dayNumber(notAfter)));
  const days = Math.min(MOST_DAYS, Math.max(3, lastWanted - first + 1));
  const width = LABEL_WIDTH + days * DAY_WIDTH;
  const height = HEAD + proposals.length * ROW + 4;
  const xOf = (isoDay: string) =>
    LABEL_WIDTH + Math.min(days, Math.max(0, dayNumber(isoDay) - first)) * DAY_WIDTH;
  return (
    <figure className="overflow-x-auto" tabIndex={0} aria-label="When each may be made">
      <svg
        viewBox={`0 0 ${width} ${height}`}
        width={width}
        height={height}
        aria-hidden
        className="max-w-none"
      >
        {Array.from({ length: days }, (_, offset) => (
          <g key={offset}>
            <path d={`M${LABEL_WIDTH + offset * DAY_WIDTH} ${HEAD - 4}V${height}`} stroke="var(--rule)" />
            <text
              x={LABEL_WIDTH + (offset + 0.5) * DAY_WIDTH}
              y={14}
              textAnchor="middle"
              fontSize="12"
              fill="var(--soft)"
            >
              {addDays(today, offset).slice(8)}
            </text>
          </g>
        ))}
        {proposals.map((proposal, index) => {
          const y = HEAD + index * ROW;
          const from = xOf(proposal.notBefore);
          const to = xOf(proposal.notAfter) + DAY_WIDTH;
          const cut = xOf(proposal.makeOn) + DAY_WIDTH / 2;
          return (
            <g key={`${proposal.solutionId}${proposal.makeOn}`}>
              <text x={LABEL_WIDTH - 10} y={y + 17} textAnchor="end" fontSize="13" fill="var(--ink)">
                {proposal.solutionName.length > 32
                  ? `${proposal.solutionName.slice(0, 31)}…`
                  : proposal.solutionName}
              </text>
              <rect
                x={from + 2}
                y={y + 6}
                width={Math.max(4, Math.min(to, width) - from - 4)}
                height={ROW - 12}
                fill="var(--verdigris-wash)"
                stroke="var(--verdigris)"
              />
              <path d={`M${cut} ${y + 1}V${y + ROW - 1}`} stroke="var(--ink)" strokeWidth="3" />
            </g>
          );
        })}
      </svg>
      <figcaption className="text-sm text-soft">
        Bars: the days on which it may be made, from <Moment at={today} style="short-day" /> on. Strokes: the
        day that serves all at their freshest. The same in words below.
      </figcaption>
    </figure>
  );
}
