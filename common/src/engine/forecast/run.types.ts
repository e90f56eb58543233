import type { DekadPoint, Outcome } from './forecast.types.ts';
import type { DekadLoad } from './dekad-load.ts';
import type { LeastHeadroom } from './first-failure.ts';
import type { OnceEvent } from './once-event.ts';

/** A part of life under one dekad's conditions, without a jump inside. */
export interface Stretch {
  load: DekadLoad;
  fromS: number;
  toS: number;
  fromSpent: number;
  toSpent: number;
}

/** What one calendar dekad has seen over life: sums that give every charge. */
export interface Usage {
  timeS: Float64Array;
  /** ∫ 1/u dt of the voltage that loads see, s/V, by dekad of the year. */
  perVoltS: Float64Array;
  /** ∫ u dt, V·s. */
  voltS: Float64Array;
  /** ∫ (share of the starting charge that is left) dt, s. */
  leftS: Float64Array;
  once: OnceEvent[];
}

/** A life at the mean-current level. */
export interface Run {
  outcome: Exclude<Outcome, 'oversubscribed'>;
  startingC: number;
  firstYearCellA: number | null;
  /** End of life, or the horizon, s. */
  endS: number;
  spent: number;
  /** Conditions of the dekad of the end, and how many dekads of life have begun. */
  endLoad: DekadLoad;
  dekadOfLife: number;
  /** The critical moment at the end; null when charge ended life, or nothing is ever on. */
  critical: LeastHeadroom | null;
  isExhausted: boolean;
  points: DekadPoint[];
  /** Kept where the supply has a monitor. */
  stretches: Stretch[];
  usage: Usage;
}
