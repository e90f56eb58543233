import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { frameLoading } from './loading.ts';
import { phyPresets } from './phy.table.ts';

const PHY = phyPresets['oqpsk-2450'];

describe('frameLoading', () => {
  test('takes its whole time before the exchange by default', () => {
    const times = frameLoading(PHY, 127, { clockHz: 1_000_000, overheadPerOctetS: 1e-6, overheadS: 20e-6 });
    expect(times.beforeS).toBeCloseTo(127 * 9e-6 + 20e-6, 12);
    expect(times.loadS).toBe(times.beforeS);
    expect(times.besideS).toBe(0);
  });

  test('takes no time of its own beside sending where the headers give it a start', () => {
    const { beforeS, besideS, loadS } = frameLoading(PHY, 127, { clockHz: 1_000_000, beside: true });
    expect([beforeS, besideS]).toEqual([0, loadS]);
  });

  test('starts ahead of sending where its overhead outlasts the headers of 192 µs', () => {
    const { beforeS } = frameLoading(PHY, 127, { clockHz: 1_000_000, overheadS: 300e-6, beside: true });
    expect(beforeS).toBeCloseTo(300e-6 + 8e-6 - 192e-6, 12);
  });

  test('keeps up where an octet takes as long over the line as on the air', () => {
    expect(frameLoading(PHY, 127, { clockHz: 250_000, beside: true }).lineOctetS).toBeCloseTo(32e-6, 12);
  });

  test('throws beside sending where the line is slower than the air, and names both times', () => {
    const error = errorOf(InconsistentInputError, () => frameLoading(PHY, 127, { clockHz: 200_000, beside: true }));
    expect(error).toMatchObject({ code: 'loading-too-slow', field: 'loading.clockHz' });
    expect(error.message).toContain('40 µs over the serial line and 32 µs on the air');
  });

  test('may be slower than the air before sending', () => {
    expect(frameLoading(PHY, 127, { clockHz: 200_000 }).beforeS).toBeCloseTo(127 * 40e-6, 12);
  });

  test('splits the transfer without remainder', () => {
    const clock = fc.integer({ min: 250_000, max: 10_000_000 });
    fc.assert(
      fc.property(clock, fc.integer({ min: 0, max: 127 }), fc.boolean(), (clockHz, octets, beside) => {
        const { loadS, beforeS, besideS } = frameLoading(PHY, octets, { clockHz, overheadS: 250e-6, beside });
        expect(beforeS + besideS).toBeCloseTo(loadS, 12);
      }),
    );
  });
});
