'use client';

import { useQuery } from '@tanstack/react-query';
import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { formatMoney } from '@/lib/client/format';
import { orderEndpoints } from '@/lib/schemas/orders';
import { shortageEndpoints } from '@/lib/schemas/shortages';
import type { Proposal } from '@/lib/schemas/shortages';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Select } from '../ui/inputs';
import { Skeleton } from '../ui/skeleton';

/** The plan of least cost by supplier, each line with its reason; one draft a supplier. */
export function ProposalView({
  budgets,
  mayDraft,
}: {
  readonly budgets: readonly { id: string; words: string }[];
  readonly mayDraft: boolean;
}) {
  const router = useRouter();
  const [budgetId, setBudgetId] = useState(budgets[0]?.id ?? '');
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState<string | null>(null);
  const [keys] = useState(() => new Map<string, string>());
  const { data, error, isPending } = useQuery({
    queryKey: ['order-proposal'],
    queryFn: ({ signal }) => callApi(shortageEndpoints.proposal, { signal }),
    staleTime: 0,
  });

  const draft = async (supplier: Proposal['suppliers'][number]) => {
    setBusy(supplier.supplierId);
    setFailure(null);
    const key = keys.get(supplier.supplierId) ?? newIdempotencyKey();
    keys.set(supplier.supplierId, key);
    try {
      const order = await callApi(orderEndpoints.create, {
        body: {
          supplierId: supplier.supplierId,
          budgetId,
          lines: supplier.lines.map(({ offerId, packs }) => ({ offerId, packs })),
        },
        idempotencyKey: key,
      });
      toast(`${order.code} is drafted`);
      router.push(`/orders/${order.id}` as Route);
    } catch (problem) {
      if (!(problem instanceof ApiProblem)) throw problem;
      setFailure(problem.errors[0]?.detail ?? problem.message);
      setBusy(null);
    }
  };

  if (isPending) return <Skeleton lines={5} />;
  if (error) return <Alert tone="attention" title={error.message} />;
  const money = (minor: number) => formatMoney(minor, data.currency, 'en-GB');
  return (
    <div>
      {failure && <Alert tone="stop" title={failure} />}
      <p className="mb-2">
        <span className="text-2xl font-bold">{money(data.totalMinor)}</span> in all. {data.message}
        {data.savedMinor !== null &&
          data.naiveMinor !== null &&
          ` Buying each thing at its best unit price would cost ${money(data.naiveMinor)}: ${money(data.savedMinor)} more.`}
      </p>
      {data.uncovered.map((line) => (
        <Alert key={line} tone="attention" title={line} />
      ))}
      <Select
        id="proposal-budget"
        label="Budget"
        value={budgetId}
        onChange={(event) => setBudgetId(event.target.value)}
        className="mb-4 w-72"
      >
        {budgets.map(({ id, words }) => (
          <option key={id} value={id}>
            {words}
          </option>
        ))}
      </Select>
      {data.suppliers.map((supplier) => (
        <section
          key={supplier.supplierId}
          aria-label={supplier.supplierName}
          className="mb-6 border-l-4 border-verdigris bg-raised p-4"
        >
          <div className="flex flex-wrap items-end justify-between gap-3">
            <h3 className="font-semibold">
              {supplier.supplierName}: {money(supplier.totalMinor)}
              <span className="block text-sm font-normal text-soft">
                goods {money(supplier.goodsMinor)}, carriage and surcharges {money(supplier.extrasMinor)}
              </span>
            </h3>
            {mayDraft && (
              <Button
                look="primary"
                isBusy={busy === supplier.supplierId}
                busyText="Drafting …"
                disabled={busy !== null || budgetId === ''}
                onClick={() => void draft(supplier)}
              >
                Draft this order
              </Button>
            )}
          </div>
          <ul className="mt-3">
            {supplier.lines.map((line) => (
              <li key={line.offerId} className="border-t py-2">
                <span className="flex flex-wrap justify-between gap-x-4">
                  <span>
                    <span className="font-mono">{line.packs} ×</span> {line.packSize} {line.substanceName}
                  </span>
                  <span className="font-mono">{money(line.lineTotalMinor)}</span>
                </span>
                <span className="block text-sm text-soft">{line.reason}</span>
              </li>
            ))}
          </ul>
        </section>
      ))}
    </div>
  );
}
