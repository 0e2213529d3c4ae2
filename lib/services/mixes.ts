import 'server-only';
import { gasId } from '@/lib/chemistry/reaction-system';
import { speciate } from '@/lib/chemistry/speciation';
import { findReaction, isMasterComponent } from '@/lib/chemistry/species-catalogue';
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

function strangersIn(body: SpeciationBody): FieldError[] {
  return body.reactions === 'catalogue'
    ? Object.keys(body.amounts)
        .filter((id) => !isMasterComponent(id))
        .map((id) => ({
          pointer: `#/amounts/${escapePointer(id)}`,
          detail: 'This is not a component of the catalogue.',
        }))
    : repeatedIn(body.reactions, Object.keys(body.amounts));
}

function repeatedIn(
  reactions: Exclude<SpeciationBody['reactions'], string>,
  totals: readonly string[],
): FieldError[] {
  const components = new Set([...totals, ...reactions.flatMap(({ stoich }) => Object.keys(stoich))]);
  const seen = new Set<string>();
  return reactions.flatMap(({ species }, index) => {
    const pointer = `#/reactions/${index}/species`;
    const isRepeated = seen.has(species);
    seen.add(species);
    if (components.has(species)) return [{ pointer, detail: 'This species is also a component.' }];
    return isRepeated ? [{ pointer, detail: 'This species is formed twice.' }] : [];
  });
}

/** Open gases that nothing forms. */
function groundlessGasesIn({ headspace, reactions }: SpeciationBody): FieldError[] {
  if (headspace.kind !== 'open') return [];
  return Object.keys(headspace.partialPressuresBar)
    .filter((name) =>
      reactions === 'catalogue'
        ? findReaction(gasId(name)) === null
        : !reactions.some(({ species, phase }) => phase === 'g' && species === gasId(name)),
    )
    .map((name) => ({
      pointer: `#/headspace/partialPressuresBar/${escapePointer(name)}`,
      detail: `No reaction forms ${gasId(name)}.`,
    }));
}

/** @throws DomainError `invalid` where a component or gas is not known or a species stands twice, `not-converged` */
export function computeSpeciation(body: SpeciationBody): EquilibriumState {
  const errors = [...strangersIn(body), ...groundlessGasesIn(body)];
  if (errors.length > 0) throw invalid(errors);
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
