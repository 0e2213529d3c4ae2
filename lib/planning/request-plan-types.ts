import type { Classification, Decision, Finding, MixPreview, Room } from '../hazards/types';

/** The frozen answer to a request. Plain JSON; its hash names it in reviews. */
export interface RequestPlan {
  readonly session: PlannedSession;
  readonly solutions: readonly PlannedSolution[];
  readonly demonstrations: readonly PlannedDemonstration[];
  /** What all of it takes from the shelves, of assay-free pure substance. */
  readonly substances: readonly PlannedSubstance[];
  /** Every finding, gravest first: those of each mix, of the bottles beside each other, of local policy. */
  readonly findings: readonly Finding[];
  readonly decision: Decision;
}

export interface PlannedSession {
  readonly course: string;
  readonly title: string;
  /** ISO moment in UTC. */
  readonly startsAt: string;
  readonly roomName: string;
  readonly room: Room;
  readonly benches: number;
}

export interface PlannedSolution {
  readonly solutionId: string;
  readonly name: string;
  readonly solutes: readonly {
    readonly substance: string;
    readonly name: string;
    readonly formula: string;
    readonly molarity: number;
  }[];
  /** For all benches, spare ones and demonstrations together. */
  readonly volumeMl: number;
  readonly shelfLifeDays: number;
  readonly classification: Classification;
}

export interface PlannedDemonstration {
  readonly demonstrationId: string;
  readonly name: string;
  readonly outcomeWanted: string | null;
  readonly vesselMl: number;
  readonly performances: number;
  readonly portions: readonly {
    readonly solutionId: string;
    readonly label: string;
    readonly volumeMl: number;
  }[];
  /** null where no equilibrium was found; a finding then says so. */
  readonly mix: MixPreview | null;
}

export interface PlannedSubstance {
  readonly substance: string;
  readonly name: string;
  readonly formula: string;
  readonly grams: number;
}
