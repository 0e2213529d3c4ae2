import type { Addition } from './addition';
import { BOILING_DANGER_FROM_RISE_C, MAX_RISE_PER_PORTION_C, planAddition } from './addition';
import type { BatchSheetInput, SheetStep, TakeLine } from './batch-sheet-types';
import type { GlassOwned } from './equipment';
import type { MakeVessel } from './glassware';
import { protectionLines } from './protection';
import type { SoluteTake } from './sheet-takes';

/** Share of the final volume put in as water before anything is added. */
export const FIRST_WATER_SHARE = 0.65;
/** Least share of water to start with where the liquids themselves fill most of the volume. */
const LEAST_WATER_SHARE = 0.25;
/** Room kept for rinsings. */
const RINSE_SHARE = 0.05;
/** The temperature glass is marked for, °C. */
const MARK_TEMPERATURE_C = 20;

const work = (text: string): SheetStep => ({ kind: 'work', text });
const mlText = (ml: number): string => `${ml >= 100 ? Math.round(ml) : Number(ml.toPrecision(3))} mL`;

/** Nothing is ever drawn up by mouth. */
function measureText(glass: GlassOwned): string {
  return glass.use.endsWith('pipette') && glass.use !== 'piston pipette'
    ? `${glass.name} and a filler`
    : glass.name;
}

/** Water to start with, mL: about 65 % of the filling, less where liquids take up the rest. */
export function firstWaterMl(fillMl: number, liquidsMl: number): number {
  const free = fillMl * (1 - RINSE_SHARE) - liquidsMl;
  return Math.max(fillMl * LEAST_WATER_SHARE, Math.min(fillMl * FIRST_WATER_SHARE, free));
}

function heatText(addition: Addition): string {
  const { rise } = addition;
  if (rise === null) {
    return addition.kind === 'plain' ? '' : ' No figure for the heat is held: watch the temperature.';
  }
  if (!addition.isNoteworthy) return '';
  const degrees =
    Math.abs(rise.riseC) < 10
      ? Math.abs(rise.riseC).toFixed(0)
      : String(5 * Math.round(Math.abs(rise.riseC) / 5));
  const way = rise.riseC > 0 ? 'warm' : 'cool';
  const boils =
    rise.riseC >= BOILING_DANGER_FROM_RISE_C
      ? ' That is enough to boil and spit: work behind a screen, and ask whether a weaker stock will do.'
      : '';
  return ` All at once it would ${way} by about ${degrees} °C if no heat were lost (${rise.source}).${boils}`;
}

function additionText(line: TakeLine, amount: string, addition: Addition): string {
  const what = `${amount} of ${line.name} (${line.formula}, ${line.lotCode}, ${line.place})`;
  const heat = heatText(addition);
  const noMeasure =
    line.measuredWith === null ? ' Nothing in the room measures this well enough: see the warnings.' : '';
  const ice = addition.needsIceBath ? ' Stand the vessel in iced water throughout.' : '';
  const portions = `in ${addition.portions} portions`;
  if (addition.kind === 'strong acid') {
    return `Pour the acid into the water, never water into the acid: add ${what} slowly ${portions}, stirring, and let it cool after each.${ice}${heat}${noMeasure}`;
  }
  if (addition.kind === 'strong base') {
    return `Add ${what} to the water ${portions}, stirring; never pour water on it. Let it cool after each portion.${ice}${heat}${noMeasure}`;
  }
  if (addition.kind === 'oxidiser') {
    return `Add ${what} to the water ${portions}, stirring, away from anything that burns; return nothing to the bottle.${ice}${heat}${noMeasure}`;
  }
  const inPortions =
    addition.portions > 1 ? ` ${portions}, no more than ${MAX_RISE_PER_PORTION_C} °C warmer after each` : '';
  return `Add ${what}${inPortions} and stir until all is dissolved.${ice}${heat}${noMeasure}`;
}

/** Solids first, then liquids, strong acids last of all: never onto a dry solid. */
const ORDER: Record<Addition['kind'], number> = { plain: 0, 'strong base': 1, oxidiser: 2, 'strong acid': 3 };

function amountPerFill(line: TakeLine, fills: number): string {
  if (fills === 1) return line.amountText;
  return `${(line.targetMicro / 1e6 / fills).toPrecision(5)} ${line.unit}, one of ${fills} equal parts,`;
}

function stockSteps(take: SoluteTake): SheetStep[] {
  const { stock, solute } = take;
  if (stock === null) return [];
  const steps: SheetStep[] = [];
  const [line] = take.lines;
  if (stock.stockFlask !== null && line !== undefined) {
    const waterMl = firstWaterMl(stock.stockFlask.nominalMl, 0);
    const addition = planAddition(solute.substance, line.massG, line.assayPercent, waterMl);
    steps.push(
      work(
        `Stock of ${solute.substance.name}, ${Number(stock.stockMolarity.toPrecision(4))} mol/L, since the amount itself is below what may be weighed: put about ${mlText(waterMl)} of water in a beaker. ${additionText(line, line.amountText, addition)}`,
      ),
      work(
        `Rinse it over into the ${stock.stockFlask.name}, make up to the mark at ${MARK_TEMPERATURE_C} °C and mix.`,
      ),
    );
  }
  // The last dilution ends in the batch itself and is described there.
  stock.dilution.steps.slice(0, -1).forEach((step, i) => {
    const from =
      i === 0
        ? stock.stockFlask === null
          ? `${line?.name ?? 'the bottle'} (${line?.lotCode ?? ''}, ${line?.place ?? ''}), poured into water`
          : 'the stock'
        : 'the solution just made';
    steps.push(
      work(
        `With the ${measureText(step.measure)} take ${mlText(step.takeMl)} of ${from}, into the ${step.flask.name} half full of water; make up to ${mlText(step.makeMl)} and mix.`,
      ),
    );
  });
  return steps;
}

