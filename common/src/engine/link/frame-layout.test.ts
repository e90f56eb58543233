import { describe, expect, test } from 'vitest';
import { frameLayout } from './frame-layout.ts';
import { phyPresets } from './phy.table.ts';

const sumOf = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0);

describe('frameLayout', () => {
  test('gives fields whose octets and times add up to those of the frame', () => {
    const { fields, airOctets, airtimeS } = frameLayout(phyPresets['oqpsk-2450'], { payloadOctets: 24 }, {});
    expect(sumOf(fields.map(({ octets }) => octets))).toBe(airOctets);
    expect(sumOf(fields.map((field) => field.airtimeS))).toBeCloseTo(airtimeS, 12);
  });

  test('gives coded octets twice the time, but not the synchronisation header', () => {
    const link = { forwardErrorCorrection: true };
    const { fields, airtimeS } = frameLayout(phyPresets['sun-fsk-50'], { payloadOctets: 24 }, link);
    expect(fields.find(({ id }) => id === 'preamble')?.airtimeS).toBeCloseTo(4 * 160e-6, 12);
    expect(fields.find(({ id }) => id === 'payload')?.airtimeS).toBeCloseTo(2 * 24 * 160e-6, 12);
    expect(sumOf(fields.map((field) => field.airtimeS))).toBeCloseTo(airtimeS, 12);
  });
});
