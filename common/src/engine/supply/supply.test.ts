import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import {
  capacityAtCurrentC,
  constantPowerA,
  freshResistanceOhm,
  openCircuitV,
  packOf,
  regulatorInputA,
  resistanceTemperatureFactor,
  selfDischargeLifeS,
  selfDischargeRatePerS,
  standardDeviation,
  tableValue,
  usableChargeC,
} from '#common/engine/index.ts';
import type { Table } from '#common/engine/index.ts';
import { besselI0 } from './bessel-i0.ts';
import { loadedVoltageV } from './cell-load.ts';
import { dayAverage, temperatureAtHour } from './day-average.ts';
import { expectedMinimumBelow } from './expected-minimum.ts';
import { firstFailingShare } from './first-failing-share.ts';

const YEAR_S = 31_557_600;
const DIRECT = { dropV: 0, ceilingV: Infinity };

/** Code of the error that a call throws. */
function codeOf(call: () => unknown): string | null {
  try {
    call();
    return null;
  } catch (error) {
    return error instanceof OutOfRangeError || error instanceof Error ? String(Reflect.get(error, 'code')) : null;
  }
}

describe('selfDischargeRatePerS', () => {
  const loss = { lossPerYear: 0.02, referenceC: 20 };

  test('loses the yearly share at the reference', () => {
    expect(Math.exp(-selfDischargeRatePerS({ ...loss, temperatureC: 20 }) * YEAR_S)).toBeCloseTo(0.98, 12);
  });

  test('doubles every 10 K where nothing else is given', () => {
    const rate = (temperatureC: number): number => selfDischargeRatePerS({ ...loss, temperatureC });
    expect(rate(30) / rate(20)).toBeCloseTo(2, 12);
  });

  test('averages the rate over the day: I0 of Q10 equals a fine sum', () => {
    const rate = (temperatureC: number, amplitudeK = 0): number =>
      selfDischargeRatePerS({ ...loss, q10: 2.5, temperatureC, amplitudeK });
    let sum = 0;
    for (let hour = 0; hour < 24; hour += 0.1) sum += rate(temperatureAtHour(12, 11, hour));
    expect(rate(12, 11) / (sum / 240)).toBeCloseTo(1, 12);
  });

  test('averages an Arrhenius rate over 24 hours', () => {
    const law = { ...loss, activationEnergyJPerMol: 50_000 };
    const mean = dayAverage(12, 11, (temperatureC) => selfDischargeRatePerS({ ...law, temperatureC }));
    expect(selfDischargeRatePerS({ ...law, temperatureC: 12, amplitudeK: 11 }) / mean).toBeCloseTo(1, 14);
  });

  test('is 0 without a loss, and refuses two laws or a loss of everything', () => {
    expect(selfDischargeRatePerS({ lossPerYear: 0, referenceC: 20, temperatureC: 60 })).toBe(0);
    const both = { ...loss, temperatureC: 20, q10: 2, activationEnergyJPerMol: 5e4 };
    expect(codeOf(() => selfDischargeRatePerS(both))).toBe('two-temperature-laws');
    expect(codeOf(() => selfDischargeRatePerS({ lossPerYear: 1, referenceC: 20, temperatureC: 20 }))).toBe(
      'out-of-range',
    );
  });
});

describe('selfDischargeLifeS', () => {
  test('tends to capacity over current as the rate tends to 0', () => {
    const life = (ratePerS: number): number => selfDischargeLifeS({ capacityC: 100, currentA: 1e-6, ratePerS });
    expect(life(0)).toBe(1e8);
    expect(life(1e-20)).toBeCloseTo(1e8, 3);
  });

  test('refuses a charge that never ends', () => {
    expect(codeOf(() => selfDischargeLifeS({ capacityC: 1, currentA: 0, ratePerS: 1e-9 }))).toBe('never-ends');
    expect(selfDischargeLifeS({ capacityC: 1, currentA: 0, ratePerS: 1e-9, reserveC: 1 })).toBe(0);
  });
});

describe('constantPowerA', () => {
  test('gives what it takes: power equals current times loaded voltage', () => {
    const currentA = constantPowerA({ openCircuitV: 3, resistanceOhm: 20, powerW: 0.1 }) ?? NaN;
    expect(currentA * (3 - 20 * currentA)).toBeCloseTo(0.1, 14);
  });

  test('is power over voltage without resistance, null beyond the most that the source gives', () => {
    expect(constantPowerA({ openCircuitV: 3, resistanceOhm: 0, powerW: 0.3 })).toBeCloseTo(0.1, 15);
    expect(constantPowerA({ openCircuitV: 3, resistanceOhm: 20, powerW: 0.1126 })).toBeNull();
  });
});

