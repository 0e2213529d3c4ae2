import 'server-only';
import { formatISO } from 'date-fns';
import type { Viewer } from '@/lib/domain/roles';
import { planBatches } from '@/lib/planning/batches';
import { dayNumber, isoDayOf } from '@/lib/planning/days';
import type { Need } from '@/lib/schemas/needs';
import { EquipmentModel } from '@/models/equipment';
import { SolutionModel } from '@/models/solution';
import { rowsById } from './lookup';
import { listNeeds } from './needs';

/** One batch that would serve several needs at once. Days are ISO days. */
export interface BatchProposal {
  readonly solutionId: string;
  readonly solutionName: string;
  readonly makeOn: string;
  readonly notBefore: string;
  readonly notAfter: string;
  readonly volumeMl: number;
  readonly needs: readonly Need[];
}

export interface BatchProposals {
  readonly proposals: readonly BatchProposal[];
  /** Needs whose session is over or that no day is left for. */
  readonly late: readonly Need[];
  /** Batches saved against one for each request. */
  readonly saved: number;
}

/** More open needs than this are planned in parts; the soonest come first. */
const MOST_NEEDS = 200;

/** The fewest batches that make all that is open, each on the latest day that serves all of its requests. */
export async function proposeBatches(viewer: Viewer): Promise<BatchProposals> {
  const { items: needs } = await listNeeds(viewer, {
    page: 1,
    pageSize: MOST_NEEDS,
    sort: 'makeBy',
    search: '',
    format: 'json',
    show: 'open',
  });
  const today = formatISO(new Date(), { representation: 'date' });
  const [solutions, flasks] = await Promise.all([
    rowsById(
      SolutionModel,
      needs.map(({ solutionId }) => solutionId),
    ),
    EquipmentModel.findAll({ where: { kind: 'flask' } }),
  ]);
  const sizes = flasks.flatMap(({ capacityMl }) => (capacityMl ? [capacityMl] : []));
  const vesselsMl = sizes.length > 0 ? sizes : [Math.max(1, ...needs.map(({ openMl }) => openMl))];
  const byId = new Map(needs.map((need) => [need.id, need]));
  const isoDay = (moment: string) => formatISO(new Date(moment), { representation: 'date' });
  const plan = planBatches(
    needs.map((need) => {
      const solution = solutions.get(need.solutionId);
      // What should have been ready is still made on the day itself, as long as the session is not over.
      const sessionDay = isoDay(need.startsAt);
      const neededOn = need.makeBy < today && sessionDay >= today ? today : need.makeBy;
      const keepsDays = dayNumber(neededOn) - dayNumber(need.notBefore);
      return {
        id: need.id,
        solutionId: need.solutionId,
        volumeMl: need.openMl,
        neededOnDay: dayNumber(neededOn),
        shelfLifeDays: solution?.sameDayOnly ? 0 : Math.max(0, keepsDays),
        leadDays: 0,
      };
    }),
    { isWorkingDay: () => true, fromDay: dayNumber(today), vesselsMl },
  );
  const needsOf = (ids: readonly string[]) => ids.flatMap((id) => byId.get(id) ?? []);
  return {
    proposals: plan.batches.map(({ solutionId, makeOnDay, window, needIds, volumeMl }) => ({
      solutionId,
      solutionName: solutions.get(solutionId)?.name ?? '',
      makeOn: isoDayOf(makeOnDay),
      notBefore: isoDayOf(window.earliestDay),
      notAfter: isoDayOf(window.latestDay),
      volumeMl,
      needs: needsOf(needIds),
    })),
    late: needsOf(plan.impossible.map(({ needId }) => needId)),
    saved: plan.saved,
  };
}
