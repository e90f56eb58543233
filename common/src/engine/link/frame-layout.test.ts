import { describe, expect, test } from 'vitest';
import { frameLayout } from './frame-layout.ts';
import { linkOf } from './link-of.ts';
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

describe('linkOf', () => {
  test('keeps what the node says of frame format and crystal where a step changes one figure of them', () => {
    const node = { frame: { securityLevel: 5 }, crystal: { startUpS: 0.001 } };
    expect(linkOf(node, { frame: { keyIdMode: 1 }, crystal: { tolerancePpm: 20 } })).toEqual({
      frame: { securityLevel: 5, keyIdMode: 1 },
      crystal: { startUpS: 0.001, tolerancePpm: 20 },
    });
  });
});
