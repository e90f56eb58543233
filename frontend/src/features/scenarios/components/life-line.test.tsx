import { cleanup, render } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';
import { YEAR_S } from '#common/units/si.ts';
import { LifeLine, lifeScaleYears } from './life-line.tsx';

afterEach(cleanup);

const forecast = (lifeYears: number | null, targetYears: number): ForecastSummary => ({
  engineVersion: '1',
  outcome: lifeYears === null ? 'outlives-horizon' : 'undervoltage',
  lifeS: lifeYears === null ? null : lifeYears * YEAR_S,
  endMonth: lifeYears === null ? null : 2,
  targetLifeS: targetYears * YEAR_S,
});

describe('lifeScaleYears', () => {
  it.each([
    [[], 2],
    [[forecast(6.2, 5)], 7],
    [[forecast(1, 10), null], 12],
    [[forecast(80, 5)], 30],
  ])('case %#: holds every life and target, 30 years at most', (forecasts, years) => {
    expect(lifeScaleYears(forecasts)).toBe(years);
  });
});

describe('LifeLine', () => {
  it('ends where the life ends', () => {
    const { container } = render(<LifeLine forecast={forecast(4, 5)} scaleYears={8} />);
    expect(container.querySelector('circle')?.getAttribute('cx')).toBe('50.00%');
  });

  it('has no end when life outlives the horizon', () => {
    const { container } = render(<LifeLine forecast={forecast(null, 5)} scaleYears={8} />);
    expect(container.querySelector('circle')).toBeNull();
  });

  it('is left out without a life', () => {
    const { container } = render(<LifeLine forecast={null} scaleYears={8} />);
    expect(container.innerHTML).toBe('');
  });
});
