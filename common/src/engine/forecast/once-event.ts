import { seenVoltageV } from '../supply/cell-load.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { converted } from './converter.ts';
import type { DekadLoad } from './dekad-load.ts';
import { weighGroups } from './load-vector.ts';
import { sourceAt } from './source-tables.ts';

/** A routine that ran once: its charge, and what it was drawn at. */
export interface OnceEvent {
  routineIndex: number;
  dekadOfYear: number;
  /** Charge from the cell in excess of rest, C. */
  chargeC: number;
  /** Voltage that the load saw, V. */
  seenV: number;
}

/**
 * Open-circuit voltage that mean currents are taken at.
 *
 * @param compiled The scenario.
 * @param load The dekad.
 * @param spent Share of the starting charge that is spent.
 * @returns Voltage of the pack, V.
 * @example meanOpenCircuitV(compiled, load, 0)
 */
export function meanOpenCircuitV({ source }: CompiledScenario, load: DekadLoad, spent: number): number {
  const point = sourceAt(source, spent / load.capacityFactor, source.room.low);
  return point.openCircuitV + load.openCircuitShiftV;
}

/**
 * What a routine that runs once takes from the cell, all at its moment.
 *
 * @param compiled The scenario.
 * @param load The dekad that the moment lies in.
 * @param routineIndex The routine.
 * @param spent Share of the starting charge that is spent before.
 * @returns The event.
 * @example onceEvent(compiled, load, 0, 0).chargeC
 */
export function onceEvent(compiled: CompiledScenario, load: DekadLoad, routineIndex: number, spent: number): OnceEvent {
  const { loads, converter } = compiled;
  const seenV = seenVoltageV(converter.sight, meanOpenCircuitV(compiled, load, spent));
  const excess = weighGroups(loads.cycleExcess, routineIndex * loads.width, load.meanFactors);
  const { constantA, powerW, conductanceS } = converted(converter, excess);
  const chargeC = constantA + powerW / seenV + conductanceS * seenV;
  return { routineIndex, dekadOfYear: load.dekad.dekadOfYear, chargeC, seenV };
}
