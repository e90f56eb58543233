import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { arbitraryScenario } from '#test/support/arbitrary-scenario.ts';
import { editorScenario } from '#test/support/editor-scenario.ts';
import { fieldOfPath, isFieldOf, pathOfField } from './fields.ts';

describe('fieldOfPath', () => {
  test('names list items by their id and others by their place', () => {
    const scenario = editorScenario();
    expect(fieldOfPath(scenario, 'node.parts[0].states[2].current.typical')).toBe(
      'node.parts.radio.states.transmit.current.typical',
    );
    expect(fieldOfPath(scenario, 'supply.cell.openCircuitTableV[1][0]')).toBe('supply.cell.openCircuitTableV.1.0');
  });

  test('is undone by pathOfField', () => {
    fc.assert(
      fc.property(arbitraryScenario(), fc.nat(3), (scenario, index) => {
        const path = `node.routines[${index}].steps[0].duration`;
        fc.pre(scenario.node.routines[index] !== undefined);
        expect(pathOfField(scenario, fieldOfPath(scenario, path))).toBe(path);
      }),
      { numRuns: 30 },
    );
  });
});

describe('isFieldOf', () => {
  test('holds for an optional figure of something that is there, not for one of a removed part', () => {
    const scenario = editorScenario();
    expect(isFieldOf(scenario, 'node.parts.radio.states.idle.lowestVoltageV.typical')).toBe(true);
    expect(isFieldOf(scenario, 'node.parts.gone.states.idle.current.typical')).toBe(false);
  });
});
