import type { EquipmentKind } from '@/lib/domain/states';
import { EquipmentModel } from '@/models/equipment';
import { PlaceModel } from '@/models/place';
import { RoomModel } from '@/models/room';

const ROOMS = [
  { name: 'Prep room', volumeM3: 110, airChangesPerHour: 8, fumeCupboards: 2, benches: 4 },
  { name: 'Laboratory 1', volumeM3: 180, airChangesPerHour: 6, fumeCupboards: 4, benches: 12 },
  { name: 'Laboratory 2', volumeM3: 150, airChangesPerHour: 6, fumeCupboards: 2, benches: 10 },
  { name: 'Demonstration theatre', volumeM3: 420, airChangesPerHour: 4, fumeCupboards: 0, benches: 1 },
];

/** Storage groups are those of the storage table in lib/hazards. */
const PLACES: readonly (readonly [name: string, kind: string, storageGroup: string])[] = [
  ['Acid cabinet, top', 'cabinet', 'acid_inorganic'],
  ['Acid cabinet, base', 'cabinet', 'acid_organic'],
  ['Oxidising acids', 'cabinet', 'acid_oxidising'],
  ['Alkali cabinet', 'cabinet', 'base'],
  ['Oxidiser shelf', 'shelf', 'oxidiser'],
  ['Flammables cabinet', 'cabinet', 'flammable'],
  ['Poisons cupboard', 'cabinet', 'toxic'],
  ['Cyanide safe', 'cabinet', 'cyanide'],
  ['Sulfide box', 'cabinet', 'sulfide'],
  ['General salts A', 'shelf', 'general'],
  ['General salts B', 'shelf', 'general'],
  ['Water-reactive tin', 'cabinet', 'water_reactive'],
  ['Restricted cupboard', 'cabinet', 'restricted'],
  ['Made solutions', 'shelf', 'general'],
];

type Item = {
  kind: EquipmentKind;
  name: string;
  count: number;
  capacityMl?: number;
  toleranceMl?: number;
  glassClass?: string;
  capacityG?: number;
  readabilityG?: number;
  repeatabilityG?: number;
};

/** Maximum permissible errors: ISO 1042 flasks class A, ISO 648 pipettes class A, ISO 4788 cylinders class B, from memory. */
const EQUIPMENT: readonly Item[] = [
  {
    kind: 'balance',
    name: 'Analytical balance',
    count: 1,
    capacityG: 220,
    readabilityG: 0.0001,
    repeatabilityG: 0.0001,
  },
  {
    kind: 'balance',
    name: 'Precision balance',
    count: 2,
    capacityG: 620,
    readabilityG: 0.001,
    repeatabilityG: 0.001,
  },
  {
    kind: 'balance',
    name: 'Top-pan balance',
    count: 2,
    capacityG: 3200,
    readabilityG: 0.01,
    repeatabilityG: 0.01,
  },
  ...(
    [
      [50, 0.06],
      [100, 0.1],
      [250, 0.15],
      [500, 0.25],
      [1000, 0.4],
      [2000, 0.6],
    ] as const
  ).map(([capacityMl, toleranceMl]) => ({
    kind: 'flask' as const,
    name: `Volumetric flask ${capacityMl} mL`,
    count: 4,
    capacityMl,
    toleranceMl,
    glassClass: 'A',
  })),
  ...(
    [
      [1, 0.008],
      [5, 0.015],
      [10, 0.02],
      [25, 0.03],
      [50, 0.05],
    ] as const
  ).map(([capacityMl, toleranceMl]) => ({
    kind: 'pipette' as const,
    name: `Pipette ${capacityMl} mL`,
    count: 6,
    capacityMl,
    toleranceMl,
    glassClass: 'A',
  })),
  ...(
    [
      [25, 0.5],
      [100, 1],
      [250, 2],
      [500, 5],
      [1000, 10],
    ] as const
  ).map(([capacityMl, toleranceMl]) => ({
    kind: 'cylinder' as const,
    name: `Measuring cylinder ${capacityMl} mL`,
    count: 4,
    capacityMl,
    toleranceMl,
    glassClass: 'B',
  })),
  { kind: 'burette', name: 'Burette 50 mL', count: 10, capacityMl: 50, toleranceMl: 0.05, glassClass: 'A' },
  ...[250, 1000, 3000, 5000].map((capacityMl) => ({
    kind: 'beaker' as const,
    name: `Beaker ${capacityMl} mL`,
    count: 6,
    capacityMl,
  })),
  ...[50, 100, 250, 500, 1000, 2500].map((capacityMl) => ({
    kind: 'bottle' as const,
    name: `Bottle ${capacityMl} mL`,
    count: 40,
    capacityMl,
  })),
];

export interface Rooms {
  readonly rooms: ReadonlyMap<string, RoomModel>;
  readonly places: ReadonlyMap<string, PlaceModel>;
}

/** Rooms by name, and places by name; glassware and balances stand in the prep room. */
export async function seedRooms(): Promise<Rooms> {
  const rooms = new Map((await RoomModel.bulkCreate(ROOMS)).map((room) => [room.name, room]));
  const prepRoom = rooms.get('Prep room');
  if (!prepRoom) throw new Error('The prep room is missing');
  const places = await PlaceModel.bulkCreate(
    PLACES.map(([name, kind, storageGroup], position) => ({
      roomId: prepRoom.id,
      name,
      kind,
      storageGroup,
      position,
    })),
  );
  await EquipmentModel.bulkCreate(EQUIPMENT.map((item) => ({ roomId: prepRoom.id, ...item })));
  return { rooms, places: new Map(places.map((place) => [place.name, place])) };
}
