import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { frameAirtimeS } from './frame-airtime.ts';
import { overhear, receptionOf } from './overhearing.ts';
import { phyOf } from './phy-of.ts';
import { phyPresets } from './phy.table.ts';

const PHY = phyPresets['oqpsk-2450'];

describe('overhear', () => {
  test('receives the whole frame where the receiver does not filter', () => {
    expect(overhear(PHY, { psduOctets: 127, stopsAfterOctets: null })).toEqual({
      receiveS: 4256e-6,
      airtimeS: 4256e-6,
    });
  });

  test('stops at the end of the MAC header where it does', () => {
    expect(overhear(PHY, { psduOctets: 127, stopsAfterOctets: 9 })).toEqual({ receiveS: 480e-6, airtimeS: 4256e-6 });
  });

  test('never receives longer than the frame', () => {
    const octets = fc.integer({ min: 0, max: 127 });
    fc.assert(
      fc.property(octets, octets, (psduOctets, stopsAfterOctets) => {
        const { receiveS, airtimeS } = overhear(PHY, { psduOctets, stopsAfterOctets });
        expect(receiveS).toBeLessThanOrEqual(airtimeS);
      }),
    );
  });
});

describe('receptionOf', () => {
  test('receives, turns around and acknowledges', () => {
    const { mean, worst } = receptionOf(PHY, { psduOctets: 33, ackPsduOctets: 5, frameErrorRate: 0, listenS: 1e-3 });
    expect(mean).toMatchObject({ listenS: 1e-3, receiveS: 1248e-6, turnaroundS: 192e-6, transmitS: 352e-6 });
    expect(mean.durationS).toBeCloseTo(2792e-6, 12);
    expect(worst).toEqual(mean);
  });

  test('does not acknowledge a frame that was lost', () => {
    const { mean, worst } = receptionOf(PHY, { psduOctets: 33, ackPsduOctets: 5, frameErrorRate: 1 });
    expect(mean).toMatchObject({ turnaroundS: 0, transmitS: 0, durationS: 1248e-6 });
    expect(worst.transmitS).toBe(352e-6);
  });

  test('needs no turnaround where nothing is acknowledged', () => {
    const phy = phyOf({ bitRateBps: 50_000, bitsPerSymbol: 1, shrOctets: 6, phrOctets: 2 });
    const { worst } = receptionOf(phy, { psduOctets: 10, ackPsduOctets: null, frameErrorRate: 0 });
    expect(worst).toMatchObject({ turnaroundS: 0, transmitS: 0 });
  });

  test('throws for an acknowledged frame on a PHY whose turnaround is unknown', () => {
    const phy = phyOf({ bitRateBps: 50_000, bitsPerSymbol: 1, shrOctets: 6, phrOctets: 2 });
    const error = errorOf(InconsistentInputError, () =>
      receptionOf(phy, { psduOctets: 10, ackPsduOctets: 5, frameErrorRate: 0 }),
    );
    expect(error).toMatchObject({ code: 'constant-unknown', field: 'turnaroundS' });
  });

  test('throws for a loss above 1', () => {
    const input = { psduOctets: 10, ackPsduOctets: 5, frameErrorRate: 1.1 };
    expect(errorOf(OutOfRangeError, () => receptionOf(PHY, input)).field).toBe('frameErrorRate');
  });
});

describe('frameAirtimeS', () => {
  test.each(['oqpsk-2450', 'bpsk-868', 'sun-fsk-150'] as const)('of %s is additive in octets', (id) => {
    const octets = fc.integer({ min: 0, max: 60 });
    fc.assert(
      fc.property(octets, octets, (a, b) => {
        const phy = phyPresets[id];
        const bodyS = (count: number) => frameAirtimeS(phy, count) - frameAirtimeS(phy, 0);
        expect(bodyS(a) + bodyS(b)).toBeCloseTo(bodyS(a + b), 12);
      }),
    );
  });
});
