'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { orderEndpoints } from '@/lib/schemas/orders';
import type { OrderDetail } from '@/lib/schemas/orders';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { NumberInput, Select, TextInput } from '../ui/inputs';

/** Packs that came, as one lot on its place. */
export function ReceiveForm({
  order,
  places,
}: {
  readonly order: OrderDetail;
  readonly places: readonly { id: string; words: string }[];
}) {
  const router = useRouter();
  const open = order.lines.filter(({ packs, receivedPacks }) => receivedPacks < packs);
  const [lineId, setLineId] = useState(open[0]?.id ?? '');
  const [packs, setPacks] = useState(String((open[0]?.packs ?? 0) - (open[0]?.receivedPacks ?? 0)));
  const [lotNumber, setLotNumber] = useState('');
  const [assay, setAssay] = useState('');
  const [expiresOn, setExpiresOn] = useState('');
  const [placeId, setPlaceId] = useState('');
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [key, setKey] = useState(newIdempotencyKey);
  const errorOf = (field: string) => problem?.errors.find(({ pointer }) => pointer === `#/${field}`)?.detail;

  const receive = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    try {
      await callApi(orderEndpoints.receive, {
        params: { id: order.id },
        body: {
          lineId,
          packs: packs.trim() === '' ? NaN : Number(packs),
          lotNumber,
          assayPercent: assay.trim() === '' ? null : Number(assay.replace(',', '.')),
          expiresOn: expiresOn || null,
          placeId,
          version: order.version,
        },
        idempotencyKey: key,
      });
      toast('It stands on the shelf as a new lot');
      setLotNumber('');
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
    <form onSubmit={(event) => void receive(event)} noValidate className="grid gap-4 sm:grid-cols-2">
      {problem && problem.errors.length === 0 && (
        <div className="sm:col-span-2">
          <Alert tone="stop" title={problem.message} />
        </div>
      )}
      <Select
        id="receive-line"
        label="Which line"
        className="sm:col-span-2"
        value={lineId}
        onChange={(event) => setLineId(event.target.value)}
        error={errorOf('lineId')}
      >
        {open.map((line) => (
          <option key={line.id} value={line.id}>
            {line.packSize} {line.substanceName} ({line.packs - line.receivedPacks} to come)
          </option>
        ))}
      </Select>
      <NumberInput
        id="receive-packs"
        label="Packs"
        value={packs}
        onChange={(event) => setPacks(event.target.value)}
        error={errorOf('packs')}
      />
      <TextInput
        id="receive-lot"
        label="Lot number"
        value={lotNumber}
        onChange={(event) => setLotNumber(event.target.value)}
        error={errorOf('lotNumber')}
      />
      <NumberInput
        id="receive-assay"
        label="Assay on the certificate"
        unit="%"
        value={assay}
        onChange={(event) => setAssay(event.target.value)}
        error={errorOf('assayPercent')}
      />
      <TextInput
        id="receive-expiry"
        label="Use by"
        type="date"
        value={expiresOn}
        onChange={(event) => setExpiresOn(event.target.value)}
        error={errorOf('expiresOn')}
      />
      <Select
        id="receive-place"
        label="Place"
        className="sm:col-span-2"
        value={placeId}
        onChange={(event) => setPlaceId(event.target.value)}
        error={errorOf('placeId')}
      >
        <option value="">Choose a place</option>
        {places.map(({ id, words }) => (
          <option key={id} value={id}>
            {words}
          </option>
        ))}
      </Select>
      <p className="sm:col-span-2">
        <Button type="submit" look="primary" isBusy={isBusy} busyText="Taking in …">
          Take it in
        </Button>
      </p>
    </form>
  );
}
