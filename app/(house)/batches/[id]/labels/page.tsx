import type { Metadata } from 'next';
import Link from 'next/link';
import { LabelFace } from '@/components/bottles/label-face';
import { LabelSheet } from '@/components/bottles/label-sheet';
import { EmptyState } from '@/components/ui/empty-state';
import { PageHeader } from '@/components/ui/page-header';
import { load, pageViewer } from '@/lib/http/page';
import { getBatch } from '@/lib/services/batches';
import { labelsOfBatch } from '@/lib/services/bottle-labels';

export const metadata: Metadata = { title: 'Labels' };

export default async function LabelsPage({ params }: PageProps<'/batches/[id]/labels'>) {
  const viewer = await pageViewer('batch:write');
  const { id } = await params;
  const [batch, { labels }] = await Promise.all([
    load(getBatch(viewer, id)),
    load(labelsOfBatch(viewer, id)),
  ]);
  const bottles = new Map(batch.bottles.map((bottle) => [bottle.code, bottle]));
  return (
    <>
      <div className="no-print">
        <PageHeader
          title={`${labels.length} ${labels.length === 1 ? 'label' : 'labels'} for ${batch.code}`}
          lead={
            <>
              {batch.solutionName}. <Link href={`/batches/${id}`}>Back to the sheet</Link>
            </>
          }
        />
      </div>
      {labels.length === 0 ? (
        <EmptyState title="No bottle to label">
          Labels come with the bottles; divide the batch on its sheet first.
        </EmptyState>
      ) : (
        <LabelSheet
          labels={labels.flatMap((label) => {
            const bottle = bottles.get(label.bottleCode);
            return bottle
              ? [
                  {
                    bottleId: bottle.id,
                    code: label.bottleCode,
                    prints: bottle.labelPrints,
                    face: <LabelFace label={label} />,
                  },
                ]
              : [];
          })}
        />
      )}
    </>
  );
}
