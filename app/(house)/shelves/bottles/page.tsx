import type { Metadata } from 'next';
import { BottleList } from '@/components/shelves/bottle-list';
import { ShelfTabs } from '@/components/shelves/shelf-tabs';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';
import { listBottles } from '@/lib/services/bottle-rows';

export const metadata: Metadata = { title: 'Bottles' };

export default async function BottlesPage() {
  const viewer = await pageViewer('stock:read');
  const { total } = await listBottles(viewer, {
    page: 1,
    pageSize: 1,
    sort: '-code',
    search: '',
    format: 'json',
    state: 'filled',
  });
  return (
    <>
      <PageHeader title={`${total} ${total === 1 ? 'bottle stands' : 'bottles stand'} in the prep room`} />
      <ShelfTabs here="/shelves/bottles" />
      <BottleList />
    </>
  );
}
