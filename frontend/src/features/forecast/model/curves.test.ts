import { describe, expect, it } from 'vitest';
import { YEAR_S } from '#common/units/si.ts';
import { pictureForecast } from '#test/support/picture-fixtures.ts';
import { curvePictures, dekadInWords, timeAxis } from './curves.ts';

describe('curvePictures', () => {
  it('curvePictures: keeps every value inside its axis', () => {
    for (const { curves, min, max } of curvePictures(pictureForecast())) {
      for (const value of curves.flatMap((curve) => curve.values)) {
        expect(value).toBeGreaterThanOrEqual(min);
        expect(value).toBeLessThanOrEqual(max);
      }
    }
  });

  it('curvePictures: says where an axis begins exactly when that is not zero', () => {
    for (const { id, min, startsAt } of curvePictures(pictureForecast())) {
      expect([id, startsAt !== null]).toEqual([id, min > 0]);
    }
  });

  it('curvePictures: tells curves of one picture apart without colour', () => {
    for (const { curves } of curvePictures(pictureForecast())) {
      expect(new Set(curves.map((curve) => curve.style.dash.join())).size).toBe(curves.length);
    }
  });

  it('curvePictures: shows the charge left in mAh', () => {
    const [charge] = curvePictures(pictureForecast());
    expect(charge?.unit).toBe('mAh');
    expect(charge?.curves[0]?.values.at(-1)).toBeCloseTo(180, 6);
  });
});

describe('timeAxis', () => {
  it('timeAxis: counts months for a life under two years and years from then on', () => {
    expect(timeAxis(pictureForecast({ lifeS: YEAR_S }).dekads)).toMatchObject({ title: 'months of life', max: 12 });
    expect(timeAxis(pictureForecast({ lifeS: 3 * YEAR_S }).dekads)).toMatchObject({ title: 'years of life', max: 3 });
  });
});

describe('dekadInWords', () => {
  it('dekadInWords: tells third, month and year of life', () => {
    const { dekads } = pictureForecast({ lifeS: 2 * YEAR_S });
    expect([0, 1, 2, 35, 36].map((i) => dekads[i]).map((dekad) => (dekad ? dekadInWords(dekad) : ''))).toEqual([
      'early October, year 1',
      'mid October, year 1',
      'late October, year 1',
      'late September, year 1',
      'early October, year 2',
    ]);
  });
});
