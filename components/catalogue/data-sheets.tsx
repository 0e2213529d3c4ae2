'use client';

import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { toast } from 'sonner';
import { addressOf, problemOf } from '@/lib/client/api';
import { DATA_SHEET_LIMIT_BYTES, dataSheetEndpoints } from '@/lib/schemas/data-sheets';
import type { DataSheet } from '@/lib/schemas/data-sheets';
import { Button } from '../ui/button';
import { Field } from '../ui/field';
import { Moment } from '../ui/moment';

/** The sheets kept for a substance, and a place to add one. */
export function DataSheets({
  substanceId,
  sheets,
  mayUpload,
}: {
  readonly substanceId: string;
  readonly sheets: readonly DataSheet[];
  readonly mayUpload: boolean;
}) {
  const router = useRouter();
  const input = useRef<HTMLInputElement>(null);
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);

  const upload = async () => {
    const file = input.current?.files?.[0];
    if (!file) return setError('Choose a PDF first.');
    if (file.size > DATA_SHEET_LIMIT_BYTES) return setError('At most 8 MB.');
    setBusy(true);
    setError(undefined);
    const form = new FormData();
    form.set('file', file);
    const response = await fetch(addressOf(dataSheetEndpoints.upload.path, { id: substanceId }, undefined), {
      method: 'POST',
      body: form,
    }).catch(() => null);
    setBusy(false);
    if (!response) return setError('The server did not answer. Try again.');
    if (!response.ok) {
      const problem = await problemOf(response);
      return setError(problem.errors[0]?.detail ?? problem.message);
    }
    toast('The data sheet is kept');
    if (input.current) input.current.value = '';
    router.refresh();
  };

  return (
    <>
      {sheets.length === 0 && (
        <p className="mb-3 text-soft">None kept yet. Read the supplier’s before handling.</p>
      )}
      <ul className="mb-4">
        {sheets.map(({ id, fileName, sizeBytes, uploadedBy, uploadedAt }) => (
          <li key={id} className="border-b py-2">
            <a href={`/api/data-sheets/${id}`}>{fileName}</a>
            <span className="block text-sm text-soft">
              {Math.ceil(sizeBytes / 1024)} kB, {uploadedBy}, <Moment at={uploadedAt} />
            </span>
          </li>
        ))}
      </ul>
      {mayUpload && (
        <div className="grid gap-3">
          <Field id="data-sheet" label="Add a data sheet" hint="PDF, at most 8 MB." error={error}>
            <input
              id="data-sheet"
              ref={input}
              type="file"
              accept="application/pdf,.pdf"
              aria-describedby="data-sheet-hint"
              className="block w-full py-2"
            />
          </Field>
          <p>
            <Button isBusy={isBusy} busyText="Uploading …" onClick={() => void upload()}>
              Add it
            </Button>
          </p>
        </div>
      )}
    </>
  );
}
