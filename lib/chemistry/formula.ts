import { ATOMIC_WEIGHTS } from './atomic-weights';

export type Composition = Readonly<Record<string, number>>;

/** Abbreviations the species ids use, with what they stand for. */
const ABBREVIATIONS: Readonly<Record<string, string>> = {
  EDTA: 'C10H12N2O8',
  HDMG: 'C4H7N2O2',
  Tris: 'C4H11NO3',
  Phth: 'C8H4O4',
  Tart: 'C4H4O6',
  Cit: 'C6H5O7',
  Gly: 'C2H4NO2',
  Sal: 'C7H4O3',
  Asc: 'C6H6O6',
  Bz: 'C7H5O2',
  en: 'C2H8N2',
};
/** A full stop before a multiplier and a formula; the stop inside the multiplier of `CaSO4.0.5H2O` is none. */
const HYDRATE_DOT = /\.(\d*(?:\.\d+)?)(?=[A-Z([])/g;
const ABBREVIATION = new RegExp(Object.keys(ABBREVIATIONS).join('|'), 'g');

/**
 * Charge number of an id: a sign with an optional magnitude at its end, before a phase; none means 0.
 * `Cu+2` 2, `CN-` −1, `PbI2(s)` 0.
 */
export function chargeOf(id: string): number {
  const [, sign, magnitude] = /([+-])(\d*)$/.exec(withoutPhase(id)) ?? [];
  if (!sign) return 0;
  const size = magnitude ? Number(magnitude) : 1;
  return sign === '+' ? size : -size;
}

/** The id without `(aq)`, `(s)`, `(l)`, `(g)` or a named form such as `(s,red)`. */
export function withoutPhase(id: string): string {
  return id.replace(/\((?:aq|s|l|g)(?:,[^)]*)?\)$/, '');
}

/**
 * Atoms of a formula: brackets, counts (also fractions, as in `CaSO4.0.5H2O`), hydrate dots `.`, `·` or `*` with a
 * multiplier, a charge at the end and a phase are understood.
 * @throws RangeError for anything else, an unknown element or an empty formula
 */
export function parseFormula(formula: string): Composition {
  const body = withoutPhase(formula.trim()).replace(/[+-]\d*$/, '');
  const spelled = body
    .replaceAll(ABBREVIATION, (word) => `(${ABBREVIATIONS[word] ?? word})`)
    .replaceAll(/\s+/g, '')
    .replaceAll(HYDRATE_DOT, '·$1');
  if (spelled === '') throw new RangeError('The formula is empty');
  const atoms: Record<string, number> = {};
  for (const part of spelled.split(/[·•∙⋅*]/)) {
    const [, multiplier, rest] = /^(\d*(?:\.\d+)?)(.+)$/.exec(part) ?? [];
    if (rest === undefined) throw new RangeError(`${formula} can't be read as a formula`);
    const times = multiplier ? Number(multiplier) : 1;
    for (const [element, count] of Object.entries(parseGroup(rest, formula)))
      atoms[element] = (atoms[element] ?? 0) + count * times;
  }
  return atoms;
}

function parseGroup(text: string, formula: string): Record<string, number> {
  const stack: Record<string, number>[] = [{}];
  let at = 0;
  const readCount = () => {
    const [count = ''] = /^\d*(?:\.\d+)?/.exec(text.slice(at)) ?? [];
    at += count.length;
    return count === '' ? 1 : Number(count);
  };
  while (at < text.length) {
    const letter = text[at] ?? '';
    if (letter === '(' || letter === '[') {
      stack.push({});
      at += 1;
      continue;
    }
    if (letter === ')' || letter === ']') {
      at += 1;
      const group = stack.pop();
      const outer = stack.at(-1);
      if (!group || !outer) throw new RangeError(`${formula} closes a bracket it did not open`);
      if (Object.keys(group).length === 0) throw new RangeError(`${formula} has an empty bracket`);
      const times = readCount();
      for (const [element, count] of Object.entries(group))
        outer[element] = (outer[element] ?? 0) + count * times;
      continue;
    }
    const [symbol] = /^[A-Z][a-z]?/.exec(text.slice(at)) ?? [];
    const element = symbol !== undefined && symbol in ATOMIC_WEIGHTS ? symbol : symbol?.[0];
    if (element === undefined || !(element in ATOMIC_WEIGHTS))
      throw new RangeError(`${formula}: ${text.slice(at, at + 2)} is no element known here`);
    at += element.length;
    const atoms = stack.at(-1) ?? {};
    atoms[element] = (atoms[element] ?? 0) + readCount();
  }
  if (stack.length !== 1) throw new RangeError(`${formula} leaves a bracket open`);
  return stack[0] ?? {};
}

/** g/mol of a composition. @throws RangeError for an unknown element */
export function massOf(composition: Composition): number {
  let mass = 0;
  for (const [element, count] of Object.entries(composition)) {
    const weight = ATOMIC_WEIGHTS[element];
    if (weight === undefined) throw new RangeError(`${element} is no element known here`);
    mass += weight * count;
  }
  return mass;
}

/** g/mol of a formula. @throws RangeError where it can't be read */
export function molarMass(formula: string): number {
  return massOf(parseFormula(formula));
}
