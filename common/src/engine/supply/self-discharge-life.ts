import { OutOfRangeError } from '#common/errors.ts';
import { requireNumber } from '../link/checks.ts';
import { fallS } from './decaying-fall.ts';

/**
 * Life of a charge under a constant current and first-order self-discharge: `ln((I + k·Q0)/(I + k·Qf))/k`, for k = 0
 * `(Q0 − Qf)/I`.
 *
 * Source: solution of `dQ/dt = −I − k·Q`.
 *
 * @param input Charge at the start, C; current, A; self-discharge rate, 1/s; charge that must be left, C, default 0.
 * @returns Time until only the reserve is left, s; 0 when no more than it is there at the start.
 * @throws OutOfRangeError code `out-of-range` for a negative figure, `never-ends` when the charge never falls to the reserve.
 * @example selfDischargeLifeS({ capacityC: 792, currentA: 5e-6, ratePerS: 0 }) // 158,400,000
 */
export function selfDischargeLifeS(input: {
  capacityC: number;
  currentA: number;
  ratePerS: number;
  reserveC?: number;
}): number {
  const { capacityC, currentA, ratePerS, reserveC = 0 } = input;
  requireNumber(capacityC, { field: 'capacityC', min: 0, unit: 'C' });
  requireNumber(currentA, { field: 'currentA', min: 0, unit: 'A' });
  requireNumber(ratePerS, { field: 'ratePerS', min: 0, unit: '1/s' });
  requireNumber(reserveC, { field: 'reserveC', min: 0, unit: 'C' });
  if (capacityC <= reserveC) return 0;
  const lifeS = fallS({ speed: currentA + ratePerS * capacityC, decayPerS: ratePerS, fall: capacityC - reserveC });
  if (lifeS < Infinity) return lifeS;
  throw new OutOfRangeError('The charge never falls to the reserve: nothing is drawn that would empty it.', {
    code: 'never-ends',
    field: 'currentA',
    value: currentA,
    unit: 'A',
    expected: 'a current above 0 A, or self-discharge and a reserve above 0 C',
  });
}
