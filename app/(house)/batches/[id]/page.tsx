import type { Metadata } from 'next';
import { BatchSheet } from '@/components/batches/batch-sheet';
import { QrSquare } from '@/components/batches/qr-square';
import { HazardBlock } from '@/components/bottles/hazard-block';
import { PageHeader } from '@/components/ui/page-header';
import { mayByRole } from '@/lib/domain/policy';
import { load, pageViewer } from '@/lib/http/page';
import { getBatch } from '@/lib/services/batches';

export const metadata: Metadata = { title: 'Batch' };

const QR_MM = 34;

export default async function BatchPage({ params }: PageProps<'/batches/[id]'>) {
  const viewer = await pageViewer('batch:read');
  const { id } = await params;
  const batch = await load(getBatch(viewer, id));
  return (
    <>
      <style>{'@media print { @page { margin: 12mm } }'}</style>
      <div className="print:hidden">
        <PageHeader title={`${batch.code}: ${batch.solutionName}`} />
      </div>
      <BatchSheet
        initial={batch}
        mayWrite={mayByRole(viewer, 'batch:write')}
        mayHold={mayByRole(viewer, 'stock:hold')}
        maySeeStock={mayByRole(viewer, 'stock:read')}
        qr={<QrSquare text={batch.address} label={`Opens the sheet of ${batch.code}`} sizeMm={QR_MM} />}
        hazards={<HazardBlock classification={batch.classification} />}
      />
    </>
  );
}
