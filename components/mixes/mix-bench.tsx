'use client';

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useDeferredValue, useEffect, useState } from 'react';
import { callApi } from '@/lib/client/api';
import { formatMass } from '@/lib/client/format';
import { findSolutions } from '@/lib/client/requests';
import { mixEndpoints } from '@/lib/schemas/mixes';
import type { Demonstration } from '@/lib/schemas/demonstrations';
import { Ladder } from '../chemistry/ladder';
import { Vessel } from '../chemistry/vessel';
import { Findings } from '../hazards/findings';
import { Alert } from '../ui/alert';
import { Combobox } from '../ui/combobox';
import { NumberInput } from '../ui/inputs';
import { Section } from '../ui/section';
import { Skeleton } from '../ui/skeleton';
import { newPortion, previewBody } from './portion';
import type { BenchPortion } from './portion';
import { PortionRow } from './portion-row';
import { SaveDemonstration } from './save-demonstration';

const PREVIEW_DELAY_MS = 120;

/** The bench for trying: portions at the left, the vessel in the middle, the species at the right. */
export function MixBench({
  demonstration,
  maySave,
}: {
  readonly demonstration: Demonstration | null;
  readonly maySave: boolean;
}) {
  const [portions, setPortions] = useState<readonly BenchPortion[]>(() =>
    (demonstration?.portions ?? []).map((portion) => newPortion(portion)),
  );
  const [vesselMl, setVesselMl] = useState(String(demonstration?.vesselMl ?? 250));
  const [rested, setRested] = useState(portions);
  useEffect(() => {
    const timer = setTimeout(() => setRested(portions), PREVIEW_DELAY_MS);
    return () => clearTimeout(timer);
  }, [portions]);
  const body = previewBody(useDeferredValue(rested));
  const preview = useQuery({
    queryKey: ['mix-preview', body],
    queryFn: ({ signal }) => callApi(mixEndpoints.preview, { body, signal }),
    enabled: rested.length > 0,
    placeholderData: keepPreviousData,
    retry: false,
  });

  const change = (key: string, volumeMl: number) =>
    setPortions((all) => all.map((portion) => (portion.key === key ? { ...portion, volumeMl } : portion)));
  const shift = (index: number, by: number) =>
    setPortions((all) => {
      const next = [...all];
      const [moved] = next.splice(index, 1);
      if (moved) next.splice(index + by, 0, moved);
      return next;
    });
  const mix = portions.length > 0 ? preview.data : undefined;
  const capacity = Number(vesselMl.replace(',', '.')) || 250;

  return (
    <div className="grid gap-8 lg:grid-cols-[minmax(18rem,1.1fr)_minmax(12rem,0.7fr)_minmax(18rem,1.1fr)]">
      <div className="min-w-0">
        <Section title="Poured in this order">
          <ol className="space-y-3">
            {portions.map((portion, index) => (
              <PortionRow
                key={portion.key}
                portion={portion}
                number={index + 1}
                most={capacity}
                isFirst={index === 0}
                isLast={index === portions.length - 1}
                onVolume={(volumeMl) => change(portion.key, volumeMl)}
                onShift={(by) => shift(index, by)}
                onRemove={() => setPortions((all) => all.filter(({ key }) => key !== portion.key))}
              />
            ))}
          </ol>
          <Combobox
            id="add-portion"
            label="Pour another solution"
            placeholder="Type a name"
            className="mt-4"
            chosen={null}
            onChoose={({ value, label }) => {
              void findSolutions(label, new AbortController().signal).then((found) => {
                const solution = found.find(({ id }) => id === value);
                if (solution)
                  setPortions((all) => [
                    ...all,
                    newPortion({
                      label: solution.name,
                      solutionId: solution.id,
                      solutes: solution.solutes.map(({ substance, molarity }) => ({ substance, molarity })),
                      volumeMl: 25,
                    }),
                  ]);
              });
            }}
            find={async (text, signal) =>
              (await findSolutions(text, signal)).map(({ id, name }) => ({ value: id, label: name }))
            }
          />
          <NumberInput
            id="vessel"
            label="Vessel"
            unit="mL"
            className="mt-4 w-40"
            value={vesselMl}
            onChange={(event) => setVesselMl(event.target.value)}
          />
        </Section>
        {maySave && portions.length >= 2 && <SaveDemonstration portions={portions} vesselMl={capacity} />}
      </div>
      <div className="min-w-0" aria-live="polite">
        {portions.length === 0 && (
          <p className="text-soft">Pour two solutions together to see what they do.</p>
        )}
        {preview.isFetching && !mix && portions.length > 0 && <Skeleton lines={6} />}
        {preview.error && <Alert tone="attention" title={preview.error.message} />}
        {mix && (
          <>
            <Vessel
              capacityMl={capacity}
              volumeMl={mix.finalVolumeMl}
              hex={mix.appearance.solution.hex}
              words={mix.appearance.solution.words}
              solids={mix.appearance.solids}
              gases={[...new Set(mix.findings.flatMap(({ gas }) => (gas ? [gas.species] : [])))]}
            />
            <p className="mt-2 text-center text-lg">
              {mix.appearance.solution.words}
              {mix.equilibrium.pH !== null && (
                <span className="font-mono"> · pH {mix.equilibrium.pH.toFixed(2)}</span>
              )}
            </p>
            {mix.appearance.solids.map((solid) => (
              <p key={solid.id} className="text-center">
                {formatMass(solid.grams)} of {solid.name}
              </p>
            ))}
            {mix.finalVolumeMl > capacity && <Alert tone="attention" title="It does not fit the vessel" />}
          </>
        )}
      </div>
      <div className="min-w-0">
        {mix && (
          <>
            <Section title="Species">
              <Ladder species={mix.equilibrium.species} />
            </Section>
            <Section title="Findings">
              <Findings findings={mix.findings} isCompact />
            </Section>
            {mix.equilibrium.notes.length > 0 && (
              <Section title="Before you trust the figures">
                <ul className="list-disc pl-5 text-sm">
                  {mix.equilibrium.notes.map(({ message }) => (
                    <li key={message}>{message}</li>
                  ))}
                </ul>
              </Section>
            )}
          </>
        )}
      </div>
    </div>
  );
}
