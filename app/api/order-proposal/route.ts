import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { proposeOrders } from '@/lib/services/shortages';

export const GET = route(orderEndpoints.proposal, ({ viewer }) => proposeOrders(viewer));
