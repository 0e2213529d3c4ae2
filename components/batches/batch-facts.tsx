'use client';

import Link from 'next/link';
import type { Route } from 'next';
import type { ReactNode } from 'react';
import type { Batch } from '@/lib/schemas/batches';
import { Amount } from '../ui/amount';
import { DefinitionList } from '../ui/definition-list';
import { Moment } from '../ui/moment';
import { SoluteLine } from './solute-line';

/** The head of the sheet: what, how much, for whom, by when. */
export function BatchFacts({ batch, qr }: { readonly batch: Batch; readonly qr: ReactNode }) {
  const { sheet } = batch;
  const percent = 100 * sheet.toleranceFraction;
  return (
    <header className="rule-double mb-6 flex items-start justify-between gap-6 pb-4">
      <div className="min-w-0">
        <p className="text-2xl font-bold">
          <span className="font-mono">{batch.code}</span>{' '}
          <span className="hidden print:inline">{batch.solutionName}</span>
        </p>
        <p className="mb-3 text-xl font-semibold">
          <SoluteLine solutes={batch.solutes} />
        </p>
        <DefinitionList
          items={[
            [
              'Make',
              <>
                <Amount value={sheet.makeVolumeMl} unit="mL" /> in{' '}
                {sheet.vessel.fills > 1 ? `${sheet.vessel.fills} fillings of the ` : 'the '}
                {sheet.vessel.name}, to {percent} % ({sheet.tolerance})
              </>,
            ],
            ['Make on', <Moment key="on" at={batch.makeOn} style="day" />],
            ['Ready by', <Moment key="ready" at={batch.readyBy} />],
            [
              'For',
              <ul key="for">
                {batch.requests.map(({ id, code, session, startsAt, volumeMl }) => (
                  <li key={id}>
                    <Link href={`/requests/${id}` as Route} className="font-mono">
                      {code}
                    </Link>{' '}
                    {session}, <Moment at={startsAt} />: <Amount value={volumeMl} unit="mL" />
                  </li>
                ))}
              </ul>,
            ],
            ...(batch.madeAt
              ? ([
                  [
                    'Made',
                    <>
                      <Moment at={batch.madeAt} /> by {batch.makerName}, checked by {batch.checkerName}
                    </>,
                  ],
                ] as const)
              : []),
            ...(batch.useBy
              ? ([['Use by', <Moment key="use" at={batch.useBy} style="short-day" />]] as const)
              : []),
          ]}
        />
      </div>
      <div className="max-sm:hidden print:block">{qr}</div>
    </header>
  );
}
