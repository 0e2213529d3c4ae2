import { formatMolarity, superscript } from '@/lib/client/format';
import { Details } from '../ui/details';
import { Formula } from './formula';
import { formulaText } from './formula-parts';

export interface LadderSpecies {
  readonly id: string;
  readonly molarity: number;
}
export interface LadderMark {
  readonly label: string;
  readonly molarity: number;
}

interface LadderProps {
  readonly species: readonly LadderSpecies[];
  readonly marks?: readonly LadderMark[];
  /** How many species are drawn; the table holds all. */
  readonly most?: number;
}

const ROW = 22;
const NAME_WIDTH = 118;
const WIDTH = 460;
const RIGHT_PAD = 14;
const HEAD = 26;
/** Below this a species is as good as absent; the axis goes no lower. */
const LOWEST_LOG = -30;

/** Every species on one logarithmic axis, the strongest at the top. */
export function Ladder({ species, marks = [], most = 25 }: LadderProps) {
  const drawn = [...species]
    .filter(({ molarity }) => molarity > 10 ** LOWEST_LOG)
    .sort((a, b) => b.molarity - a.molarity)
    .slice(0, most);
  const logs = drawn.map(({ molarity }) => Math.log10(molarity));
  const high = Math.max(0, Math.ceil(Math.max(...logs, 0)));
  const low = Math.min(-6, Math.floor(Math.min(...logs, -6)));
  const xOf = (log: number) => NAME_WIDTH + ((log - low) / (high - low)) * (WIDTH - NAME_WIDTH - RIGHT_PAD);
  const step = Math.max(1, Math.ceil((high - low) / 9));
  const ticks = Array.from(
    { length: Math.floor((high - low) / step) + 1 },
    (_, index) => high - index * step,
  );
  const tall = HEAD + drawn.length * ROW + 8;

  return (
    <figure>
      <svg
        viewBox={`0 0 ${WIDTH} ${tall}`}
        className="w-full"
        role="img"
        aria-label={`${drawn.length} species by concentration; the table below lists them`}
      >
        {ticks.map((tick) => (
          <g key={tick}>
            <path d={`M${xOf(tick)} ${HEAD - 6}V${tall - 6}`} stroke="var(--rule)" strokeWidth="1" />
            <text x={xOf(tick)} y={HEAD - 11} fontSize="11" textAnchor="middle" fill="var(--soft)">
              {tick === 0 ? '1' : `10${superscript(tick)}`}
            </text>
          </g>
        ))}
        {marks
          .filter(({ molarity }) => Math.log10(molarity) >= low && Math.log10(molarity) <= high)
          .map(({ label, molarity }) => (
            <g key={label}>
              <path
                d={`M${xOf(Math.log10(molarity))} ${HEAD - 6}V${tall - 6}`}
                stroke="var(--signal)"
                strokeWidth="1.5"
                strokeDasharray="4 3"
              />
              <title>{label}</title>
            </g>
          ))}
        {drawn.map(({ id, molarity }, row) => {
          const y = HEAD + row * ROW + ROW / 2;
          const x = xOf(Math.log10(molarity));
          return (
            <g key={id}>
              <text x={NAME_WIDTH - 8} y={y + 4} fontSize="13" textAnchor="end" fill="var(--ink)">
                {formulaText(id)}
              </text>
              <path d={`M${NAME_WIDTH} ${y}H${x}`} stroke="var(--line)" strokeWidth="2" />
              <circle cx={x} cy={y} r="4.5" fill="var(--copper)" stroke="var(--raised)" strokeWidth="1.5" />
              <title>{`${id}: ${formatMolarity(molarity)}`}</title>
            </g>
          );
        })}
      </svg>
      <figcaption className="text-sm text-soft">
        mol/L, each line ten times the next{step > 1 ? ` (every ${step} powers marked)` : ''}
      </figcaption>
      <Details summary="As a table">
        <table className="w-full text-sm">
          <thead>
            <tr className="border-b border-line text-left">
              <th scope="col">Species</th>
              <th scope="col" className="text-right">
                Concentration
              </th>
            </tr>
          </thead>
          <tbody>
            {[...species]
              .sort((a, b) => b.molarity - a.molarity)
              .map(({ id, molarity }) => (
                <tr key={id} className="border-b">
                  <td>
                    <Formula id={id} />
                  </td>
                  <td className="text-right font-mono">{formatMolarity(molarity)}</td>
                </tr>
              ))}
          </tbody>
        </table>
      </Details>
    </figure>
  );
}
