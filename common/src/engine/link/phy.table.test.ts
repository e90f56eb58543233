import { describe, expect, test } from 'vitest';
import { phyPresets } from './phy.table.ts';

const presets = Object.values(phyPresets);

describe('phyPresets', () => {
  test('has the ten presets under their own ids', () => {
    expect(Object.entries(phyPresets).every(([id, phy]) => phy.id === id)).toBe(true);
    expect(presets).toHaveLength(10);
  });

  test('keeps bit time and symbol time apart at 2450 MHz O-QPSK', () => {
    const { bitS, symbolS, macSymbolS } = phyPresets['oqpsk-2450'];
    expect([bitS, symbolS, macSymbolS]).toEqual([4e-6, 16e-6, 16e-6]);
  });

  test('gives MSK a symbol of one bit, 4 µs', () => {
    const { bitS, symbolS, macSymbolS, bitsPerSymbol } = phyPresets['msk-2450'];
    expect([bitS, symbolS, macSymbolS, bitsPerSymbol]).toEqual([4e-6, 4e-6, 4e-6, 1]);
  });

  test('leaves null what no source gives for MSK', () => {
    const { shrOctets, phrOctets, ackWaitS } = phyPresets['msk-2450'];
    expect([shrOctets, phrOctets, ackWaitS]).toEqual([null, null, null]);
  });

  test.each(['sun-fsk-50', 'sun-fsk-100', 'sun-fsk-150', 'sun-fsk-200'] as const)(
    'counts MAC times of %s in 20 µs and leaves its acknowledgement wait and long space null',
    (id) => {
      const phy = phyPresets[id];
      expect(phy).toMatchObject({
        macSymbolS: 20e-6,
        turnaroundS: 1e-3,
        sifsS: 1e-3,
        unitBackoffS: 1160e-6,
        shrOctets: 6,
      });
      expect([phy.ackWaitS, phy.lifsS]).toEqual([null, null]);
    },
  );

  test.each(presets.map((phy) => [phy.id, phy] as const))('%s is consistent in itself', (_id, phy) => {
    expect(phy.symbolS).toBeCloseTo(phy.bitsPerSymbol * phy.bitS, 12);
    expect(phy.symbolsPerOctet * phy.bitsPerSymbol).toBe(8);
    expect(phy.unitBackoffS).toBeCloseTo((phy.turnaroundS ?? 0) + (phy.ccaS ?? 0), 12);
  });

  test.each(presets.map((phy) => [phy.id, phy] as const))('%s gives a source for each constant', (_id, phy) => {
    expect(Object.values(phy.sources).every((source) => source.length > 10)).toBe(true);
  });
});
