'use client';

import { formatVolume } from '@/lib/client/format';
import { Button } from '../ui/button';
import type { BenchPortion } from './portion';

interface PortionRowProps {
  readonly portion: BenchPortion;
  readonly number: number;
  readonly most: number;
  readonly isFirst: boolean;
  readonly isLast: boolean;
  readonly onVolume: (volumeMl: number) => void;
  readonly onShift: (by: number) => void;
  readonly onRemove: () => void;
}

/** A bottle whose fill is dragged; arrow keys move it by a step. */
export function PortionRow({
  portion,
  number,
  most,
  isFirst,
  isLast,
  onVolume,
  onShift,
  onRemove,
}: PortionRowProps) {
  const id = `${portion.key}-volume`;
  return (
    <li className="border-l-4 border-copper bg-raised p-3">
      <div className="flex items-baseline justify-between gap-3">
        <label htmlFor={id} className="font-semibold">
          {number}. {portion.label}
        </label>
        <output htmlFor={id} className="font-mono whitespace-nowrap">
          {formatVolume(portion.volumeMl)}
        </output>
      </div>
      <input
        id={id}
        type="range"
        min={0.5}
        max={Math.max(most, portion.volumeMl)}
        step={0.5}
        value={portion.volumeMl}
        onChange={(event) => onVolume(Number(event.target.value))}
        className="h-11 w-full accent-verdigris"
      />
      <div className="flex flex-wrap gap-1">
        <Button
          look="plain"
          disabled={isFirst}
          onClick={() => onShift(-1)}
          aria-label={`Pour ${portion.label} earlier`}
        >
          Earlier
        </Button>
        <Button
          look="plain"
          disabled={isLast}
          onClick={() => onShift(1)}
          aria-label={`Pour ${portion.label} later`}
        >
          Later
        </Button>
        <Button look="plain" onClick={onRemove} aria-label={`Take ${portion.label} away`}>
          Take away
        </Button>
      </div>
    </li>
  );
}
