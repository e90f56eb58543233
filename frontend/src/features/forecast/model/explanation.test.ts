import { describe, expect, it } from 'vitest';
import type { Forecast } from '#common/engine/index.ts';
import { YEAR_S } from '#common/units/si.ts';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import { explainFigure, type Explanation } from './explanation.ts';
import { forecastSentence } from './sentence.ts';

const explain = (key: Parameters<typeof explainFigure>[0], forecast: Partial<Forecast> = {}): Explanation =>
  explainFigure(key, pictureScenario(), pictureForecast(forecast));
const valueOf = ({ rows }: Explanation, label: string): string =>
  (rows.find((row) => row.label === label)?.value ?? '').replaceAll('\u00a0', ' ');

describe('explainFigure', () => {
  it('explainFigure: explains every figure of the sentence of every outcome', () => {
    const outcomes = [
      'charge-exhausted',
      'undervoltage',
      'shelf-life',
      'outlives-horizon',
      'never-starts',
      'oversubscribed',
    ] as const;
    for (const outcome of outcomes) {
      const forecast = pictureForecast({ outcome, lifeS: 6 * YEAR_S });
      for (const { key } of forecastSentence(pictureScenario(), forecast)) {
        if (key !== null) expect(explainFigure(key, pictureScenario(), forecast).words).not.toBe('');
      }
    }
  });

  it('explainFigure: multiplies the fresh resistance by cold and depth', () => {
    const limit = explain('limit');
    expect(valueOf(limit, 'Resistance, fresh and at 20 °C')).toBe('18 Ω');
    expect(valueOf(limit, 'Limit set by')).toBe('Radio');
    expect(valueOf(limit, 'Critical step')).toBe('Transmit, in Report');
    const [cold, deep] = limit.rows.filter((row) => row.value.startsWith('×')).map((row) => Number(row.value.slice(2)));
    const then = Number.parseFloat(valueOf(limit, 'Resistance then'));
    expect(then / (18 * (cold ?? 0) * (deep ?? 0))).toBeCloseTo(1, 1);
  });

  it('explainFigure: says that a voltage which no longer carries the load collapses', () => {
    const forecast = pictureForecast();
    const dekads = forecast.dekads.map((dekad) => ({ ...dekad, loadedV: 0 }));
    expect(valueOf(explain('limit', { dekads }), 'Loaded, at the coldest hour')).toBe('collapses');
  });

  it('explainFigure: tells when and at which threshold the monitor warns', () => {
    const warning = explain('warning');
    expect(valueOf(warning, 'Before the end')).toBe('41 days');
    expect(valueOf(warning, 'Threshold')).toBe('2.4 V');
  });
});
