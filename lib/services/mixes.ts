import 'server-only';
import { speciate } from '@/lib/chemistry/speciation';
import { isMasterComponent } from '@/lib/chemistry/species-catalogue';
import { findSubstance } from '@/lib/chemistry/substances';
import type { EquilibriumState, NotConverged } from '@/lib/chemistry/types';
import { DomainError, invalid } from '@/lib/domain/errors';
import type { FieldError } from '@/lib/domain/errors';
import { previewMix } from '@/lib/hazards/preview';
import type { MixPreview } from '@/lib/hazards/types';
import type { MixPreviewBody, SpeciationBody } from '@/lib/schemas/mixes';

function escapePointer(key: string): string {
  return key.replaceAll('~', '~0').replaceAll('/', '~1');
}

/** @throws DomainError `not-converged` carrying the residuals */
function refuse(outcome: NotConverged): never {
  throw new DomainError('not-converged', outcome.message, {
    data: { reason: outcome.reason, iterations: outcome.iterations, residuals: outcome.residuals },
  });
}

/** @throws DomainError `invalid` where a component is not in the catalogue, `not-converged` */
export function computeSpeciation(body: SpeciationBody): EquilibriumState {
  const unknown: FieldError[] = [];
  if (body.reactions === 'catalogue') {
    for (const id of Object.keys(body.amounts)) {
      if (!isMasterComponent(id))
        unknown.push({
          pointer: `#/amounts/${escapePointer(id)}`,
          detail: 'This is not a component of the catalogue.',
        });
    }
  } else {
    const components = new Set([
      ...Object.keys(body.amounts),
      ...body.reactions.flatMap(({ stoich }) => Object.keys(stoich)),
    ]);
    const seen = new Set<string>();
    body.reactions.forEach(({ species }, index) => {
      if (components.has(species))
        unknown.push({
          pointer: `#/reactions/${index}/species`,
          detail: 'This species is also a component.',
        });
      if (seen.has(species))
        unknown.push({ pointer: `#/reactions/${index}/species`, detail: 'This species is formed twice.' });
      seen.add(species);
    });
  }
  if (unknown.length > 0) throw invalid(unknown);
  const outcome = speciate(body);
  return outcome.converged ? outcome : refuse(outcome);
}

/** @throws DomainError `invalid` for each substance that is not in the catalogue, `not-converged` */
export function computePreview({
  portions,
  activity,
  temperatureC,
  room,
  slips,
}: MixPreviewBody): MixPreview {
  const unknown = portions.flatMap(({ solutes }, portion) =>
    solutes.flatMap(({ substance }, index) =>
      findSubstance(substance)
        ? []
        : [
            {
              pointer: `#/portions/${portion}/solutes/${index}/substance`,
              detail: 'This substance is not in the catalogue.',
            },
          ],
    ),
  );
  if (unknown.length > 0) throw invalid(unknown);
  const outcome = previewMix({ portions, activity, temperatureC, room, slips });
  return 'converged' in outcome ? refuse(outcome) : outcome;
}
