import { describe, expect, test } from 'vitest';
import { InconsistentInputError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { maxFrameTotalWaitS } from './max-frame-total-wait.ts';
import { phyPresets } from './phy.table.ts';

const oqpsk = phyPresets['oqpsk-2450'];

describe('maxFrameTotalWaitS', () => {
  test('is 1986 symbols of 16 µs with the default settings', () => {
    expect(maxFrameTotalWaitS(oqpsk)).toBeCloseTo(1986 * 16e-6, 12);
  });

  test('is the longest frame alone where no round may follow the first', () => {
    expect(maxFrameTotalWaitS(oqpsk, { macMaxCSMABackoffs: 0 })).toBe(4256e-6);
  });

  test('counts the largest exponent alone where the exponent does not grow', () => {
    const waitS = maxFrameTotalWaitS(oqpsk, { macMinBE: 3, macMaxBE: 3, macMaxCSMABackoffs: 2 });
    expect(waitS).toBeCloseTo(14 * 320e-6 + 4256e-6, 12);
  });

  test('throws and names the synchronisation header of MSK, which no source gives', () => {
    const error = errorOf(InconsistentInputError, () => maxFrameTotalWaitS(phyPresets['msk-2450']));
    expect(error).toMatchObject({ code: 'constant-unknown', field: 'shrOctets' });
  });
});
