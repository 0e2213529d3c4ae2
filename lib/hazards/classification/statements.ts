import statementData from '../data/statements.json';
import type { AssignedClass, Regime } from './mixture';

interface ClassStatement {
  readonly h: string;
  readonly pictogram: string | null;
  readonly signal: string | null;
}
const CLASSES: Readonly<Record<string, ClassStatement | undefined>> = statementData.classes;
const H_TEXTS: Readonly<Record<string, string | undefined>> = statementData.h;
const EUH_TEXTS: Readonly<Record<string, string | undefined>> = statementData.euh;
const P_TEXTS: Readonly<Record<string, string | undefined>> = statementData.p;
const BY_CLASS = statementData.precautionsByClass as Readonly<
  Record<string, Readonly<Record<string, readonly string[]>> | undefined>
>;
const WEIGHTS = statementData.precautionWeights as Readonly<
  Record<string, Readonly<Record<string, number>> | undefined>
>;

export const MOST_PRECAUTIONS = 6;

/** `Repr. 1B (FD)` shares its row with `Repr. 1B`; the effects of STOT SE 3 are kept apart. */
function stated(name: string): string {
  return name.startsWith('STOT SE 3') ? name : name.replace(/\s*\(.*\)$/, '');
}

export function statementFor(name: string): ClassStatement | null {
  return CLASSES[stated(name)] ?? null;
}

/** The statement's code with the effect behind it, as in H360FD or H350i (CLP Annex VI 1.1.2.1.2). */
function codeFor(name: string): string | null {
  const code = statementFor(name)?.h;
  if (!code) return null;
  const effect = /^(?:Carc|Repr)\..*\((\w+)\)$/.exec(name)?.[1] ?? '';
  return H_TEXTS[`${code}${effect}`] ? `${code}${effect}` : code;
}

export function statementText(code: string): string {
  return H_TEXTS[code] ?? EUH_TEXTS[code] ?? '';
}

/** Text of a precautionary statement; a combined one joins its parts where it has no text of its own. */
export function precautionText(code: string): string {
  return (
    P_TEXTS[code] ??
    code
      .split('+')
      .map((part) => P_TEXTS[part] ?? '')
      .join(' ')
      .trim()
  );
}

/**
 * Pictograms by precedence: skull over exclamation mark, corrosion over it for skin and eye, and so on
 * (CLP Art. 26). HazCom (C.2.1) lets the skull stand for the exclamation mark in acute toxicity alone.
 */
export function pictogramsFor(classes: readonly AssignedClass[], regime: Regime = 'CLP'): string[] {
  const signs = new Set(
    classes.flatMap(({ class: name }) => statementFor(name)?.pictogram?.split('+') ?? []),
  );
  const exclaims = classes
    .filter(({ class: name }) => statementFor(name)?.pictogram === 'GHS07')
    .map(({ class: name }) => name);
  const isTouch = (name: string) => name.startsWith('Skin Irrit.') || name.startsWith('Eye Irrit.');
  const hasRespiratory = classes.some(({ class: name }) => name.startsWith('Resp. Sens.'));
  const isUnderSkull = (name: string) =>
    signs.has('GHS06') && (regime !== 'HazCom' || name.startsWith('Acute Tox.'));
  const left = exclaims.filter(
    (name) =>
      !isUnderSkull(name) &&
      !(signs.has('GHS05') && isTouch(name)) &&
      !(hasRespiratory && (isTouch(name) || name.startsWith('Skin Sens.'))),
  );
  if (left.length === 0) signs.delete('GHS07');
  if (signs.has('GHS02') || signs.has('GHS06')) signs.delete('GHS04');
  return [...signs].sort();
}

export function signalWordFor(classes: readonly AssignedClass[]): 'Danger' | 'Warning' | null {
  const words = classes.map(({ class: name }) => statementFor(name)?.signal);
  return words.includes('Danger') ? 'Danger' : words.includes('Warning') ? 'Warning' : null;
}

