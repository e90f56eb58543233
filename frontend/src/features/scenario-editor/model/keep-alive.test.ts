import { describe, expect, it } from 'vitest';
import type { Schedule } from '#common/engine/scenario/scenario.types.ts';
import { scheduleSchema } from '#common/schemas/scenario.schema.ts';
import { countingSide, withKeepAlive, withPeriod } from './keep-alive.ts';

const PLAIN: Schedule = { kind: 'every', periodS: 900 };
const CHILD: Schedule = {
  kind: 'every',
  periodS: 10,
  keepAlive: { pollS: 10, supervisionS: 120, childTimeoutS: 240 },
  when: { belowC: 2 },
};

describe('countingSide', () => {
  it.each([
    [{ pollS: 10, supervisionS: 120 }, 'pollS'],
    [{ pollS: 300, supervisionS: 120, childTimeoutS: 240 }, 'supervisionS'],
    [{ childTimeoutS: 240 }, 'childTimeoutS'],
    [{ supervisionS: 60, childTimeoutS: 60 }, 'supervisionS'],
    [{}, null],
  ])('%o: %s', (keepAlive, side) => {
    expect(countingSide(keepAlive)).toBe(side);
  });
});

describe('withKeepAlive', () => {
  it('makes the first period given the period', () => {
    expect(withKeepAlive(PLAIN, 'pollS', 30)).toEqual({ kind: 'every', periodS: 30, keepAlive: { pollS: 30 } });
  });

  it('takes the next shortest where the shortest grows', () => {
    expect(withKeepAlive(CHILD, 'pollS', 600)).toMatchObject({ periodS: 120, when: { belowC: 2 } });
  });

  it('takes the next shortest where the shortest is taken away', () => {
    expect(withKeepAlive(CHILD, 'pollS', undefined)).toMatchObject({
      periodS: 120,
      keepAlive: { supervisionS: 120, childTimeoutS: 240 },
    });
  });

  it('leaves the period and no trace when the last one is taken away', () => {
    expect(withKeepAlive(withKeepAlive(PLAIN, 'pollS', 30), 'pollS', undefined)).toEqual({
      kind: 'every',
      periodS: 30,
    });
  });

  it('makes what the schema accepts', () => {
    expect(scheduleSchema.safeParse(withKeepAlive(CHILD, 'childTimeoutS', 5)).error).toBeUndefined();
  });
});

describe('withPeriod', () => {
  it('changes the period that counts', () => {
    expect(withPeriod(CHILD, 20)).toMatchObject({ periodS: 20, keepAlive: { pollS: 20 } });
  });

  it('stops at the next shortest', () => {
    expect(withPeriod(CHILD, 200)).toMatchObject({ periodS: 120, keepAlive: { pollS: 200 } });
  });

  it('changes a plain period', () => {
    expect(withPeriod(PLAIN, 60)).toEqual({ kind: 'every', periodS: 60 });
  });

  it('leaves a schedule without a period', () => {
    expect(withPeriod({ kind: 'always' }, 60)).toEqual({ kind: 'always' });
  });
});