describe('loadedVoltageV', () => {
  const load = fc.record({
    constantA: fc.double({ min: 0, max: 0.05, noNaN: true }),
    powerW: fc.double({ min: 0, max: 0.1, noNaN: true }),
    conductanceS: fc.double({ min: 0, max: 0.02, noNaN: true }),
  });
  const sight = fc.constantFrom(DIRECT, { dropV: 0.1, ceilingV: 2 });

  test('is an operating point: open-circuit voltage less resistance times the current there', () => {
    fc.assert(
      fc.property(load, sight, fc.double({ min: 0, max: 30, noNaN: true }), (drawn, seen, ohm) => {
        const voltageV = loadedVoltageV(drawn, seen, 3, ohm);
        fc.pre(!Number.isNaN(voltageV) && voltageV - seen.dropV > 0.01);
        const u = Math.min(seen.ceilingV, voltageV - seen.dropV);
        const currentA = drawn.constantA + drawn.powerW / u + drawn.conductanceS * u;
        expect(3 - ohm * currentA).toBeCloseTo(voltageV, 10);
      }),
    );
  });

  test('never rises with resistance', () => {
    fc.assert(
      fc.property(load, sight, fc.double({ min: 0, max: 30, noNaN: true }), (drawn, seen, ohm) => {
        const voltageV = loadedVoltageV(drawn, seen, 3, ohm * 1.1);
        fc.pre(!Number.isNaN(voltageV));
        expect(voltageV).toBeLessThanOrEqual(loadedVoltageV(drawn, seen, 3, ohm) + 1e-12);
      }),
    );
  });
});

describe('firstFailingShare', () => {
  test('agrees with a fine search along the stretch, also where the voltage rises again', () => {
    const voltage = fc.double({ min: 1.5, max: 3.5, noNaN: true });
    const ohm = fc.double({ min: 0, max: 60, noNaN: true });
    const drawn = fc.record({
      constantA: fc.constantFrom(0, 0.01),
      powerW: fc.constantFrom(0, 0.03, 0.06),
      conductanceS: fc.constantFrom(0, 0.005),
    });
    const sight = fc.constantFrom(DIRECT, { dropV: 0.1, ceilingV: 2 });
    const limit = fc.double({ min: 0.2, max: 3, noNaN: true });
    fc.assert(
      fc.property(drawn, sight, limit, fc.tuple(voltage, voltage, ohm, ohm), (load, seen, limitV, [v0, v1, r0, r1]) => {
        const works = (w: number): boolean =>
          loadedVoltageV(load, seen, v0 + (v1 - v0) * w, r0 + (r1 - r0) * w) >= limitV;
        let first: number | null = null;
        for (let step = 0; step <= 2_000 && first === null; step++) if (!works(step / 2_000)) first = step / 2_000;
        const share = firstFailingShare({ load, limitV }, seen, {
          openCircuitFromV: v0,
          openCircuitToV: v1,
          resistanceFromOhm: r0,
          resistanceToOhm: r1,
        });
        if (first !== null) {
          expect(share).not.toBeNull();
          expect(share ?? 2).toBeLessThanOrEqual(first + 1e-9);
        }
        // The fine search may step over a short failure, never the other way round.
        if (share !== null && share > 1e-9) expect(works(share - 1e-9)).toBe(true);
        if (share !== null && share > 0 && share < 1 - 1e-6) expect(works(share + 1e-7)).toBe(false);
      }),
      { numRuns: 500, seed: 3 },
    );
  });
});

describe('regulatorInputA', () => {
  test('none passes the current on, linear adds its own, switching keeps the power', () => {
    const common = { inputV: 3, outputV: 1.5, outputA: 0.01, quiescentA: 1e-6 };
    expect(regulatorInputA({ kind: 'none', ...common })).toBe(0.01);
    expect(regulatorInputA({ kind: 'linear', ...common })).toBe(0.010001);
    expect(regulatorInputA({ kind: 'switching', ...common, efficiency: 0.5 })).toBeCloseTo(0.010001, 15);
  });

  test('refuses an input without voltage', () => {
    const empty = { inputV: 0, outputV: 1, outputA: 1, quiescentA: 0 };
    expect(codeOf(() => regulatorInputA({ kind: 'switching', ...empty }))).toBe('out-of-range');
  });
});

