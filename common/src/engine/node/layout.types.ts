import type { Occupant } from './node-program.types.ts';
import type { Hop, PartModel, StateModel } from './part-model.ts';

/** A step made ready for the timeline. */
export interface StepModel {
  /** State of each part by part index; undefined where the step does not name the part. */
  named: readonly (StateModel | undefined)[];
  durationUs: number;
  durationS: number;
  termsS: readonly number[];
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
  /** Number of the layout's spans among which all that overlap this window are found. */
  spanCount: number;
}

/** One cycle of a routine laid out in time. */
export interface Layout {
  spans: Span[];
  claims: BusyClaim[];
  windows: LaidWindow[];
  cycleUs: number;
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
