import { OutOfRangeError } from '#common/errors.ts';

/**
 * Mean current of phases that follow each other: `Σ I·t / Σ t`.
 *
 * Source: definition.
 *
 * @param phases Current, A, and duration, s, 0 or more, of each; their durations must not all be 0.
 * @returns Mean current, A.
 * @throws OutOfRangeError code `out-of-range` for a figure that is not finite, a negative duration, or no duration at all.
 * @example meanCurrentA([{ currentA: 0.02, durationS: 1 }, { currentA: 0, durationS: 9 }]) // 0.002
 */
export function meanCurrentA(phases: readonly { currentA: number; durationS: number }[]): number {
  let chargeC = 0;
  let totalS = 0;
  phases.forEach(({ currentA, durationS }, index) => {
    if (!Number.isFinite(currentA)) throw outOfRange(`phases[${index}].currentA`, currentA, 'A', 'a finite current');
    if (!(durationS >= 0 && durationS < Infinity)) {
      throw outOfRange(`phases[${index}].durationS`, durationS, 's', '0 s or more');
    }
    chargeC += currentA * durationS;
    totalS += durationS;
  });
  if (totalS === 0) throw outOfRange('phases', totalS, 's', 'durations that add up to more than 0 s');
  return chargeC / totalS;
}

function outOfRange(field: string, value: number, unit: string, expected: string): OutOfRangeError {
  return new OutOfRangeError(`${field} is ${value}; allowed is ${expected}.`, {
    code: 'out-of-range',
    field,
    value,
    unit,
    expected,
  });
}
