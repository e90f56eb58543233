import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { arbitraryScenario } from '#test/support/arbitrary-scenario.ts';
import { buildScenario } from '#test/support/api-scenario.ts';
import { buildPart, buildRoutine, buildStep, buildTransition } from '#test/support/build-node.ts';
import { diffDocuments } from './document-diff.ts';
import { joinPath, splitPath } from './problem.ts';

const radio = buildPart('radio', { sleep: 1e-6, send: 1e-2 }, { name: 'Radio', kind: 'radio' });
const sensor = buildPart('sensor', { sleep: 1e-7, on: 1e-3 }, { name: 'Sensor', kind: 'sensor' });
const report = buildRoutine('report', [
  buildStep('read', 0.1, { sensor: 'on' }),
  buildStep('tell', 0.01, { radio: 'send' }),
]);

function document(change: (draft: Scenario) => void = () => undefined): Scenario {
  const draft = structuredClone(buildScenario({ node: { parts: [radio, sensor], routines: [report], leakages: [] } }));
  change(draft);
  return draft;
}

/** Kind, path and label of each change. */
function told(from: Scenario, to: Scenario): string[] {
  return diffDocuments(from, to).map(({ kind, path, label }) => `${kind} ${path} | ${label}`);
}

describe('diffDocuments', () => {
  test('tells nothing for equal documents', () => {
    expect(diffDocuments(document(), document())).toEqual([]);
  });

  test('tells a changed figure with both values, named by part and state', () => {
    const to = document((draft) => {
      draft.node.parts.at(0)?.states.splice(1, 1, { id: 'send', name: 'send', current: { typical: 2e-2 } });
    });
    expect(diffDocuments(document(), to)).toEqual([
      {
        kind: 'changed',
        path: 'node.parts[0].states[1].current.typical',
        label: 'Part “Radio”, state “send”, current, typical value',
        before: 1e-2,
        after: 2e-2,
      },
    ]);
  });

  test('tells a part that only moved as moved, and a change inside it as such', () => {
    const to = document((draft) => {
      draft.node.parts.reverse();
      const [first] = draft.node.parts;
      if (first) first.name = 'Thermometer';
    });
    expect(told(document(), to)).toEqual([
      'moved node.parts[0] | Part “Thermometer”',
      'changed node.parts[0].name | Part “Thermometer”, name',
    ]);
  });

  test('tells of several moves only the items that left their order', () => {
    const steps = ['a', 'b', 'c', 'd'].map((id) => buildStep(id, 1, {}));
    const withSteps = (order: string): Scenario =>
      document((draft) => {
        draft.node.routines = [
          buildRoutine(
            'r',
            [...order].flatMap((id) => steps.filter((step) => step.id === id)),
          ),
        ];
      });
    expect(told(withSteps('abcd'), withSteps('dabc'))).toEqual([
      'moved node.routines[0].steps[0] | Routine “r”, step “d”',
    ]);
  });

  test('tells new and lost items whole, lost ones where they stood', () => {
    const to = document((draft) => {
      draft.node.routines = [buildRoutine('new', [])];
    });
    const changes = diffDocuments(document(), to);
    expect(changes).toMatchObject([
      { kind: 'added', path: 'node.routines[0]', label: 'Routine “new”', after: { id: 'new' } },
      { kind: 'removed', path: 'node.routines[0]', label: 'Routine “report”', before: { id: 'report' } },
    ]);
  });

  test('tells a first item of an empty list', () => {
    const to = document((draft) => {
      draft.node.leakages.push({ id: 'board', name: 'Board', current: { typical: 1e-7 } });
    });
    expect(told(document(), to)).toEqual(['added node.leakages[0] | Leakage “Board”']);
  });

  test('matches transitions by the states they join', () => {
    const withTransitions = (...list: string[]): Scenario =>
      document((draft) => {
        const [part] = draft.node.parts;
        if (part) part.transitions = list.map((fromTo, at) => buildTransition(fromTo, at));
      });
    const changes = told(withTransitions('sleep>send'), withTransitions('send>sleep', 'sleep>send'));
    expect(changes).toEqual([
      'added node.parts[0].transitions[0] | Part “Radio”, transition from “send” to “sleep”',
      'changed node.parts[0].transitions[1].durationS.typical | Part “Radio”, transition from “sleep” to “send”, duration, typical value',
    ]);
  });

  test('names the part whose state a step changes', () => {
    const to = document((draft) => {
      const step = draft.node.routines[0]?.steps[0];
      if (step) step.states['radio'] = 'send';
    });
    expect(told(document(), to)).toEqual([
      'added node.routines[0].steps[0].states.radio | Routine “report”, step “read”, state of “Radio”',
    ]);
  });

  test('tells another kind of schedule whole, and another kind of part as a field', () => {
    const to = document((draft) => {
      const [routine] = draft.node.routines;
      if (routine) routine.schedule = { kind: 'always' };
      const [part] = draft.node.parts;
      if (part) part.kind = 'other';
    });
    expect(told(document(), to)).toEqual([
      'changed node.parts[0].kind | Part “Radio”, kind',
      'changed node.routines[0].schedule | Routine “report”, schedule',
    ]);
  });

  test('names months, tables and fields without their units', () => {
    const to = document((draft) => {
      const [january] = draft.climate.months;
      if (january) january.meanC = -18;
      draft.supply.cell.openCircuitTableV = [[0, 3.5]];
      draft.supply.cutOffV = 2;
    });
    expect(told(document(), to)).toEqual([
      'changed supply.cell.openCircuitTableV | Supply, cell, open-circuit voltage',
      'added supply.cutOffV | Supply, cut-off',
      'changed climate.months[0].meanC | Climate, January, mean',
    ]);
  });

  test('says of any two documents something exactly when they differ, at paths that exist', () => {
    fc.assert(
      fc.property(arbitraryScenario(), arbitraryScenario(), (from, to) => {
        const changes = diffDocuments(from, to);
        expect(changes.length > 0).toBe(JSON.stringify(from) !== JSON.stringify(to));
        for (const { path, label } of changes) {
          expect(joinPath(splitPath(path))).toBe(path);
          expect(label).not.toMatch(/undefined|, ,/);
        }
      }),
      { numRuns: 50 },
    );
  });
});
