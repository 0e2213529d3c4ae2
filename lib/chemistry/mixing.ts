import { appearanceOf } from './appearance';
import { speciate } from './speciation';
import { findSubstance } from './substances';
import type { DilutedSolute, Mix, MixInput, MixOutcome, MixStep, Portion } from './types';

/** Portions stronger than this deviate from adding volumes enough to be said. */
const VOLUMES_ADD_UP_TO_MOLARITY = 2;

/** @throws RangeError for a substance that is not in the catalogue */
function substanceOf(idOrCas: string) {
  const substance = findSubstance(idOrCas);
  if (!substance) throw new RangeError(`${idOrCas} is not in the catalogue`);
  return substance;
}

/**
 * mol of each master component that a portion brings. Substances outside the equilibrium model bring none;
 * they are inert here and screened by the hazard rules.
 */
export function componentAmounts(portion: Portion): Record<string, number> {
  const amounts: Record<string, number> = {};
  for (const { substance, molarity } of portion.solutes) {
    const mol = (molarity * portion.volumeMl) / 1000;
    for (const [component, count] of Object.entries(substanceOf(substance).releases ?? {})) {
      if (component !== 'H2O') amounts[component] = (amounts[component] ?? 0) + count * mol;
    }
  }
  return amounts;
}

/**
 * Pours portions together in their order: dilution first, then the equilibrium after every pour. Volumes are
 * taken to add, which holds for dilute aqueous portions; stronger ones are noted in the state.
 *
 * @param input - at least one portion; volumes in mL, each above 0
 * @returns each state of the vessel, or the first that did not converge
 * @throws RangeError for an unknown substance or a volume that is not positive
 */
export function pourMix(input: MixInput): MixOutcome {
  if (input.portions.length === 0) throw new RangeError('There is nothing to pour');
  const poured: Portion[] = [];
  const amounts: Record<string, number> = {};
  const steps: MixStep[] = [];
  for (const portion of input.portions) {
    if (!(portion.volumeMl > 0)) throw new RangeError(`The volume of ${portion.label} must be positive`);
    poured.push(portion);
    for (const [component, mol] of Object.entries(componentAmounts(portion)))
      amounts[component] = (amounts[component] ?? 0) + mol;
    const volumeMl = poured.reduce((sum, part) => sum + part.volumeMl, 0);
    const equilibrium = speciate({
      volumeL: volumeMl / 1000,
      amounts,
      reactions: 'catalogue',
      pH: null,
      suppress: [],
      activity: input.activity,
      temperatureC: input.temperatureC,
      headspace: { kind: 'none' },
    });
    if (!equilibrium.converged) return { ...equilibrium, afterPortion: portion.label };
    steps.push({ afterPortion: portion.label, volumeMl, amounts: { ...amounts }, equilibrium });
  }
  return finish(poured, steps);
}

function finish(poured: readonly Portion[], steps: readonly MixStep[]): Mix {
  const last = steps.at(-1);
  if (!last) throw new RangeError('There is nothing to pour');
  const isStrong = poured.some(({ solutes }) =>
    solutes.some(({ molarity }) => molarity > VOLUMES_ADD_UP_TO_MOLARITY),
  );
  const equilibrium = isStrong
    ? {
        ...last.equilibrium,
        notes: [
          ...last.equilibrium.notes,
          {
            code: 'volumes-added',
            message: `A portion is stronger than ${VOLUMES_ADD_UP_TO_MOLARITY} mol/L; volumes were added all the same, which may be a few per cent off.`,
          },
        ],
      }
    : last.equilibrium;
  return {
    converged: true,
    finalVolumeMl: last.volumeMl,
    volumeBasis: 'volumes-add',
    diluted: dilutedSolutes(poured, last.volumeMl),
    steps,
    equilibrium,
    appearance: appearanceOf(equilibrium),
  };
}

/** Each substance once, at its strength after mixing and before any reaction. */
function dilutedSolutes(poured: readonly Portion[], volumeMl: number): DilutedSolute[] {
  const mmol = new Map<string, number>();
  for (const { solutes, volumeMl: portionMl } of poured) {
    for (const { substance, molarity } of solutes)
      mmol.set(substance, (mmol.get(substance) ?? 0) + molarity * portionMl);
  }
  return [...mmol].map(([substance, amount]) => ({
    substance,
    name: substanceOf(substance).name,
    molarity: amount / volumeMl,
  }));
}
