import { formatISO } from 'date-fns';
import type { Metadata } from 'next';
import { BatchList } from '@/components/batches/batch-list';
import { Proposals } from '@/components/batches/proposals';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { mayByRole } from '@/lib/domain/policy';
import { pageViewer } from '@/lib/http/page';
import { proposeBatches } from '@/lib/services/batch-proposals';
import { listBatches } from '@/lib/services/batches';

export const metadata: Metadata = { title: 'Batches' };

const count = (number: number, one: string, many: string) =>
  `${number === 0 ? 'No' : number} ${number === 1 ? one : many}`;

export default async function BatchesPage() {
  const viewer = await pageViewer('batch:list');
  const isStaff = mayByRole(viewer, 'stock:read');
  if (!isStaff) {
    return (
      <>
        <PageHeader title="Batches made for your requests" />
        <BatchList />
      </>
    );
  }
  const one = { page: 1, pageSize: 1, sort: 'makeOn', search: '', format: 'json' } as const;
  const [plan, planned, making, checked] = await Promise.all([
    proposeBatches(viewer),
    listBatches(viewer, { ...one, state: 'planned' }),
    listBatches(viewer, { ...one, state: 'making' }),
    listBatches(viewer, { ...one, state: 'checked' }),
  ]);
  const onTheBench = planned.total + making.total + checked.total;
  return (
    <>
      <PageHeader
        title={`${count(plan.proposals.length, 'batch', 'batches')} to plan, ${onTheBench} on the bench`}
        lead={`${planned.total} planned, ${making.total} being made, ${checked.total} checked and waiting for bottles.`}
      />
      <Section title="To be planned">
        <Proposals
          proposals={plan.proposals}
          late={plan.late}
          saved={plan.saved}
          today={formatISO(new Date(), { representation: 'date' })}
          mayWrite={mayByRole(viewer, 'batch:write')}
        />
      </Section>
      <Section title="All batches">
        <BatchList />
      </Section>
    </>
  );
}
