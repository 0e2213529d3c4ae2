import 'server-only';
import { formatISO } from 'date-fns';
import { fn, col, Op } from 'sequelize';
import { fromMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import type { Place, Shelf } from '@/lib/schemas/places';
import { LotModel } from '@/models/lot';
import { MovementModel } from '@/models/movement';
import { PlaceModel } from '@/models/place';
import { RoomModel } from '@/models/room';
import { SubstanceModel } from '@/models/substance';
import { lotStops } from './holds';
import { groupedBy, rowsById } from './lookup';

/** What came into each lot in all, in millionths. */
export async function receivedMicro(lotIds: readonly string[]): Promise<Map<string, number>> {
  const sums = (await MovementModel.findAll({
    attributes: ['lotId', [fn('SUM', col('amountMicro')), 'amountMicro']],
    where: { lotId: [...lotIds], kind: 'received' },
    group: ['lotId'],
  })) as unknown as readonly { lotId: string; amountMicro: number }[];
  return new Map(sums.map(({ lotId, amountMicro }) => [lotId, Number(amountMicro)]));
}

/** Cabinets, shelves and safes, room by room. */
export async function listPlaces(_viewer: Viewer): Promise<{ items: Place[] }> {
  const places = await PlaceModel.findAll({
    order: [
      ['position', 'ASC'],
      ['name', 'ASC'],
    ],
  });
  const rooms = await rowsById(
    RoomModel,
    places.map(({ roomId }) => roomId),
  );
  const items = places.map(({ id, roomId, name, kind, storageGroup, position }) => ({
    id,
    roomId,
    roomName: rooms.get(roomId)?.name ?? '',
    name,
    kind,
    storageGroup,
    position,
  }));
  return {
    items: items.sort((a, b) => a.roomName.localeCompare(b.roomName, 'en') || a.position - b.position),
  };
}

/** Every place with what stands in it. */
export async function listShelves(viewer: Viewer): Promise<Shelf[]> {
  const { items } = await listPlaces(viewer);
  const lots = await LotModel.findAll({
    where: { balanceMicro: { [Op.gt]: 0 } },
    order: [
      ['substanceId', 'ASC'],
      ['expiresOn', 'ASC'],
    ],
  });
  const [substances, received, stops] = await Promise.all([
    rowsById(
      SubstanceModel,
      lots.map(({ substanceId }) => substanceId),
    ),
    receivedMicro(lots.map(({ id }) => id)),
    lotStops(lots),
  ]);
  const today = formatISO(new Date(), { representation: 'date' });
  const standing = groupedBy(lots, ({ placeId }) => placeId);
  return items.map((place) => ({
    ...place,
    lots: (standing.get(place.id) ?? []).map((lot) => {
      const whole = Math.max(received.get(lot.id) ?? 0, lot.balanceMicro);
      return {
        id: lot.id,
        code: lot.code,
        substanceId: lot.substanceId,
        substanceName: substances.get(lot.substanceId)?.name ?? lot.substanceId,
        formula: substances.get(lot.substanceId)?.formula ?? '',
        balance: fromMicro(lot.balanceMicro),
        unit: lot.unit,
        fill: lot.balanceMicro / whole,
        expiresOn: lot.expiresOn,
        isHeld: stops.has(lot.id),
        isExpired: lot.expiresOn !== null && lot.expiresOn < today,
      };
    }),
  }));
}
