import { route } from '@/lib/http/route';
import { budgetEndpoints } from '@/lib/schemas/budgets';
import { listBudgets } from '@/lib/services/budgets';

export const GET = route(budgetEndpoints.list, async () => ({ items: await listBudgets() }));
