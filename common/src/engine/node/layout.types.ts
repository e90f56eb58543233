import type { PhaseId } from '../link/exchange-plan.types.ts';
import type { Step } from '../scenario/scenario.types.ts';
import type { Occupant } from './node-program.types.ts';
import type { Hop, PartModel, StateModel } from './part-model.ts';

/** A step, or a phase of an exchange step, made ready for the timeline. */
export interface StepModel {
  step: Step;
  /** Path of the step in the input. */
  path: string;
  phase: { id: PhaseId; name: string } | null;
  /** Radio whose states the phases set, by part index; −1 for steps that are no phase. */
  radioIndex: number;
  /** What follows `<routineId>/<stepId>` in the ids of its intervals. */
  suffix: string;
  /** State of each part by part index; undefined where the step does not name the part. */
  named: readonly (StateModel | undefined)[];
  /** On the timeline, where derived durations are whole microseconds. */
  durationUs: number;
  /** Unrounded. */
  durationS: number;
  termsS: readonly number[];
  worstS: number;
  longestS: number;
}

/** A time during which one part does one thing other than resting. */
export interface Span {
  occupant: Occupant;
  startUs: number;
  endUs: number;
  termsS: readonly number[];
  stepIndex: number;
  /** Holding the state of the step before while other parts move; a transition's `busy` takes precedence over that. */
  isHeld: boolean;
}

/** A part that a transition keeps in a state while it runs. */
export interface BusyClaim {
  hop: Hop;
  /** Index of the part that moves. */
  moverIndex: number;
  startUs: number;
  endUs: number;
  stepIndex: number;
}

/** Moves before a step, a step, or the returns after the last step. */
export interface LaidWindow {
  kind: 'move' | 'step' | 'return';
  stepIndex: number;
  startUs: number;
  endUs: number;
  durationS: number;
  worstS: number;
  longestS: number;
  /** Number of the layout's spans among which all that overlap this window are found. */
  spanCount: number;
}

/** One cycle of a routine laid out in time. */
export interface Layout {
  spans: Span[];
  claims: BusyClaim[];
  windows: LaidWindow[];
  cycleUs: number;
  /** What the rounding of derived durations took from the cycle, s; may be negative. */
  roundedOffS: number;
  /** Indices of parts that changed state without any declared transition. */
  instantMovers: Set<number>;
}

/** What the layout needs to know of a routine; `onNoPath` is told each move that has no path. */
export interface LayOutInput {
  parts: readonly PartModel[];
  steps: readonly StepModel[];
  /** Whether the first step follows the last one. */
  isCyclic: boolean;
  onNoPath: (part: PartModel, from: StateModel, to: StateModel, stepIndex: number) => void;
}
