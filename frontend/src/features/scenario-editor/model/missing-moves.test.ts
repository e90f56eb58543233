import { describe, expect, test } from 'vitest';
import { compileNode } from '#common/engine/index.ts';
import { EngineError } from '#common/errors.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { problemsOfEngine, type InputProblem } from '#common/schemas/problem.ts';
import { editorScenario } from '#test/support/editor-scenario.ts';
import { missingMoves } from './missing-moves.ts';
import { addTransition } from './operations/part-operations.ts';
import { addStep, updateStep, withPartState } from './operations/routine-operations.ts';

/** The engine's own complaints about the node. */
function problemsOf(scenario: Scenario): InputProblem[] {
  try {
    compileNode(scenario.node, { defaultReferenceVoltageV: 3 });
    return [];
  } catch (error) {
    if (error instanceof EngineError) return problemsOfEngine(error);
    throw error;
  }
}

const sending = (): Scenario =>
  addStep(editorScenario(), 'report', {
    name: 'Send',
    states: { radio: 'transmit' },
    duration: { kind: 'fixed', typical: 0.001 },
  });

describe('missingMoves', () => {
  test('is empty when every move has a way', () => {
    expect(missingMoves(editorScenario(), problemsOf(editorScenario()))).toEqual([]);
  });

  test('tells the move, what is reachable and the transitions that would help', () => {
    const scenario = sending();
    const [move, ...others] = missingMoves(scenario, problemsOf(scenario));
    expect(others).toEqual([]);
    expect(move).toMatchObject({
      step: { name: 'Send' },
      part: { name: 'Radio' },
      from: { id: 'idle' },
      to: { id: 'transmit' },
    });
    expect(move?.reachable.map(({ id }) => id)).toEqual(['sleep']);
    expect(move?.links).toEqual([
      { fromStateId: 'idle', toStateId: 'transmit', viaStateId: null },
      { fromStateId: 'sleep', toStateId: 'transmit', viaStateId: 'sleep' },
    ]);
  });

  test.each([0, 1])('each link that it offers makes the move possible (%i)', (index) => {
    const scenario = sending();
    const link = missingMoves(scenario, problemsOf(scenario))[0]?.links[index];
    expect(link).toBeDefined();
    const repaired = addTransition(scenario, 'radio', {
      fromStateId: link?.fromStateId ?? '',
      toStateId: link?.toStateId ?? '',
      durationS: { typical: 0 },
      current: { typical: 0 },
    });
    expect(problemsOf(repaired)).toEqual([]);
  });

  test('tells the way back to rest that is missing after the last step', () => {
    const scenario = updateStep(sending(), 'report', 'wait', (step) => withPartState(step, 'radio', ''));
    const part = scenario.node.parts[0];
    if (part)
      part.transitions = [
        { fromStateId: 'sleep', toStateId: 'transmit', durationS: { typical: 0 }, current: { typical: 0 } },
      ];
    const [move] = missingMoves(scenario, problemsOf(scenario));
    expect(move).toMatchObject({ from: { id: 'transmit' }, to: { id: 'sleep' }, reachable: [] });
  });
});
