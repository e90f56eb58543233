import { powerCurrentA } from './constant-power.ts';

/**
 * Current that a load takes from the cell, as a function of the cell's voltage V: `I = constantA + powerW/u + conductanceS·u` at
 * the voltage `u = min(ceilingV, V − dropV)` that the load sees. Without a regulator u is V; behind a linear one u is its output,
 * or V less the dropout; a switching one makes the load a constant power at V.
 */
export interface CellLoad {
  constantA: number;
  powerW: number;
  conductanceS: number;
}

/** The voltage that loads see: `min(ceilingV, V − dropV)`. */
export interface LoadSight {
  dropV: number;
  /** Infinity where nothing holds the voltage. */
  ceilingV: number;
}

/**
 * Voltage of a source under a load, with the load's own dependence on voltage solved exactly.
 *
 * Where the load sees a held voltage its current is fixed: `V = Voc − R·I`. Otherwise
 * `u·(1 + R·g) = Voc − drop − R·c − R·p/u`, a quadratic whose larger root is the operating point.
 *
 * @param load The load.
 * @param sight What it sees of the cell's voltage.
 * @param openCircuitV Open-circuit voltage of the pack, V.
 * @param resistanceOhm Resistance of the pack, Ω, 0 or more.
 * @returns Voltage at the pack, V; NaN when there is no operating point: the source collapses.
 * @example loadedVoltageV({ constantA: 0.1, powerW: 0, conductanceS: 0 }, { dropV: 0, ceilingV: Infinity }, 3, 2) // 2.8
 */
export function loadedVoltageV(load: CellLoad, sight: LoadSight, openCircuitV: number, resistanceOhm: number): number {
  const { constantA, powerW, conductanceS } = load;
  const { dropV, ceilingV } = sight;
  if (ceilingV !== Infinity) {
    const heldV = openCircuitV - resistanceOhm * (constantA + powerW / ceilingV + conductanceS * ceilingV);
    if (heldV >= ceilingV + dropV) return heldV;
  }
  // The parallel conductance and the constant current make another source; what is left on it is a pure constant power.
  const division = 1 + resistanceOhm * conductanceS;
  const sourceV = (openCircuitV - dropV - resistanceOhm * constantA) / division;
  if (powerW === 0) return sourceV + dropV;
  const sourceOhm = resistanceOhm / division;
  const seenV = sourceV - sourceOhm * powerCurrentA(sourceV, sourceOhm, powerW);
  // Above the ceiling the current would no longer fall with voltage: that root is none.
  return seenV > ceilingV ? NaN : seenV + dropV;
}

/**
 * Current of a load at a voltage of the cell.
 *
 * @param load The load.
 * @param sight What it sees of the cell's voltage.
 * @param voltageV Voltage of the pack, V.
 * @returns Current, A.
 * @example loadCurrentA({ constantA: 0, powerW: 0.03, conductanceS: 0 }, { dropV: 0, ceilingV: Infinity }, 3) // 0.01
 */
export function loadCurrentA(load: CellLoad, sight: LoadSight, voltageV: number): number {
  const seenV = seenVoltageV(sight, voltageV);
  return load.constantA + load.powerW / seenV + load.conductanceS * seenV;
}

/** Below this voltage a mean current no longer changes, so that a constant power stays finite, V. Nothing works there anyway. */
export const LEAST_SEEN_V = 0.01;

/**
 * The voltage that loads see.
 *
 * @param sight Drop and ceiling, V.
 * @param voltageV Voltage of the pack, V.
 * @returns Voltage, V, at least 10 mV.
 * @example seenVoltageV({ dropV: 0.1, ceilingV: 1.8 }, 3) // 1.8
 */
export function seenVoltageV({ dropV, ceilingV }: LoadSight, voltageV: number): number {
  return Math.max(LEAST_SEEN_V, Math.min(ceilingV, voltageV - dropV));
}
