import type { Metadata } from 'next';
import { MovementList } from '@/components/shelves/movement-list';
import { ShelfNav } from '@/components/shelves/shelf-nav';
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
      <ShelfNav current="Ledger" />
      <MovementList />
    </>
  );
}
