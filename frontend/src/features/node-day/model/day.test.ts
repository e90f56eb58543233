import { describe, expect, it } from 'vitest';
import type { Schedule } from '#common/engine/index.ts';
import { dayStrip, type DayStrip } from './day.ts';

const strip = (schedule: Schedule, cycleS = 0.02): DayStrip =>
  dayStrip({ id: 'r', name: 'R', enabled: true, schedule, steps: [] }, cycleS);

describe('dayStrip', () => {
  it('dayStrip: marks every cycle of an hourly routine, the first at midnight', () => {
    const { kind, marksH } = strip({ kind: 'every', periodS: 3_600 });
    expect(kind).toBe('marks');
    expect(marksH).toHaveLength(24);
    expect(marksH[1]).toBeCloseTo(1, 9);
  });

  it('dayStrip: shows a frequent routine as a density with its count', () => {
    expect(strip({ kind: 'every', periodS: 60 })).toMatchObject({
      kind: 'density',
      perDay: 1_440,
      stretchesH: [[0, 24]],
    });
  });

  it('dayStrip: keeps a window within its hours, across midnight too', () => {
    const { stretchesH, marksH } = strip({ kind: 'window', fromHour: 22, toHour: 2, periodS: 3_600 });
    expect(stretchesH).toEqual([
      [0, 2],
      [22, 24],
    ]);
    expect(marksH).toEqual([22, 23, 0, 1]);
  });

  it('dayStrip: scatters random cycles within the day, alike each time', () => {
    const first = strip({ kind: 'random', meanPerDay: 40 });
    expect(first.isRandom).toBe(true);
    expect(first.marksH).toHaveLength(40);
    expect(first.marksH.every((hour) => hour >= 0 && hour < 24)).toBe(true);
    expect(strip({ kind: 'random', meanPerDay: 40 })).toEqual(first);
  });

  it('dayStrip: leaves a day without cycles empty', () => {
    expect(strip({ kind: 'once', afterS: 0 }).kind).toBe('none');
    expect(strip({ kind: 'random', meanPerDay: 0 }).kind).toBe('none');
  });

  it('dayStrip: fills the day of a routine that never pauses', () => {
    expect(strip({ kind: 'always' }).kind).toBe('solid');
  });
});
