'use client';

import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { TOLERANCE_CLASSES } from '@/lib/domain/quantities';
import type { ToleranceClass } from '@/lib/domain/quantities';
import { solutionEndpoints } from '@/lib/schemas/solutions';
import type { SolutionDetail } from '@/lib/schemas/solutions';
import { substanceEndpoints } from '@/lib/schemas/substances';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Combobox } from '../ui/combobox';
import { NumberInput, Select, TextArea, TextInput } from '../ui/inputs';

interface TypedSolute {
  readonly key: number;
  readonly substance: string;
  readonly name: string;
  readonly molarity: string;
}

const TOLERANCE_WORDS: Readonly<Record<ToleranceClass, string>> = {
  bench: 'bench, 5 %',
  ordinary: 'ordinary, 1 %',
  analytical: 'analytical, 0.2 %',
};

const figure = (text: string) => (text.trim() === '' ? NaN : Number(text.trim().replace(',', '.')));

/** Writes a recipe, or changes one. */
export function SolutionForm({ solution }: { readonly solution: SolutionDetail | null }) {
  const router = useRouter();
  const [name, setName] = useState(solution?.name ?? '');
  const [life, setLife] = useState(String(solution?.shelfLifeDays ?? 90));
  const [note, setNote] = useState(solution?.storageNote ?? '');
  const [toleranceClass, setTolerance] = useState<ToleranceClass>(solution?.toleranceClass ?? 'bench');
  const [solutes, setSolutes] = useState<readonly TypedSolute[]>(() =>
    solution
      ? solution.solutes.map((solute, key) => ({
          key,
          substance: solute.substance,
          name: solute.name,
          molarity: String(solute.molarity),
        }))
      : [{ key: 0, substance: '', name: '', molarity: '' }],
  );
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [key] = useState(newIdempotencyKey);
  const errorOf = (pointer: string) =>
    problem?.errors.find((error) => error.pointer === `#/${pointer}`)?.detail;
  const change = (wanted: number, patch: Partial<TypedSolute>) =>
    setSolutes((all) => all.map((solute) => (solute.key === wanted ? { ...solute, ...patch } : solute)));

  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    const body = {
      name,
      shelfLifeDays: figure(life),
      storageNote: note.trim() || null,
      toleranceClass,
      solutes: solutes.map(({ substance, molarity }) => ({ substance, molarity: figure(molarity) })),
    };
    try {
      const saved = solution
        ? await callApi(solutionEndpoints.update, {
            params: { id: solution.id },
            body: { ...body, isArchived: solution.isArchived, version: solution.version },
          })
        : await callApi(solutionEndpoints.create, { body, idempotencyKey: key });
      toast('The recipe is kept');
      router.push(`/catalogue/solutions/${saved.id}` as Route);
      router.refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
    } finally {
      setBusy(false);
    }
  };

  return (
    <form onSubmit={(event) => void save(event)} noValidate className="grid max-w-3xl gap-4">
      {problem && problem.errors.length === 0 && <Alert tone="stop" title={problem.message} />}
      <TextInput
        id="solution-name"
        label="Name"
        hint="As it should stand on the bottle."
        value={name}
        onChange={(event) => setName(event.target.value)}
        error={errorOf('name')}
      />
      {solutes.map((solute, index) => (
        <div
          key={solute.key}
          className="grid gap-3 border-l-4 border-verdigris bg-raised p-3 sm:grid-cols-[1fr_11rem_auto] sm:items-start"
        >
          <Combobox
            id={`solute-${solute.key}`}
            label={`Solute ${index + 1}`}
            placeholder="Name, formula or CAS number"
            chosen={solute.substance ? { value: solute.substance, label: solute.name } : null}
            onChoose={({ value, label }) => change(solute.key, { substance: value, name: label })}
            find={async (text, signal) =>
              (
                await callApi(substanceEndpoints.list, { query: { search: text, pageSize: 12 }, signal })
              ).items.map(({ id, name: found, formula }) => ({ value: id, label: found, detail: formula }))
            }
            error={errorOf(`solutes/${index}/substance`)}
          />
          <NumberInput
            id={`strength-${solute.key}`}
            label="Strength"
            unit="mol/L"
            value={solute.molarity}
            onChange={(event) => change(solute.key, { molarity: event.target.value })}
            error={errorOf(`solutes/${index}/molarity`)}
          />
          <Button
            look="plain"
            className="self-end"
            disabled={solutes.length === 1}
            onClick={() => setSolutes((all) => all.filter((other) => other.key !== solute.key))}
            aria-label={`Remove solute ${index + 1}`}
          >
            Remove
          </Button>
        </div>
      ))}
      <p>
        <Button
          onClick={() =>
            setSolutes((all) => [
              ...all,
              {
                key: Math.max(...all.map((solute) => solute.key)) + 1,
                substance: '',
                name: '',
                molarity: '',
              },
            ])
          }
        >
          Add a solute
        </Button>
      </p>
      <div className="grid gap-4 sm:grid-cols-2">
        <NumberInput
          id="life"
          label="Keeps for"
          unit="days"
          value={life}
          onChange={(event) => setLife(event.target.value)}
          error={errorOf('shelfLifeDays')}
        />
        <Select
          id="tolerance"
          label="Made to"
          value={toleranceClass}
          onChange={(event) => setTolerance(event.target.value as ToleranceClass)}
        >
          {TOLERANCE_CLASSES.map((name_) => (
            <option key={name_} value={name_}>
              {TOLERANCE_WORDS[name_]}
            </option>
          ))}
        </Select>
      </div>
      <TextArea
        id="storage"
        label="Storage"
        value={note}
        onChange={(event) => setNote(event.target.value)}
        error={errorOf('storageNote')}
      />
      <p>
        <Button type="submit" look="primary" isBusy={isBusy} busyText="Saving …">
          Keep the recipe
        </Button>
      </p>
    </form>
  );
}
