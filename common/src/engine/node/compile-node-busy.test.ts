import { describe, expect, test } from 'vitest';
import { buildNode, buildPart, buildRoutine, buildStep, buildTransition } from '#test/support/build-node.ts';
import type { Part, Step } from '../scenario/scenario.types.ts';
import { compileNode } from './compile-node.ts';
import type { NodeProgram } from './node-program.types.ts';

const busy = { partId: 'controller', stateId: 'polling' };
const radio = buildPart(
  'radio',
  { off: 0, on: 0.01 },
  { transitions: [buildTransition('off>on', 0.002, 0.003, busy), buildTransition('on>off', 0.001, 0.003)] },
);
const controller = buildPart('controller', { sleep: 0, polling: 0.004, active: 0.006 });

function compile(parts: Part[], steps: Step[]): NodeProgram {
  return compileNode(buildNode(parts, [buildRoutine('r', steps)]), { defaultReferenceVoltageV: 3 });
}

/** Time of the controller by what it does, s. */
function controllerTimes(program: NodeProgram): Record<string, number> {
  const times: Record<string, number> = {};
  for (const { partIndex, activity, durationTermsS } of program.routines[0]?.segments ?? []) {
    if (program.parts[partIndex]?.partId !== 'controller') continue;
    const name = activity.kind === 'state' ? activity.stateId : `${activity.fromStateId}>${activity.toStateId}`;
    times[name] = (times[name] ?? 0) + durationTermsS.reduce((sum, term) => sum + term, 0);
  }
  return times;
}

describe('compileNode: a part kept busy', () => {
  test('is in that state while the transition runs, as a segment of its own', () => {
    const program = compile([radio, controller], [buildStep('s', 0.01, { radio: 'on' })]);
    expect(controllerTimes(program)).toEqual({ polling: 0.002 });
    expect(program.routines[0]?.intervals[0]?.occupants).toHaveLength(2);
  });

  test('is that instead of holding the state of the step before', () => {
    const steps = [
      buildStep('s', 0.01, { controller: 'active' }),
      buildStep('t', 0.01, { radio: 'on', controller: 'active' }),
    ];
    const times = controllerTimes(compile([radio, controller], steps));
    expect(times).toEqual({ active: 0.02, polling: 0.002 });
  });

  test('keeps the state that a step names beside a return', () => {
    const returning = buildPart(
      'radio',
      { off: 0, on: 0.01 },
      { transitions: [buildTransition('off>on', 0), buildTransition('on>off', 0.001, 0.003, busy)] },
    );
    const steps = [buildStep('s', 0.01, { radio: 'on' }), buildStep('t', 0.01, { controller: 'active' })];
    expect(controllerTimes(compile([returning, controller], steps))).toEqual({ active: 0.01 });
    expect(controllerTimes(compile([returning, controller], steps.slice(0, 1)))).toEqual({ polling: 0.001 });
  });

  const slow = {
    ...controller,
    transitions: [buildTransition('sleep>polling', 0.0005), buildTransition('polling>sleep', 0.0005)],
  };

  test('counts as on the way while it moves itself, and the forecast says so', () => {
    const program = compile([radio, slow], [buildStep('s', 0.01, { radio: 'on', controller: 'polling' })]);
    const times = controllerTimes(program);
    expect(times['polling']).toBeCloseTo(0.0115, 12);
    expect(times['sleep>polling']).toBe(0.0005);
    expect(program.remarks).toEqual([
      expect.objectContaining({ code: 'busy-part-elsewhere', path: 'node.parts[0].transitions[0].busy' }),
    ]);
  });

  test('is not remarked when it is in that state already', () => {
    const steps = [
      buildStep('s', 0.01, { controller: 'polling' }),
      buildStep('t', 0.01, { radio: 'on', controller: 'polling' }),
    ];
    expect(compile([radio, slow], steps).remarks).toEqual([]);
  });
});
