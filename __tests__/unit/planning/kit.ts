import type { Substance } from '@/lib/chemistry/types';
import type { EquipmentItem } from '@/lib/planning/equipment';

/** A substance for a test; only what the test says differs from pure table salt. */
export function buildSubstance(given: Partial<Substance> = {}): Substance {
  return {
    id: 'sodium-chloride',
    name: 'sodium chloride',
    cas: '7647-14-5',
    formula: 'NaCl',
    molarMassGPerMol: 58.44,
    form: 'solid',
    assayPercent: null,
    densityGPerMl: null,
    releases: { 'Na+': 1, 'Cl-': 1 },
    ...given,
  };
}

function item(given: Partial<EquipmentItem> & Pick<EquipmentItem, 'id' | 'kind' | 'name'>): EquipmentItem {
  return {
    capacityMl: null,
    toleranceMl: null,
    glassClass: null,
    capacityG: null,
    readabilityG: null,
    repeatabilityG: null,
    count: 1,
    ...given,
  };
}

export function buildBalance(
  readabilityG: number,
  repeatabilityG: number | null,
  capacityG: number,
): EquipmentItem {
  return item({
    id: `balance-${readabilityG}`,
    kind: 'balance',
    name: `balance ${readabilityG} g`,
    readabilityG,
    repeatabilityG,
    capacityG,
  });
}

export function buildGlass(
  kind: 'flask' | 'cylinder' | 'burette' | 'pipette',
  capacityMl: number,
  glassClass: string | null,
  delivery?: EquipmentItem['delivery'],
): EquipmentItem {
  const name = `${capacityMl} mL ${delivery ?? ''} ${kind} ${glassClass ?? ''}`.replaceAll(/ +/g, ' ').trim();
  return item({
    id: `${kind}-${delivery ?? ''}-${glassClass ?? ''}-${capacityMl}`,
    kind,
    name,
    capacityMl,
    glassClass,
    ...(delivery === undefined ? {} : { delivery }),
  });
}

/** A well-equipped prep room: class A flasks and pipettes, class B cylinders, three balances. */
export function buildRoom(): EquipmentItem[] {
  return [
    buildBalance(0.0001, 0.0001, 220),
    buildBalance(0.001, 0.001, 620),
    buildBalance(0.01, 0.01, 4200),
    ...[10, 25, 50, 100, 250, 500, 1000, 2000].map((ml) => buildGlass('flask', ml, 'A')),
    ...[1, 2, 5, 10, 20, 25, 50].map((ml) => buildGlass('pipette', ml, 'AS')),
    ...[1, 5, 10].map((ml) => buildGlass('pipette', ml, 'AS', 'graduated')),
    buildGlass('burette', 50, 'AS'),
    ...[10, 25, 50, 100, 250, 500, 1000, 2000].map((ml) => buildGlass('cylinder', ml, 'B')),
  ];
}
