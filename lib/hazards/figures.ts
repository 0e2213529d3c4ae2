const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A figure for a sentence: three significant digits, powers of ten instead of e-notation. */
export function figure(value: number): string {
  if (value === 0) return '0';
  const [mantissa = '', exponentText = '0'] = value.toExponential(2).split('e');
  const exponent = Number(exponentText);
  if (exponent >= -3 && exponent < 6) return String(Number(`${mantissa}e${exponent}`));
  const raised = String(exponent)
    .replaceAll(/\d/g, (digit) => SUPERSCRIPTS[Number(digit)] ?? digit)
    .replace('-', '⁻');
  return `${mantissa} × 10${raised}`;
}
