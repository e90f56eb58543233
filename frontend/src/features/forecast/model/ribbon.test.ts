import { describe, expect, it } from 'vitest';
import { DAY_S, YEAR_S } from '#common/units/si.ts';
import { pictureForecast, pictureScenario } from '#test/support/picture-fixtures.ts';
import { headroomStep, ribbonMeasures, seasonRibbon, winterMonths } from './ribbon.ts';

describe('seasonRibbon', () => {
  it('seasonRibbon: begins its columns with the month in which life starts', () => {
    expect(seasonRibbon(pictureScenario(), pictureForecast()).columnMonths).toEqual([
      10, 11, 12, 1, 2, 3, 4, 5, 6, 7, 8, 9,
    ]);
  });

  it('seasonRibbon: draws a row a year and a month for each three dekads', () => {
    const ribbon = seasonRibbon(pictureScenario(), pictureForecast({ lifeS: 2 * YEAR_S }));
    expect(ribbon.rows.map((row) => row.year)).toEqual([1, 2]);
    expect(ribbon.months).toHaveLength(24);
    expect(ribbon.months.map(({ month }) => month).slice(0, 4)).toEqual([10, 11, 12, 1]);
  });

  it('seasonRibbon: marks the end inside the last row and lives up to it only', () => {
    const last = seasonRibbon(pictureScenario(), pictureForecast({ lifeS: 6.35 * YEAR_S })).rows.at(-1);
    expect(last?.endAt).toBeCloseTo(0.35, 6);
    expect(last?.livedTo).toBeCloseTo(0.35, 6);
  });

  it('seasonRibbon: covers the lived part of a row with runs that touch', () => {
    for (const row of seasonRibbon(pictureScenario(), pictureForecast()).rows) {
      expect(row.runs[0]?.from).toBe(0);
      expect(row.runs.at(-1)?.to).toBeCloseTo(row.livedTo, 9);
      row.runs.slice(1).forEach((run, i) => expect(run.from).toBeCloseTo(row.runs[i]?.to ?? -1, 9));
    }
  });

  it('seasonRibbon: takes the least headroom and the coldest hour of the three dekads of a month', () => {
    const forecast = pictureForecast({ lifeS: YEAR_S });
    const january = seasonRibbon(pictureScenario(), forecast).months[3];
    const three = forecast.dekads.slice(9, 12);
    expect(january?.headroomV).toBe(Math.min(...three.map((dekad) => dekad.headroomV)));
    expect(january?.coldestC).toBe(Math.min(...three.map((dekad) => dekad.coldestC)));
    expect(january?.isCold).toBe(true);
  });

  it('seasonRibbon: puts the warning into exactly one month', () => {
    const months = seasonRibbon(pictureScenario(), pictureForecast()).months.filter((month) => month.hasWarning);
    expect(months).toHaveLength(1);
    expect(months[0]?.month).toBe(12);
  });

  it('seasonRibbon: has forty rows and no end for a life past the horizon', () => {
    const ribbon = seasonRibbon(
      pictureScenario(),
      pictureForecast({ outcome: 'outlives-horizon', lifeS: null, warning: null }),
    );
    expect(ribbon.rows).toHaveLength(40);
    expect(ribbon.rows.every((row) => row.endAt === null && row.livedTo === 1)).toBe(true);
  });

  it('seasonRibbon: leaves out years past the fortieth and counts them', () => {
    expect(seasonRibbon(pictureScenario(), pictureForecast({ lifeS: 42 * YEAR_S })).hiddenYears).toBe(2);
  });

  it('seasonRibbon: marks an end at the border of two years once', () => {
    const ribbon = seasonRibbon(pictureScenario(), pictureForecast({ lifeS: 3 * YEAR_S }));
    expect(ribbon.rows.map((row) => row.endAt)).toEqual([null, null, 1]);
  });

  it('seasonRibbon: has no months for a life of no length', () => {
    expect(seasonRibbon(pictureScenario(), pictureForecast({ lifeS: 0 })).months).toEqual([]);
  });

  it('seasonRibbon: draws a life of a few days', () => {
    const [month, ...others] = seasonRibbon(pictureScenario(), pictureForecast({ lifeS: 5 * DAY_S })).months;
    expect(others).toEqual([]);
    expect(month?.hasEnd).toBe(true);
    expect(month?.lived).toBeCloseTo((5 * DAY_S) / (YEAR_S / 12), 6);
  });
});

describe('headroomStep', () => {
  it('headroomStep: never grows fainter as headroom falls', () => {
    const steps = [2, 0.8, 0.79, 0.4, 0.3, 0.2, 0.15, 0.1, 0.05, 0, -0.1].map(headroomStep);
    expect(steps).toEqual([1, 1, 2, 2, 3, 3, 4, 4, 5, 5, 5]);
  });
});

describe('ribbonMeasures', () => {
  it('ribbonMeasures: fits every number of rows from 1 to 40 into the height kept free', () => {
    for (let rows = 1; rows <= 40; rows += 1) {
      const { rowPx, gapPx, heightPx } = ribbonMeasures(rows);
      expect(rows * (rowPx + gapPx)).toBeLessThanOrEqual(heightPx);
      expect(heightPx).toBeLessThanOrEqual(330);
    }
  });
});

describe('winterMonths', () => {
  it('winterMonths: finds the three coldest months in a row, across the new year', () => {
    expect(winterMonths(pictureScenario().climate)).toEqual([12, 1, 2]);
  });

  it('winterMonths: is null where every month is alike', () => {
    const { climate } = pictureScenario(
      (s) => (s.climate.months = s.climate.months.map(() => ({ meanC: -20, amplitudeK: 0 }))),
    );
    expect(winterMonths(climate)).toBeNull();
  });
});
