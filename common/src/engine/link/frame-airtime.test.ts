import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { frameAirtimeS } from './frame-airtime.ts';
import { phyOf } from './phy-of.ts';
import { phyPresets } from './phy.table.ts';

const oqpsk = phyPresets['oqpsk-2450'];
const msk = phyPresets['msk-2450'];
const sun = phyPresets['sun-fsk-50'];

describe('frameAirtimeS', () => {
  test('is 352 µs for an immediate acknowledgement and 4256 µs for the longest frame at O-QPSK', () => {
    expect(frameAirtimeS(oqpsk, 5)).toBe(352e-6);
    expect(frameAirtimeS(oqpsk, 127)).toBe(4256e-6);
  });

  test('grows by one octet time per octet', () => {
    expect(frameAirtimeS(oqpsk, 51) - frameAirtimeS(oqpsk, 50)).toBeCloseTo(8 * oqpsk.bitS, 12);
  });

  test('takes a preamble instead of the 4 octets of the preset', () => {
    expect(frameAirtimeS(sun, 127, { preambleOctets: 8 }) - frameAirtimeS(sun, 127)).toBeCloseTo(4 * 160e-6, 12);
  });

  test('doubles PHR and PSDU but not the SHR with forward error correction', () => {
    expect(frameAirtimeS(sun, 100, { forwardErrorCorrection: true })).toBeCloseTo((6 + 2 * 102) * 160e-6, 12);
  });

  test('throws and names the SHR of MSK, which no source gives', () => {
    const error = errorOf(InconsistentInputError, () => frameAirtimeS(msk, 50));
    expect(error).toMatchObject({ code: 'constant-unknown', field: 'shrOctets' });
    expect(error.message).toContain('shrOctets');
  });

  test('throws and names the PHR of MSK when only the SHR is supplied', () => {
    const error = errorOf(InconsistentInputError, () => frameAirtimeS(msk, 50, { shrOctets: 5 }));
    expect(error).toMatchObject({ code: 'constant-unknown', field: 'phrOctets' });
  });

  test('uses supplied headers where the preset has none', () => {
    expect(frameAirtimeS(msk, 127, { shrOctets: 5, phrOctets: 1 })).toBe(4256e-6);
  });

  test.each([-1, 1.5, 128, NaN])('throws for a PSDU of %s octets', (psduOctets) => {
    const error = errorOf(OutOfRangeError, () => frameAirtimeS(oqpsk, psduOctets));
    expect(error).toMatchObject({ code: 'out-of-range', field: 'psduOctets' });
  });

  test('throws for forward error correction at O-QPSK', () => {
    const error = errorOf(InconsistentInputError, () => frameAirtimeS(oqpsk, 5, { forwardErrorCorrection: true }));
    expect(error.code).toBe('no-forward-error-correction');
  });

  test('computes a PHY of your own and refuses another preamble for it', () => {
    const own = phyOf({ bitRateBps: 1_000_000, bitsPerSymbol: 1, shrOctets: 5, phrOctets: 2 });
    expect(frameAirtimeS(own, 33)).toBe(320e-6);
    const error = errorOf(InconsistentInputError, () => frameAirtimeS(own, 33, { preambleOctets: 8 }));
    expect(error.code).toBe('preamble-unknown');
  });
});
