'use client';

import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { formatMoney } from '@/lib/client/format';
import { offerEndpoints } from '@/lib/schemas/offers';
import type { OfferRow } from '@/lib/schemas/offers';
import { orderEndpoints } from '@/lib/schemas/orders';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Combobox } from '../ui/combobox';
import { NumberInput, Select, TextArea } from '../ui/inputs';

interface TypedLine {
  readonly key: number;
  readonly offer: OfferRow;
  readonly packs: string;
}

/** An order by hand: packs of one supplier. */
export function OrderForm({ budgets }: { readonly budgets: readonly { id: string; words: string }[] }) {
  const router = useRouter();
  const [lines, setLines] = useState<readonly TypedLine[]>([]);
  const [budgetId, setBudgetId] = useState(budgets[0]?.id ?? '');
  const [note, setNote] = useState('');
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [found, setFound] = useState<readonly OfferRow[]>([]);
  const [key] = useState(newIdempotencyKey);
  const supplier = lines[0]?.offer;
  const total = lines.reduce((sum, { offer, packs }) => sum + offer.priceMinor * (Number(packs) || 0), 0);

  const find = async (text: string, signal: AbortSignal) => {
    const { items } = await callApi(offerEndpoints.list, {
      query: { search: text, pageSize: 15, ...(supplier ? { supplierId: supplier.supplierId } : {}) },
      signal,
    });
    setFound(items);
    return items.map((offer) => ({
      value: offer.id,
      label: `${offer.packSize} ${offer.substanceName}`,
      detail: `${offer.supplierName}, ${formatMoney(offer.priceMinor, 'GBP', 'en-GB')}`,
    }));
  };

  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    try {
      const order = await callApi(orderEndpoints.create, {
        body: {
          supplierId: supplier?.supplierId ?? '',
          budgetId,
          note: note.trim() || null,
          lines: lines.map(({ offer, packs }) => ({
            offerId: offer.id,
            packs: packs.trim() === '' ? NaN : Number(packs),
          })),
        },
        idempotencyKey: key,
      });
      toast(`${order.code} is drafted`);
      router.push(`/orders/${order.id}` as Route);
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
      setBusy(false);
    }
  };

  return (
    <form onSubmit={(event) => void save(event)} noValidate className="grid max-w-3xl gap-4">
      {problem && (
        <Alert
          tone="stop"
          title={
            problem.errors.find(({ pointer }) => !/^#\/lines\/\d/.test(pointer))?.detail ??
            'Some lines need attention'
          }
        />
      )}
      <ul className="space-y-3">
        {lines.map(({ key: lineKey, offer, packs }, index) => (
          <li
            key={lineKey}
            className="grid gap-3 border-l-4 border-verdigris bg-raised p-3 sm:grid-cols-[1fr_9rem_auto] sm:items-end"
          >
            <p>
              {offer.packSize} {offer.substanceName}
              <span className="block text-sm text-soft">
                {offer.supplierName}, {offer.stockNumber}, {formatMoney(offer.priceMinor, 'GBP', 'en-GB')}
              </span>
            </p>
            <NumberInput
              id={`packs-${lineKey}`}
              label="Packs"
              value={packs}
              onChange={(event) =>
                setLines((all) =>
                  all.map((line) => (line.key === lineKey ? { ...line, packs: event.target.value } : line)),
                )
              }
              error={problem?.errors.find(({ pointer }) => pointer.startsWith(`#/lines/${index}/`))?.detail}
            />
            <Button
              look="plain"
              onClick={() => setLines((all) => all.filter((line) => line.key !== lineKey))}
              aria-label={`Remove ${offer.substanceName}`}
            >
              Remove
            </Button>
          </li>
        ))}
      </ul>
      <Combobox
        id="offer"
        label={supplier ? `Add a pack of ${supplier.supplierName}` : 'Add a pack'}
        placeholder="Substance, CAS or stock number"
        chosen={null}
        onChoose={({ value }) => {
          const offer = found.find(({ id }) => id === value);
          if (offer)
            setLines((all) => [
              ...all,
              { key: Math.max(0, ...all.map((line) => line.key)) + 1, offer, packs: '1' },
            ]);
        }}
        find={find}
      />
      <Select
        id="budget"
        label="Budget"
        value={budgetId}
        onChange={(event) => setBudgetId(event.target.value)}
      >
        {budgets.map(({ id, words }) => (
          <option key={id} value={id}>
            {words}
          </option>
        ))}
      </Select>
      <TextArea id="order-note" label="Note" value={note} onChange={(event) => setNote(event.target.value)} />
      <p className="text-lg">
        Goods: <span className="font-mono">{formatMoney(total, 'GBP', 'en-GB')}</span>
        <span className="block text-sm text-soft">
          Carriage and surcharges are added by the supplier’s terms.
        </span>
      </p>
      <p>
        <Button
          type="submit"
          look="primary"
          isBusy={isBusy}
          busyText="Drafting …"
          disabled={lines.length === 0}
        >
          Keep the draft
        </Button>
      </p>
    </form>
  );
}
