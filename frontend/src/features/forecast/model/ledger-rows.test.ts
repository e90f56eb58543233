import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Ledger } from '#common/engine/index.ts';
import { pictureForecast, pictureScenario, PICTURE_LEDGER_ENTRIES } from '#test/support/picture-fixtures.ts';
import { apportion, ledgerView, type LedgerRow } from './ledger-rows.ts';

const Exact = Decimal.clone({ precision: 80 });
const ledger = (): Ledger => {
  const made = pictureForecast().ledger;
  if (!made) throw new Error('The fixture has no ledger.');
  return made;
};
const view = (): ReturnType<typeof ledgerView> => ledgerView(pictureScenario(), ledger());
const numberIn = (text: string): number => Number(text.replace('\u2212', '-').replace(/\u00a0.*$/, ''));
const shownSum = (rows: readonly LedgerRow[], key: 'share' | 'charge'): number =>
  rows.reduce((sum, row) => sum + numberIn(row[key]), 0);

describe('ledgerView', () => {
  it('ledgerView: keeps the exact total to the last digit', () => {
    expect(new Exact(view().totalExactC).equals(ledger().totalC)).toBe(true);
    expect(view().totalExactC).toContain('000000000000000001');
  });

  it('ledgerView: has rows whose exact charges add up to the exact total', () => {
    const { rows, totalExactC } = view();
    const sum = rows.reduce((total, row) => total.plus(row.exactC), new Exact(0));
    expect(sum.toFixed()).toBe(totalExactC);
  });

  it('ledgerView: shows shares that add up to 100.0 %', () => {
    expect(shownSum(view().rows, 'share')).toBeCloseTo(100, 9);
  });

  it('ledgerView: shows charges that add up to the shown total', () => {
    const { rows, total } = view();
    expect(shownSum(rows, 'charge')).toBeCloseTo(numberIn(total), 9);
  });

  it('ledgerView: shows entries of a group that add up to the shown group', () => {
    for (const row of view().rows.filter(({ children }) => children.length > 0)) {
      expect(shownSum(row.children, 'share')).toBeCloseTo(numberIn(row.share), 9);
      expect(shownSum(row.children, 'charge')).toBeCloseTo(numberIn(row.charge), 9);
    }
  });

  it('ledgerView: gives rest and leakage lines of their own', () => {
    expect(view().rows.map((row) => row.what)).toEqual(
      expect.arrayContaining(['Report', 'Rest, all parts', 'Leakage', 'Self-discharge', 'Everything else']),
    );
  });

  it('ledgerView: tells step, part and state of each entry of a routine', () => {
    const report = view().rows.find((row) => row.what === 'Report');
    expect(report?.children.map((row) => `${row.what}: ${row.detail.replaceAll('\u00a0', ' ')}`)).toContain(
      'Sense: Controller, Sleep → Active · 2.1 µC a cycle',
    );
  });

  it('ledgerView: gathers the smaller of many entries, with sums that still add up', () => {
    const entries = PICTURE_LEDGER_ENTRIES.flatMap((entry) =>
      entry.routineId === 'report' ? [entry, { ...entry, chargeC: '0.01' }] : [entry],
    );
    const report = ledgerView(pictureScenario(), { ...ledger(), entries }).rows.find((row) => row.what === 'Report');
    const last = report?.children.at(-1);
    expect(report?.children).toHaveLength(6);
    expect([last?.what, last?.detail]).toEqual(['Smaller entries', '7 entries']);
    expect(shownSum(report?.children ?? [], 'share')).toBeCloseTo(numberIn(report?.share ?? ''), 9);
    expect(shownSum(last?.children ?? [], 'charge')).toBeCloseTo(numberIn(last?.charge ?? ''), 9);
  });

  it('ledgerView: names an entry whose part is gone', () => {
    const scenario = pictureScenario((s) => (s.node.parts = s.node.parts.filter((part) => part.id !== 'leaf')));
    const rest = ledgerView(scenario, ledger()).rows.find((row) => row.id === 'rest');
    expect(rest?.children.map((row) => row.what)).toContain('A removed part');
  });

  it('ledgerView: has no rows for a ledger without entries', () => {
    const empty = ledgerView(pictureScenario(), { side: 'cell', periodS: 1, entries: [], totalC: '0' });
    expect(empty.rows).toEqual([]);
    expect(numberIn(empty.total)).toBe(0);
  });

  it('ledgerView: does not change the ledger it is given', () => {
    const before = JSON.stringify(PICTURE_LEDGER_ENTRIES);
    view();
    expect(JSON.stringify(PICTURE_LEDGER_ENTRIES)).toBe(before);
  });
});

describe('apportion', () => {
  it('apportion: adds up to its units for any positive values', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 1e-9, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 30 }),
        fc.integer({ min: 0, max: 100_000 }),
        (values, units) => apportion(values, units).reduce((sum, n) => sum + n, 0) === units,
      ),
    );
  });

  it('apportion: is within one of the exact share', () => {
    expect(apportion([1, 1, 1], 100)).toEqual([34, 33, 33]);
  });
});