/** Hazard statements in the order of the label, without those another one says already. */
export function hazardStatements(
  classes: readonly AssignedClass[],
): { readonly code: string; readonly text: string; readonly because: string }[] {
  const byCode = new Map<string, string>();
  for (const { class: name, because } of classes) {
    const code = codeFor(name);
    if (code && !byCode.has(code)) byCode.set(code, because);
  }
  const drop = (when: string, ...codes: string[]) => {
    if (byCode.has(when)) for (const code of codes) byCode.delete(code);
  };
  drop('H314', 'H318', 'H315', 'H319');
  drop('H318', 'H319');
  if (byCode.has('H400') && (byCode.has('H411') || byCode.has('H412'))) {
    const because = byCode.get('H400') ?? '';
    for (const code of ['H400', 'H411', 'H412']) byCode.delete(code);
    byCode.set('H410', because);
  }
  drop('H410', 'H400');
  drop('H411', 'H401');
  drop('H412', 'H402');
  return [...byCode]
    .map(([code, because]) => ({ code, text: statementText(code), because }))
    .sort((a, b) => a.code.localeCompare(b.code));
}

/** Keys of the tables of precautions that a class falls under. */
function tableKey(name: string): string {
  const short = stated(name);
  if (short.startsWith('Skin Corr.')) return 'Skin Corr. 1';
  return short.startsWith('STOT SE 3')
    ? 'STOT SE 3'
    : short.replace(/ 1[ABC]$/, (match) => (/(?:Sens\.)/.test(short) ? ' 1' : match));
}

function weightsFor(name: string): Readonly<Record<string, number>> {
  const key = tableKey(name);
  const found = Object.entries(WEIGHTS).find(([row]) => matchesRow(row, key));
  return found?.[1] ?? {};
}

function matchesRow(row: string, key: string): boolean {
  const range = /^(.*?) ?(\d)-(\d)(.*)$/.exec(row);
  if (range) {
    const [, head = '', from, to, tail = ''] = range;
    const own = /(\d)/.exec(key)?.[1] ?? '';
    const isSameKind = key.startsWith(head.trim().split(' ')[0] ?? '') && key.endsWith(tail.trim());
    return isSameKind && own >= (from ?? '') && own <= (to ?? '');
  }
  if (row.startsWith('CMR'))
    return /^(?:Muta|Carc|Repr)\. /.test(key) && key.includes(row.endsWith('1') ? ' 1' : ' 2');
  if (row === 'STOT 1' || row === 'STOT 2')
    return /^STOT (?:SE|RE) /.test(key) && key.endsWith(row.at(-1) ?? '');
  return row === key || (row.endsWith('.') && key.startsWith(row));
}

/** At most six precautionary statements, the weightiest first, without those another one says already. */
export function precautionsFor(classes: readonly AssignedClass[]): string[] {
  const weight = new Map<string, number>();
  for (const { class: name } of classes) {
    const weights = weightsFor(name);
    const listed = Object.values(BY_CLASS[tableKey(name)] ?? {}).flat();
    for (const code of new Set([...Object.keys(weights), ...listed])) {
      weight.set(code, Math.max(weight.get(code) ?? 0, weights[code] ?? 1));
    }
  }
  for (const code of ['P101', 'P102', 'P103', 'P405', 'P501', 'P363', 'P321', 'P320']) weight.delete(code);
  const drop = (when: string, ...codes: string[]) => {
    if (weight.has(when)) for (const code of codes) weight.delete(code);
  };
  drop('P301+P310', 'P301+P312');
  if (!classes.some(({ class: name }) => name.startsWith('Skin Sens.'))) drop('P310', 'P333+P313');
  drop('P310', 'P311', 'P312', 'P314', 'P332+P313', 'P337+P313');
  drop('P260', 'P261');
  drop('P303+P361+P353', 'P302+P352', 'P361+P364', 'P362+P364');
  drop('P403+P233', 'P233');
  return [...weight]
    .filter(([code]) => precautionText(code) !== '')
    .sort((a, b) => b[1] - a[1] || a[0].localeCompare(b[0]))
    .slice(0, MOST_PRECAUTIONS)
    .map(([code]) => code)
    .sort();
}
