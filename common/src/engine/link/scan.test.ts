import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { phyPresets } from './phy.table.ts';
import { BEACON_REQUEST_PSDU_OCTETS, scanTimes } from './scan.ts';

const PHY = phyPresets['oqpsk-2450'];
const PASSIVE = { channels: 16, scanDuration: 3, retuneS: 200e-6, requestPsduOctets: null };

describe('scanTimes', () => {
  test('listens nine superframes of 15.36 ms on each channel at a scan duration of 3', () => {
    const { channelS, listenS, transmitS, retuneS, durationS } = scanTimes(PHY, PASSIVE);
    expect(channelS).toBeCloseTo(9 * 15.36e-3, 12);
    expect(listenS).toBeCloseTo(16 * 9 * 15.36e-3, 12);
    expect(transmitS).toBe(0);
    expect(retuneS).toBeCloseTo(3.2e-3, 12);
    expect(durationS).toBe(listenS + retuneS);
  });

  test('sends a beacon request of 512 µs on each channel of an active scan', () => {
    const { transmitS } = scanTimes(PHY, { ...PASSIVE, requestPsduOctets: BEACON_REQUEST_PSDU_OCTETS });
    expect(transmitS).toBeCloseTo(16 * 512e-6, 12);
  });

  test.each([
    ['channels', 0],
    ['scanDuration', 15],
    ['retuneS', -1],
  ])('throws for %s of %d', (field, value) => {
    expect(errorOf(OutOfRangeError, () => scanTimes(PHY, { ...PASSIVE, [field]: value })).field).toBe(field);
  });
});
