import type { Metadata } from 'next';
import { ShortageList } from '@/components/orders/order-lists';
import { OrderTabs } from '@/components/orders/order-tabs';
import { ProposalView } from '@/components/orders/proposal-view';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { mayByRole } from '@/lib/domain/policy';
import { pageViewer } from '@/lib/http/page';
import { listBudgets } from '@/lib/services/budgets';
import { listShortages } from '@/lib/services/shortages';

export const metadata: Metadata = { title: 'Shortages' };

export default async function ShortagesPage() {
  const viewer = await pageViewer('order:read');
  const [open, budgets] = await Promise.all([
    listShortages(viewer, {
      page: 1,
      pageSize: 1,
      sort: 'orderBy',
      search: '',
      format: 'json',
      state: 'open',
    }),
    listBudgets(),
  ]);
  return (
    <>
      <PageHeader
        title={
          open.total === 0
            ? 'Nothing waits to be ordered'
            : open.total === 1
              ? '1 thing is short and not ordered'
              : `${open.total} things are short and not ordered`
        }
      />
      <OrderTabs here="/orders/shortages" />
      <Section title="What is short">
        <ShortageList />
      </Section>
      {open.total > 0 && (
        <Section title="What to order, at least cost">
          <ProposalView
            budgets={budgets.map(({ id, name, year }) => ({ id, words: `${name} ${year}` }))}
            mayDraft={mayByRole(viewer, 'order:draft')}
          />
        </Section>
      )}
    </>
  );
}
