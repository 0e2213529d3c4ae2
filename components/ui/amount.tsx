import { formatMass, formatMolarity, formatNumber, formatVolume } from '@/lib/client/format';

type Kind = 'mol/L' | 'mL' | 'g';

/** An amount with its unit, in figures that line up. */
export function Amount({
  value,
  unit,
  significant = 3,
}: {
  readonly value: number;
  readonly unit: Kind | (string & {});
  readonly significant?: number;
}) {
  const text =
    unit === 'mol/L'
      ? formatMolarity(value, significant)
      : unit === 'mL'
        ? formatVolume(value, significant)
        : unit === 'g'
          ? formatMass(value, significant)
          : `${formatNumber(value, significant)}\u202f${unit}`;
  return <span className="font-mono whitespace-nowrap">{text}</span>;
}
