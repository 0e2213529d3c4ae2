import 'server-only';
import { formatISO } from 'date-fns';
import { findSubstance } from '@/lib/chemistry/substances';
import { fromMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import { planOrder } from '@/lib/planning/order-plan';
import type { OrderNeed } from '@/lib/planning/order-types';
import type { Page } from '@/lib/schemas/list';
import type { Proposal, ShortageListQuery, ShortageRow } from '@/lib/schemas/shortages';
import { OfferModel } from '@/models/offer';
import { OrderModel } from '@/models/order';
import { OrderLineModel } from '@/models/order-line';
import { RequestModel } from '@/models/request';
import { ShortageModel } from '@/models/shortage';
import { SubstanceModel } from '@/models/substance';
import { SupplierModel } from '@/models/supplier';
import { orderOf } from './lists';
import { rowsById } from './lookup';
import { CURRENCY, packSizeOf } from './order-rows';

const SOLVER_SECONDS = 3;

export async function listShortages(_viewer: Viewer, query: ShortageListQuery): Promise<Page<ShortageRow>> {
  const { rows, count } = await ShortageModel.findAndCountAll({
    where: query.state ? { state: query.state } : {},
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  const [substances, requests, lines] = await Promise.all([
    rowsById(
      SubstanceModel,
      rows.map(({ substanceId }) => substanceId),
    ),
    rowsById(
      RequestModel,
      rows.map(({ requestId }) => requestId),
    ),
    rowsById(
      OrderLineModel,
      rows.map(({ orderLineId }) => orderLineId),
    ),
  ]);
  const orders = await rowsById(
    OrderModel,
    [...lines.values()].map(({ orderId }) => orderId),
  );
  const items = rows.map((row) => {
    const line = row.orderLineId ? lines.get(row.orderLineId) : undefined;
    const order = line ? orders.get(line.orderId) : undefined;
    return {
      id: row.id,
      substanceId: row.substanceId,
      substanceName: substances.get(row.substanceId)?.name ?? row.substanceId,
      amount: fromMicro(row.neededMicro),
      unit: row.unit,
      neededOn: row.neededOn,
      orderBy: row.orderBy,
      state: row.state,
      requestId: row.requestId,
      requestCode: row.requestId ? (requests.get(row.requestId)?.code ?? null) : null,
      orderId: order?.id ?? null,
      orderCode: order?.code ?? null,
    };
  });
  return { items, total: count, page: query.page, pageSize: query.pageSize };
}

/** Open shortages in the unit their packs are sold in, one need per substance. */
function needsOf(
  shortages: readonly ShortageModel[],
  unitOf: (substanceId: string) => 'g' | 'mL' | undefined,
): OrderNeed[] {
  const bySubstance = new Map<string, OrderNeed>();
  for (const shortage of shortages) {
    const unit = unitOf(shortage.substanceId) ?? shortage.unit;
    const density = findSubstance(shortage.substanceId)?.densityGPerMl ?? 1;
    const factor = unit === shortage.unit ? 1 : unit === 'mL' ? 1 / density : density;
    const use = { onDay: shortage.neededOn, amountMicro: Math.ceil(shortage.neededMicro * factor) };
    const before = bySubstance.get(shortage.substanceId);
    bySubstance.set(shortage.substanceId, {
      substanceId: shortage.substanceId,
      unit,
      uses: [...(before?.uses ?? []), use],
    });
  }
  return [...bySubstance.values()];
}

/** The order of least cost for everything that is short, beside what buying each at its best unit price would cost. */
export async function proposeOrders(_viewer: Viewer): Promise<Proposal> {
  const shortages = await ShortageModel.findAll({ where: { state: 'open' } });
  const nothing: Proposal = {
    status: 'nothing-short',
    message: 'Nothing is short.',
    currency: CURRENCY,
    totalMinor: 0,
    naiveMinor: null,
    savedMinor: null,
    gap: 0,
    suppliers: [],
    uncovered: [],
  };
  if (shortages.length === 0) return nothing;
  const substances = await rowsById(
    SubstanceModel,
    shortages.map(({ substanceId }) => substanceId),
  );
  const [offers, suppliers] = await Promise.all([
    OfferModel.findAll({ where: { substanceId: [...substances.keys()], active: true } }),
    SupplierModel.findAll({ where: { active: true } }),
  ]);
  const outcome = await planOrder(
    needsOf(shortages, (id) => substances.get(id)?.unit),
    offers
      .filter(({ supplierId }) => suppliers.some(({ id }) => id === supplierId))
      .map(({ id, supplierId, substanceId, unit, packMicro, priceMinor, hazardous }) => ({
        id,
        supplierId,
        substanceId,
        unit,
        packMicro,
        prices: [{ fromPacks: 1, priceMinor }],
        maxPacks: null,
        shelfLifeDays: null,
        hazardous,
      })),
    suppliers.map(({ id, name, leadDays, carriageMinor, hazardSurchargeMinor, minimumOrderMinor }) => ({
      id,
      name,
      leadDays,
      carriageMinor,
      hazardSurchargeMinor,
      minimumOrderMinor,
    })),
    {
      orderOn: formatISO(new Date(), { representation: 'date' }),
      budgetMinor: null,
      pinned: [],
      forbidden: [],
      timeLimitSeconds: SOLVER_SECONDS,
    },
  );
  if (outcome.status === 'no-plan')
    return {
      ...nothing,
      status: 'no-plan',
      message: outcome.message,
      uncovered: outcome.uncovered.map(({ message }) => message),
    };
  const { plan } = outcome;
  const offerById = new Map(offers.map((offer) => [offer.id, offer]));
  return {
    status: outcome.status,
    message:
      plan.gap === 0
        ? 'Proven to be the least cost.'
        : `Within ${(plan.gap * 100).toFixed(1)} % of the least cost.`,
    currency: CURRENCY,
    totalMinor: plan.totalMinor,
    naiveMinor: plan.naive?.totalMinor ?? null,
    savedMinor: plan.savedMinor,
    gap: plan.gap,
    suppliers: plan.suppliers.map((supplier) => ({
      supplierId: supplier.supplierId,
      supplierName: suppliers.find(({ id }) => id === supplier.supplierId)?.name ?? '',
      goodsMinor: supplier.goodsMinor,
      extrasMinor: supplier.carriageMinor + supplier.hazardSurchargeMinor,
      totalMinor: supplier.totalMinor,
      lines: plan.lines
        .filter(({ supplierId }) => supplierId === supplier.supplierId)
        .map((line) => ({
          offerId: line.offerId,
          substanceName: substances.get(line.substanceId)?.name ?? line.substanceId,
          stockNumber: offerById.get(line.offerId)?.stockNumber ?? '',
          packs: line.packs,
          packSize: packSizeOf(line.packMicro, line.unit),
          lineTotalMinor: line.lineTotalMinor,
          reason: line.reason,
        })),
    })),
    uncovered: plan.uncovered.map(({ message }) => message),
  };
}
