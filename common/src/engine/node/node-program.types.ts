import type { PhaseId } from '../link/exchange-plan.types.ts';
import type { LoadLaw, Schedule } from '../scenario/scenario.types.ts';

/** What a state, transition or leakage takes from the rail: the typical current with its law. */
export interface Draw {
  /** Current at the reference voltage and temperature, A. */
  currentA: number;
  law: LoadLaw;
  referenceVoltageV: number;
  referenceTemperatureC: number;
  /** Temperature rise that doubles the current, K; null: no dependence. */
  doublingK: number | null;
}

/** What a part is doing for some time: in a state, or on the way from one state to another. */
export type Activity =
  { kind: 'state'; stateId: string } | { kind: 'transition'; fromStateId: string; toStateId: string };

/** A part that is not simply resting during an interval. */
export interface Occupant {
  /** Index into NodeProgram.parts. */
  partIndex: number;
  activity: Activity;
  draw: Draw;
  /** Lowest rail voltage that this activity needs, V: the highest of the part's and the state's own limit; 0 where none applies. */
  lowestVoltageV: number;
}

/**
 * A stretch of a routine's cycle in which no part changes its activity. A step with a part returning beside it is cut into
 * two intervals of the same step. Intervals after the last step ('return') lie beyond the cycle and delay nobody.
 */
export interface Interval {
  /**
   * Unique in the node, stable between calls: `<routineId>/<stepId>`, for a phase of an exchange `<routineId>/<stepId>/<phase>`,
   * with a suffix where there are several.
   */
  id: string;
  kind: 'step' | 'move' | 'return';
  /** The step it belongs to; for a move the step that it leads into, for a return after the last step that last step. */
  stepId: string;
  stepName: string;
  /** Phase of the exchange that this is a part of; null for steps that are none, and for moves and returns. */
  phase: { id: PhaseId; name: string } | null;
  /** Offset from the start of the cycle, s. */
  startS: number;
  /** Mean duration, s, all repeats together, unrounded. */
  durationS: number;
  /** Longest duration, s: of an exchange at its worst; otherwise equal to `durationS`. */
  worstS: number;
  /** Longest uninterrupted stretch, s, for which a cell has to bear it at once; otherwise equal to `durationS`. */
  longestS: number;
  /** Parts not at rest; parts not listed rest. */
  occupants: Occupant[];
}

/** One line of the charge account of a routine: a part in a state, or a transition, within a step. */
export interface Segment {
  stepId: string;
  partIndex: number;
  activity: Activity;
  draw: Draw;
  /** Time per cycle, s, as a sum of typed terms kept apart so that decimal arithmetic stays exact. */
  durationTermsS: readonly number[];
}

export interface RoutineProgram {
  routineId: string;
  name: string;
  schedule: Schedule;
  /** Steps and moves into them; returns to rest are not part of it. */
  cycleS: number;
  intervals: Interval[];
  segments: Segment[];
}

export interface PartProgram {
  partId: string;
  name: string;
  restStateId: string;
  restDraw: Draw;
  /** Lowest rail voltage of the rest state itself, V; 0 where none is given. */
  restLowestVoltageV: number;
}

/** Remark of the compiler that is no error, for example a part that moves instantly. */
export interface NodeRemark {
  code: string;
  message: string;
  path: string;
}

/** A node made ready for charge and voltage: enabled routines only, typical values, links and paths resolved. */
export interface NodeProgram {
  parts: PartProgram[];
  leakages: { leakageId: string; name: string; draw: Draw }[];
  routines: RoutineProgram[];
  remarks: NodeRemark[];
}
