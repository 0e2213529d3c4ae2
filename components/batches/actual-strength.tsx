import { formatMolarity, formatNumber } from '@/lib/client/format';
import type { BatchActual } from '@/lib/schemas/batch-sheets';
import { Amount } from '../ui/amount';

/** What was really made: strength, its expanded uncertainty, and how far from the plan. */
export function ActualStrength({ actual }: { readonly actual: BatchActual }) {
  return (
    <div>
      <p className="mb-2">
        <Amount value={actual.volumeMl} unit="mL" significant={4} /> made
      </p>
      <div className="overflow-x-auto">
        <table className="w-full border-collapse">
          <thead>
            <tr className="border-b-2 border-line text-left text-sm">
              <th scope="col" className="py-1 pr-4">
                Solute
              </th>
              <th scope="col" className="py-1 pr-4">
                Real strength
              </th>
              <th scope="col" className="py-1 pr-4">
                Planned
              </th>
              <th scope="col" className="py-1 pr-4">
                Off by
              </th>
              <th scope="col" className="py-1">
                Largest part of the uncertainty
              </th>
            </tr>
          </thead>
          <tbody>
            {actual.strengths.map((strength) => (
              <tr key={strength.substanceId} className="border-b">
                <th scope="row" className="py-2 pr-4 text-left font-semibold">
                  {strength.name}
                </th>
                <td className="py-2 pr-4 font-mono whitespace-nowrap">
                  {formatNumber(strength.molarity, 4)}
                  {strength.expandedUncertainty !== null &&
                    ` ± ${formatNumber(strength.expandedUncertainty, 2)}`}{' '}
                  mol/L
                </td>
                <td className="py-2 pr-4 font-mono">{formatMolarity(strength.plannedMolarity)}</td>
                <td className="py-2 pr-4 font-mono">{strength.deviationPercent.toFixed(2)} %</td>
                <td className="py-2 text-sm">{strength.largestPart ?? 'no budget'}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <p className="mt-1 text-sm text-soft">± is the expanded uncertainty, k = 2: about 95 % of cases.</p>
    </div>
  );
}
