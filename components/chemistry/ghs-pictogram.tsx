import type { ReactNode } from 'react';

export const PICTOGRAM_NAMES: Readonly<Record<string, string>> = {
  GHS01: 'Exploding bomb',
  GHS02: 'Flame',
  GHS03: 'Flame over circle',
  GHS04: 'Gas cylinder',
  GHS05: 'Corrosion',
  GHS06: 'Skull and crossbones',
  GHS07: 'Exclamation mark',
  GHS08: 'Health hazard',
  GHS09: 'Environment',
};

const FLAME = 'M50 22c4 12 16 16 16 32 0 11-7 18-16 18s-16-7-16-17c0-7 4-11 6-17 3 3 4 6 4 9 5-6 8-13 6-25z';

/** Symbols drawn by us in a 100 × 100 square, black on white inside the red frame of the standard. */
const SYMBOLS: Readonly<Record<string, ReactNode>> = {
  GHS01: (
    <>
      <circle cx="47" cy="58" r="13" />
      <path d="M56 46l5-6 4 4-5 6z" />
      <path
        d="M64 38l3-9M67 41l10-3M61 35l-3-9M70 45l8 5M54 74l2 8M36 70l-7 6M32 58l-9-1M37 47l-6-7"
        fill="none"
        stroke="#000"
        strokeWidth="3"
        strokeLinecap="round"
      />
    </>
  ),
  GHS02: (
    <>
      <path d={FLAME} />
      <path d="M30 76h40v4H30z" />
    </>
  ),
  GHS03: (
    <>
      <path d="M50 18c3 9 12 12 12 24 0 5-2 8-4 10-5-3-11-3-16 0-3-3-4-6-4-10 0-5 3-8 5-13 2 2 3 5 3 7 3-5 5-10 4-18z" />
      <circle cx="50" cy="65" r="12" fill="none" stroke="#000" strokeWidth="5" />
      <path d="M30 79h40v4H30z" />
    </>
  ),
  GHS04: (
    <path
      d="M24 62l37-21c4-2 8-1 11 1l5-3 2 4-5 3c1 4-1 8-4 10L33 77c-6 3-12-1-13-6-1-4 1-7 4-9z"
      transform="translate(0 -6)"
    />
  ),
  GHS05: (
    <>
      <path d="M22 34l22-8 3 6-22 8zM52 28l22 6-2 6-21-6z" />
      <path
        d="M40 42v8M45 42v12M62 44v6M67 45v11"
        stroke="#000"
        strokeWidth="3"
        strokeDasharray="3 3"
        fill="none"
      />
      <path d="M24 62h14l3 5 5-5h10v12H24z" />
      <path d="M56 66c4-5 10-6 14-4l8-2c3 0 3 4 0 5l-7 3c-2 5-8 7-15 6z" />
    </>
  ),
  GHS06: (
    <>
      <path d="M50 20c11 0 18 7 18 16 0 6-3 9-7 11v8H39v-8c-4-2-7-5-7-11 0-9 7-16 18-16z" />
      <circle cx="43" cy="37" r="4.500" fill="#fff" />
      <circle cx="57" cy="37" r="4.500" fill="#fff" />
      <path d="M50 42l3 6h-6z" fill="#fff" />
      <path d="M44 50v5M50 50v5M56 50v5" stroke="#fff" strokeWidth="1.600" />
      <path d="M28 60l44 20M72 60L28 80" stroke="#000" strokeWidth="6" strokeLinecap="round" />
    </>
  ),
  GHS07: (
    <>
      <path d="M44 24h12l-3 34h-6z" />
      <circle cx="50" cy="70" r="6" />
    </>
  ),
  GHS08: (
    <>
      <circle cx="50" cy="26" r="8" />
      <path d="M50 36c12 0 18 6 19 16l2 22H29l2-22c1-10 7-16 19-16z" />
      <path d="M50 44l3 9 9-3-6 7 7 7-9-1-4 9-4-9-9 1 7-7-6-7 9 3z" fill="#fff" />
    </>
  ),
  GHS09: (
    <>
      <path d="M36 26v46h5V50l8-8-3-3-5 5V26z" />
      <path d="M36 48l-8-8 3-3 5 5M36 36l-5-6M41 34l6-6" stroke="#000" strokeWidth="3" fill="none" />
      <path d="M22 72h56v4H22z" />
      <path d="M52 66c6-8 16-8 22-2l4-4v10l-4-3c-6 5-16 5-22-1z" />
      <circle cx="58" cy="65" r="1.500" fill="#fff" />
    </>
  ),
};

/** A hazard pictogram: a square set on a point, red frame, black symbol on white. */
export function GhsPictogram({
  code,
  sizeMm,
  className,
}: {
  readonly code: string;
  readonly sizeMm?: number;
  readonly className?: string;
}) {
  const symbol = SYMBOLS[code];
  if (!symbol) return null;
  const size = sizeMm === undefined ? {} : { width: `${sizeMm}mm`, height: `${sizeMm}mm` };
  return (
    <svg
      viewBox="0 0 100 100"
      role="img"
      aria-label={PICTOGRAM_NAMES[code]}
      className={className}
      style={size}
    >
      <path
        d="M50 3.500L96.500 50 50 96.500 3.500 50z"
        fill="#fff"
        stroke="#d5001c"
        strokeWidth="6"
        strokeLinejoin="miter"
      />
      <g transform="translate(50 50) scale(0.78) translate(-50 -50)">{symbol}</g>
    </svg>
  );
}
