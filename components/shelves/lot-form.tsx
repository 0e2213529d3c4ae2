'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import type { Route } from 'next';
import { useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { showProblem } from '@/lib/client/forms';
import { lotKeys } from '@/lib/client/lots';
import { lotCreateSchema, lotEndpoints } from '@/lib/schemas/lots';
import type { Place } from '@/lib/schemas/places';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { NumberInput, Select, TextArea, TextInput } from '../ui/inputs';

interface LotFormProps {
  readonly substances: readonly {
    readonly id: string;
    readonly name: string;
    readonly unit: string;
    readonly storageGroup: string;
  }[];
  readonly places: readonly Place[];
  readonly today: string;
}

const FIELDS = [
  'substanceId',
  'lotNumber',
  'assayPercent',
  'amount',
  'receivedOn',
  'expiresOn',
  'placeId',
  'reason',
];
const blankToNull = (value: unknown) => (value === '' ? null : value);

/** Puts a lot on the shelf by hand. */
export function LotForm({ substances, places, today }: LotFormProps) {
  const router = useRouter();
  const client = useQueryClient();
  const [key, setKey] = useState(newIdempotencyKey);
  const [general, setGeneral] = useState<string | null>(null);
  const { register, handleSubmit, setError, control, formState } = useForm({
    resolver: zodResolver(lotCreateSchema),
    defaultValues: {
      substanceId: '',
      lotNumber: '',
      assayPercent: '',
      amount: '',
      receivedOn: today,
      expiresOn: null,
      placeId: '',
      reason: 'Received',
    },
  });
  const { errors, isSubmitting } = formState;
  const [substanceId, placeId] = useWatch({ control, name: ['substanceId', 'placeId'] });
  const substance = substances.find(({ id }) => id === substanceId);
  const fitting = [...places].sort(
    (a, b) =>
      Number(b.storageGroup === substance?.storageGroup) - Number(a.storageGroup === substance?.storageGroup),
  );
  const chosen = places.find(({ id }) => id === placeId);
  const isMisplaced = substance && chosen && chosen.storageGroup !== substance.storageGroup;

  const save = handleSubmit(async (body) => {
    setGeneral(null);
    try {
      const lot = await callApi(lotEndpoints.create, { body, idempotencyKey: key });
      void client.invalidateQueries({ queryKey: lotKeys.lists() });
      router.push(`/shelves/lots/${lot.id}` as Route);
    } catch (error) {
      setGeneral(showProblem(error, setError, FIELDS));
      if (!(error instanceof ApiProblem) || error.status !== 0) setKey(newIdempotencyKey());
    }
  });

  return (
    <form onSubmit={(event) => void save(event)} noValidate className="grid max-w-2xl gap-4">
      {general && <Alert tone="stop" title={general} />}
      <Select
        id="substanceId"
        label="Substance"
        {...register('substanceId')}
        error={errors.substanceId && 'Choose the substance.'}
      >
        <option value="">choose …</option>
        {substances.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </Select>
      <div className="grid gap-4 sm:grid-cols-2">
        <NumberInput
          id="amount"
          label="Amount"
          unit={substance?.unit}
          {...register('amount')}
          error={errors.amount?.message}
        />
        <TextInput
          id="lotNumber"
          label="Lot number"
          hint="As printed on the pack."
          {...register('lotNumber')}
          error={errors.lotNumber?.message}
        />
        <NumberInput
          id="assayPercent"
          label="Assay"
          unit="%"
          hint="From the certificate; blank where none came."
          {...register('assayPercent')}
          error={errors.assayPercent?.message}
        />
        <TextInput
          id="receivedOn"
          label="Received on"
          type="date"
          {...register('receivedOn')}
          error={errors.receivedOn?.message}
        />
        <TextInput
          id="expiresOn"
          label="Expires on"
          type="date"
          hint="Blank where it does not."
          {...register('expiresOn', { setValueAs: blankToNull })}
          error={errors.expiresOn?.message}
        />
        <Select
          id="placeId"
          label="Place"
          {...register('placeId')}
          error={errors.placeId && 'Choose where it stands.'}
        >
          <option value="">choose …</option>
          {fitting.map(({ id, name, roomName, storageGroup }) => (
            <option key={id} value={id}>
              {name}, {roomName} ({storageGroup.replaceAll('_', ' ')})
            </option>
          ))}
        </Select>
      </div>
      {isMisplaced && (
        <Alert tone="attention" title={`${chosen.name} is for ${chosen.storageGroup.replaceAll('_', ' ')}`}>
          {substance.name} belongs with {substance.storageGroup.replaceAll('_', ' ')}. Read the data sheet
          before it stands there.
        </Alert>
      )}
      <TextArea id="reason" label="Reason" {...register('reason')} error={errors.reason?.message} />
      <div>
        <Button type="submit" look="primary" isBusy={isSubmitting} busyText="Saving …">
          Put it on the shelf
        </Button>
      </div>
    </form>
  );
}
