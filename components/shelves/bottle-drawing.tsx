import { classNames } from '../ui/class-names';

const INSIDE_TOP = 17;
const INSIDE_BOTTOM = 58;

/** A reagent bottle, filled as far as it is. What is told by its looks is told in words beside it too. */
export function BottleDrawing({
  fill,
  isStopped,
  className,
}: {
  readonly fill: number;
  readonly isStopped: boolean;
  readonly className?: string;
}) {
  const level = INSIDE_BOTTOM - Math.min(1, Math.max(0, fill)) * (INSIDE_BOTTOM - INSIDE_TOP);
  return (
    <svg viewBox="0 0 40 62" aria-hidden className={classNames('shrink-0', className)}>
      <path
        d={`M5 ${level}H35V56a2 2 0 0 1-2 2H7a2 2 0 0 1-2-2z`}
        fill={isStopped ? 'var(--signal-wash)' : 'var(--amber-wash)'}
        stroke="none"
      />
      <path
        d="M14 3h12v7c0 3 9 4 9 10v36a3 3 0 0 1-3 3H8a3 3 0 0 1-3-3V20c0-6 9-7 9-10z"
        fill="none"
        stroke="var(--ink)"
        strokeWidth="1.600"
      />
      <path d="M12 1.500h16v5H12z" fill="var(--ink)" />
      {isStopped && <path d="M8 24l24 28M32 24L8 52" stroke="var(--signal)" strokeWidth="2.500" />}
    </svg>
  );
}
