import { pourMix } from '../chemistry/mixing';
import wasteData from './data/waste.json';
import { groupsOf, screenedBottle } from './contents';
import { decide, screenMix, sortFindings } from './screen';
import type { BottleContent, Decision, Finding, Room } from './types';

export interface WasteStream {
  readonly id: string;
  readonly takes: string;
  readonly mustNotMeet: readonly string[];
  readonly alsoNot: readonly string[];
  readonly container: string;
  readonly treatment: string;
}
export const WASTE_STREAMS: readonly WasteStream[] = wasteData.streams;

/** The first stream whose groups are present takes the mix: what is worst to meet comes first. */
const STREAM_OF_GROUP: readonly (readonly [group: string, stream: string])[] = [
  ['azide', 'azide'],
  ['cyanide', 'cyanide_alk'],
  ['perchlorate', 'perchlorate'],
  ['mercury_salt', 'mercury'],
  ['sulfide', 'sulfide_alk'],
  ['thioacetamide', 'sulfide_alk'],
  ['chromate', 'chromium6'],
  ['silver_salt', 'silver'],
  ['lead_salt', 'heavy_metal'],
  ['toxic_metal_salt', 'heavy_metal'],
  ['copper_salt', 'heavy_metal'],
  ['hypochlorite', 'oxidiser_aq'],
  ['permanganate', 'oxidiser_aq'],
  ['persulfate', 'oxidiser_aq'],
  ['chlorate', 'oxidiser_aq'],
  ['formaldehyde', 'formaldehyde'],
  ['halogenated_solvent', 'org_halogenated'],
  ['acid_mineral_ox', 'nitric'],
  ['alcohol', 'org_nonhalogenated'],
  ['ketone', 'org_nonhalogenated'],
  ['hydrocarbon', 'org_nonhalogenated'],
  ['iodine', 'iodine'],
  ['acid_mineral_nonox', 'acid_aq'],
  ['acid_organic', 'acid_aq'],
  ['base_strong', 'base_aq'],
  ['ammonia_or_ammonium', 'base_aq'],
];

/** Stream for what a vessel holds; `unknown` where a substance has no hazard data. */
export function wasteStreamOf(content: BottleContent): string {
  const bottle = screenedBottle(content);
  if (bottle.unknown.length > 0) return 'unknown';
  const groups = groupsOf(bottle);
  return STREAM_OF_GROUP.find(([group]) => groups.has(group))?.[1] ?? 'drain_permitted';
}

/**
 * Everything that goes into one jar on top of what it holds: the screen of a mix that is kept, and the table of
 * streams. The jar comes first, since it is what is poured into.
 * @throws RangeError for an unknown substance or a volume that is not positive
 */
export function screenWaste(
  jar: BottleContent,
  additions: readonly BottleContent[],
  room: Room,
): { readonly findings: readonly Finding[]; readonly decision: Decision } {
  const portions = [jar, ...additions];
  const mix = pourMix({ portions, activity: 'davies', temperatureC: 25 });
  const computed = mix.converged
    ? screenMix(portions, mix, room, true).filter(({ severity }) => severity !== 'note')
    : [notComputed(portions)];
  const findings = sortFindings([
    ...computed.map((finding) => ({ ...finding, scope: 'waste' as const })),
    ...additions.flatMap((addition) => streamFindings(jar, addition)),
  ]);
  return { findings, decision: decide(findings) };
}

function streamFindings(jar: BottleContent, addition: BottleContent): Finding[] {
  const [held, added] = [wasteStreamOf(jar), wasteStreamOf(addition)];
  const stream = WASTE_STREAMS.find(({ id }) => id === held);
  if (held === added || !stream?.mustNotMeet.includes(added)) return [];
  return [
    {
      rule: `waste:${held}+${added}`,
      severity: 'review',
      scope: 'waste',
      title: 'Wrong jar',
      reason: `${jar.label} takes ${stream.takes}; ${addition.label} belongs to another stream that must not meet it.`,
      mustNot: `Do not pour ${addition.label} into ${jar.label}.`,
      gas: null,
      precautions: [WASTE_STREAMS.find(({ id }) => id === added)?.container ?? 'A jar of its own'],
      alternative: null,
      source: `House waste table (${wasteData.basis})`,
      concerns: [jar.label, addition.label],
    },
  ];
}

function notComputed(portions: readonly BottleContent[]): Finding {
  return {
    rule: 'no-equilibrium',
    severity: 'review',
    scope: 'waste',
    title: 'The jar could not be computed',
    reason: 'No equilibrium was found for what would be in the jar. Unknown is not safe.',
    mustNot: null,
    gas: null,
    precautions: [],
    alternative: null,
    source: 'House rule',
    concerns: portions.map(({ label }) => label),
  };
}
