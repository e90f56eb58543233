import { describe, expect, test } from 'vitest';
import { valueAt, withValueAt } from './link-values.ts';

describe('valueAt', () => {
  test('reads what stands at a dotted key, and nothing where nothing does', () => {
    expect(valueAt({ crystal: { startUpS: 0.001 } }, 'crystal.startUpS')).toBe(0.001);
    expect(valueAt({ phy: 'oqpsk-2450' }, 'phy.bitRateBps')).toBeUndefined();
    expect(valueAt(undefined, 'phy')).toBeUndefined();
  });
});

describe('withValueAt', () => {
  test('makes the objects that a dotted key leads through', () => {
    expect(withValueAt({}, 'crystal.pulling.loadCapacitanceF', 9e-12)).toEqual({
      crystal: { pulling: { loadCapacitanceF: 9e-12 } },
    });
  });

  test('takes a key away together with objects that are then empty', () => {
    const link = { frame: { securityLevel: 5 }, macMinBE: 3 };
    expect(withValueAt(link, 'frame.securityLevel', undefined)).toEqual({ macMinBE: 3 });
    expect(withValueAt(link, 'frame.keyIdMode', undefined)).toBe(link);
  });

  test('gives the same object where nothing changes', () => {
    const link = { frame: { securityLevel: 5 } };
    expect(withValueAt(link, 'frame.securityLevel', 5)).toBe(link);
  });
});
