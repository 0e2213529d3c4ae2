import type { BatchSolute } from '@/lib/schemas/batch-sheets';
import { Formula } from '../chemistry/formula';
import { Amount } from '../ui/amount';

/** What a solution holds, typeset: formula and strength of each solute. */
export function SoluteLine({ solutes }: { readonly solutes: readonly BatchSolute[] }) {
  return (
    <>
      {solutes.map(({ substanceId, formula, name, molarity }, index) => (
        <span key={substanceId}>
          {index > 0 && ', '}
          {formula ? <Formula id={formula} name={name} /> : name} <Amount value={molarity} unit="mol/L" />
        </span>
      ))}
    </>
  );
}
