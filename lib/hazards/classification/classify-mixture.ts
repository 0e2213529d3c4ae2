import { acuteClasses } from './acute';
import type { AssignedClass, Mixture } from './mixture';
import { aquaticClasses, longTermClasses, organClasses, physicalClasses } from './other-classes';
import { skinAndEyeClasses } from './skin-eye';

/** Every class of a mixture by the mixture rules of the UN GHS, as CLP or HazCom has them. */
export function classifyMixture(mixture: Mixture): AssignedClass[] {
  return [
    ...physicalClasses(mixture),
    ...acuteClasses(mixture),
    ...skinAndEyeClasses(mixture),
    ...longTermClasses(mixture),
    ...organClasses(mixture),
    ...aquaticClasses(mixture),
  ];
}
