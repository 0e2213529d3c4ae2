import type { HazardStatement } from '../hazards/types';

interface ProtectionRule {
  readonly codes: readonly string[];
  readonly text: string;
}

/**
 * What to wear and do for what the materials can do, by hazard statement code (UN GHS). Common practice of teaching
 * laboratories; the supplier's safety data sheet and local rules come first.
 */
const RULES: readonly ProtectionRule[] = [
  {
    codes: ['H330', 'H331', 'H334', 'H335', 'H280', 'EUH029', 'EUH031', 'EUH032'],
    text: 'Work in a fume cupboard that has been seen to draw.',
  },
  {
    codes: ['H314', 'H318'],
    text: 'Wear goggles that close, not spectacles; a face shield for more than 500 mL.',
  },
  {
    codes: ['H300', 'H310', 'H311', 'H314', 'H317'],
    text: 'Wear gloves of a material the data sheet names; change them at once if splashed.',
  },
  {
    codes: ['H340', 'H341', 'H350', 'H351', 'H360', 'H361', 'H362'],
    text: 'Avoid every contact and all dust; check local rules on who may handle this.',
  },
  { codes: ['H220', 'H224', 'H225', 'H226', 'H228'], text: 'No flame, hot plate or spark nearby.' },
  {
    codes: ['H270', 'H271', 'H272'],
    text: 'Keep away from anything that burns, paper and solvents too; wipe spills with plenty of water.',
  },
  {
    codes: ['H200', 'H201', 'H202', 'H203', 'H240', 'H241', 'H242'],
    text: 'No heat, friction or drying out; stop and ask the safety officer if anything looks unusual.',
  },
  { codes: ['H400', 'H410', 'H411'], text: 'Nothing of it to the drain: rinsings go to the waste jar too.' },
];

const ALWAYS = 'Laboratory coat closed, eye protection on; know where eye-wash and shower are.';

/**
 * Protection lines for a batch from the hazard statements of what is handled, each named with the codes that ask
 * for it. The first line always stands.
 * @param hazards - statements of the materials and of the solution, in any order
 */
export function protectionLines(hazards: readonly HazardStatement[]): string[] {
  // Suffixed codes such as H360FD ask for what their stem asks.
  const stems = new Set(hazards.map(({ code }) => /^(?:EUH|H)\d{3}/.exec(code)?.[0] ?? code));
  const lines = RULES.flatMap(({ codes, text }) => {
    const because = codes.filter((code) => stems.has(code));
    return because.length === 0 ? [] : [`${text} (${because.join(', ')})`];
  });
  return [ALWAYS, ...lines];
}
