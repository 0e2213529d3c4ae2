import { route } from '@/lib/http/route';
import { shortageEndpoints } from '@/lib/schemas/shortages';
import { proposeOrders } from '@/lib/services/shortages';

export const GET = route(shortageEndpoints.proposal, ({ viewer }) => proposeOrders(viewer));