describe('packOf and standardDeviation', () => {
  test('series adds voltage and resistance, parallel adds charge', () => {
    expect(packOf({ capacityC: { typical: 5 } }, { series: 3, parallel: 2 })).toEqual({
      openCircuitFactor: 3,
      capacityFactor: 2,
      resistanceFactor: 1.5,
    });
  });

  test('the weakest of two lies 1/√π deviations below the mean', () => {
    expect(expectedMinimumBelow(1)).toBe(0);
    expect(expectedMinimumBelow(2)).toBeCloseTo(1 / Math.sqrt(Math.PI), 12);
    expect(expectedMinimumBelow(3)).toBeCloseTo(1.5 / Math.sqrt(Math.PI), 12);
  });

  test('a deviation for each distribution', () => {
    const sides = { min: 1, typical: 2, max: 4 };
    expect(standardDeviation(sides)).toBeCloseTo(Math.sqrt(7 / 18), 14);
    expect(standardDeviation({ ...sides, distribution: 'uniform' })).toBeCloseTo(3 / Math.sqrt(12), 14);
    expect(standardDeviation({ ...sides, distribution: 'normal' })).toBeCloseTo(3 / 3.2897072539029444, 12);
    expect(standardDeviation({ ...sides, distribution: 'normal', deviation: 0.5 })).toBe(0.5);
    expect(standardDeviation({ ...sides, distribution: 'fixed' })).toBe(0);
    expect(standardDeviation({ typical: 2, distribution: 'lognormal', deviation: 0.1 })).toBeCloseTo(0.2015, 4);
    expect(standardDeviation({ typical: 2 })).toBe(0);
  });
});

describe('tables of a cell', () => {
  const table: Table = [
    [0, 1],
    [10, 3],
  ];

  test('tableValue: linear inside, constant outside, refused when empty', () => {
    expect([-5, 0, 2.5, 10, 99].map((x) => tableValue(table, x))).toEqual([1, 1, 1.5, 3, 3]);
    expect(codeOf(() => tableValue([], 1))).toBe('empty-table');
  });

  test('resistanceTemperatureFactor: the logarithm is linear', () => {
    const factors: Table = [
      [-20, 16],
      [20, 1],
    ];
    expect(resistanceTemperatureFactor(factors, 0)).toBeCloseTo(4, 12);
    expect(resistanceTemperatureFactor(factors, -40)).toBe(16);
  });

  test('openCircuitV: table at 20 °C and a coefficient', () => {
    const cell = { openCircuitTableV: table, openCircuitTemperatureVPerK: 0.01 };
    expect(openCircuitV(cell, 5, 10)).toBeCloseTo(1.9, 14);
  });

  test('freshResistanceOhm: the nearest longer pulse, else the longest, a figure without length for what is left', () => {
    const figures = [
      { pulseS: 2, ohm: { typical: 20 } },
      { pulseS: 0.01, ohm: { typical: 10 } },
    ];
    expect([0.001, 0.01, 0.02, 2, 5, Infinity].map((s) => freshResistanceOhm(figures, s))).toEqual([
      10, 10, 20, 20, 20, 20,
    ]);
    const undated = [...figures, { ohm: { typical: 30 } }];
    expect([0.01, 5, Infinity].map((s) => freshResistanceOhm(undated, s))).toEqual([10, 30, 30]);
  });

  test('capacityAtCurrentC: linear in the logarithm of the current, constant outside', () => {
    const rates: Table = [
      [1e-4, 100],
      [1e-2, 50],
    ];
    expect([0, 1e-3, 1].map((currentA) => capacityAtCurrentC({ table: rates, currentA }))).toEqual([100, 75, 50]);
  });

  test('usableChargeC: all of it without a cut-off, none where the fresh cell fails', () => {
    const input = { capacityC: 10, openCircuitTableV: table, resistanceTableOhm: table, peakA: 0.1 };
    expect(usableChargeC({ ...input, cutOffV: 0 })).toBe(10);
    expect(usableChargeC({ ...input, cutOffV: 2 })).toBe(0);
  });
});

test('besselI0: the mean of exp(x·cos φ)', () => {
  let sum = 0;
  for (let step = 0; step < 64; step++) sum += Math.exp(1.7 * Math.cos((2 * Math.PI * step) / 64));
  expect(besselI0(1.7)).toBeCloseTo(sum / 64, 12);
  expect(besselI0(1e6)).toBe(Infinity);
});
