import { describe, expect, it } from 'vitest';
import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';
import { YEAR_S } from '#common/units/si.ts';
import { forecastWords } from './forecast-words.ts';

function words(forecast: Partial<ForecastSummary> | null): string {
  const base: ForecastSummary = {
    engineVersion: '1',
    outcome: 'undervoltage',
    lifeS: 6.2 * YEAR_S,
    endMonth: 2,
    targetLifeS: 5 * YEAR_S,
  };
  const { before, strong, after, target } = forecastWords(forecast === null ? null : { ...base, ...forecast });
  return `${before}${strong}${after}${target ? ` | ${target.text}` : ''}`.replaceAll('\u00a0', ' ');
}

describe('forecastWords', () => {
  it.each([
    [{}, 'Lives 6.2 years, ends in February | meets the target of 5 years'],
    [{ lifeS: 4 * YEAR_S }, 'Lives 4.0 years, ends in February | misses the target of 5 years'],
    [{ outcome: 'charge-exhausted' }, 'Lives 6.2 years, ends in February | meets the target of 5 years'],
    [{ outcome: 'shelf-life' }, 'Lives 6.2 years, ends in February with its shelf life | meets the target of 5 years'],
    [
      { outcome: 'outlives-horizon', lifeS: null, endMonth: null },
      'Lives longer than 40 years | meets the target of 5 years',
    ],
    [{ outcome: 'never-starts', lifeS: 0 }, 'Never starts | misses the target of 5 years'],
    [{ outcome: 'oversubscribed', lifeS: null, endMonth: null }, 'Oversubscribed: steps need more time than there is'],
  ] as const)('%j: says the outcome and the target', (forecast, text) => {
    expect(words(forecast)).toBe(text);
  });

  it('meets the target exactly at its length', () => {
    expect(words({ lifeS: 5 * YEAR_S })).toMatch(/meets/);
  });

  it('says so when there is no forecast', () => {
    expect(words(null)).toMatch(/^No forecast/);
  });
});
