import { describe, expect, test } from 'vitest';
import { editorScenario } from '#test/support/editor-scenario.ts';
import { problemWords } from './problem-words.ts';

describe('problemWords', () => {
  test('puts names in the place of the ids of the part that the path leads to', () => {
    const message = '"Radio" has no transitions that lead from "idle" to "transmit"; reachable: sleep, idle.';
    expect(problemWords(editorScenario(), { path: 'node.routines[0].steps[1].states.radio', message })).toBe(
      '“Radio” has no transitions that lead from “Idle” to “Transmit”; reachable: Sleep, Idle.',
    );
  });

  test('leaves words alone that are no ids', () => {
    const message = 'The table "soon" must rise.';
    expect(problemWords(editorScenario(), { path: 'supply.cell', message })).toBe('The table “soon” must rise.');
  });
});
