import type { Metadata } from 'next';
import { ChainState } from '@/components/records/chain-state';
import { RecordList } from '@/components/records/record-list';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Records' };

export default async function RecordsPage() {
  await pageViewer('record:read');
  return (
    <>
      <PageHeader
        title="Who did what, and when"
        lead="Every change of state is one line. Each line’s hash covers the line before, so a later alteration shows."
      />
      <ChainState />
      <RecordList />
    </>
  );
}