function lastDilutionText(take: SoluteTake): string | null {
  const last = take.stock?.dilution.steps.at(-1);
  if (last === undefined || take.stock === null) return null;
  const isFirst = take.stock.dilution.steps.length === 1;
  const from =
    isFirst && take.stock.stockFlask === null
      ? (take.lines[0]?.name ?? 'the bottle')
      : `the diluted ${take.solute.substance.name}`;
  return `With the ${measureText(last.measure)} add ${mlText(last.takeMl)} of ${isFirst && take.stock.stockFlask !== null ? `the ${take.solute.substance.name} stock` : from}.`;
}

function makeSteps(vessel: MakeVessel, takes: readonly SoluteTake[]): SheetStep[] {
  const { fills, fillMl, glass } = vessel;
  const direct = takes.filter((take) => take.stock === null);
  const liquidsMl =
    direct.flatMap((take) => take.lines).reduce((sum, line) => sum + (line.volumeMl ?? 0), 0) / fills;
  const waterMl = firstWaterMl(fillMl, liquidsMl);
  const additions = direct
    .flatMap((take) => take.lines.map((line) => ({ line, solute: take.solute.substance })))
    .map(({ line, solute }) => {
      // Heat is tabulated for the recipe's own formula; another hydrate has none.
      const material =
        line.substanceId === solute.id ? solute : { ...solute, id: line.substanceId, formula: line.formula };
      return {
        line,
        isLiquid: line.volumeMl !== null,
        addition: planAddition(material, line.massG / fills, line.assayPercent, waterMl),
      };
    })
    .sort(
      (a, b) =>
        ORDER[a.addition.kind] - ORDER[b.addition.kind] ||
        Number(a.isLiquid) - Number(b.isLiquid) ||
        a.line.position - b.line.position,
    );
  const isWarm = additions.some(({ addition }) => addition.isNoteworthy);
  const each = fills > 1 ? ` Do this and what follows ${fills} times, then pour all together and mix.` : '';
  return [
    work(`Put about ${mlText(waterMl)} of deionised water in a beaker of twice the volume.${each}`),
    ...additions.map(({ line, addition }) => work(additionText(line, amountPerFill(line, fills), addition))),
    ...takes.flatMap((take) => {
      const text = lastDilutionText(take);
      return text === null ? [] : [work(text)];
    }),
    work(
      `${isWarm ? 'Let it come' : 'Bring it'} to ${MARK_TEMPERATURE_C} °C, rinse it over into the ${glass.name}, and make up ${glass.use === 'flask' ? 'to the mark' : `to ${mlText(fillMl)}`}.`,
    ),
    work(
      glass.use === 'flask'
        ? 'Stopper and invert ten times.'
        : 'Pour it into its bottle, close and invert ten times.',
    ),
  ];
}

function checkSteps(input: BatchSheetInput): SheetStep[] {
  const { pH, colour } = input.solution.expected;
  const check = (text: string): SheetStep => ({ kind: 'check', text });
  return [
    ...(pH === null ? [] : [check(`pH about ${pH.toFixed(1)}; more than half a unit away: stop and ask.`)]),
    ...(colour === null
      ? []
      : [check(`Looks: ${colour}. Anything else, or a solid that stays: stop and ask.`)]),
    check('Label before it leaves the bench.'),
  ];
}

/** The sheet's steps in order: protection, conditions to tick, work, checks. */
export function sheetSteps(
  input: BatchSheetInput,
  vessel: MakeVessel,
  takes: readonly SoluteTake[],
): SheetStep[] {
  return [
    ...protectionLines(input.hazards).map((text): SheetStep => ({ kind: 'protection', text })),
    ...input.conditions.map((text): SheetStep => ({ kind: 'condition', text })),
    ...takes.flatMap(stockSteps),
    ...makeSteps(vessel, takes),
    ...checkSteps(input),
  ];
}

/** Glass the steps call for, each named once with its limit of error. */
export function glasswareOf(vessel: MakeVessel, takes: readonly SoluteTake[]) {
  const uses: { glass: GlassOwned; use: string }[] = [{ glass: vessel.glass, use: 'make up the batch' }];
  for (const take of takes) {
    const name = take.solute.substance.name;
    for (const glass of take.measures) if (glass !== null) uses.push({ glass, use: `measure ${name}` });
    if (take.stock?.stockFlask) uses.push({ glass: take.stock.stockFlask, use: `stock of ${name}` });
    for (const step of take.stock?.dilution.steps ?? []) {
      uses.push(
        { glass: step.measure, use: `take ${mlText(step.takeMl)} of ${name}` },
        { glass: step.flask, use: `dilute ${name}` },
      );
    }
  }
  const seen = new Set<string>();
  return uses.flatMap(({ glass, use }) => {
    if (seen.has(glass.id)) return [];
    seen.add(glass.id);
    return [
      { name: glass.name, use, toleranceMl: glass.toleranceMl, toleranceSource: glass.toleranceSource },
    ];
  });
}
