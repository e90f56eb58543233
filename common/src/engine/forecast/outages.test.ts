import { describe, expect, test } from 'vitest';
import { forecast } from '#common/engine/index.ts';
import type { Forecast, Scenario } from '#common/engine/index.ts';
import { pulsingNode, simpleScenario } from '#test/support/simple-scenario.ts';

const YEAR_S = 31_557_600;
const HOUR_S = 3_600;

/** A pulse that fails below some temperature while the voltage has hardly changed. */
function coldFailing(change: (scenario: Scenario) => void = () => undefined): Forecast {
  const scenario = simpleScenario({
    node: pulsingNode(3_600, 0.02, 1.5),
    capacityC: { typical: 2_000 },
    cell: {
      openCircuitTableV: [
        [0, 3],
        [0.9, 2.9],
        [1, 2],
      ],
      // 3 V − 1.5 V over 20 mA: fails above 75 Ω, 7.5 times the resistance at 20 °C, near −9 °C.
      resistanceFactorByTemperature: [
        [-20, 12],
        [20, 1],
      ],
    },
    climate: {
      startMonth: 7,
      months: Array.from({ length: 12 }, (_, month) => ({
        meanC: 4 - 10 * Math.cos((2 * Math.PI * month) / 12),
        amplitudeK: 8,
      })),
    },
  });
  change(scenario);
  return forecast(scenario, { withLedger: false });
}

describe('outages', () => {
  test('one a winter, silent at night only: fewer hours than the time between first and last', () => {
    const { lifeS, outages } = coldFailing();
    expect(outages.slice(0, 3).map(({ winter }) => winter)).toEqual([1, 2, 3]);
    const [first] = outages;
    expect(first?.startS).toBe(lifeS);
    expect(first?.hours).toBeGreaterThan(0);
    expect(first?.hours).toBeLessThan(((first?.endS ?? 0) - (first?.startS ?? 0)) / HOUR_S / 2);
  });

  test('the last report comes when no hour of any season works any more', () => {
    const { lastReportS, lifeS, startingChargeC, meanCurrentA } = coldFailing();
    expect(lastReportS).toBeGreaterThan((lifeS ?? 0) + YEAR_S);
    // At most when all charge is drawn.
    expect(lastReportS).toBeLessThan(startingChargeC / meanCurrentA);
  });

  test('no later report than the end of shelf life', () => {
    const { outcome, lastReportS } = coldFailing(({ supply: { cell } }) => (cell.shelfLifeS = 3 * YEAR_S));
    expect(outcome).toBe('undervoltage');
    expect(lastReportS).toBe(3 * YEAR_S);
  });

  test('judges each hour where colder may be better, and the same where the order does not matter', () => {
    const ordered = coldFailing();
    const judged = coldFailing(({ supply: { cell } }) => (cell.openCircuitTemperatureVPerK = -1e-12));
    expect(judged.outages).toHaveLength(ordered.outages.length);
    judged.outages.forEach((outage, index) => expect(outage.hours).toBeCloseTo(ordered.outages[index]?.hours ?? -1, 3));
    expect(judged.lastReportS).toBeCloseTo(ordered.lastReportS ?? -1, 0);
  });

  test('a node that fails on its first cold night may still report by day', () => {
    const { outcome, lifeS, lastReportS, outages } = coldFailing(({ climate }) => (climate.startMonth = 1));
    expect({ outcome, lifeS }).toEqual({ outcome: 'never-starts', lifeS: 0 });
    expect(outages[0]).toMatchObject({ winter: 1, startS: 0 });
    expect(lastReportS).toBeGreaterThan(YEAR_S);
  });
});
