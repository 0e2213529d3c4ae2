import { formatISO } from 'date-fns';
import type { Metadata } from 'next';
import Link from 'next/link';
import { Story } from '@/components/batches/story';
import { Formula } from '@/components/chemistry/formula';
import { LotActions } from '@/components/shelves/lot-actions';
import { LotEdit } from '@/components/shelves/lot-edit';
import { LotLife } from '@/components/shelves/lot-life';
import { MovementList } from '@/components/shelves/movement-list';
import { Alert } from '@/components/ui/alert';
import { DefinitionList } from '@/components/ui/definition-list';
import { Moment } from '@/components/ui/moment';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { StateMark } from '@/components/ui/state-mark';
import { mayByRole } from '@/lib/domain/policy';
import { load, pageViewer } from '@/lib/http/page';
import { getLot } from '@/lib/services/lots';
import { listPlaces } from '@/lib/services/places';

export const metadata: Metadata = { title: 'Lot' };

/** A ledger amount to its last digit. */
function Exact({ amount, unit }: { readonly amount: number; readonly unit: string }) {
  return <span className="font-mono whitespace-nowrap">{`${amount}\u202f${unit}`}</span>;
}

export default async function LotPage({ params }: PageProps<'/shelves/lots/[id]'>) {
  const viewer = await pageViewer('stock:read');
  const { id } = await params;
  const [lot, { items: places }] = await Promise.all([load(getLot(viewer, id)), listPlaces(viewer)]);
  const mayWrite = mayByRole(viewer, 'stock:write');
  return (
    <>
      <PageHeader
        title={`${lot.code}: ${lot.substanceName}`}
        lead={
          <>
            {lot.formula && <Formula id={lot.formula} />} <Exact amount={lot.balance} unit={lot.unit} /> left
            of <Exact amount={lot.receivedAmount} unit={lot.unit} />, {lot.placeName}
          </>
        }
        actions={
          <>
            {mayWrite && <LotEdit lot={lot} places={places} />}
            <LotActions lot={lot} mayWrite={mayWrite} mayHold={mayByRole(viewer, 'stock:hold')} />
          </>
        }
      />
      <div className="mb-6 grid gap-3">
        {lot.heldReason !== null && (
          <Alert tone="stop" title="On hold: take nothing from it">
            {lot.heldReason}
          </Alert>
        )}
        {lot.substanceHeldReason !== null && (
          <Alert tone="stop" title={`All ${lot.substanceName} is on hold`}>
            {lot.substanceHeldReason}
          </Alert>
        )}
        {lot.isExpired && (
          <Alert tone="stop" title="Past its date">
            It is passed over when batches are planned.
          </Alert>
        )}
        {lot.storageGroup !== lot.placeStorageGroup && (
          <Alert tone="attention" title="It may stand in the wrong place">
            It belongs with {lot.storageGroup.replaceAll('_', ' ')}; {lot.placeName} is for{' '}
            {lot.placeStorageGroup.replaceAll('_', ' ')}.
          </Alert>
        )}
      </div>
      <Section title="Its life">
        <LotLife lot={lot} today={formatISO(new Date(), { representation: 'date' })} />
      </Section>
      <div className="grid gap-x-10 lg:grid-cols-2">
        <Section title="What it is">
          <DefinitionList
            items={[
              [
                'Lot number',
                <span key="number" className="font-mono">
                  {lot.lotNumber}
                </span>,
              ],
              [
                'Assay',
                lot.assayPercent === null
                  ? 'no certificate; the catalogue figure is used'
                  : `${lot.assayPercent} %`,
              ],
              ['From', lot.supplierName ?? 'not said'],
              ['Received', <Moment key="received" at={lot.receivedOn} style="short-day" />],
              [
                'Opened',
                lot.openedOn ? <Moment key="opened" at={lot.openedOn} style="short-day" /> : 'not yet',
              ],
              [
                'Expires',
                lot.expiresOn ? <Moment key="expires" at={lot.expiresOn} style="short-day" /> : 'does not',
              ],
              [
                'Substance',
                <Link key="substance" href={`/catalogue/substances/${lot.substanceId}`}>
                  {lot.substanceName}
                </Link>,
              ],
            ]}
          />
        </Section>
        <Section title="Made from it">
          {lot.usedIn.length === 0 ? (
            <p className="text-soft">Nothing yet.</p>
          ) : (
            <ul>
              {lot.usedIn.map((use) => (
                <li key={`${use.batchId}${use.at}`} className="border-b py-2">
                  <Link href={`/batches/${use.batchId}`} className="font-semibold">
                    <span className="font-mono">{use.batchCode}</span> {use.solutionName}
                  </Link>{' '}
                  <StateMark state={use.state} /> <Exact amount={use.amount} unit={lot.unit} />
                  {use.bottleCodes.length > 0 && (
                    <span className="block font-mono text-sm text-soft">{use.bottleCodes.join(', ')}</span>
                  )}
                </li>
              ))}
            </ul>
          )}
        </Section>
      </div>
      <Section title="Its ledger">
        <MovementList lotId={lot.id} />
      </Section>
      <Story entries={lot.story} />
    </>
  );
}
