import { describe, expect, it } from 'vitest';
import type { Forecast, Scenario } from '#common/engine/index.ts';
import { YEAR_S } from '#common/units/si.ts';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import { forecastFacts } from './facts.ts';

function fact(label: string, forecast: Partial<Forecast> = {}, change?: (scenario: Scenario) => void): string {
  const found = forecastFacts(pictureScenario(change), pictureForecast(forecast)).find((line) =>
    line.label.startsWith(label),
  );
  return `${found?.value} | ${found?.note ?? ''}`.replaceAll('\u00a0', ' ');
}

describe('forecastFacts', () => {
  it('forecastFacts: tells by how much a target is met or missed', () => {
    expect(fact('Target')).toBe('met | 16 months to spare');
    expect(fact('Target', { lifeS: 3 * YEAR_S })).toBe('not met | 2.0 years short');
    expect(fact('Target', { lifeS: 5.01 * YEAR_S })).toBe('just met | ');
  });

  it('forecastFacts: reads the last report where the target tolerates outages', () => {
    const tolerate = (scenario: Scenario): void => void (scenario.target.outages = 'tolerated');
    expect(fact('Target', { lifeS: 4 * YEAR_S, lastReportS: 7 * YEAR_S }, tolerate)).toBe(
      'met | 2.0 years to spare, outages tolerated',
    );
  });

  it('forecastFacts: does not call a target met that cannot be run', () => {
    expect(fact('Target', { outcome: 'oversubscribed', lifeS: null })).toBe('not met | the steps do not fit');
    expect(fact('Target', { outcome: 'never-starts', lifeS: 0 })).toMatch(/^not met/);
  });

  it('forecastFacts: tells the lead of the warning, its absence and that there is no monitor', () => {
    expect(fact('Low-battery')).toMatch(/^41 days ahead/);
    expect(fact('Low-battery', { warning: null })).toMatch(/^does not come/);
    expect(fact('Low-battery', {}, (scenario) => delete scenario.supply.lowBattery)).toMatch(/^no monitor/);
  });

  it('forecastFacts: tells the heaviest pulse and what happens when routines meet', () => {
    expect(fact('Heaviest')).toBe('17.3 mA for 1.31 ms | 20.4 mA when routines meet, about 32 times a year');
  });

  it('forecastFacts: adds outages only where there are any', () => {
    expect(fact('Last report')).toBe('undefined | ');
    const outages = [{ winter: 5, startS: 1, endS: 2, hours: 30 }];
    expect(fact('Last report', { outages, lastReportS: 7 * YEAR_S })).toBe(
      '7.0 years | silent for 30 hours in 1 winter',
    );
  });
});
