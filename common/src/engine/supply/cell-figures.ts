import type { Cell, Table } from '../scenario/scenario.types.ts';
import { tableValue, tableValueLn } from './table-value.ts';

/** Temperature of the open-circuit and resistance tables, °C. */
const TABLE_C = 20;

/**
 * Open-circuit voltage of one cell: piecewise linear in depth at 20 °C, plus its temperature coefficient.
 *
 * @param cell Open-circuit table [depth, V] and coefficient, V/K, default 0.
 * @param depth Depth of discharge, 0 to 1; held constant beyond the table.
 * @param temperatureC Temperature, °C.
 * @returns Voltage, V.
 * @example openCircuitV({ openCircuitTableV: [[0, 3], [1, 2]] }, 0.5, 20) // 2.5
 */
export function openCircuitV(
  cell: Pick<Cell, 'openCircuitTableV' | 'openCircuitTemperatureVPerK'>,
  depth: number,
  temperatureC: number,
): number {
  return tableValue(cell.openCircuitTableV, depth) + openCircuitShiftV(cell, temperatureC);
}

/**
 * What temperature adds to the open-circuit voltage of one cell.
 *
 * @param cell Its coefficient, V/K, default 0.
 * @param temperatureC Temperature, °C.
 * @returns Voltage, V, 0 at 20 °C.
 * @example openCircuitShiftV({ openCircuitTemperatureVPerK: 0.001 }, 10) // −0.01
 */
export function openCircuitShiftV(cell: Pick<Cell, 'openCircuitTemperatureVPerK'>, temperatureC: number): number {
  return (cell.openCircuitTemperatureVPerK ?? 0) * (temperatureC - TABLE_C);
}

/**
 * Fresh resistance of one cell at 20 °C for a load of some length: the figure of the nearest longer pulse, else of the longest.
 * A figure without a length serves for all that no longer pulse covers; of several the highest.
 *
 * @param figures Typical resistances, Ω, by pulse length, s.
 * @param durationS Length of the load, s; Infinity for rest.
 * @returns Resistance, Ω.
 * @example freshResistanceOhm([{ pulseS: 0.1, ohm: { typical: 10 } }, { pulseS: 2, ohm: { typical: 15 } }], 0.5) // 15
 */
export function freshResistanceOhm(figures: Cell['resistanceOhm'], durationS: number): number {
  let bestS = -Infinity;
  let bestOhm = 0;
  for (const { pulseS = Infinity, ohm } of figures) {
    if (isNearer(pulseS, bestS, durationS)) {
      bestS = pulseS;
      bestOhm = ohm.typical;
    } else if (pulseS === bestS) bestOhm = Math.max(bestOhm, ohm.typical);
  }
  return bestOhm;
}

/** Whether a pulse length serves a duration better: long enough and shorter, or longer while none is long enough. */
function isNearer(pulseS: number, thanS: number, durationS: number): boolean {
  if (thanS >= durationS) return pulseS >= durationS && pulseS < thanS;
  return pulseS > thanS;
}

/**
 * Factor of a cell's resistance at a temperature; the logarithm of the factor is piecewise linear.
 *
 * @param table [°C, factor].
 * @param temperatureC Temperature, °C.
 * @returns Factor, 1 at 20 °C by definition of the table.
 * @example resistanceTemperatureFactor([[-20, 4], [20, 1]], 0) // 2
 */
export function resistanceTemperatureFactor(table: Readonly<Table>, temperatureC: number): number {
  return tableValueLn(table, temperatureC);
}

/**
 * Share of the capacity that can be had at a temperature, piecewise linear.
 *
 * @param table [°C, factor]; undefined where the cell has none.
 * @param temperatureC Temperature, °C.
 * @returns Factor, above 0, at most 1; 1 without a table.
 * @example capacityTemperatureFactor([[-20, 0.6], [23, 1]], 23) // 1
 */
export function capacityTemperatureFactor(table: Readonly<Table> | undefined, temperatureC: number): number {
  return table ? Math.min(1, tableValue(table, temperatureC)) : 1;
}
