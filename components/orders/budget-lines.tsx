import { formatMoney } from '@/lib/client/format';
import type { BudgetRow } from '@/lib/schemas/budgets';

/** Each budget as a line: spent, promised, left. */
export function BudgetLines({ budgets }: { readonly budgets: readonly BudgetRow[] }) {
  return (
    <ul className="grid gap-4 md:grid-cols-2">
      {budgets.map(({ id, name, year, amountMinor, committedMinor, spentMinor, currency }) => {
        const money = (minor: number) => formatMoney(minor, currency, 'en-GB');
        const left = amountMinor - committedMinor - spentMinor;
        const share = (minor: number) => `${Math.min(100, (100 * minor) / Math.max(1, amountMinor))}%`;
        return (
          <li key={id}>
            <p className="flex justify-between gap-4">
              <span className="font-semibold">
                {name} {year}
              </span>
              <span className="font-mono">{money(amountMinor)}</span>
            </p>
            <div aria-hidden className="my-1 flex h-3 border border-line bg-raised">
              <span className="bg-verdigris" style={{ width: share(spentMinor) }} />
              <span className="bg-amber" style={{ width: share(committedMinor) }} />
            </div>
            <p className="text-sm text-soft">
              {money(spentMinor)} paid, {money(committedMinor)} promised,{' '}
              {left < 0 ? `${money(-left)} over` : `${money(left)} left`}
            </p>
          </li>
        );
      })}
    </ul>
  );
}
