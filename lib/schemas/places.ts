import { z } from 'zod';
import { LEDGER_UNITS } from '@/lib/domain/quantities';
import { endpoint } from './endpoint';

/** A lot as it stands on a shelf. */
export const standingLotSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  substanceId: z.string(),
  substanceName: z.string(),
  formula: z.string(),
  balance: z.number(),
  unit: z.enum(LEDGER_UNITS),
  /** 0 to 1: what is left of what came in. */
  fill: z.number(),
  expiresOn: z.string().nullable(),
  isHeld: z.boolean(),
  isExpired: z.boolean(),
});
export type StandingLot = z.infer<typeof standingLotSchema>;

export const placeSchema = z.object({
  id: z.uuid(),
  roomId: z.uuid(),
  roomName: z.string(),
  name: z.string(),
  kind: z.string(),
  storageGroup: z.string(),
  position: z.number().int(),
});
export type Place = z.infer<typeof placeSchema>;

export const shelfSchema = placeSchema.extend({ lots: z.array(standingLotSchema) });
export type Shelf = z.infer<typeof shelfSchema>;

export const placeEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/places',
    action: 'place:read',
    summary: 'Cabinets, shelves and safes',
    response: z.object({ items: z.array(placeSchema) }),
  }),
};
