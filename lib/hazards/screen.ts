import { pourMix } from '../chemistry/mixing';
import type { Mix } from '../chemistry/types';
import { DECISIONS, gravityOf } from '../domain/gravity';
import { screenedBottle } from './contents';
import type { ScreenedBottle } from './contents';
import { figure } from './figures';
import { heatFinding } from './heat';
import { firingRules, meetingTitle } from './rules';
import type { Firing } from './rules';
import type { BottleContent, Decision, Finding, Room, Severity } from './types';
import { uncoveredFindings } from './uncovered';
import { vapourFindings } from './vapour';

const ROOM_TEMPERATURE_C = 25;

/** The gravest finding decides; notes alone leave it clear. */
export function decide(findings: readonly Finding[]): Decision {
  const gravest = findings.reduce(
    (least, { severity }) => Math.min(least, gravityOf(severity)),
    gravityOf('clear'),
  );
  return DECISIONS[gravest] ?? 'clear';
}

/** Gravest first; the same rule on the same bottles once. */
export function sortFindings(findings: readonly Finding[]): Finding[] {
  const seen = new Set<string>();
  return [...findings]
    .sort((a, b) => gravityOf(a.severity) - gravityOf(b.severity))
    .filter(({ rule, scope, concerns }) => {
      const key = `${scope}|${rule}|${[...concerns].sort().join('|')}`;
      if (seen.has(key)) return false;
      seen.add(key);
      return true;
    });
}

function findingOf(
  { rule, severity, gas, concerns }: Firing,
  scope: Finding['scope'],
  reason: string,
): Finding {
  return {
    rule: rule.id,
    severity,
    scope,
    title: meetingTitle(rule),
    reason,
    mustNot: rule.mustNot,
    gas,
    precautions: rule.precautions,
    alternative: rule.alternative,
    source: rule.isDraft ? `${rule.source}; draft rule` : rule.source,
    concerns,
  };
}

function withGas({ rule, gas }: Firing): string {
  if (!gas) return rule.reason;
  const limit = gas.limit ? ` against ${gas.limit.ppm} ppm (${gas.limit.name})` : '';
  return `${rule.reason} At worst ${figure(gas.worstCaseMoles * 1000)} mmol of ${gas.species}, ${figure(gas.mlAt25C)} mL at 25 °C: ${figure(gas.ppmInBreathingZone)} ppm in a breathing zone of 0.1 m³${limit}.`;
}

/**
 * Findings on the portions as poured, at the composition computed after every pour.
 * @param isKept - true where the mix is to stand, overnight or in a bottle
 */
export function screenMix(
  portions: readonly BottleContent[],
  mix: Mix,
  room: Room,
  isKept = false,
): Finding[] {
  const bottles = portions.map(screenedBottle);
  const findings: Finding[] = bottles.flatMap(unknownFindings);
  mix.steps.forEach((step, index) => {
    const met = bottles.slice(0, index + 1);
    if (met.length < 2 && bottles.length > 1) return;
    const firings = firingRules({
      bottles: met,
      volumeMl: step.volumeMl,
      state: step.equilibrium,
      temperatureC: step.equilibrium.temperatureC,
      isKept,
      room,
    });
    findings.push(
      ...firings.map((firing) =>
        findingOf(firing, firing.rule.kinds.includes('quality-only') ? 'quality' : 'mix', withGas(firing)),
      ),
    );
  });
  findings.push(...uncoveredFindings(bottles));
  const heat = heatFinding(bottles, mix, mix.equilibrium.temperatureC);
  if (heat) findings.push(heat);
  findings.push(...vapourFindings(mix, room), ...redoxFindings(portions, mix));
  return sortFindings(mergeSteps(findings));
}

/** Findings on each solution by itself, as made and kept in its bottle; notes are left to the mixes. */
export function screenSolutions(contents: readonly BottleContent[], room: Room): Finding[] {
  return sortFindings(
    contents.flatMap((content) => {
      const mix = pourMix({ portions: [content], activity: 'davies', temperatureC: ROOM_TEMPERATURE_C });
      if (!mix.converged) return [];
      return screenMix([content], mix, room, true).filter(({ severity }) => severity !== 'note');
    }),
  );
}

/** A rule that fired after several pours is told once, as it stands when most has met. */
function mergeSteps(findings: readonly Finding[]): Finding[] {
  const latest = new Map<string, Finding>();
  for (const finding of findings) {
    const key = `${finding.scope}|${finding.rule}`;
    const before = latest.get(key);
    if (!before || gravityOf(finding.severity) <= gravityOf(before.severity)) latest.set(key, finding);
  }
  return [...latest.values()];
}

