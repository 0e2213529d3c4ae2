import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { FirstMeasures } from '@/components/bottles/first-measures';
import { HazardBlock } from '@/components/bottles/hazard-block';
import { SoluteLine } from '@/components/batches/solute-line';
import { Alert } from '@/components/ui/alert';
import { Amount } from '@/components/ui/amount';
import { Moment } from '@/components/ui/moment';
import { findPublicBottle } from '@/lib/services/bottle-labels';
import type { PublicBottle } from '@/lib/services/bottle-labels';

export const metadata: Metadata = {
  title: 'Bottle',
  robots: { index: false, follow: false },
  referrer: 'no-referrer',
};

const TOKEN = /^[\w-]{20,60}$/;

/** What a scanned label opens: for whoever found the bottle, without signing in. */
export default async function PublicBottlePage({ params }: PageProps<'/b/[token]'>) {
  const { token } = await params;
  const bottle = TOKEN.test(token) ? await findPublicBottle(token) : null;
  if (!bottle) notFound();
  return (
    <main id="page" className="mx-auto max-w-3xl px-4 py-8">
      {bottle.kind === 'revoked' ? <Revoked house={bottle.house} /> : <Known bottle={bottle} />}
    </main>
  );
}

function Known({ bottle }: { readonly bottle: Extract<PublicBottle, { kind: 'bottle' }> }) {
  const { label, isHeld, isDiscarded, isPastDate } = bottle;
  return (
    <>
      {isHeld && <Warning title="Do not use this: it is on hold" />}
      {isDiscarded && <Warning title="This bottle was discarded and should no longer stand anywhere" />}
      {isPastDate && <Warning title="Past its date: do not use it" />}
      <article className="sheet border-2 border-line p-5">
        <h1 className="text-3xl">{label.solutionName}</h1>
        <p className="mt-1 text-xl font-semibold">
          <SoluteLine solutes={label.solutes} />
        </p>
        <p className="mt-1 mb-5">
          Bottle <span className="font-mono font-bold">{label.bottleCode}</span>,{' '}
          <Amount value={label.volumeMl} unit="mL" />
          {label.madeAt && (
            <>
              , made <Moment at={label.madeAt} style="short-day" />
            </>
          )}
          {label.useBy && (
            <>
              , use by <Moment at={label.useBy} style="short-day" />
            </>
          )}
        </p>
        <HazardBlock classification={label.classification} />
      </article>
      <Part title="What to do first">
        <FirstMeasures precautions={label.classification.precautions} />
      </Part>
      <Contact house={label.house} />
    </>
  );
}

function Revoked({ house }: { readonly house: Extract<PublicBottle, { kind: 'revoked' }>['house'] }) {
  return (
    <>
      <h1 className="rule-double mb-4 pb-2 text-3xl">This label is no longer valid</h1>
      <p className="text-lg">
        Its address was revoked, so nothing is said here about what the bottle holds. Treat it as unknown and
        hazardous: do not open it, do not use it, keep others away.
      </p>
      <Contact house={house} />
    </>
  );
}

function Contact({ house }: { readonly house: Extract<PublicBottle, { kind: 'revoked' }>['house'] }) {
  return (
    <Part title="Whom to tell">
      <p className="text-lg font-semibold">{house.emergency}</p>
      <p className="text-lg">
        {house.name}. {house.contact}
      </p>
    </Part>
  );
}

function Part({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <section aria-label={title} className="mt-7">
      <h2 className="mb-2 border-b border-line pb-1 text-xl">{title}</h2>
      {children}
    </section>
  );
}

function Warning({ title }: { readonly title: string }) {
  return (
    <div className="mb-4">
      <Alert tone="stop" title={title} />
    </div>
  );
}
