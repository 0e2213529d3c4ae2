import { create } from 'qrcode';
import { classNames } from '../ui/class-names';

/** Modules of light around the code, as ISO/IEC 18004 asks for. */
const QUIET_ZONE = 4;

/** A QR code (error level M) drawn in black on white with its quiet zone; `sizeMm` is the whole square. */
export function QrSquare({
  text,
  label,
  sizeMm,
  className,
}: {
  readonly text: string;
  readonly label: string;
  readonly sizeMm: number;
  readonly className?: string;
}) {
  const { modules } = create(text, { errorCorrectionLevel: 'M' });
  const side = modules.size + 2 * QUIET_ZONE;
  const dark = Array.from(modules.data).flatMap((bit, index) => {
    if (!bit) return [];
    const x = (index % modules.size) + QUIET_ZONE;
    const y = Math.floor(index / modules.size) + QUIET_ZONE;
    return [`M${x} ${y}h1v1h-1z`];
  });
  return (
    <svg
      viewBox={`0 0 ${side} ${side}`}
      role="img"
      aria-label={label}
      shapeRendering="crispEdges"
      className={classNames('shrink-0', className)}
      style={{ width: `${sizeMm}mm`, height: `${sizeMm}mm` }}
    >
      <path d={`M0 0h${side}v${side}h-${side}z`} fill="#fff" />
      <path d={dark.join('')} fill="#000" />
    </svg>
  );
}
