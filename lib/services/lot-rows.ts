import 'server-only';
import { addDays, formatISO } from 'date-fns';
import { col, fn, Op } from 'sequelize';
import type { WhereOptions } from 'sequelize';
import { fromMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import type { Page } from '@/lib/schemas/list';
import type { LotListQuery, LotRow } from '@/lib/schemas/lots';
import { LotModel } from '@/models/lot';
import { PlaceModel } from '@/models/place';
import { SubstanceModel } from '@/models/substance';
import { lotStops } from './holds';
import { contains, orderOf } from './lists';
import { rowsById } from './lookup';

/** A lot whose last day comes this soon is shown as expiring. */
const EXPIRING_DAYS = 30;
const MOST_FOUND = 500;
const SORT_COLUMNS = { substance: 'substanceId', balance: 'balanceMicro' };

const isoDay = (date: Date): string => formatISO(date, { representation: 'date' });

export async function presentLots(lots: readonly LotModel[]): Promise<LotRow[]> {
  const [substances, places, stops] = await Promise.all([
    rowsById(
      SubstanceModel,
      lots.map(({ substanceId }) => substanceId),
    ),
    rowsById(
      PlaceModel,
      lots.map(({ placeId }) => placeId),
    ),
    lotStops(lots),
  ]);
  const today = isoDay(new Date());
  return lots.map((lot) => ({
    id: lot.id,
    code: lot.code,
    substanceId: lot.substanceId,
    substanceName: substances.get(lot.substanceId)?.name ?? lot.substanceId,
    formula: substances.get(lot.substanceId)?.formula ?? '',
    lotNumber: lot.lotNumber,
    assayPercent: lot.assayPercent,
    unit: lot.unit,
    balance: fromMicro(lot.balanceMicro),
    receivedOn: lot.receivedOn,
    openedOn: lot.openedOn,
    expiresOn: lot.expiresOn,
    placeId: lot.placeId,
    placeName: places.get(lot.placeId)?.name ?? '',
    isHeld: stops.has(lot.id),
    isExpired: lot.expiresOn !== null && lot.expiresOn < today,
    version: lot.version,
  }));
}

/** Substances of which less stands on the shelves, held and expired lots aside, than their low-stock point. */
async function lowSubstances(): Promise<string[]> {
  const watched = await SubstanceModel.findAll({
    where: { lowStockMicro: { [Op.ne]: null } },
    attributes: ['id', 'lowStockMicro'],
  });
  const sums = (await LotModel.findAll({
    attributes: ['substanceId', [fn('SUM', col('balanceMicro')), 'balanceMicro']],
    where: { heldAt: null, [Op.or]: [{ expiresOn: null }, { expiresOn: { [Op.gte]: isoDay(new Date()) } }] },
    group: ['substanceId'],
  })) as unknown as readonly { substanceId: string; balanceMicro: number }[];
  const usable = new Map(sums.map(({ substanceId, balanceMicro }) => [substanceId, Number(balanceMicro)]));
  return watched
    .filter(({ id, lowStockMicro }) => (usable.get(id) ?? 0) < (lowStockMicro ?? 0))
    .map(({ id }) => id);
}

async function shownWhere(show: LotListQuery['show']): Promise<WhereOptions> {
  const today = isoDay(new Date());
  const inStock = { balanceMicro: { [Op.gt]: 0 } };
  switch (show) {
    case 'in-stock':
      return inStock;
    case 'expiring':
      return { ...inStock, expiresOn: { [Op.between]: [today, isoDay(addDays(new Date(), EXPIRING_DAYS))] } };
    case 'expired':
      return { ...inStock, expiresOn: { [Op.lt]: today } };
    case 'low':
      return { ...inStock, substanceId: await lowSubstances() };
    case 'held':
      return { heldAt: { [Op.ne]: null } };
    case 'empty':
      return { balanceMicro: 0 };
    case 'all':
      return {};
  }
}

/** Lots, searched by code, lot number, or the name, formula or CAS number of the substance. */
export async function listLots(_viewer: Viewer, query: LotListQuery): Promise<Page<LotRow>> {
  const conditions: WhereOptions[] = [await shownWhere(query.show)];
  if (query.substanceId) conditions.push({ substanceId: query.substanceId });
  if (query.placeId) conditions.push({ placeId: query.placeId });
  if (query.search) {
    const found = await SubstanceModel.findAll({
      where: contains('searchText', query.search.toLowerCase()),
      attributes: ['id'],
      limit: MOST_FOUND,
    });
    conditions.push({
      [Op.or]: [
        contains('code', query.search),
        contains('lotNumber', query.search),
        { substanceId: found.map(({ id }) => id) },
      ],
    });
  }
  const { rows, count } = await LotModel.findAndCountAll({
    where: { [Op.and]: conditions },
    order: orderOf(query.sort, SORT_COLUMNS),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  return { items: await presentLots(rows), total: count, page: query.page, pageSize: query.pageSize };
}
