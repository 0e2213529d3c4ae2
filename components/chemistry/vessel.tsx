import { formatMass, formatVolume } from '@/lib/client/format';

export interface VesselSolid {
  readonly id: string;
  readonly name: string;
  readonly hex: string;
  readonly grams: number;
}

interface VesselProps {
  readonly capacityMl: number;
  readonly volumeMl: number;
  readonly hex: string;
  readonly words: string;
  readonly solids: readonly VesselSolid[];
  /** Names of gases that may come off. */
  readonly gases?: readonly string[];
  readonly className?: string;
}

/** Inside of the beaker in drawing units. */
const LEFT = 22;
const RIGHT = 158;
const TOP = 34;
const BOTTOM = 226;
/** Loose precipitate holds mostly liquid: this is the settled height per gram in 100 mL, an impression and no prediction. */
const SETTLED_UNITS_PER_GRAM = 24;

/** A beaker to scale: filled to its volume in the predicted colour, with what settles and what comes off. */
export function Vessel({ capacityMl, volumeMl, hex, words, solids, gases = [], className }: VesselProps) {
  const height = BOTTOM - TOP;
  const level = BOTTOM - height * Math.min(1, volumeMl / capacityMl);
  const solidGrams = solids.reduce((sum, { grams }) => sum + grams, 0);
  const settled =
    solidGrams > 0
      ? Math.min(
          (BOTTOM - level) * 0.6,
          Math.max(4, (SETTLED_UNITS_PER_GRAM * solidGrams * 100) / Math.max(volumeMl, 1)),
        )
      : 0;
  const marks = [0.25, 0.5, 0.75, 1];
  const told = [
    `${formatVolume(volumeMl)} of ${words} liquid in a ${formatVolume(capacityMl)} beaker`,
    ...solids.map(({ name, grams }) => `${formatMass(grams)} of ${name} settled`),
    ...gases.map((gas) => `${gas} may come off`),
  ].join('; ');

  return (
    <svg viewBox="0 0 200 250" role="img" aria-label={told} className={className}>
      {gases.length > 0 && (
        <g fill="none" stroke="var(--signal)" strokeWidth="2" strokeLinecap="round">
          <path d="M70 26c-5-6 5-9 0-16M90 26c-5-6 5-9 0-16M110 26c-5-6 5-9 0-16" />
        </g>
      )}
      {volumeMl > 0 && (
        <>
          <rect x={LEFT} y={level} width={RIGHT - LEFT} height={BOTTOM - level} fill={hex} />
          <ellipse
            cx={(LEFT + RIGHT) / 2}
            cy={level}
            rx={(RIGHT - LEFT) / 2}
            ry="5"
            fill={hex}
            stroke="var(--line)"
            strokeWidth="0.8"
          />
        </>
      )}
      {settled > 0 &&
        stack(solids, settled, solidGrams).map(({ id, hex: colour, y, tall }) => (
          <g key={id}>
            <rect x={LEFT} y={y} width={RIGHT - LEFT} height={tall} fill={colour} />
            <path
              d={`M${LEFT} ${y}h${RIGHT - LEFT}`}
              stroke="var(--line)"
              strokeWidth="0.8"
              strokeDasharray="3 2"
            />
          </g>
        ))}
      <path
        d={`M${LEFT - 8} ${TOP - 8}q8 2 8 10V${BOTTOM - 6}q0 8 8 8h${RIGHT - LEFT - 16}q8 0 8-8V${TOP + 2}q0-8 8-10`}
        fill="none"
        stroke="var(--ink)"
        strokeWidth="2.4"
        strokeLinejoin="round"
      />
      {marks.map((mark) => {
        const y = BOTTOM - height * mark;
        return (
          <g key={mark}>
            <path d={`M${RIGHT} ${y}h-14`} stroke="var(--ink)" strokeWidth="1.2" />
            <text x={RIGHT + 6} y={y + 4} fontSize="11" fill="var(--soft)">
              {Math.round(capacityMl * mark)}
            </text>
          </g>
        );
      })}
      <text x={RIGHT + 6} y={BOTTOM + 4} fontSize="11" fill="var(--soft)">
        mL
      </text>
    </svg>
  );
}

/** Layers of the settled solids from the bottom up, each as tall as its share of the mass. */
function stack(solids: readonly VesselSolid[], settled: number, solidGrams: number) {
  let bottom = BOTTOM;
  return solids
    .filter(({ grams }) => grams > 0)
    .map(({ id, hex, grams }) => {
      const tall = (settled * grams) / solidGrams;
      bottom -= tall;
      return { id, hex, y: bottom, tall };
    });
}
