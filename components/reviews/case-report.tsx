import Link from 'next/link';
import { stateWords } from '@/lib/domain/states';
import type { ReviewCase } from '@/lib/schemas/reviews';
import type { PlannedDemonstration, RequestPlan } from '@/lib/planning/request-plan-types';
import { Ladder } from '../chemistry/ladder';
import { Vessel } from '../chemistry/vessel';
import { Findings } from '../hazards/findings';
import { Alert } from '../ui/alert';
import { Amount } from '../ui/amount';
import { DefinitionList } from '../ui/definition-list';
import { Details } from '../ui/details';
import { Moment } from '../ui/moment';
import { Section } from '../ui/section';

/** The case as a short report: what is asked, what will happen, what was found, what was decided before. */
export function CaseReport({ review }: { readonly review: ReviewCase }) {
  const plan = review.plan as unknown as RequestPlan;
  return (
    <>
      {review.decisionText !== null && review.reviewerName && (
        <div className="mb-6">
          <Alert
            tone={review.state === 'refused' || review.state === 'returned' ? 'attention' : 'done'}
            title={`${stateWords(review.state)} by ${review.reviewerName}`}
          >
            {review.decisionText}
            {review.conditions.length > 0 && (
              <ul className="list-disc pl-5">
                {review.conditions.map((line) => (
                  <li key={line}>{line}</li>
                ))}
              </ul>
            )}
          </Alert>
        </div>
      )}
      <Section title="What is asked">
        <DefinitionList
          items={[
            [
              'Room',
              `${plan.session.roomName}, ${plan.session.room.volumeM3} m³, ${plan.session.room.airChangesPerHour} air changes an hour, ${plan.session.room.fumeCupboard ? 'with' : 'no'} fume cupboard`,
            ],
            ['Benches', String(plan.session.benches)],
            [
              'Request',
              <Link key="request" href={`/requests/${review.requestId}`}>
                {review.requestCode}
              </Link>,
            ],
            [
              'Plan',
              <code key="hash" className="font-mono text-sm break-all">
                {review.planHash}
              </code>,
            ],
          ]}
        />
        <table className="mt-4 w-full max-w-3xl">
          <thead>
            <tr className="border-b border-line text-left text-sm">
              <th scope="col">Solution</th>
              <th scope="col" className="text-right">
                In all
              </th>
            </tr>
          </thead>
          <tbody>
            {plan.solutions.map(({ solutionId, name, volumeMl }) => (
              <tr key={solutionId} className="border-b">
                <td className="py-1.5">{name}</td>
                <td className="text-right">
                  <Amount value={volumeMl} unit="mL" />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </Section>
      <Section title="What was found">
        <Findings findings={plan.findings} />
      </Section>
      {plan.demonstrations.map((demonstration) => (
        <Section key={demonstration.demonstrationId} title={`What will happen: ${demonstration.name}`}>
          <WhatHappens demonstration={demonstration} />
        </Section>
      ))}
      {review.earlier.length > 0 && (
        <Section title="Decided before on the same pattern">
          <ul>
            {review.earlier.map((earlier) => (
              <li key={earlier.id} className="border-b py-2">
                <Link href={`/reviews/${earlier.id}`}>
                  {earlier.requestCode}: {earlier.headline}
                </Link>{' '}
                – {stateWords(earlier.state)} by {earlier.reviewerName}
                {earlier.decidedAt && (
                  <>
                    , <Moment at={earlier.decidedAt} style="short-day" />
                  </>
                )}
              </li>
            ))}
          </ul>
        </Section>
      )}
    </>
  );
}

function WhatHappens({ demonstration }: { readonly demonstration: PlannedDemonstration }) {
  const { mix, portions, vesselMl } = demonstration;
  if (!mix) return <Alert tone="attention" title="No equilibrium was found for this mix; judge it by hand" />;
  const { equilibrium, appearance } = mix;
  return (
    <div className="grid gap-6 md:grid-cols-[minmax(10rem,14rem)_1fr]">
      <Vessel
        capacityMl={vesselMl}
        volumeMl={mix.finalVolumeMl}
        hex={appearance.solution.hex}
        words={appearance.solution.words}
        solids={appearance.solids}
        gases={mix.findings.flatMap(({ gas }) => (gas ? [gas.species] : []))}
      />
      <div className="min-w-0">
        <ol className="mb-3 list-decimal pl-5">
          {portions.map(({ label, volumeMl }, index) => (
            <li key={`${label}-${index}`}>
              <Amount value={volumeMl} unit="mL" /> of {label}
            </li>
          ))}
        </ol>
        <p className="mb-3">
          Final pH {equilibrium.pH === null ? 'not computed' : equilibrium.pH.toFixed(2)};{' '}
          {appearance.solution.words}
          {appearance.solids.length > 0 &&
            `, with ${appearance.solids.map(({ name }) => name).join(' and ')} settled`}
          .
        </p>
        <Details summary="Every species">
          <Ladder species={equilibrium.species} />
        </Details>
      </div>
    </div>
  );
}
