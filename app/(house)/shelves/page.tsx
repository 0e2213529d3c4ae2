import type { Metadata } from 'next';
import { Cabinets } from '@/components/shelves/cabinets';
import { ShelfTabs } from '@/components/shelves/shelf-tabs';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';
import { listShelves } from '@/lib/services/places';

export const metadata: Metadata = { title: 'Shelves' };

export default async function ShelvesPage() {
  const viewer = await pageViewer('stock:read');
  const shelves = await listShelves(viewer);
  const lots = shelves.flatMap((shelf) => shelf.lots);
  const stopped = lots.filter(({ isHeld, isExpired }) => isHeld || isExpired).length;
  return (
    <>
      <PageHeader
        title={`${lots.length} lots on ${shelves.length} shelves${stopped > 0 ? `, ${stopped} not to be used` : ''}`}
        lead="Each bottle is a lot, filled as far as it is; a cross means on hold or past its date."
      />
      <ShelfTabs here="/shelves" />
      <Cabinets shelves={shelves} />
    </>
  );
}
