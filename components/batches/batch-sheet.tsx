'use client';

import type { Route } from 'next';
import type { ReactNode } from 'react';
import { callApi } from '@/lib/client/api';
import { useBatch, useBatchChange } from '@/lib/client/use-batch';
import { batchEndpoints } from '@/lib/schemas/batches';
import type { Batch } from '@/lib/schemas/batches';
import { BottleTable } from '../bottles/bottle-table';
import { StepStrip } from '../steps/step-strip';
import { Alert } from '../ui/alert';
import { Section } from '../ui/section';
import { ActualStrength } from './actual-strength';
import { BottleForm } from './bottle-form';
import { CheckForm } from './check-form';
import { BatchFacts } from './batch-facts';
import { BatchActions } from './batch-actions';
import { StepList } from './step-list';
import { Story } from './story';
import { TakeLines } from './take-lines';

interface BatchSheetProps {
  readonly initial: Batch;
  readonly mayWrite: boolean;
  readonly mayHold: boolean;
  readonly maySeeStock: boolean;
  /** The square that opens this sheet. */
  readonly qr: ReactNode;
  /** Hazards of the solution as diluted. */
  readonly hazards: ReactNode;
}

const NOW: Readonly<Record<Batch['state'], string>> = {
  planned: 'planned',
  making: 'being made',
  checked: 'checked, not yet in bottles',
  bottled: 'in bottles',
  spent: 'spent',
  discarded: 'discarded',
};

/** The batch as its sheet: on the screen as on paper. */
export function BatchSheet({ initial, mayWrite, mayHold, maySeeStock, qr, hazards }: BatchSheetProps) {
  const batch = useBatch(initial);
  const change = useBatchChange(batch.id);
  const start = () =>
    change(() =>
      callApi(batchEndpoints.start, { params: { id: batch.id }, body: { version: batch.version } }),
    );
  const isMade = batch.state === 'bottled' || batch.state === 'spent';
  const { warnings, questions, expected } = batch.sheet;
  const asked = batch.requests[0] ? (`/requests/${batch.requests[0].id}` as Route) : null;

  return (
    <>
      <StepStrip
        done={isMade ? 3 : 2}
        now={batch.isHeld ? 'on hold' : NOW[batch.state]}
        isStopped={batch.isHeld || batch.state === 'discarded'}
        hrefs={[asked, asked, null, null]}
      />
      {batch.heldReason && (
        <div className="mb-4">
          <Alert tone="stop" title="On hold: do not use">
            {batch.heldReason}
          </Alert>
        </div>
      )}
      <BatchActions batch={batch} mayWrite={mayWrite} mayHold={mayHold} onStart={start} />
      <article
        className="sheet px-4 py-5 md:px-8 print:border-0 print:p-0 print:[&_section]:mb-3"
        aria-label={`Sheet of batch ${batch.code}`}
      >
        <BatchFacts batch={batch} qr={qr} />
        {(warnings.length > 0 || questions.length > 0) && (
          <div className="mb-6">
            <Alert tone="attention" title="Look at this before you begin">
              <ul className="list-disc pl-5">
                {[...questions, ...warnings].map((line) => (
                  <li key={line}>{line}</li>
                ))}
              </ul>
            </Alert>
          </div>
        )}
        <Section title="What it is once made">{hazards}</Section>
        <Section title="Take">
          <TakeLines batch={batch} mayWrite={mayWrite} maySeeStock={maySeeStock} />
          {batch.sheet.passedOver.length > 0 && (
            <p className="mt-2 text-sm text-soft">Passed over: {batch.sheet.passedOver.join(' ')}</p>
          )}
        </Section>
        <Section title="Glass">
          <ul className="columns-1 gap-8 md:columns-2">
            {batch.sheet.glassware.map(({ name, use, toleranceMl, toleranceSource }) => (
              <li key={name} className="mb-1 break-inside-avoid">
                <strong>{name}</strong>: {use}{' '}
                <span className="text-sm text-soft">
                  (± {Number(toleranceMl.toPrecision(3))} mL, {toleranceSource})
                </span>
              </li>
            ))}
          </ul>
        </Section>
        <Section title="Steps">
          <StepList batch={batch} mayWrite={mayWrite} />
        </Section>
        <Section title="Expected">
          <p>
            {expected.pH === null ? 'No pH is foreseen' : `pH about ${expected.pH.toFixed(1)}`};{' '}
            {expected.colour === null ? 'no colour is foreseen' : expected.colour}.
            {batch.sheet.storageNote && ` Keep: ${batch.sheet.storageNote}`}
          </p>
        </Section>
        {batch.actual && (
          <Section title="Real strength">
            <ActualStrength actual={batch.actual} />
          </Section>
        )}
        {mayWrite && batch.state === 'making' && (
          <Section title="Check" className="no-print">
            <CheckForm key={batch.version} batch={batch} />
          </Section>
        )}
        {mayWrite && batch.state === 'checked' && (
          <Section title="Divide into bottles" className="no-print">
            <BottleForm batch={batch} />
          </Section>
        )}
        {batch.bottles.length > 0 && (
          <Section title="Bottles">
            <BottleTable batch={batch} mayWrite={mayWrite} />
          </Section>
        )}
        <p className="hidden text-sm print:block">
          Predictions replace no risk assessment, data sheet or local rule; a competent person decides.
        </p>
      </article>
      <Story entries={batch.story} />
    </>
  );
}
