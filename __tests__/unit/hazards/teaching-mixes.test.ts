import { gravityOf } from '../../../lib/domain/gravity';
import { screenPolicy } from '../../../lib/hazards/policy-gates';
import { previewMix } from '../../../lib/hazards/preview';
import { decide, screenNeighbours, sortFindings } from '../../../lib/hazards/screen';
import type { Decision, Finding } from '../../../lib/hazards/types';
import { MORE_MIXES } from './more-teaching-mixes';
import { FIRST_MIXES } from './teaching-mixes';
import type { TeachingMix } from './teaching-mixes';

const TEACHING_MIXES = [...FIRST_MIXES, ...MORE_MIXES];

const ROOM = { volumeM3: 150, airChangesPerHour: 6, fumeCupboard: false };

interface Judged {
  readonly mix: TeachingMix;
  readonly decision: Decision;
  readonly findings: readonly Finding[];
}

function judge(mix: TeachingMix): Judged {
  const { portions, meeting } = mix;
  if (meeting === 'beside') {
    const findings = sortFindings([...screenNeighbours(portions, ROOM), ...screenPolicy(portions)]);
    return { mix, decision: decide(findings), findings };
  }
  const outcome = previewMix({ portions, activity: 'davies', temperatureC: 25, room: ROOM });
  if (!('decision' in outcome)) throw new Error(`${mix.title}: ${outcome.message}`);
  return { mix, decision: outcome.decision, findings: outcome.findings };
}

function told({ mix, decision, findings }: Judged): string {
  const rules = findings.map(({ rule, severity }) => `${rule} ${severity}`).join(', ');
  return `${mix.title}: ${decision}, a competent person says ${mix.least === mix.most ? mix.least : `${mix.least} to ${mix.most}`} (${rules})`;
}

const judged = TEACHING_MIXES.map(judge);
const missedStops = judged.filter(({ mix, decision }) => mix.least === 'stop' && decision !== 'stop');
const tooMild = judged.filter(({ mix, decision }) => gravityOf(decision) > gravityOf(mix.least));
const falseAlarms = judged.filter(({ mix, decision }) => gravityOf(decision) < gravityOf(mix.most));

afterAll(() => {
  process.stdout.write(
    [
      `${judged.length} teaching mixes, ${judged.filter(({ mix }) => mix.isCommon).length} of them everyday: ${missedStops.length} missed stops, ${tooMild.length} judged too mild, ${falseAlarms.length} false alarms`,
      ...tooMild.map((entry) => `  too mild: ${told(entry)}`),
      ...falseAlarms.map((entry) => `  false alarm: ${told(entry)}`),
      '',
    ].join('\n'),
  );
});

test('no stop is missed', () => {
  expect(missedStops.map(told)).toEqual([]);
});
test('nothing is judged more mildly than a competent person would', () => {
  expect(tooMild.map(told)).toEqual([]);
});
test('everyday mixes raise no alarm', () => {
  expect(falseAlarms.filter(({ mix }) => mix.isCommon).map(told)).toEqual([]);
});
test('no other mix is judged more gravely than a competent person would', () => {
  expect(falseAlarms.filter(({ mix }) => !mix.isCommon).map(told)).toEqual([]);
});
test('the table holds about thirty each of everyday mixes and of stops', () => {
  expect(TEACHING_MIXES.filter(({ isCommon }) => isCommon).length).toBeGreaterThanOrEqual(30);
  expect(TEACHING_MIXES.filter(({ least }) => least === 'stop').length).toBeGreaterThanOrEqual(20);
});
