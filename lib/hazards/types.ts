import type { Appearance, DilutedSolute, EquilibriumState, MixStep, Solute } from '../chemistry/types';

export type Severity = 'stop' | 'review' | 'controlled' | 'caution' | 'note';
/** `clear` when nothing above a note was found. */
export type Decision = 'stop' | 'review' | 'controlled' | 'caution' | 'clear';
export type Scope = 'mix' | 'order' | 'neighbours' | 'waste' | 'storage' | 'slip' | 'policy' | 'quality';

export interface GasLimit {
  readonly name: string;
  readonly ppm: number;
  readonly source: string;
}
export interface GasEstimate {
  readonly species: string;
  readonly worstCaseMoles: number;
  readonly mlAt25C: number;
  /** Worst case in the well-mixed room before any air change. */
  readonly ppmInRoom: number;
  /** Worst case in a 0.1 m3 breathing zone. */
  readonly ppmInBreathingZone: number;
  /** Predicted at the final pH by Henry's law; null where no constants are held. */
  readonly predictedPpmInBreathingZone: number | null;
  /** Equilibrium pressure just above the liquid, as ppm; null where no constants are held. */
  readonly ppmAboveLiquid: number | null;
  /** The strictest short-term limit held for the gas; null where none is held. */
  readonly limit: GasLimit | null;
  readonly limits: readonly GasLimit[];
}

export interface Finding {
  /** Rule id, or an id of our own for computed findings. */
  readonly rule: string;
  readonly severity: Severity;
  readonly scope: Scope;
  readonly title: string;
  /** One sentence with its numbers. */
  readonly reason: string;
  readonly mustNot: string | null;
  readonly gas: GasEstimate | null;
  readonly precautions: readonly string[];
  readonly alternative: string | null;
  readonly source: string;
  /** Labels of the bottles or portions concerned. */
  readonly concerns: readonly string[];
}

export interface Room {
  readonly volumeM3: number;
  readonly airChangesPerHour: number;
  readonly fumeCupboard: boolean;
}

/** One bottle or portion as screened: what it holds, how much, where it is named. */
export interface BottleContent {
  readonly label: string;
  readonly volumeMl: number;
  readonly solutes: readonly Solute[];
}

export interface HazardStatement {
  readonly code: string;
  readonly text: string;
  readonly because: string;
}
export interface Classification {
  readonly signalWord: 'Danger' | 'Warning' | null;
  readonly pictograms: readonly string[];
  readonly hazards: readonly HazardStatement[];
  readonly precautions: readonly string[];
  readonly supplemental: readonly string[];
  /** Ingredients without data, so that "not classified" can't be claimed. */
  readonly incomplete: readonly string[];
}

/** One plausible slip and what the same screen says of it. */
export interface Slip {
  readonly kind:
    | 'too-strong'
    | 'doubled'
    | 'swapped'
    | 'reversed'
    | 'left-out'
    | 'wrong-substance'
    | 'wrong-bottle'
    | 'overnight'
    | 'wrong-jar';
  /** Whole sentence, beginning with "If". */
  readonly sentence: string;
  readonly decision: Decision;
  /** The gravest finding that the slip brings. */
  readonly finding: Finding;
  /** Labels of the portions that are handled wrongly. */
  readonly concerns: readonly string[];
}
export interface SlipReport {
  /** How many slips were tried. */
  readonly tried: number;
  /** Those that make the decision graver, gravest first. */
  readonly raised: readonly Slip[];
  readonly stops: number;
  /** "3 of 26 single slips lead to a stop." */
  readonly summary: string;
  /** The one change that removes most of them; null where none is needed. */
  readonly separation: string | null;
}

/** The answer about one mix: what the vessel holds after every pour, what was found, how it is labelled. */
export interface MixPreview {
  readonly finalVolumeMl: number;
  readonly diluted: readonly DilutedSolute[];
  readonly steps: readonly MixStep[];
  readonly equilibrium: EquilibriumState;
  readonly appearance: Appearance;
  /** Gravest first. */
  readonly findings: readonly Finding[];
  readonly classification: Classification;
  readonly decision: Decision;
  /** Only where asked for. */
  readonly slips?: SlipReport;
}
