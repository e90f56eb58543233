import { regulatorInputA } from '../supply/regulator-input.ts';
import type { CellLoad, LoadSight } from '../supply/cell-load.ts';
import type { Supply } from '../scenario/scenario.types.ts';
import type { RailLoad } from './load-vector.ts';

/** The regulator as the cell sees it: what becomes of loads and of limits. */
export interface Converter {
  kind: 'none' | 'linear' | 'switching';
  /** What cell loads see of the cell's voltage. */
  sight: LoadSight;
  /** Highest voltage that the rail can have, V; Infinity without a regulator. */
  highestRailV: number;
  quiescentA: number;
  /** Input power of a switching regulator per ampere at its output, its quiescent current not included, W/A; 0 for the others. */
  powerPerAmpereW: number;
  /** Below this the regulator fails, V; 0 where it gives none. */
  failureV: number;
  cutOffV: number;
}

/**
 * Reads a supply's regulator and cut-off. A table of efficiencies counts with its lowest value.
 *
 * @param supply The supply.
 * @returns The converter.
 * @example converterOf({ ...supply, regulator: { kind: 'none' } }).highestRailV // Infinity
 */
export function converterOf({ regulator, cutOffV = 0 }: Pick<Supply, 'regulator' | 'cutOffV'>): Converter {
  const free: LoadSight = { dropV: 0, ceilingV: Infinity };
  const none = { sight: free, highestRailV: Infinity, quiescentA: 0, powerPerAmpereW: 0, failureV: 0, cutOffV };
  if (regulator.kind === 'none') return { kind: 'none', ...none };
  const { kind, outputV, quiescentA, minimumInputV: failureV = 0 } = regulator;
  const common = { ...none, highestRailV: outputV, quiescentA, failureV };
  if (kind === 'linear') {
    return { kind, ...common, sight: { dropV: regulator.dropoutV, ceilingV: outputV } };
  }
  // At 1 V the input current is the input power.
  const efficiency = lowestEfficiency(regulator.efficiency);
  const powerPerAmpereW = regulatorInputA({ kind, inputV: 1, outputV, outputA: 1, quiescentA: 0, efficiency });
  return { kind, ...common, powerPerAmpereW };
}

/**
 * The efficiency that a forecast counts with.
 *
 * @param efficiency One figure, or a table [output A, efficiency].
 * @returns The figure; of a table the lowest.
 * @example lowestEfficiency([[0.001, 0.7], [0.1, 0.9]]) // 0.7
 */
export function lowestEfficiency(efficiency: number | [number, number][]): number {
  return typeof efficiency === 'number' ? efficiency : Math.min(...efficiency.map(([, row]) => row));
}

/**
 * What the cell gives for a load on the rail. Behind a switching regulator the rail is held and the load becomes a constant power.
 *
 * @param converter The regulator.
 * @param rail Load on the rail.
 * @returns Load on the cell, the quiescent current included.
 * @example cellLoad(converter, { constantA: 0.01, powerW: 0, conductanceS: 0 })
 */
export function cellLoad(converter: Converter, rail: RailLoad): CellLoad {
  const { constantA, powerW, conductanceS } = converted(converter, rail);
  return { constantA: constantA + converter.quiescentA, powerW, conductanceS };
}

/**
 * What the cell gives for a part of the load on the rail, so without the quiescent current; also for a part that is negative.
 *
 * @param converter The regulator.
 * @param rail Part of the load on the rail.
 * @returns Part of the load on the cell.
 * @example converted(converter, { constantA: 0.01, powerW: 0, conductanceS: 0 })
 */
export function converted({ kind, highestRailV, powerPerAmpereW }: Converter, rail: RailLoad): CellLoad {
  if (kind !== 'switching') return rail;
  const outputA = rail.constantA + rail.powerW / highestRailV + rail.conductanceS * highestRailV;
  return { constantA: 0, powerW: powerPerAmpereW * outputA, conductanceS: 0 };
}

/**
 * Lowest voltage of the cell at which the rail still has a voltage, the regulator works, and the cut-off is not passed.
 *
 * @param converter The regulator and cut-off.
 * @param railV Lowest voltage that the parts need, V.
 * @returns Voltage, V; Infinity when the rail never reaches it.
 * @example cellLimitV(converter, 1.8)
 */
export function cellLimitV(converter: Converter, railV: number): number {
  return Math.max(throughRegulatorV(converter, railV), converter.failureV, converter.cutOffV);
}

/**
 * Voltage of the cell at which the rail has a voltage: linear adds its dropout, a switching one holds its output whatever the cell.
 *
 * @param converter The regulator.
 * @param railV Voltage of the rail, V.
 * @returns Voltage of the cell, V; Infinity when the rail never has it.
 * @example throughRegulatorV(converter, 1.8)
 */
export function throughRegulatorV({ kind, sight, highestRailV }: Converter, railV: number): number {
  if (railV > highestRailV) return Infinity;
  return kind === 'switching' ? 0 : railV + sight.dropV;
}

/**
 * Voltage of the rail.
 *
 * @param converter The regulator.
 * @param cellV Voltage of the cell, V.
 * @returns Voltage, V.
 * @example railVoltageV(converter, 3.6)
 */
export function railVoltageV({ kind, sight, highestRailV }: Converter, cellV: number): number {
  return kind === 'switching' ? highestRailV : Math.min(highestRailV, cellV - sight.dropV);
}
