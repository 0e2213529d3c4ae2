import { formatISO } from 'date-fns';
import type { Metadata } from 'next';
import { LotForm } from '@/components/shelves/lot-form';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';
import { listStockable } from '@/lib/services/lots';
import { listPlaces } from '@/lib/services/places';

export const metadata: Metadata = { title: 'Put a lot on the shelf' };

export default async function NewLotPage() {
  const viewer = await pageViewer('stock:write');
  const [substances, { items: places }] = await Promise.all([listStockable(viewer), listPlaces(viewer)]);
  return (
    <>
      <PageHeader
        title="Put a lot on the shelf"
        lead="For what came outside an order. What was ordered is received on the order's page."
      />
      <LotForm
        substances={substances}
        places={places}
        today={formatISO(new Date(), { representation: 'date' })}
      />
    </>
  );
}
