import type { Portion } from '../../../lib/chemistry/types';
import type { Decision } from '../../../lib/hazards/types';

/**
 * Mixes of teaching laboratories with the decision a competent person would give: `least` to `most`, since
 * two careful people may differ by a level. `isCommon` marks the everyday ones that must raise no alarm.
 * The judgements are ours, written down before the screen was run on them.
 */
export interface TeachingMix {
  readonly title: string;
  readonly portions: readonly Portion[];
  /** `beside`: the same bottles share a room and hour and are not meant to meet. */
  readonly meeting: 'poured' | 'beside';
  readonly least: Decision;
  readonly most: Decision;
  readonly isCommon: boolean;
}

type Recipe = readonly [volumeMl: number, ...solutes: (readonly [substance: string, molarity: number])[]];

function portionsOf(recipes: readonly Recipe[]): Portion[] {
  return recipes.map(([volumeMl, ...solutes], index) => ({
    label: String.fromCharCode(65 + index),
    volumeMl,
    solutes: solutes.map(([substance, molarity]) => ({ substance, molarity })),
  }));
}

function poured(title: string, least: Decision, most: Decision, ...recipes: Recipe[]): TeachingMix {
  return { title, portions: portionsOf(recipes), meeting: 'poured', least, most, isCommon: false };
}
function beside(title: string, least: Decision, most: Decision, ...recipes: Recipe[]): TeachingMix {
  return { title, portions: portionsOf(recipes), meeting: 'beside', least, most, isCommon: false };
}
function common(mix: TeachingMix): TeachingMix {
  return { ...mix, isCommon: true };
}

