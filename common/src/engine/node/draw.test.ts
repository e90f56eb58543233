import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { drawAt, stateDraw } from './draw.ts';
import type { Draw } from './node-program.types.ts';

const draw: Draw = {
  currentA: 0.01,
  law: 'constant-current',
  referenceVoltageV: 3,
  referenceTemperatureC: 25,
  doublingK: null,
};

describe('drawAt', () => {
  test.each([
    ['constant-current', 0.01],
    ['constant-power', 0.02],
    ['resistive', 0.005],
  ] as const)('follows the law %s at half the reference voltage', (law, currentA) => {
    expect(drawAt({ ...draw, law }, { voltageV: 1.5, temperatureC: 25 })).toBeCloseTo(currentA, 15);
  });

  test('doubles every doublingK above the reference and halves below', () => {
    const leaky = { ...draw, doublingK: 10 };
    expect(drawAt(leaky, { voltageV: 3, temperatureC: 35 })).toBeCloseTo(0.02, 15);
    expect(drawAt(leaky, { voltageV: 3, temperatureC: 5 })).toBeCloseTo(0.0025, 15);
  });

  test.each([0, -1, NaN, Infinity])('throws for a rail of %s V', (voltageV) => {
    const error = errorOf(OutOfRangeError, () => drawAt(draw, { voltageV, temperatureC: 25 }));
    expect(error).toMatchObject({ code: 'out-of-range', field: 'voltageV' });
  });
});

describe('stateDraw', () => {
  test('fills in constant current, 25 °C and the default reference voltage', () => {
    const state = { id: 'on', name: 'On', current: { min: 0.005, typical: 0.01, max: 0.02 } };
    expect(stateDraw(state, 3)).toEqual(draw);
  });
});
