import type { CalendarDekad } from '../climate/dekads.ts';
import type { CellLoad } from '../supply/cell-load.ts';
import type { CandidateLists, TestCase } from './candidates.ts';

/** What decides at one temperature whether the node works. */
export interface TestConditions {
  temperatureC: number;
  /** Share of the capacity that can be had, 0 to 1. */
  capacityFactor: number;
  /** Added to the pack's open-circuit voltage of 20 °C, V. */
  openCircuitShiftV: number;
  /** Of the pack's resistance against that of 20 °C. */
  resistanceFactor: number;
  cases: TestCase[];
  /** Rest alone, for the monitor. */
  restCases: TestCase[];
}

/** A stretch of spent charge along which the seen voltage of mean currents is linear. */
export interface MeanPiece {
  fromSpent: number;
  /** Infinity for the last. */
  toSpent: number;
  /** Voltage that loads see at the beginning, V. */
  seenV: number;
  /** Its change per unit of spent charge, V. */
  slopeV: number;
}

/** What draws the charge down during a dekad. */
export interface MeanLoad {
  load: CellLoad;
  selfDischargePerS: number;
  pieces: MeanPiece[];
}

/** Everything that a dekad of the calendar brings, the same in each year of life. */
export interface DekadLoad {
  dekad: CalendarDekad;
  /** Cycles per second by routine while it is on in this dekad, otherwise 0. */
  ratesPerS: Float64Array;
  /** Factor by temperature group, averaged over the day. */
  meanFactors: number[];
  capacityFactor: number;
  openCircuitShiftV: number;
  mean: MeanLoad;
  lists: CandidateLists;
  cold: TestConditions;
}
