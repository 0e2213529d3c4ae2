import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { enterInvoice } from '@/lib/services/receiving';

export const POST = route(orderEndpoints.invoice, ({ viewer, params, body }) =>
  enterInvoice(viewer, params.id, body),
);
