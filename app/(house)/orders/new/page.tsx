import type { Metadata } from 'next';
import { OrderForm } from '@/components/orders/order-form';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';
import { listBudgets } from '@/lib/services/budgets';

export const metadata: Metadata = { title: 'Draft an order' };

export default async function NewOrderPage() {
  await pageViewer('order:draft');
  const budgets = await listBudgets();
  return (
    <>
      <PageHeader
        title="Draft an order"
        lead="To one supplier. What the shelves lack is planned for you under Shortages."
      />
      <OrderForm budgets={budgets.map(({ id, name, year }) => ({ id, words: `${name} ${year}` }))} />
    </>
  );
}
