import { loadCurrentA } from '../supply/cell-load.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import type { DekadLoad } from './dekad-load.ts';
import type { LeastHeadroom } from './first-failure.ts';
import type { DekadPoint } from './forecast.types.ts';
import { meanOpenCircuitV } from './once-event.ts';

export interface PointState {
  startingC: number;
  spent: number;
  timeS: number;
  least: LeastHeadroom | null;
  /** Charge drawn and lost since the last point, C, and how long ago that was, s. */
  drawnC: number;
  lostC: number;
  sinceS: number;
}

/**
 * State of the node at the end of a dekad, or of life. Currents are means since the last point; at a point that no time leads to,
 * as a failure at the border of a dekad, those of the moment.
 *
 * @param compiled The scenario.
 * @param load The dekad.
 * @param state Where life stands.
 * @returns The point.
 * @example dekadPoint(compiled, load, state).remainingC
 */
export function dekadPoint(
  compiled: CompiledScenario,
  load: DekadLoad,
  { startingC, spent, timeS, least, drawnC, lostC, sinceS }: PointState,
): DekadPoint {
  const { month, dekadOfYear, meanC, coldestC } = load.dekad;
  const openCircuitV = meanOpenCircuitV(compiled, load, spent);
  const remainingC = startingC * Math.max(0, 1 - spent);
  const hasTime = sinceS > 0;
  return {
    timeS,
    month,
    dekadOfYear,
    remainingC,
    openCircuitV,
    loadedV: least?.loadedV ?? openCircuitV,
    limitV: least?.limitV ?? 0,
    headroomV: least?.headroomV ?? openCircuitV,
    meanC,
    coldestC,
    currentA: hasTime ? drawnC / sinceS : loadCurrentA(load.mean.load, compiled.converter.sight, openCircuitV),
    selfDischargeA: hasTime ? lostC / sinceS : load.mean.selfDischargePerS * remainingC,
  };
}
