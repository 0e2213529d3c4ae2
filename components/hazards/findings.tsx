import { formatAmount, formatNumber } from '@/lib/client/format';
import type { Finding } from '@/lib/hazards/types';
import { classNames } from '../ui/class-names';
import { Details } from '../ui/details';
import { StateMark } from '../ui/state-mark';

const EDGE: Readonly<Record<string, string>> = {
  stop: 'border-signal',
  review: 'border-amber',
  controlled: 'border-amber',
  caution: 'border-line',
  note: 'border-rule',
};

/** Findings in words, gravest first: why, what must not happen, what protects, where it comes from. */
export function Findings({
  findings,
  isCompact = false,
}: {
  readonly findings: readonly Finding[];
  readonly isCompact?: boolean;
}) {
  if (findings.length === 0) {
    return (
      <p className="flex items-center gap-2 font-semibold text-verdigris">
        <span aria-hidden>✓</span> Nothing found against it. A missing rule is no proof of safety.
      </p>
    );
  }
  return (
    <ol className="space-y-4">
      {findings.map((finding, index) => (
        <li
          key={`${finding.rule}-${index}`}
          className={classNames('border-l-4 pl-3', EDGE[finding.severity])}
        >
          <p className="flex flex-wrap items-center gap-x-3 gap-y-1">
            <StateMark state={finding.severity} />
            <strong>{finding.title}</strong>
          </p>
          <p className="mt-1">{finding.reason}</p>
          {finding.concerns.length > 0 && (
            <p className="text-sm text-soft">Concerns: {finding.concerns.join(' · ')}</p>
          )}
          {finding.mustNot && <p className="mt-1 font-semibold">{finding.mustNot}</p>}
          {finding.gas && <GasFigures gas={finding.gas} />}
          {!isCompact && <Guidance finding={finding} />}
          {isCompact && (
            <Details summary="What protects, and the source">
              <Guidance finding={finding} />
            </Details>
          )}
        </li>
      ))}
    </ol>
  );
}

function Guidance({ finding }: { readonly finding: Finding }) {
  return (
    <>
      {finding.precautions.length > 0 && (
        <ul className="mt-1 list-disc pl-5">
          {finding.precautions.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      )}
      {finding.alternative && (
        <p className="mt-1">
          <span className="font-semibold">Safer: </span>
          {finding.alternative}
        </p>
      )}
      <p className="mt-1 text-sm text-soft">
        Source: {finding.source}. Local rules and a competent person decide.
      </p>
    </>
  );
}

function GasFigures({ gas }: { readonly gas: NonNullable<Finding['gas']> }) {
  const rows: (readonly [string, string])[] = [
    [
      'Worst case',
      `${formatAmount(gas.worstCaseMoles * 1000, 'mmol')}, ${formatAmount(gas.mlAt25C, 'mL')} of gas at 25 °C`,
    ],
    ['In the room, well mixed', formatAmount(gas.ppmInRoom, 'ppm')],
    ['In a 0.1 m³ breathing zone', formatAmount(gas.ppmInBreathingZone, 'ppm')],
  ];
  if (gas.predictedPpmInBreathingZone !== null)
    rows.push(['Predicted there at this pH', formatAmount(gas.predictedPpmInBreathingZone, 'ppm')]);
  if (gas.ppmAboveLiquid !== null)
    rows.push(['Just above the liquid', formatAmount(gas.ppmAboveLiquid, 'ppm')]);
  return (
    <table className="mt-2 text-sm">
      <caption className="text-left font-semibold">{gas.species} gas</caption>
      <tbody>
        {rows.map(([name, value]) => (
          <tr key={name}>
            <th scope="row" className="pr-4 text-left font-normal text-soft">
              {name}
            </th>
            <td className="font-mono">{value}</td>
          </tr>
        ))}
        {gas.limits.map((limit) => (
          <tr key={limit.name} className="text-signal">
            <th scope="row" className="pr-4 text-left font-normal">
              Limit: {limit.name}
            </th>
            <td className="font-mono" title={limit.source}>
              {formatNumber(limit.ppm)} ppm
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
