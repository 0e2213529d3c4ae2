'use client';

import { findDemonstrations, findSolutions } from '@/lib/client/requests';
import { formatVolume } from '@/lib/client/format';
import { Button } from '../ui/button';
import { Combobox } from '../ui/combobox';
import { NumberInput } from '../ui/inputs';
import { readFigure } from './request-lines';
import type { TypedLine } from './request-lines';

interface LineRowProps {
  readonly line: TypedLine;
  readonly number: number;
  readonly benches: number;
  readonly errors: Readonly<Record<string, string | undefined>>;
  readonly onChange: (change: Partial<TypedLine>) => void;
  readonly onRemove: () => void;
}

const ROW =
  'grid gap-3 border-l-4 border-verdigris bg-raised p-3 sm:grid-cols-[minmax(14rem,1fr)_8.5rem_7rem_auto] sm:items-start';

/** One bottle on the tray: what, how much a bench, how many to spare, and what that comes to. */
export function SolutionRow({ line, number, benches, errors, onChange, onRemove }: LineRowProps) {
  const total = readFigure(line.volumePerBenchMl) * (benches + readFigure(line.spareBenches));
  return (
    <li className={ROW}>
      <Combobox
        id={`${line.key}-solution`}
        label={`Solution ${number}`}
        placeholder="Type a name"
        chosen={line.id ? { value: line.id, label: line.name } : null}
        onChoose={({ value, label }) => onChange({ id: value, name: label })}
        find={async (text, signal) =>
          (await findSolutions(text, signal)).map(({ id, name, storageNote }) => ({
            value: id,
            label: name,
            detail: storageNote ?? undefined,
          }))
        }
        error={errors.solutionId}
      />
      <NumberInput
        id={`${line.key}-volume`}
        label="Per bench"
        unit="mL"
        value={line.volumePerBenchMl}
        onChange={(event) => onChange({ volumePerBenchMl: event.target.value })}
        error={errors.volumePerBenchMl}
      />
      <NumberInput
        id={`${line.key}-spare`}
        label="Spare"
        unit="benches"
        value={line.spareBenches}
        onChange={(event) => onChange({ spareBenches: event.target.value })}
        error={errors.spareBenches}
      />
      <div className="flex items-end justify-between gap-3 sm:flex-col">
        <p className="font-mono text-sm whitespace-nowrap" aria-label={`Total of solution ${number}`}>
          {Number.isFinite(total) ? `= ${formatVolume(total)}` : '= –'}
        </p>
        <Button look="plain" onClick={onRemove} aria-label={`Remove solution ${number}`}>
          Remove
        </Button>
      </div>
    </li>
  );
}

/** A demonstration and how often it is shown. */
export function DemonstrationRow({ line, number, errors, onChange, onRemove }: LineRowProps) {
  return (
    <li className={ROW.replace('border-verdigris', 'border-copper')}>
      <Combobox
        id={`${line.key}-demonstration`}
        label={`Demonstration ${number}`}
        placeholder="Type a name"
        chosen={line.id ? { value: line.id, label: line.name } : null}
        onChoose={({ value, label }) => onChange({ id: value, name: label })}
        find={async (text, signal) =>
          (await findDemonstrations(text, signal)).map(({ id, name, portions }) => ({
            value: id,
            label: name,
            detail: `${portions.length} portions`,
          }))
        }
        error={errors.demonstrationId}
      />
      <NumberInput
        id={`${line.key}-times`}
        label="Shown"
        unit="times"
        value={line.performances}
        onChange={(event) => onChange({ performances: event.target.value })}
        error={errors.performances}
      />
      <span className="max-sm:hidden" />
      <div className="flex items-end justify-end sm:flex-col">
        <Button look="plain" onClick={onRemove} aria-label={`Remove demonstration ${number}`}>
          Remove
        </Button>
      </div>
    </li>
  );
}