function unknownFindings(bottle: ScreenedBottle): Finding[] {
  return bottle.unknown.map((name) => ({
    rule: 'no-data',
    severity: 'review' as const,
    scope: 'mix' as const,
    title: `No hazard data for ${name}`,
    reason: `Nothing is held about ${name}, so nothing can be said for it. Unknown is not safe.`,
    mustNot: null,
    gas: null,
    precautions: ["Read the supplier's safety data sheet first"],
    alternative: null,
    source: 'House rule',
    concerns: [bottle.label],
  }));
}

/** Electron transfer that the equilibrium does not know: the demonstration will not do what it promises. */
function redoxFindings(portions: readonly BottleContent[], mix: Mix): Finding[] {
  return mix.equilibrium.notes
    .filter(({ code }) => code === 'redox-not-modelled')
    .map(({ message }) => ({
      rule: `redox:${message}`,
      severity: 'note' as const,
      scope: 'quality' as const,
      title: 'Redox, not complexation alone',
      reason: message,
      mustNot: null,
      gas: null,
      precautions: ['Try it at small scale before relying on the predicted outcome'],
      alternative: null,
      source: 'Common laboratory knowledge (from memory)',
      concerns: portions.map(({ label }) => label),
    }));
}

/** Standing beside each other is less than being poured together. */
const BESIDE: Readonly<Record<Severity, Severity | null>> = {
  stop: 'review',
  review: 'caution',
  controlled: null,
  caution: null,
  note: null,
};

/**
 * Every pair of bottles that share a room and hour, judged as if they met in a spill or a sink: the whole of
 * both, at the composition computed for that.
 */
export function screenNeighbours(contents: readonly BottleContent[], room: Room): Finding[] {
  const bottles = contents.map(screenedBottle);
  const findings: Finding[] = [];
  bottles.forEach((first, index) => {
    bottles.slice(index + 1).forEach((second, offset) => {
      const portions = [contents[index], contents[index + 1 + offset]].filter(
        (content) => content !== undefined,
      );
      findings.push(...screenPair(first, second, portions, room));
    });
  });
  return sortFindings(findings);
}

function screenPair(
  first: ScreenedBottle,
  second: ScreenedBottle,
  portions: readonly BottleContent[],
  room: Room,
): Finding[] {
  const pair = [first, second];
  const could = firingRules({
    bottles: pair,
    volumeMl: first.volumeMl + second.volumeMl,
    state: null,
    temperatureC: ROOM_TEMPERATURE_C,
    isKept: false,
    room,
  });
  if (!could.some(({ rule }) => BESIDE[rule.severity] !== null && needsBoth(rule.groups, pair))) return [];
  const mix = pourMix({ portions, activity: 'davies', temperatureC: ROOM_TEMPERATURE_C });
  const state = mix.converged ? mix.equilibrium : null;
  return firingRules({
    bottles: pair,
    volumeMl: first.volumeMl + second.volumeMl,
    state,
    temperatureC: ROOM_TEMPERATURE_C,
    isKept: false,
    room,
  }).flatMap((firing) => {
    const severity = BESIDE[firing.rule.severity];
    if (!severity || !needsBoth(firing.rule.groups, pair)) return [];
    const finding = findingOf(
      { ...firing, severity, concerns: [first.label, second.label] },
      'neighbours',
      `${first.label} and ${second.label} stand in the same room and hour. If they met: ${withGas(firing)}`,
    );
    return [
      {
        ...finding,
        precautions: [
          `Keep ${first.label} and ${second.label} on separate trolleys and benches, with separate waste`,
          ...finding.precautions,
        ],
      },
    ];
  });
}

/** Whether it takes both bottles for the rule: one alone is no neighbour. */
function needsBoth(groups: readonly string[], [first, second]: readonly ScreenedBottle[]): boolean {
  const held = (bottle: ScreenedBottle | undefined) =>
    new Set((bottle?.solutes ?? []).flatMap((solute) => [...solute.groups]));
  const inFirst = held(first);
  const inSecond = held(second);
  const real = groups.filter((group) => group !== 'water');
  return (
    real.some((group) => !inFirst.has(group)) && real.some((group) => !inSecond.has(group)) && real.length > 1
  );
}
