/** Numbers as people read them: significant figures, thin spaces, never a bare e-notation. */

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const THIN = '\u202f';

/** An integer as superscript digits, with a true minus sign. */
export function superscript(value: number): string {
  return String(value)
    .replaceAll(/\d/g, (digit) => SUPERSCRIPTS[Number(digit)] ?? digit)
    .replace('-', '⁻');
}

/**
 * A number to so many significant figures: `0.0750`, `2 500`, `4.50 × 10⁻¹¹`.
 * Plain notation from 0.001 to below a million; zero is `0`.
 */
export function formatNumber(value: number, significant = 3): string {
  if (!Number.isFinite(value)) return '–';
  if (value === 0) return '0';
  const [mantissa = '', exponentText = '0'] = value.toExponential(significant - 1).split('e');
  const exponent = Number(exponentText);
  if (exponent < -3 || exponent >= 6)
    return `${mantissa.replace('-', '−')}${THIN}×${THIN}10${superscript(exponent)}`;
  const decimals = Math.max(0, significant - 1 - exponent);
  const rounded = Number(`${mantissa}e${exponent}`);
  return formatFixed(rounded, decimals);
}

/** A number to so many decimals, digits in groups of three from ten thousand on. */
export function formatFixed(value: number, decimals: number): string {
  const text = Math.abs(value).toFixed(decimals);
  const [whole = '0', fraction] = text.split('.');
  const grouped = whole.length > 4 ? whole.replaceAll(/\B(?=(\d{3})+$)/g, THIN) : whole;
  const sign = value < 0 && Number(text) !== 0 ? '−' : '';
  return sign + grouped + (fraction ? `.${fraction}` : '');
}

/** Number and unit with a thin space between. */
export function formatAmount(value: number, unit: string, significant = 3): string {
  return `${formatNumber(value, significant)}${THIN}${unit}`;
}

/** A mass in the unit a balance would show it in. */
export function formatMass(grams: number, significant = 3): string {
  const size = Math.abs(grams);
  if (size >= 1000) return formatAmount(grams / 1000, 'kg', significant);
  if (size >= 0.1 || size === 0) return formatAmount(grams, 'g', significant);
  return size >= 1e-4
    ? formatAmount(grams * 1000, 'mg', significant)
    : formatAmount(grams * 1e6, 'µg', significant);
}

/** A volume given in mL, in mL or L. */
export function formatVolume(volumeMl: number, significant = 3): string {
  const size = Math.abs(volumeMl);
  if (size >= 1000) return formatAmount(volumeMl / 1000, 'L', significant);
  return size >= 0.1 || size === 0
    ? formatAmount(volumeMl, 'mL', significant)
    : formatAmount(volumeMl * 1000, 'µL', significant);
}

/** A strength; small ones in powers of ten, since prefixes hide how small they are. */
export function formatMolarity(molarity: number, significant = 3): string {
  return formatAmount(molarity, 'mol/L', significant);
}

/** Money from integer minor units. */
export function formatMoney(minor: number, currency: string, locale?: string): string {
  return new Intl.NumberFormat(locale, { style: 'currency', currency }).format(minor / 100);
}
