import 'server-only';
import { Op } from 'sequelize';
import type { Viewer } from '@/lib/domain/roles';
import type { Page } from '@/lib/schemas/list';
import type { OfferListQuery, OfferRow } from '@/lib/schemas/offers';
import { OfferModel } from '@/models/offer';
import { SubstanceModel } from '@/models/substance';
import { SupplierModel } from '@/models/supplier';
import { contains, orderOf } from './lists';
import { rowsById } from './lookup';
import { packSizeOf } from './order-rows';

export async function listOffers(_viewer: Viewer, query: OfferListQuery): Promise<Page<OfferRow>> {
  const found = query.search
    ? await SubstanceModel.findAll({
        where: contains('searchText', query.search.toLowerCase()),
        attributes: ['id'],
      })
    : null;
  const { rows, count } = await OfferModel.findAndCountAll({
    where: {
      active: true,
      ...(query.supplierId ? { supplierId: query.supplierId } : {}),
      ...(query.substanceId ? { substanceId: query.substanceId } : {}),
      ...(found
        ? { [Op.or]: [{ substanceId: found.map(({ id }) => id) }, contains('stockNumber', query.search)] }
        : {}),
    },
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  const [suppliers, substances] = await Promise.all([
    rowsById(
      SupplierModel,
      rows.map(({ supplierId }) => supplierId),
    ),
    rowsById(
      SubstanceModel,
      rows.map(({ substanceId }) => substanceId),
    ),
  ]);
  const items = rows.map((offer) => ({
    id: offer.id,
    supplierId: offer.supplierId,
    supplierName: suppliers.get(offer.supplierId)?.name ?? '',
    substanceId: offer.substanceId,
    substanceName: substances.get(offer.substanceId)?.name ?? '',
    stockNumber: offer.stockNumber,
    packSize: packSizeOf(offer.packMicro, offer.unit),
    priceMinor: offer.priceMinor,
    leadDays: suppliers.get(offer.supplierId)?.leadDays ?? 0,
  }));
  return { items, total: count, page: query.page, pageSize: query.pageSize };
}
