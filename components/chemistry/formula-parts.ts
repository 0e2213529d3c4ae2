/** One stretch of a typeset formula. */
export interface FormulaPart {
  readonly text: string;
  readonly place: 'base' | 'sub' | 'super';
}

/** A dot before added water or another part, also `.0.5H2O`, but not the point inside 0.5. */
const HYDRATE_DOT = /(?<![.·*]\d+)[.·*](?=\d*(?:\.\d+)?[A-Z(])/g;

/**
 * Splits a plain id such as `Cu(NH3)4+2`, `CuSO4.5H2O` or `PbI2(s)` into stretches to be set on, below or
 * above the line. A charge is a sign with an optional magnitude at the end, before a phase.
 */
export function formulaParts(id: string): FormulaPart[] {
  const [, bodyAndCharge = id, phase = ''] = /^(.*?)(\((?:aq|s|l|g)\))?$/.exec(id) ?? [];
  const [, body = bodyAndCharge, sign = '', magnitude = ''] =
    /^(.+?)(?:([+-])(\d*))?$/.exec(bodyAndCharge) ?? [];
  const parts: FormulaPart[] = [];
  for (const [text] of body.replaceAll(HYDRATE_DOT, '·').matchAll(/\d+(?:\.\d+)?|\D+/g)) {
    const before = parts.at(-1)?.text.at(-1);
    const isCount = /^\d/.test(text) && before !== undefined && before !== '·';
    parts.push({ text, place: isCount ? 'sub' : 'base' });
  }
  if (sign) parts.push({ text: `${magnitude}${sign === '+' ? '+' : '−'}`, place: 'super' });
  if (phase) parts.push({ text: phase, place: 'base' });
  return parts;
}

/** The formula as one line of plain text with Unicode sub- and superscripts, for places without markup. */
export function formulaText(id: string): string {
  const sub = '₀₁₂₃₄₅₆₇₈₉';
  const sup = '⁰¹²³⁴⁵⁶⁷⁸⁹';
  return formulaParts(id)
    .map(({ text, place }) => {
      if (place === 'base') return text;
      const digits = place === 'sub' ? sub : sup;
      return text
        .replaceAll(/\d/g, (digit) => digits[Number(digit)] ?? digit)
        .replace('+', '⁺')
        .replace('−', '⁻');
    })
    .join('');
}
