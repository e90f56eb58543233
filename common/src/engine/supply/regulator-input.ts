import { requireNumber } from '../link/checks.ts';

export interface RegulatorInput {
  kind: 'none' | 'linear' | 'switching';
  /** Voltage at its input, V, above 0. */
  inputV: number;
  /** Voltage at its output, V. */
  outputV: number;
  /** Current at its output, A. */
  outputA: number;
  /** Own consumption at the input, A. */
  quiescentA: number;
  /** 0 to 1 without the quiescent current; only `switching` uses it, default 1. */
  efficiency?: number;
}

/**
 * Current at a regulator's input: none passes it on; linear adds its quiescent current, whatever the input voltage; switching
 * takes `Vout·Iout/(η·Vin)` and its quiescent current.
 *
 * Source: conservation of charge (linear) and of energy (switching).
 * Valid for: an efficiency that excludes the quiescent current.
 *
 * @param regulator Kind, voltages, V, output and quiescent current, A, efficiency.
 * @returns Input current, A.
 * @throws OutOfRangeError code `out-of-range` for an input voltage or efficiency that is not above 0, or a negative current.
 * @example regulatorInputA({ kind: 'linear', inputV: 3.6, outputV: 1.8, outputA: 1e-6, quiescentA: 5e-7 }) // 1.5e-6
 */
export function regulatorInputA(regulator: RegulatorInput): number {
  const { kind, inputV, outputV, outputA, quiescentA, efficiency = 1 } = regulator;
  requireNumber(outputA, { field: 'outputA', min: 0, unit: 'A' });
  requireNumber(quiescentA, { field: 'quiescentA', min: 0, unit: 'A' });
  if (kind === 'none') return outputA;
  if (kind === 'linear') return outputA + quiescentA;
  requireNumber(inputV, { field: 'inputV', min: Number.MIN_VALUE, unit: 'V' });
  requireNumber(outputV, { field: 'outputV', min: 0, unit: 'V' });
  requireNumber(efficiency, { field: 'efficiency', min: Number.MIN_VALUE, max: 1 });
  return (outputV * outputA) / (efficiency * inputV) + quiescentA;
}
