import type { Metadata } from 'next';
import { LotList } from '@/components/shelves/lot-list';
import { ShelfTabs } from '@/components/shelves/shelf-tabs';
import { LinkButton } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { mayByRole } from '@/lib/domain/policy';
import { pageViewer } from '@/lib/http/page';
import { listLots } from '@/lib/services/lot-rows';
import { listPlaces } from '@/lib/services/places';

export const metadata: Metadata = { title: 'Lots' };

export default async function LotsPage() {
  const viewer = await pageViewer('stock:read');
  const one = { page: 1, pageSize: 1, sort: 'expiresOn', search: '', format: 'json' } as const;
  const [{ items: places }, inStock, expiring, held] = await Promise.all([
    listPlaces(viewer),
    listLots(viewer, { ...one, show: 'in-stock' }),
    listLots(viewer, { ...one, show: 'expiring' }),
    listLots(viewer, { ...one, show: 'held' }),
  ]);
  return (
    <>
      <PageHeader
        title={`${inStock.total} lots in stock: ${expiring.total} expire within 30 days, ${held.total} on hold`}
        actions={
          mayByRole(viewer, 'stock:write') ? (
            <LinkButton href="/shelves/lots/new">Put a lot on the shelf</LinkButton>
          ) : null
        }
      />
      <ShelfTabs here="/shelves/lots" />
      <LotList places={places} />
    </>
  );
}
