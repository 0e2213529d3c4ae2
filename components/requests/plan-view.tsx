import { formatMass, formatVolume } from '@/lib/client/format';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import { Formula } from '../chemistry/formula';
import { Ladder } from '../chemistry/ladder';
import { Vessel } from '../chemistry/vessel';
import { Findings } from '../hazards/findings';
import { Alert } from '../ui/alert';
import { Details } from '../ui/details';

const NEXT: Readonly<Record<RequestPlan['decision'], { tone: 'done' | 'attention' | 'stop'; text: string }>> =
  {
    clear: { tone: 'done', text: 'Agreed at once when you submit' },
    caution: { tone: 'done', text: 'Agreed at once when you submit, with cautions printed on the sheet' },
    controlled: {
      tone: 'done',
      text: 'Agreed at once when you submit, with controls to be ticked on the sheet',
    },
    review: { tone: 'attention', text: 'Goes to the safety officer when you submit' },
    stop: {
      tone: 'stop',
      text: 'Must not be made here: nobody can agree it. Change it, or submit it to ask safety',
    },
  };
const TELLING = 5;

/** What submitting will lead to, in one sentence. */
export function DecisionSentence({ decision }: { readonly decision: RequestPlan['decision'] }) {
  const { tone, text } = NEXT[decision];
  return <Alert tone={tone} title={text} />;
}

/** What each demonstration will do: the vessel, its pH and colour, and the species that tell most. */
export function PlannedDemonstrations({ plan }: { readonly plan: RequestPlan }) {
  return (
    <>
      {plan.demonstrations.map(({ demonstrationId, name, vesselMl, mix, portions, outcomeWanted }) => (
        <section key={demonstrationId} aria-label={name} className="mb-6">
          <h3 className="mb-1 font-semibold">{name}</h3>
          {outcomeWanted && <p className="mb-2 text-sm text-soft">Wanted: {outcomeWanted}</p>}
          {!mix && <Alert tone="attention" title="No equilibrium was found for this mix" />}
          {mix && (
            <div className="grid grid-cols-[minmax(7rem,10rem)_1fr] gap-4">
              <Vessel
                capacityMl={vesselMl}
                volumeMl={mix.finalVolumeMl}
                hex={mix.appearance.solution.hex}
                words={mix.appearance.solution.words}
                solids={mix.appearance.solids}
                gases={[...new Set(mix.findings.flatMap(({ gas }) => (gas ? [gas.species] : [])))]}
              />
              <div className="min-w-0">
                <p className="text-sm text-soft">
                  {portions.map(({ label, volumeMl }) => `${formatVolume(volumeMl)} ${label}`).join(' → ')}
                </p>
                <p className="mt-2 text-lg">
                  {mix.appearance.solution.words}
                  {mix.equilibrium.pH !== null && (
                    <span className="font-mono"> · pH {mix.equilibrium.pH.toFixed(2)}</span>
                  )}
                </p>
                {mix.appearance.solids.map((solid) => (
                  <p key={solid.id}>
                    {formatMass(solid.grams)} of {solid.name}
                  </p>
                ))}
                <Details summary="The most telling species">
                  <Ladder species={mix.equilibrium.species.slice(0, TELLING)} />
                </Details>
              </div>
            </div>
          )}
        </section>
      ))}
    </>
  );
}

/** What the whole request takes, in solutions and in substances. */
export function PlannedAmounts({ plan }: { readonly plan: RequestPlan }) {
  return (
    <div className="grid gap-8 md:grid-cols-2">
      <table className="h-fit w-full">
        <caption className="pb-1 text-left font-semibold">Solutions to be made</caption>
        <tbody>
          {plan.solutions.map(({ solutionId, name, volumeMl }) => (
            <tr key={solutionId} className="border-t">
              <th scope="row" className="py-1.5 text-left font-normal">
                {name}
              </th>
              <td className="text-right font-mono whitespace-nowrap">{formatVolume(volumeMl)}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <table className="h-fit w-full">
        <caption className="pb-1 text-left font-semibold">Taken from the shelves, as pure substance</caption>
        <tbody>
          {plan.substances.map(({ substance, name, formula, grams }) => (
            <tr key={substance} className="border-t">
              <th scope="row" className="py-1.5 text-left font-normal">
                {name} <Formula id={formula} />
              </th>
              <td className="text-right font-mono whitespace-nowrap">{formatMass(grams)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

export function PlannedFindings({
  plan,
  isCompact,
}: {
  readonly plan: RequestPlan;
  readonly isCompact?: boolean;
}) {
  return <Findings findings={plan.findings} isCompact={isCompact} />;
}
