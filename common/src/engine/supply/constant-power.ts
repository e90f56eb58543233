import { requireNumber } from '../link/checks.ts';

/**
 * Current that a constant-power load draws from a source with resistance: the smaller root of `P = I·(Voc − R·I)`,
 * `(Voc − √(Voc² − 4RP))/(2R)`, in the form that stays exact for R → 0.
 *
 * Source: definition; no operating point exists above `Voc²/(4R)`.
 *
 * @param input Open-circuit voltage, V, above 0; resistance, Ω, 0 or more; power, W, 0 or more.
 * @returns Current, A; null when the source collapses.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @example constantPowerA({ openCircuitV: 2.8, resistanceOhm: 60, powerW: 0.03 }) // 0.01666…
 */
export function constantPowerA(input: { openCircuitV: number; resistanceOhm: number; powerW: number }): number | null {
  const { openCircuitV, resistanceOhm, powerW } = input;
  requireNumber(openCircuitV, { field: 'openCircuitV', min: Number.MIN_VALUE, unit: 'V' });
  requireNumber(resistanceOhm, { field: 'resistanceOhm', min: 0, unit: 'Ω' });
  requireNumber(powerW, { field: 'powerW', min: 0, unit: 'W' });
  const currentA = powerCurrentA(openCircuitV, resistanceOhm, powerW);
  return Number.isNaN(currentA) ? null : currentA;
}

/**
 * `constantPowerA` without checks, for inner loops.
 *
 * @param openCircuitV Open-circuit voltage, V.
 * @param resistanceOhm Resistance, Ω.
 * @param powerW Power, W.
 * @returns Current, A; NaN when the source collapses.
 * @example powerCurrentA(3, 0, 0.03) // 0.01
 */
export function powerCurrentA(openCircuitV: number, resistanceOhm: number, powerW: number): number {
  if (powerW === 0) return 0;
  if (!(openCircuitV > 0)) return NaN;
  const root = Math.sqrt(openCircuitV * openCircuitV - 4 * resistanceOhm * powerW);
  return (2 * powerW) / (openCircuitV + root);
}
