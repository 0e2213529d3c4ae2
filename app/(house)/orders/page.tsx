import type { Metadata } from 'next';
import { BudgetLines } from '@/components/orders/budget-lines';
import { OrderList } from '@/components/orders/order-lists';
import { OrderTabs } from '@/components/orders/order-tabs';
import { LinkButton } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { mayByRole } from '@/lib/domain/policy';
import { pageViewer } from '@/lib/http/page';
import { listBudgets } from '@/lib/services/budgets';
import { listOrders } from '@/lib/services/orders';

export const metadata: Metadata = { title: 'Orders' };

export default async function OrdersPage() {
  const viewer = await pageViewer('order:read');
  const [waiting, budgets] = await Promise.all([
    listOrders(viewer, {
      page: 1,
      pageSize: 1,
      sort: '-createdAt',
      search: '',
      format: 'json',
      state: 'for-approval',
    }),
    listBudgets(),
  ]);
  const title =
    waiting.total === 0
      ? 'No order waits for approval'
      : waiting.total === 1
        ? '1 order waits for approval'
        : `${waiting.total} orders wait for approval`;
  return (
    <>
      <PageHeader
        title={title}
        actions={
          mayByRole(viewer, 'order:draft') ? (
            <LinkButton href="/orders/new" look="primary">
              Draft an order
            </LinkButton>
          ) : null
        }
      />
      <OrderTabs here="/orders" />
      <Section title="Money">
        <BudgetLines budgets={budgets} />
      </Section>
      <OrderList />
    </>
  );
}
