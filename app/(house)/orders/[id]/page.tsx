import type { Metadata } from 'next';
import { OrderActions } from '@/components/orders/order-actions';
import { OrderLines } from '@/components/orders/order-lines';
import { ReceiveForm } from '@/components/orders/receive-form';
import { InvoiceForm } from '@/components/orders/invoice-form';
import { Story } from '@/components/records/story';
import { Alert } from '@/components/ui/alert';
import { DefinitionList } from '@/components/ui/definition-list';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { StateMark } from '@/components/ui/state-mark';
import { formatMoney } from '@/lib/client/format';
import { mayByRole } from '@/lib/domain/policy';
import { load, pageViewer } from '@/lib/http/page';
import { getOrder } from '@/lib/services/orders';
import { listPlaces } from '@/lib/services/places';

export const metadata: Metadata = { title: 'Order' };

export default async function OrderPage({ params }: PageProps<'/orders/[id]'>) {
  const viewer = await pageViewer('order:read');
  const { id } = await params;
  const order = await load(getOrder(viewer, id));
  const places = await listPlaces(viewer);
  const money = (minor: number) => formatMoney(minor, order.currency, 'en-GB');
  const isReceivable = ['sent', 'acknowledged', 'part-received'].includes(order.state);
  return (
    <>
      <PageHeader
        title={`${order.code} to ${order.supplierName}: ${money(order.totalMinor)}`}
        lead={`Drafted by ${order.draftedByName}${order.approvedByName ? `, approved by ${order.approvedByName}` : ''}`}
        actions={<StateMark state={order.state} />}
      />
      {order.sending && order.sending.state !== 'sent' && (
        <div className="mb-4">
          <Alert
            tone={order.sending.state === 'dead' ? 'stop' : 'attention'}
            title={
              order.sending.state === 'dead'
                ? 'The supplier has not got it; it was given up'
                : `On its way; ${order.sending.attempts} attempts so far`
            }
          >
            {order.sending.lastError}
          </Alert>
        </div>
      )}
      {order.payment?.failure && (
        <div className="mb-4">
          <Alert tone="stop" title="The payment failed">
            {order.payment.failure}
          </Alert>
        </div>
      )}
      <OrderActions
        order={order}
        mayDraft={mayByRole(viewer, 'order:update')}
        mayApprove={mayByRole(viewer, 'order:approve')}
      />
      <Section title="What is ordered">
        <OrderLines order={order} />
      </Section>
      <div className="grid gap-x-10 lg:grid-cols-2">
        <Section title="Money and supplier">
          <DefinitionList
            items={[
              ['Goods', money(order.goodsMinor)],
              ['Carriage, surcharges', money(order.surchargeMinor)],
              ['In all', money(order.totalMinor)],
              ['Budget', order.budgetName],
              ['Paid', order.isPaid ? `yes, ${order.payment?.reference ?? ''}` : 'no'],
              ['Supplier’s reference', order.supplierReference ?? 'none yet'],
              [
                'Invoices',
                order.invoices
                  .map(({ number, amountMinor, state }) => `${number}: ${money(amountMinor)} (${state})`)
                  .join(', ') || 'none yet',
              ],
            ]}
          />
        </Section>
        {isReceivable && mayByRole(viewer, 'order:receive') && (
          <Section title="Take in what came">
            <ReceiveForm
              order={order}
              places={places.items.map((place) => ({
                id: place.id,
                words: `${place.name} (${place.storageGroup.replaceAll('_', ' ')})`,
              }))}
            />
          </Section>
        )}
        {['sent', 'acknowledged', 'part-received', 'received'].includes(order.state) &&
          mayByRole(viewer, 'order:receive') && (
            <Section title="Enter the invoice">
              <InvoiceForm order={order} />
            </Section>
          )}
        <Section title="From draft to shelf">
          <Story entries={order.story} />
        </Section>
      </div>
    </>
  );
}