const EVERYDAY: readonly TeachingMix[] = [
  poured('Sodium chloride and potassium nitrate', 'clear', 'clear', [25, ['sodium-chloride', 0.1]], [25, ['potassium-nitrate', 0.1]]),
  poured('Silver nitrate and sodium chloride', 'clear', 'caution', [5, ['silver-nitrate', 0.1]], [5, ['sodium-chloride', 0.1]]),
  poured('Titration of 0.1 mol/L hydrochloric acid with sodium hydroxide', 'clear', 'caution', [25, ['hydrochloric-acid', 0.1]], [25, ['sodium-hydroxide', 0.1]]),
  poured('Hydrochloric acid and ammonia, 0.1 mol/L', 'clear', 'caution', [25, ['hydrochloric-acid', 0.1]], [25, ['ammonia-solution', 0.1]]),
  poured('Ethanoic acid and sodium hydroxide', 'clear', 'caution', [25, ['acetic-acid', 0.1]], [25, ['sodium-hydroxide', 0.1]]),
  poured('Oxalic acid and sodium hydroxide', 'clear', 'caution', [25, ['oxalic-acid', 0.05]], [25, ['sodium-hydroxide', 0.1]]),
  poured('Copper(II) sulfate and ammonia', 'clear', 'controlled', [50, ['copper-sulfate', 0.1]], [30, ['ammonia-solution', 2]]),
  poured('Copper(II) sulfate and sodium hydroxide', 'clear', 'caution', [20, ['copper-sulfate', 0.1]], [40, ['sodium-hydroxide', 0.1]]),
  poured('Lead(II) nitrate and potassium iodide', 'clear', 'caution', [10, ['lead-nitrate', 0.05]], [10, ['potassium-iodide', 0.1]]),
  poured('Barium chloride and sodium sulfate', 'clear', 'caution', [10, ['barium-chloride', 0.1]], [10, ['sodium-sulfate', 0.1]]),
  poured('Iron(III) chloride and potassium thiocyanate', 'clear', 'caution', [5, ['iron-iii-chloride', 0.01]], [5, ['potassium-thiocyanate', 0.01]]),
  poured('Calcium chloride and sodium carbonate', 'clear', 'caution', [10, ['calcium-chloride', 0.1]], [10, ['sodium-carbonate', 0.1]]),
  poured('Sodium carbonate and hydrochloric acid', 'clear', 'caution', [20, ['sodium-carbonate', 0.5]], [20, ['hydrochloric-acid', 1]]),
  poured('Vinegar strength acid and sodium hydrogencarbonate', 'clear', 'caution', [20, ['acetic-acid', 0.8]], [20, ['sodium-hydrogencarbonate', 0.5]]),
  poured('Permanganate titration of oxalate', 'clear', 'caution', [25, ['sodium-oxalate', 0.05]], [25, ['sulfuric-acid', 1]], [20, ['potassium-permanganate', 0.02]]),
  poured('Permanganate titration of iron(II)', 'clear', 'caution', [25, ['ammonium-iron-ii-sulfate', 0.1]], [25, ['sulfuric-acid', 1]], [20, ['potassium-permanganate', 0.02]]),
  poured('Thiosulfate titration of iodine', 'clear', 'caution', [25, ['iodine', 0.025], ['potassium-iodide', 0.1]], [12, ['sodium-thiosulfate', 0.1]]),
  poured('Hardness of water with EDTA in ammonia buffer', 'clear', 'caution', [25, ['calcium-chloride', 0.01]], [5, ['ammonia-solution', 1], ['ammonium-chloride', 0.2]], [25, ['disodium-edta', 0.01]]),
  poured('Aluminium sulfate and sodium hydroxide', 'clear', 'caution', [10, ['aluminium-sulfate', 0.1]], [20, ['sodium-hydroxide', 0.5]]),
  poured('Zinc sulfate and ammonia', 'clear', 'caution', [10, ['zinc-sulfate', 0.1]], [10, ['ammonia-solution', 2]]),
  poured('Nickel(II) sulfate and ammonia', 'clear', 'caution', [10, ['nickel-sulfate', 0.1]], [10, ['ammonia-solution', 2]]),
  poured('Iron(III) chloride and sodium hydroxide', 'clear', 'caution', [10, ['iron-iii-chloride', 0.1]], [40, ['sodium-hydroxide', 0.1]]),
  poured('Prussian blue', 'clear', 'caution', [5, ['potassium-ferrocyanide', 0.1]], [5, ['iron-iii-nitrate', 0.1]]),
  poured('Iodine clock with peroxide', 'clear', 'caution', [25, ['potassium-iodide', 0.1], ['sodium-thiosulfate', 0.005]], [25, ['hydrogen-peroxide', 0.1]], [10, ['sulfuric-acid', 0.5]]),
  poured("Fehling's test with glucose", 'clear', 'caution', [5, ['copper-sulfate', 0.25]], [5, ['rochelle-salt', 1.2], ['sodium-hydroxide', 2]], [5, ['glucose', 0.1]]),
  poured('Phosphate buffer', 'clear', 'clear', [50, ['sodium-dihydrogenphosphate', 0.1]], [50, ['disodium-hydrogenphosphate', 0.1]]),
  poured('Acetate buffer', 'clear', 'caution', [50, ['acetic-acid', 0.1]], [50, ['sodium-acetate', 0.1]]),
  poured('Copper(II) sulfate and potassium iodide', 'clear', 'caution', [10, ['copper-sulfate', 0.1]], [20, ['potassium-iodide', 0.1]]),
  poured('Starch and iodine', 'clear', 'caution', [10, ['starch', 0.01]], [1, ['iodine', 0.01], ['potassium-iodide', 0.03]]),
  poured('Magnesium sulfate and sodium hydroxide', 'clear', 'caution', [10, ['magnesium-sulfate', 0.1]], [20, ['sodium-hydroxide', 0.1]]),
  beside('Silver nitrate beside sodium chloride', 'clear', 'clear', [100, ['silver-nitrate', 0.1]], [100, ['sodium-chloride', 0.1]]),
  beside('Sodium chloride beside potassium nitrate', 'clear', 'clear', [500, ['sodium-chloride', 0.1]], [500, ['potassium-nitrate', 0.1]]),
  beside('Copper(II) sulfate beside ammonia', 'clear', 'caution', [500, ['copper-sulfate', 0.1]], [250, ['ammonia-solution', 2]]),
  beside('Hydrochloric acid beside sodium hydroxide', 'clear', 'caution', [500, ['hydrochloric-acid', 1]], [500, ['sodium-hydroxide', 1]]),
  beside('Dilute nitric acid beside ethanol', 'clear', 'caution', [500, ['nitric-acid', 0.1]], [250, ['ethanol', 16]]),
  beside('3 % peroxide beside acetone', 'clear', 'caution', [250, ['hydrogen-peroxide', 0.85]], [100, ['acetone', 13.5]]),
  beside('Permanganate beside ethanol', 'clear', 'caution', [250, ['potassium-permanganate', 0.02]], [250, ['ethanol', 16]]),
  beside('Lead(II) nitrate beside potassium iodide', 'clear', 'caution', [100, ['lead-nitrate', 0.1]], [100, ['potassium-iodide', 0.1]]),
  beside('Thiosulfate beside hydrochloric acid', 'clear', 'caution', [500, ['sodium-thiosulfate', 0.1]], [250, ['hydrochloric-acid', 1]]),
  beside('Sodium carbonate beside hydrochloric acid', 'clear', 'caution', [500, ['sodium-carbonate', 0.1]], [500, ['hydrochloric-acid', 0.1]]),
].map(common);

