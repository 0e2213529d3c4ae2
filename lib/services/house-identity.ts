import 'server-only';
import { z } from 'zod';
import { SettingModel } from '@/models/setting';

/** The setting that says whose bottles these are. */
export const HOUSE_SETTING = 'house';

const houseSchema = z.object({ name: z.string(), contact: z.string(), emergency: z.string() });
export type HouseIdentity = z.infer<typeof houseSchema>;

/** What stands on labels until somebody fills in the setting. */
const UNNAMED: HouseIdentity = {
  name: 'Prep room',
  contact: 'Ask the prep room of this laboratory.',
  emergency:
    'In an emergency call the emergency number of your country and tell the nearest member of staff.',
};

/** Whom the bottles belong to and how they are reached. */
export async function houseIdentity(): Promise<HouseIdentity> {
  const setting = await SettingModel.findByPk(HOUSE_SETTING);
  const parsed = houseSchema.safeParse(setting?.value);
  return parsed.success ? parsed.data : UNNAMED;
}
