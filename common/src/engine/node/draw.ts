import { OutOfRangeError } from '#common/errors.ts';
import type { State } from '../scenario/scenario.types.ts';
import type { Draw } from './node-program.types.ts';

/** Reference temperature of a state that gives none, °C. */
const DEFAULT_REFERENCE_C = 25;

/** Rail voltage and temperature at which a current is asked for. */
export interface DrawConditions {
  /** Rail voltage, V, above 0. */
  voltageV: number;
  /** Temperature, °C. */
  temperatureC: number;
}

/**
 * What a state takes from the rail: its typical current with its law.
 *
 * @param state The state.
 * @param defaultReferenceVoltageV Reference voltage of a state that gives none, V.
 * @returns The draw.
 * @example stateDraw({ id: 'rx', name: 'Receive', current: { typical: 0.006 } }, 3).currentA // 0.006
 */
export function stateDraw(state: State, defaultReferenceVoltageV: number): Draw {
  return {
    currentA: state.current.typical,
    law: state.law ?? 'constant-current',
    referenceVoltageV: state.referenceVoltageV ?? defaultReferenceVoltageV,
    referenceTemperatureC: state.referenceTemperatureC ?? DEFAULT_REFERENCE_C,
    doublingK: state.doublingK ?? null,
  };
}

/**
 * A current that depends neither on voltage nor on temperature, as those of transitions and leakages.
 *
 * @param currentA Current, A.
 * @param referenceVoltageV Reference voltage, V; of no effect on a constant current.
 * @returns The draw.
 * @example constantDraw(0.001, 3).law // 'constant-current'
 */
export function constantDraw(currentA: number, referenceVoltageV: number): Draw {
  return {
    currentA,
    law: 'constant-current',
    referenceVoltageV,
    referenceTemperatureC: DEFAULT_REFERENCE_C,
    doublingK: null,
  };
}

/**
 * Current of a draw at a rail voltage and temperature: constant-current `I`, constant-power `I·Vref/V`, resistive
 * `I·V/Vref`, each times `2^((T − Tref)/doublingK)` where a doubling is given.
 *
 * Source: definition of the three load laws.
 *
 * @param draw The draw.
 * @param conditions Rail voltage, V, above 0; temperature, °C.
 * @returns Current, A.
 * @throws OutOfRangeError code `out-of-range` for a voltage that is not above 0 or not finite.
 * @example drawAt({ currentA: 0.01, law: 'resistive', referenceVoltageV: 3, referenceTemperatureC: 25, doublingK: null },
 *   { voltageV: 1.5, temperatureC: 25 }) // 0.005
 */
export function drawAt(draw: Draw, { voltageV, temperatureC }: DrawConditions): number {
  if (!(voltageV > 0 && voltageV < Infinity)) {
    throw new OutOfRangeError(`The rail voltage is ${voltageV} V; it must be above 0.`, {
      code: 'out-of-range',
      field: 'voltageV',
      value: voltageV,
      unit: 'V',
      expected: 'above 0 V',
    });
  }
  const currentA = lawCurrentA(draw, voltageV);
  if (draw.doublingK === null) return currentA;
  return currentA * 2 ** ((temperatureC - draw.referenceTemperatureC) / draw.doublingK);
}

function lawCurrentA({ currentA, law, referenceVoltageV }: Draw, voltageV: number): number {
  if (law === 'constant-current') return currentA;
  return law === 'constant-power'
    ? (currentA * referenceVoltageV) / voltageV
    : (currentA * voltageV) / referenceVoltageV;
}
