import 'server-only';
import { col, fn, Op } from 'sequelize';
import type { BudgetRow } from '@/lib/schemas/budgets';
import { BudgetModel } from '@/models/budget';
import { OrderModel } from '@/models/order';

interface Sums {
  readonly committedMinor: number;
  readonly spentMinor: number;
}

async function totalsOf(isPaid: boolean): Promise<Map<string, number>> {
  const rows = (await OrderModel.findAll({
    where: {
      state: { [Op.notIn]: ['draft', 'for-approval', 'refused', 'cancelled'] },
      paidAt: isPaid ? { [Op.ne]: null } : null,
    },
    attributes: ['budgetId', [fn('SUM', col('totalMinor')), 'sumMinor']],
    group: ['budgetId'],
    raw: true,
  })) as unknown as { budgetId: string; sumMinor: number }[];
  return new Map(rows.map(({ budgetId, sumMinor }) => [budgetId, Number(sumMinor)]));
}

/** What is promised by approved orders and what is paid, by budget; added up by the database. */
async function sumsByBudget(): Promise<(budgetId: string) => Sums> {
  const [committed, spent] = await Promise.all([totalsOf(false), totalsOf(true)]);
  return (budgetId) => ({
    committedMinor: committed.get(budgetId) ?? 0,
    spentMinor: spent.get(budgetId) ?? 0,
  });
}

/** Budgets with the orders that are promised but not paid, and those that are paid. */
export async function listBudgets(): Promise<BudgetRow[]> {
  const [budgets, sums] = await Promise.all([
    BudgetModel.findAll({
      order: [
        ['year', 'DESC'],
        ['name', 'ASC'],
      ],
    }),
    sumsByBudget(),
  ]);
  return budgets.map(({ id, name, year, amountMinor, currency }) => ({
    id,
    name,
    year,
    amountMinor,
    currency,
    ...sums(id),
  }));
}

/** What a budget has left after all that is promised or paid, in minor units; negative where it is overdrawn. */
export async function budgetLeftMinor(budget: BudgetModel): Promise<number> {
  const { committedMinor, spentMinor } = (await sumsByBudget())(budget.id);
  return budget.amountMinor - committedMinor - spentMinor;
}