const WITH_CARE: readonly TeachingMix[] = [
  poured('Ammoniacal silver, fresh', 'controlled', 'controlled', [5, ['silver-nitrate', 0.1]], [5, ['ammonia-solution', 2]]),
  poured('Ammoniacal silver with alkali', 'review', 'review', [5, ['silver-nitrate', 0.1]], [2, ['sodium-hydroxide', 1]], [5, ['ammonia-solution', 2]]),
  poured('Thiosulfate and acid, rate of reaction', 'caution', 'controlled', [50, ['sodium-thiosulfate', 0.15]], [5, ['hydrochloric-acid', 2]]),
  poured('Nitrite and acid', 'controlled', 'review', [10, ['sodium-nitrite', 0.1]], [10, ['hydrochloric-acid', 1]]),
  poured('Sulfite and acid', 'controlled', 'review', [25, ['sodium-sulfite', 1]], [25, ['hydrochloric-acid', 2]]),
  poured('Sulfide and acid', 'review', 'stop', [10, ['sodium-sulfide', 0.1]], [10, ['hydrochloric-acid', 1]]),
  poured('Dichromate and ethanol in acid', 'controlled', 'review', [10, ['potassium-dichromate', 0.1]], [5, ['sulfuric-acid', 2]], [5, ['ethanol', 8]]),
  poured('Chromate and dilute hydrochloric acid', 'caution', 'controlled', [10, ['potassium-chromate', 0.1]], [2, ['hydrochloric-acid', 1]]),
  poured('Mercury(II) chloride and iodide', 'review', 'review', [5, ['mercury-chloride', 0.05]], [10, ['potassium-iodide', 0.1]]),
  poured('Silver cyanide complex', 'review', 'review', [25, ['silver-nitrate', 0.075]], [40, ['sodium-cyanide', 0.1]]),
  poured('Permanganate and hydrochloric acid', 'controlled', 'review', [20, ['potassium-permanganate', 0.02]], [20, ['hydrochloric-acid', 6]]),
  poured('Water into concentrated sulfuric acid', 'controlled', 'review', [20, ['sulfuric-acid', 18]], [80]),
  poured('Concentrated acid and strong base', 'review', 'stop', [50, ['hydrochloric-acid', 12]], [50, ['sodium-hydroxide', 10]]),
  poured('Formaldehyde and hydrochloric acid', 'review', 'stop', [10, ['formaldehyde-solution', 12]], [10, ['hydrochloric-acid', 6]]),
  poured('Mercury(II) nitrate and ammonia', 'review', 'stop', [5, ['mercury-nitrate', 0.05]], [5, ['ammonia-solution', 2]]),
  poured('Cyanide in hydrogencarbonate', 'review', 'stop', [10, ['sodium-cyanide', 0.1]], [10, ['sodium-hydrogencarbonate', 0.5]]),
  beside('Cyanide beside 0.1 mol/L hydrochloric acid', 'review', 'stop', [100, ['sodium-cyanide', 0.1]], [500, ['hydrochloric-acid', 0.1]]),
  beside('Cyanide beside 0.1 mol/L nitric acid', 'review', 'stop', [100, ['sodium-cyanide', 0.1]], [500, ['nitric-acid', 0.1]]),
  beside('Cyanide beside 0.1 mol/L ethanoic acid', 'review', 'stop', [100, ['potassium-cyanide', 0.1]], [500, ['acetic-acid', 0.1]]),
  beside('Much cyanide beside little acid', 'review', 'stop', [500, ['sodium-cyanide', 0.1]], [20, ['hydrochloric-acid', 0.1]]),
  beside('Bleach beside ammonia', 'review', 'stop', [250, ['sodium-hypochlorite', 0.7]], [250, ['ammonia-solution', 2]]),
  beside('Bleach beside hydrochloric acid', 'review', 'stop', [250, ['sodium-hypochlorite', 0.7]], [250, ['hydrochloric-acid', 1]]),
  beside('Concentrated nitric acid beside ethanol', 'review', 'stop', [100, ['nitric-acid', 15.6]], [250, ['ethanol', 16]]),
  beside('Azide beside lead(II) nitrate', 'review', 'stop', [50, ['sodium-azide', 0.1]], [50, ['lead-nitrate', 0.1]]),
  beside('Iodine beside strong ammonia', 'review', 'stop', [100, ['iodine', 0.05], ['potassium-iodide', 0.2]], [100, ['ammonia-solution', 13]]),
  beside('Sulfide beside hydrochloric acid', 'caution', 'review', [50, ['sodium-sulfide', 0.1]], [250, ['hydrochloric-acid', 1]]),
];

