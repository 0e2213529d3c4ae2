import { z } from 'zod';
import { endpoint } from './endpoint';
import { moneyField } from './fields';

export const budgetSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  year: z.number().int(),
  amountMinor: moneyField,
  committedMinor: moneyField,
  spentMinor: moneyField,
  currency: z.string(),
});
export type BudgetRow = z.infer<typeof budgetSchema>;

export const budgetEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/budgets',
    action: 'order:read',
    summary: 'Budgets with what is committed and spent',
    response: z.object({ items: z.array(budgetSchema) }),
  }),
};
