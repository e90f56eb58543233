import { describe, expect, it } from 'vitest';
import { pictureScenario } from '#test/support/picture-fixtures.ts';
import { compileAlone, type CompiledRoutine } from './compiled-routine.ts';

function compiled(index: number, change?: Parameters<typeof pictureScenario>[0]): CompiledRoutine {
  const scenario = pictureScenario(change);
  const routine = scenario.node.routines[index];
  if (!routine) throw new Error('No such routine.');
  return compileAlone(scenario, routine);
}

const withoutWayToTransmit: Parameters<typeof pictureScenario>[0] = (scenario) => {
  const radio = scenario.node.parts[0];
  if (radio) radio.transitions = radio.transitions.filter((move) => move.toStateId !== 'r-tx');
};

describe('compileAlone', () => {
  it('compileAlone: places a missing path in the lane of its part and at its step, told by names', () => {
    expect(compiled(0, withoutWayToTransmit)).toEqual({
      kind: 'problems',
      problems: [
        {
          partId: 'radio',
          stepIndex: 2,
          message: expect.stringContaining('from “Receive” to “Transmit”; reachable: Sleep, Idle'),
        },
      ],
    });
  });

  it('compileAlone: lays out a routine although another one has problems', () => {
    expect(compiled(1, withoutWayToTransmit).kind).toBe('laid-out');
  });

  it('compileAlone: lays out a routine that is switched off', () => {
    const result = compiled(0, (scenario) => scenario.node.routines.forEach((routine) => (routine.enabled = false)));
    expect(result.kind).toBe('laid-out');
  });
});
