import 'server-only';
import { invalid } from '@/lib/domain/errors';
import type { FieldError } from '@/lib/domain/errors';
import { countedIn } from '@/lib/planning/counted-in';
import type { OrderCreate } from '@/lib/schemas/orders';
import { OfferModel } from '@/models/offer';
import { OrderLineModel } from '@/models/order-line';
import { ShortageModel } from '@/models/shortage';
import type { SupplierModel } from '@/models/supplier';
import { rowsById } from './lookup';
import { CURRENCY } from './order-rows';

export interface Priced {
  readonly rows: readonly {
    offerId: string;
    substanceId: string;
    packs: number;
    packMicro: number;
    unit: 'g' | 'mL';
    priceMinor: number;
    lineTotalMinor: number;
  }[];
  readonly goodsMinor: number;
  readonly surchargeMinor: number;
}

/** Prices lines at a supplier's present offers. @throws DomainError `invalid` for every line that does not fit */
export async function priceLines(supplier: SupplierModel, lines: OrderCreate['lines']): Promise<Priced> {
  const offers = await rowsById(
    OfferModel,
    lines.map(({ offerId }) => offerId),
  );
  const errors: FieldError[] = [];
  const seen = new Set<string>();
  let isHazardous = false;
  const rows = lines.flatMap(({ offerId, packs }, index) => {
    const offer = offers.get(offerId);
    const pointer = `#/lines/${index}/offerId`;
    if (!offer || !offer.active) errors.push({ pointer, detail: 'There is no such offer.' });
    else if (offer.supplierId !== supplier.id)
      errors.push({ pointer, detail: `${supplier.name} does not offer this.` });
    else if (seen.has(offerId)) errors.push({ pointer, detail: 'This offer stands twice.' });
    if (!offer) return [];
    seen.add(offerId);
    isHazardous ||= offer.hazardous;
    const { substanceId, packMicro, unit, priceMinor } = offer;
    return [{ offerId, substanceId, packs, packMicro, unit, priceMinor, lineTotalMinor: priceMinor * packs }];
  });
  if (errors.length > 0) throw invalid(errors);
  const goodsMinor = rows.reduce((sum, { lineTotalMinor }) => sum + lineTotalMinor, 0);
  if (goodsMinor < supplier.minimumOrderMinor) {
    throw invalid([
      {
        pointer: '#/lines',
        detail: `${supplier.name} takes orders from ${(supplier.minimumOrderMinor / 100).toFixed(2)} ${CURRENCY} of goods.`,
      },
    ]);
  }
  return {
    rows,
    goodsMinor,
    surchargeMinor: supplier.carriageMinor + (isHazardous ? supplier.hazardSurchargeMinor : 0),
  };
}

/**
 * Ties open shortages to the lines that cover them, the soonest needed first; packs of several lines add up. One
 * that the packs do not cover wholly stays open: half of it would still be short.
 */
async function claimShortages(orderId: string): Promise<void> {
  const lines = await OrderLineModel.findAll({ where: { orderId }, order: [['position', 'ASC']] });
  const open = await ShortageModel.findAll({
    where: { substanceId: lines.map(({ substanceId }) => substanceId), state: 'open' },
    order: [
      ['neededOn', 'ASC'],
      ['createdAt', 'ASC'],
    ],
  });
  const leftBy = new Map<string, number>();
  for (const line of lines) {
    const key = `${line.substanceId} ${line.unit}`;
    let leftMicro = (leftBy.get(key) ?? 0) + line.packs * line.packMicro;
    for (const shortage of open.filter(({ substanceId }) => substanceId === line.substanceId)) {
      const neededMicro = countedIn(shortage.substanceId, shortage.neededMicro, shortage.unit, line.unit);
      if (shortage.state !== 'open' || neededMicro > leftMicro) continue;
      leftMicro -= neededMicro;
      await shortage.update({ state: 'on-order', orderLineId: line.id });
    }
    leftBy.set(key, leftMicro);
  }
}

/** What an order no longer covers is open again. Belongs inside a write. */
export async function releaseShortages(orderId: string): Promise<void> {
  const lines = await OrderLineModel.findAll({ where: { orderId }, attributes: ['id'] });
  await ShortageModel.update(
    { state: 'open', orderLineId: null },
    { where: { orderLineId: lines.map(({ id }) => id), state: 'on-order' } },
  );
}

export async function saveLines(orderId: string, { rows }: Priced): Promise<void> {
  await releaseShortages(orderId);
  await OrderLineModel.destroy({ where: { orderId } });
  await OrderLineModel.bulkCreate(rows.map((row, position) => ({ orderId, position, ...row })));
  await claimShortages(orderId);
}
