import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { meanCurrentA } from './mean-current.ts';

describe('meanCurrentA', () => {
  test('weighs each current with its duration', () => {
    expect(
      meanCurrentA([
        { currentA: 0.02, durationS: 1 },
        { currentA: 0.01, durationS: 4 },
      ]),
    ).toBeCloseTo(0.012, 15);
  });

  test('equals the sleep current when the other phases have no duration', () => {
    expect(
      meanCurrentA([
        { currentA: 1, durationS: 0 },
        { currentA: 2e-6, durationS: 60 },
      ]),
    ).toBe(2e-6);
  });

  test.each([
    [[], 'phases'],
    [[{ currentA: 1, durationS: 0 }], 'phases'],
    [[{ currentA: NaN, durationS: 1 }], 'phases[0].currentA'],
    [
      [
        { currentA: 1, durationS: 1 },
        { currentA: 1, durationS: -1 },
      ],
      'phases[1].durationS',
    ],
  ])('throws for %o', (phases, field) => {
    const error = errorOf(OutOfRangeError, () => meanCurrentA(phases));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});
