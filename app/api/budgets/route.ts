import { route } from '@/lib/http/route';
import { orderEndpoints } from '@/lib/schemas/orders';
import { listBudgets } from '@/lib/services/budgets';

export const GET = route(orderEndpoints.budgets, async () => ({ items: await listBudgets() }));
