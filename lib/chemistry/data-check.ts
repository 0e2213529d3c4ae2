import { massOf, parseFormula } from './formula';
import { ALL_REACTIONS, ALL_SPECIES, findSpecies } from './species-catalogue';
import { ALL_SUBSTANCES } from './substances';

/** One thing wrong in the data files. */
export interface DataFault {
  readonly where: string;
  readonly what: string;
}

const SAME_ATOMS = 1e-9;
/** Molar masses are kept to about 0.01; abridged weights round by less. */
const SAME_MASS = 0.02;

/** Whether the last digit of a CAS number is the check digit of the others. */
export function hasCasCheckDigit(cas: string): boolean {
  const [, digits, check] = /^(\d{2,7}-\d{2})-(\d)$/.exec(cas) ?? [];
  if (!digits) return false;
  const reversed = [...digits.replace('-', '')].reverse();
  const sum = reversed.reduce((total, digit, index) => total + Number(digit) * (index + 1), 0);
  return sum % 10 === Number(check);
}

/** Balance of atoms and charge of every reaction; CAS digits, masses and releases of every substance. */
export function findDataFaults(): DataFault[] {
  return [...speciesFaults(), ...reactionFaults(), ...substanceFaults()];
}

function speciesFaults(): DataFault[] {
  const seen = new Set<string>();
  return ALL_SPECIES.flatMap(({ id, isMaster, hex }) => {
    const faults: DataFault[] = [];
    if (seen.has(id)) faults.push({ where: id, what: 'stands twice' });
    seen.add(id);
    if (!isMaster && !ALL_REACTIONS.some(({ species }) => species === id))
      faults.push({ where: id, what: 'has no formation reaction' });
    if (!/^#[0-9A-F]{6}$/i.test(hex)) faults.push({ where: id, what: `colour ${hex} can't be read` });
    return faults;
  });
}

function reactionFaults(): DataFault[] {
  return ALL_REACTIONS.flatMap(({ species, stoich, logK, source }) => {
    const product = findSpecies(species);
    if (!product) return [{ where: species, what: 'is formed but not listed' }];
    const faults: DataFault[] = [];
    const left: Record<string, number> = { charge: 0 };
    for (const [id, count] of Object.entries(stoich)) {
      const master = findSpecies(id);
      if (!master?.isMaster) {
        faults.push({ where: species, what: `is formed from ${id}, which is no master` });
        continue;
      }
      left.charge = (left.charge ?? 0) + count * master.charge;
      for (const [element, atoms] of Object.entries(master.composition))
        left[element] = (left[element] ?? 0) + count * atoms;
    }
    const right: Record<string, number> = { charge: product.charge, ...product.composition };
    for (const key of new Set([...Object.keys(left), ...Object.keys(right)])) {
      const gap = (left[key] ?? 0) - (right[key] ?? 0);
      if (Math.abs(gap) > SAME_ATOMS) faults.push({ where: species, what: `${key} is off by ${gap}` });
    }
    if (!Number.isFinite(logK)) faults.push({ where: species, what: 'has no constant' });
    if (source === 'not stated') faults.push({ where: species, what: 'has no source' });
    return faults;
  });
}

function substanceFaults(): DataFault[] {
  return ALL_SUBSTANCES.flatMap((substance) => {
    const { id, cas, formula, molarMassGPerMol, releases } = substance;
    const faults: DataFault[] = [];
    if (!hasCasCheckDigit(cas)) faults.push({ where: id, what: `CAS ${cas} has a wrong check digit` });
    if (formula === '') return faults;
    const composition = parseFormula(formula);
    const mass = massOf(composition);
    if (Math.abs(mass - molarMassGPerMol) > SAME_MASS)
      faults.push({ where: id, what: `molar mass ${molarMassGPerMol} against ${mass.toFixed(3)}` });
    if (releases) faults.push(...releaseFaults(id, composition, releases));
    return faults;
  });
}

/** What is released must be the formula, but for whole waters, and neutral. */
function releaseFaults(
  id: string,
  composition: Readonly<Record<string, number>>,
  releases: Readonly<Record<string, number>>,
): DataFault[] {
  const left: Record<string, number> = {};
  let charge = 0;
  for (const [component, count] of Object.entries(releases)) {
    const species = findSpecies(component);
    if (!species) return [{ where: id, what: `releases ${component}, which is no species` }];
    charge += count * species.charge;
    for (const [element, atoms] of Object.entries(species.composition))
      left[element] = (left[element] ?? 0) + count * atoms;
  }
  const faults: DataFault[] = [];
  if (Math.abs(charge) > SAME_ATOMS) faults.push({ where: id, what: `releases a charge of ${charge}` });
  for (const element of new Set([...Object.keys(left), ...Object.keys(composition)])) {
    if (element === 'H' || element === 'O') continue;
    if (Math.abs((left[element] ?? 0) - (composition[element] ?? 0)) > SAME_ATOMS)
      faults.push({ where: id, what: `releases another amount of ${element} than it holds` });
  }
  const waters = (composition.O ?? 0) - (left.O ?? 0);
  const hydrogens = (composition.H ?? 0) - (left.H ?? 0);
  if (Math.abs(hydrogens - 2 * waters) > SAME_ATOMS)
    faults.push({ where: id, what: 'hydrogen and oxygen do not differ by whole waters' });
  return faults;
}
