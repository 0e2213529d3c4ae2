import type { Metadata } from 'next';
import { MixBench } from '@/components/mixes/mix-bench';
import { PageHeader } from '@/components/ui/page-header';
import { mayByRole } from '@/lib/domain/policy';
import { load, pageViewer } from '@/lib/http/page';
import { getDemonstration } from '@/lib/services/demonstrations';

export const metadata: Metadata = { title: 'Mix bench' };

export default async function MixBenchPage({ searchParams }: PageProps<'/mix-bench'>) {
  const viewer = await pageViewer('mix:compute');
  const { demonstration } = await searchParams;
  return (
    <>
      <PageHeader
        title="What if these were poured together?"
        lead="Drag a volume and watch. Nothing is made from here."
      />
      <MixBench
        demonstration={
          typeof demonstration === 'string' ? await load(getDemonstration(viewer, demonstration)) : null
        }
        maySave={mayByRole(viewer, 'recipe:create')}
      />
    </>
  );
}
