'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { showProblem } from '@/lib/client/forms';
import { lotKeys } from '@/lib/client/lots';
import { lotEndpoints, lotPatchSchema } from '@/lib/schemas/lots';
import type { Lot } from '@/lib/schemas/lots';
import type { Place } from '@/lib/schemas/places';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { NumberInput, Select, TextArea, TextInput } from '../ui/inputs';

const FIELDS = ['placeId', 'assayPercent', 'openedOn', 'expiresOn', 'reason'];
const blankToNull = (value: unknown) => (value === '' ? null : value);

/** Moves a lot, or puts its dates and assay right. */
export function LotEdit({ lot, places }: { readonly lot: Lot; readonly places: readonly Place[] }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>Move or put right</Button>
      <Dialog
        title={`Move or put right ${lot.code}`}
        description="What stood there before is kept in the record."
        isOpen={isOpen}
        onOpenChange={setOpen}
      >
        <EditForm lot={lot} places={places} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function EditForm({
  lot,
  places,
  onDone,
}: {
  readonly lot: Lot;
  readonly places: readonly Place[];
  readonly onDone: () => void;
}) {
  const router = useRouter();
  const client = useQueryClient();
  const [key, setKey] = useState(newIdempotencyKey);
  const [general, setGeneral] = useState<string | null>(null);
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(lotPatchSchema),
    defaultValues: {
      placeId: lot.placeId,
      assayPercent: lot.assayPercent ?? '',
      openedOn: lot.openedOn,
      expiresOn: lot.expiresOn,
      reason: '',
      version: lot.version,
    },
  });
  const { errors, isSubmitting } = formState;

  const save = handleSubmit(async (body) => {
    setGeneral(null);
    try {
      await callApi(lotEndpoints.update, { params: { id: lot.id }, body, idempotencyKey: key });
      void client.invalidateQueries({ queryKey: lotKeys.lists() });
      onDone();
      router.refresh();
    } catch (error) {
      setGeneral(showProblem(error, setError, FIELDS));
      if (!(error instanceof ApiProblem) || error.status !== 0) setKey(newIdempotencyKey());
    }
  });

  return (
    <form onSubmit={(event) => void save(event)} noValidate className="grid gap-4">
      {general && <Alert tone="stop" title={general} />}
      <Select id="edit-place" label="Place" {...register('placeId')} error={errors.placeId?.message}>
        {places.map(({ id, name, roomName, storageGroup }) => (
          <option key={id} value={id}>
            {name}, {roomName} ({storageGroup.replaceAll('_', ' ')})
          </option>
        ))}
      </Select>
      <NumberInput
        id="edit-assay"
        label="Assay"
        unit="%"
        {...register('assayPercent')}
        error={errors.assayPercent?.message}
      />
      <div className="grid gap-4 sm:grid-cols-2">
        <TextInput
          id="edit-opened"
          label="Opened on"
          type="date"
          {...register('openedOn', { setValueAs: blankToNull })}
          error={errors.openedOn?.message}
        />
        <TextInput
          id="edit-expires"
          label="Expires on"
          type="date"
          {...register('expiresOn', { setValueAs: blankToNull })}
          error={errors.expiresOn?.message}
        />
      </div>
      <TextArea id="edit-reason" label="Reason" {...register('reason')} error={errors.reason?.message} />
      <Button type="submit" look="primary" isBusy={isSubmitting} busyText="Saving …">
        Save
      </Button>
    </form>
  );
}
