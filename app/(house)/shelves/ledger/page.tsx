import type { Metadata } from 'next';
import { MovementList } from '@/components/shelves/movement-list';
import { ShelfTabs } from '@/components/shelves/shelf-tabs';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Ledger' };

export default async function LedgerPage() {
  await pageViewer('stock:read');
  return (
    <>
      <PageHeader
        title="Everything that came in and went out"
        lead="Lines are never changed; a mistake is put right by a further line."
      />
      <ShelfTabs here="/shelves/ledger" />
      <MovementList />
    </>
  );
}
