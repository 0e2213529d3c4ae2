import { HOUSE_SETTING } from '@/lib/services/house-identity';
import type { HouseIdentity } from '@/lib/services/house-identity';
import { SettingModel } from '@/models/setting';

const LARKMOOR: HouseIdentity = {
  name: 'Larkmoor College prep room',
  contact: 'Room C 014, extension 4410, prep@larkmoor.example',
  emergency: 'In an emergency: the local emergency number, then the college desk, extension 2222.',
};

/** Whose bottles these are, as labels and the public bottle page say it. */
export async function seedHouse(): Promise<void> {
  await SettingModel.create({ key: HOUSE_SETTING, value: { ...LARKMOOR } });
}