const MUST_STOP: readonly TeachingMix[] = [
  poured('Cyanide and hydrochloric acid', 'stop', 'stop', [10, ['sodium-cyanide', 0.1]], [10, ['hydrochloric-acid', 1]]),
  poured('Cyanide and dilute ethanoic acid', 'stop', 'stop', [10, ['sodium-cyanide', 0.1]], [10, ['acetic-acid', 0.1]]),
  poured('Cyanide and dilute nitric acid', 'stop', 'stop', [10, ['potassium-cyanide', 0.1]], [10, ['nitric-acid', 0.1]]),
  poured('Cyanide and an ammonium salt', 'stop', 'stop', [10, ['sodium-cyanide', 0.1]], [10, ['ammonium-chloride', 0.1]]),
  poured('Cyanide and a little acid, still alkaline', 'stop', 'stop', [40, ['sodium-cyanide', 0.1]], [4, ['hydrochloric-acid', 0.1]]),
  poured('Silver cyanide complex and nitric acid', 'stop', 'stop', [25, ['silver-nitrate', 0.075]], [40, ['sodium-cyanide', 0.1]], [10, ['nitric-acid', 1]]),
  poured('Cyanide and copper(II) sulfate', 'stop', 'stop', [10, ['sodium-cyanide', 0.1]], [10, ['copper-sulfate', 0.1]]),
  poured('Cyanide and bleach', 'stop', 'stop', [10, ['sodium-cyanide', 0.1]], [10, ['sodium-hypochlorite', 0.7]]),
  poured('Cyanide and acidic iron(III) chloride', 'stop', 'stop', [10, ['sodium-cyanide', 0.1]], [10, ['iron-iii-chloride', 0.1]]),
  poured('Cyanide and dihydrogenphosphate', 'stop', 'stop', [10, ['sodium-cyanide', 0.1]], [10, ['potassium-dihydrogenphosphate', 0.1]]),
  poured('Cyanide and alum', 'stop', 'stop', [10, ['sodium-cyanide', 0.1]], [10, ['potassium-alum', 0.1]]),
  poured('Bleach and hydrochloric acid', 'stop', 'stop', [10, ['sodium-hypochlorite', 0.7]], [10, ['hydrochloric-acid', 1]]),
  poured('Bleach and vinegar', 'stop', 'stop', [10, ['sodium-hypochlorite', 0.7]], [10, ['acetic-acid', 0.8]]),
  poured('Bleach and hydrogensulfate', 'stop', 'stop', [10, ['sodium-hypochlorite', 0.7]], [10, ['sodium-hydrogensulfate', 1]]),
  poured('Bleach and ammonia', 'stop', 'stop', [10, ['sodium-hypochlorite', 0.7]], [10, ['ammonia-solution', 2]]),
  poured('Bleach and an ammonium salt', 'stop', 'stop', [10, ['sodium-hypochlorite', 0.7]], [10, ['ammonium-chloride', 1]]),
  poured('Concentrated nitric acid and ethanol', 'stop', 'stop', [10, ['nitric-acid', 15.6]], [10, ['ethanol', 16]]),
  poured('Concentrated nitric acid and acetone', 'stop', 'stop', [10, ['nitric-acid', 15.6]], [5, ['acetone', 13]]),
  poured('Peroxide, acetone and acid', 'stop', 'stop', [10, ['hydrogen-peroxide', 9.8]], [10, ['acetone', 13]], [1, ['sulfuric-acid', 2]]),
  poured('Peroxide and concentrated sulfuric acid', 'stop', 'stop', [10, ['hydrogen-peroxide', 9.8]], [30, ['sulfuric-acid', 18]]),
  poured('Azide and hydrochloric acid', 'stop', 'stop', [10, ['sodium-azide', 0.1]], [10, ['hydrochloric-acid', 0.1]]),
  poured('Azide and silver nitrate', 'stop', 'stop', [10, ['sodium-azide', 0.1]], [10, ['silver-nitrate', 0.1]]),
  poured('Iodine and strong ammonia', 'stop', 'stop', [10, ['iodine', 0.05], ['potassium-iodide', 0.2]], [10, ['ammonia-solution', 13]]),
  poured('Permanganate and concentrated sulfuric acid', 'stop', 'stop', [5, ['potassium-permanganate', 0.3]], [20, ['sulfuric-acid', 18]]),
  poured('Chlorate and concentrated hydrochloric acid', 'stop', 'stop', [10, ['potassium-chlorate', 0.5]], [10, ['hydrochloric-acid', 11]]),
  poured('Chlorate and an ammonium salt', 'stop', 'stop', [10, ['potassium-chlorate', 0.5]], [10, ['ammonium-nitrate', 1]]),
  poured('Fluoride and hydrochloric acid', 'stop', 'stop', [10, ['sodium-fluoride', 0.5]], [10, ['hydrochloric-acid', 1]]),
  poured('Thiocyanate and bleach', 'stop', 'stop', [10, ['potassium-thiocyanate', 0.1]], [10, ['sodium-hypochlorite', 0.7]]),
  poured('Perchloric acid and ethanol', 'stop', 'stop', [10, ['perchloric-acid', 9]], [10, ['ethanol', 16]]),
  poured('Acetone, chloroform and alkali', 'stop', 'stop', [10, ['acetone', 13]], [10, ['chloroform', 12]], [5, ['sodium-hydroxide', 2]]),
];

export const TEACHING_MIXES: readonly TeachingMix[] = [...EVERYDAY, ...WITH_CARE, ...MUST_STOP];
