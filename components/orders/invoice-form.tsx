'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { orderEndpoints } from '@/lib/schemas/orders';
import type { OrderDetail } from '@/lib/schemas/orders';
import { Button } from '../ui/button';
import { NumberInput, TextInput } from '../ui/inputs';

/** The supplier's bill, matched with the order to the penny. */
export function InvoiceForm({ order }: { readonly order: OrderDetail }) {
  const router = useRouter();
  const [number, setNumber] = useState('');
  const [amount, setAmount] = useState('');
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [key, setKey] = useState(newIdempotencyKey);
  const errorOf = (field: string) => problem?.errors.find(({ pointer }) => pointer === `#/${field}`)?.detail;
  const enter = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    const amountMinor = amount.trim() === '' ? NaN : Math.round(Number(amount.replace(',', '.')) * 100);
    try {
      await callApi(orderEndpoints.invoice, {
        params: { id: order.id },
        body: { number, amountMinor, version: order.version },
        idempotencyKey: key,
      });
      toast(
        amountMinor === order.totalMinor ? 'It matches the order' : 'It differs from the order: disputed',
      );
      setNumber('');
      setAmount('');
      setKey(newIdempotencyKey());
      router.refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
    } finally {
      setBusy(false);
    }
  };
  return (
    <form onSubmit={(event) => void enter(event)} noValidate className="grid gap-4 sm:grid-cols-2">
      <TextInput
        id="invoice-number"
        label="Invoice number"
        value={number}
        onChange={(event) => setNumber(event.target.value)}
        error={errorOf('number')}
      />
      <NumberInput
        id="invoice-amount"
        label="Amount"
        unit={order.currency}
        value={amount}
        onChange={(event) => setAmount(event.target.value)}
        error={
          errorOf('amountMinor') ?? (problem && problem.errors.length === 0 ? problem.message : undefined)
        }
      />
      <p>
        <Button type="submit" isBusy={isBusy} busyText="Entering …">
          Enter the invoice
        </Button>
      </p>
    </form>
  );
}
