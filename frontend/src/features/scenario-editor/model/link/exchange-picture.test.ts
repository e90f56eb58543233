import { describe, expect, test } from 'vitest';
import { acknowledgedPlan } from '#test/support/exchange-plan-fixture.ts';
import {
  hasAlternatives,
  isOneExchange,
  leaders,
  meanRow,
  MOST_ATTEMPTS_DRAWN,
  rulerTicks,
  worstRow,
} from './exchange-picture.ts';
import { drawnFields } from './frame-picture.ts';

describe('meanRow', () => {
  test('draws each phase once, to scale and without a gap', () => {
    const plan = acknowledgedPlan();
    const { stretches, totalS, attempts } = meanRow(plan);
    expect(totalS).toBeCloseTo(plan.meanS, 9);
    expect(attempts).toEqual([]);
    stretches.forEach(({ from, to, phase }, i) => {
      expect(from).toBe(i === 0 ? 0 : stretches[i - 1]?.to);
      expect((to - from) * totalS).toBeCloseTo(plan.phases[phase]?.meanS ?? 0, 12);
    });
  });
});

describe('worstRow', () => {
  test('draws what is interrupted in each attempt and what is not once', () => {
    const plan = acknowledgedPlan();
    const { stretches, totalS, attempts } = worstRow(plan);
    expect(totalS).toBeCloseTo(plan.worstS, 12);
    expect(attempts).toHaveLength(4);
    const namesOf = (attempt: number | null) =>
      stretches.filter((stretch) => stretch.attempt === attempt).map(({ phase }) => plan.phases[phase]?.id);
    expect(namesOf(null)).toEqual(['crystal-start']);
    expect(namesOf(3)).toEqual(['backoff', 'assessment', 'turnaround', 'frame', 'acknowledgement-wait']);
  });

  test('draws attempts as one where they are too many to tell apart', () => {
    const { stretches, attempts } = worstRow(acknowledgedPlan({ worstAttempts: MOST_ATTEMPTS_DRAWN + 1 }));
    expect(attempts).toEqual([]);
    expect(stretches).toHaveLength(6);
  });
});

describe('phases that exclude each other', () => {
  test('are left out of the worst row where the others make the longest exchange', () => {
    const plan = acknowledgedPlan();
    expect(hasAlternatives(plan)).toBe(true);
    expect(isOneExchange(worstRow(plan), plan)).toBe(true);
  });

  test('are drawn all where no choice of them makes the longest exchange', () => {
    const plan = acknowledgedPlan({ worstS: 0.1234 });
    expect(isOneExchange(worstRow(plan), plan)).toBe(false);
    expect(worstRow(plan).stretches.some(({ phase }) => plan.phases[phase]?.id === 'acknowledgement')).toBe(true);
  });
});

describe('leaders', () => {
  test('keep their labels apart and on the row where stretches are hair-thin', () => {
    const labels = leaders(worstRow(acknowledgedPlan())).map(({ label }) => label);
    labels.forEach((label, i) => expect(label - (labels[i - 1] ?? -1)).toBeGreaterThan(0.0449));
    expect(labels[0]).toBeGreaterThan(0);
    expect(labels.at(-1)).toBeLessThan(1);
  });
});

describe('rulerTicks', () => {
  test('stand at round times within the row', () => {
    expect(rulerTicks(0.004534).map(({ timeS }) => timeS)).toEqual([0, 0.001, 0.002, 0.003, 0.004]);
    expect(rulerTicks(0)).toEqual([]);
  });
});

describe('drawnFields', () => {
  test('give each field its places on air', () => {
    const { frame } = acknowledgedPlan();
    const fields = frame ? drawnFields(frame) : [];
    expect(fields.find(({ field }) => field.id === 'payload')).toMatchObject({ first: 16, last: 39, drawn: 24 });
    expect(fields.at(-1)?.last).toBe(frame?.airOctets);
  });
});
