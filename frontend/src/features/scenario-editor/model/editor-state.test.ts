import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import { arbitraryScenario } from '#test/support/arbitrary-scenario.ts';
import {
  applyEdit,
  initialState,
  isDirty,
  leaveField,
  markSaved,
  redo,
  replaceDocument,
  select,
  setPending,
  undo,
  type EditorState,
} from './editor-state.ts';
import {
  addLeakage,
  addPart,
  addState,
  addTransition,
  duplicatePart,
  duplicateState,
  emptyPart,
  moveLeakage,
  movePart,
  moveState,
  moveTransition,
  removeLeakage,
  removePart,
  removeState,
  removeTransition,
  renameState,
  updateState,
} from './operations/part-operations.ts';
import {
  addRoutine,
  addStep,
  duplicateRoutine,
  duplicateStep,
  durationOfKind,
  emptyRoutine,
  emptyStep,
  moveRoutine,
  moveStep,
  removeRoutine,
  removeStep,
  scheduleOfKind,
  updateRoutine,
  updateStep,
  withPartState,
} from './operations/routine-operations.ts';
import {
  applyClimate,
  regulatorOfKind,
  updateMonth,
  updateSupply,
  updateTarget,
} from './operations/supply-operations.ts';
import { assumeMaxima } from './quantities.ts';

const saved = (document: Scenario) => ({
  document,
  version: 3,
  revision: 2,
  savedAt: '2026-12-01T12:00:00.000Z',
  savedBy: 'A',
});

/** An edit by three numbers, which pick the operation and what it works on. */
type Picks = readonly [number, number, number];
const pick = <T>(list: readonly T[], at: number): T | undefined => list[at % Math.max(1, list.length)];

function partEdit(scenario: Scenario, [operation, a, b]: Picks): Scenario {
  const part = pick(scenario.node.parts, a);
  const state = part && pick(part.states, b);
  const other = part && pick(part.states, a + 1);
  if (!part || !state || !other) return addPart(scenario, emptyPart('radio', 'Radio'));
  const places = (b % 5) - 2;
  const current = { typical: 1e-6 };
  const operations: (() => Scenario)[] = [
    () => addPart(scenario, emptyPart('sensor', part.name)),
    () => addPart(scenario, part),
    () => duplicatePart(scenario, part.id),
    () => removePart(scenario, part.id),
    () => movePart(scenario, part.id, places),
    () => addState(scenario, part.id, { name: 'Listen', current }, b),
    () => duplicateState(scenario, part.id, state.id),
    () => removeState(scenario, part.id, state.id),
    () => moveState(scenario, part.id, state.id, places),
    () => updateState(scenario, part.id, state.id, (before) => renameState(before, `Name ${b}`)),
    () =>
      addTransition(scenario, part.id, {
        fromStateId: state.id,
        toStateId: other.id,
        durationS: { typical: 0.001 },
        current,
        busy: { partId: part.id, stateId: state.id },
      }),
    () => removeTransition(scenario, part.id, b),
    () => moveTransition(scenario, part.id, b, places),
    () => addLeakage(scenario, { name: 'Divider', current }),
    () => removeLeakage(scenario, pick(scenario.node.leakages, b)?.id ?? ''),
    () => moveLeakage(scenario, pick(scenario.node.leakages, b)?.id ?? '', places),
  ];
  return pick(operations, operation)?.() ?? scenario;
}

function routineEdit(scenario: Scenario, [operation, a, b]: Picks): Scenario {
  const routine = pick(scenario.node.routines, a);
  if (!routine) return addRoutine(scenario, emptyRoutine('Report'));
  const step = pick(routine.steps, b);
  const part = pick(scenario.node.parts, b);
  const places = (b % 5) - 2;
  const kinds = ['every', 'random', 'window', 'once', 'always'] as const;
  const durations = ['fixed', 'exchange', 'serial'] as const;
  const operations: (() => Scenario)[] = [
    () => addRoutine(scenario, emptyRoutine('Report')),
    () => duplicateRoutine(scenario, routine.id),
    () => removeRoutine(scenario, routine.id),
    () => moveRoutine(scenario, routine.id, places),
    () => addStep(scenario, routine.id, emptyStep('Send'), b),
    () => duplicateStep(scenario, routine.id, step?.id ?? ''),
    () => removeStep(scenario, routine.id, step?.id ?? ''),
    () => moveStep(scenario, routine.id, step?.id ?? '', places),
    () =>
      updateRoutine(scenario, routine.id, (before) => ({
        ...before,
        schedule: scheduleOfKind(kinds[b % 5] ?? 'every', before.schedule),
      })),
    () =>
      updateStep(scenario, routine.id, step?.id ?? '', (before) => ({
        ...before,
        duration: durationOfKind(durations[b % 3] ?? 'fixed'),
      })),
    () =>
      updateStep(scenario, routine.id, step?.id ?? '', (before) =>
        part ? withPartState(before, part.id, part.states[0]?.id ?? '') : before,
      ),
  ];
  return pick(operations, operation)?.() ?? scenario;
}

function otherEdit(scenario: Scenario, [operation, a, b]: Picks): Scenario {
  const kinds = ['none', 'linear', 'switching'] as const;
  const operations: (() => Scenario)[] = [
    () =>
      updateSupply(scenario, (supply) => ({
        ...supply,
        regulator: regulatorOfKind(kinds[b % 3] ?? 'none', supply.regulator),
      })),
    () => updateMonth(scenario, a % 12, (month) => ({ ...month, meanC: b })),
    () => applyClimate(scenario, { months: scenario.climate.months.toReversed() }),
    () => updateTarget(scenario, (target) => ({ ...target, lifeS: 1 + b })),
    () => assumeMaxima(scenario, 1 + b / 10),
  ];
  return pick(operations, operation)?.() ?? scenario;
}

const arbitraryPicks = fc.tuple(fc.nat(3), fc.nat(30), fc.nat(30), fc.nat(30));
const changeOf =
  ([area, ...picks]: [number, number, number, number]) =>
  (scenario: Scenario): Scenario =>
    area === 0 || area === 1
      ? partEdit(scenario, picks)
      : area === 2
        ? routineEdit(scenario, picks)
        : otherEdit(scenario, picks);

const run = (document: Scenario, edits: [number, number, number, number][]): EditorState =>
  edits.reduce(
    (state, picks) => applyEdit(state, { label: 'an edit', change: changeOf(picks) }),
    initialState(saved(document)),
  );

describe('applyEdit', () => {
  test('keeps every schema-valid document valid, whatever the operations', () => {
    fc.assert(
      fc.property(arbitraryScenario(), fc.array(arbitraryPicks, { maxLength: 25 }), (scenario, edits) => {
        const { document } = run(scenario, edits);
        const parsed = scenarioSchema.safeParse(document);
        expect(parsed.error?.issues ?? []).toEqual([]);
      }),
      { numRuns: 150 },
    );
  });

  test('joins edits of one field into one undo step until the field is left', () => {
    fc.assert(
      fc.property(arbitraryScenario(), (scenario) => {
        const type = (state: EditorState, name: string) =>
          applyEdit(state, { label: 'the name', field: 'name', change: (before) => ({ ...before, name }) });
        const typed = type(type(type(initialState(saved(scenario)), 'R'), 'Ra'), 'Rad');
        expect(typed.past).toHaveLength(1);
        expect(type(leaveField(typed), 'Radi').past).toHaveLength(2);
      }),
      { numRuns: 5 },
    );
  });

  test('adds no undo step when nothing changes', () => {
    fc.assert(
      fc.property(arbitraryScenario(), (scenario) => {
        const state = initialState(saved(scenario));
        expect(applyEdit(state, { label: 'nothing', change: (before) => before })).toBe(state);
      }),
      { numRuns: 5 },
    );
  });
});

describe('undo and redo', () => {
  test('undo after redo and redo after undo give the same document and selection', () => {
    fc.assert(
      fc.property(
        arbitraryScenario(),
        fc.array(arbitraryPicks, { minLength: 1, maxLength: 20 }),
        fc.nat(20),
        (scenario, edits, back) => {
          let state = run(scenario, edits);
          for (let count = 0; count < back; count += 1) state = undo(state);
          if (state.past.length > 0) {
            const there = redo(undo(state));
            expect(there.document).toBe(state.document);
            expect(there.selection).toEqual(state.selection);
            expect(there.past).toEqual(state.past);
          }
          if (state.future.length > 0) expect(undo(redo(state)).document).toBe(state.document);
        },
      ),
      { numRuns: 100 },
    );
  });

  test('undoing everything gives the document that was opened', () => {
    fc.assert(
      fc.property(arbitraryScenario(), fc.array(arbitraryPicks, { maxLength: 20 }), (scenario, edits) => {
        let state = run(scenario, edits);
        while (state.past.length > 0) state = undo(state);
        expect(state.document).toBe(scenario);
        expect(isDirty(state)).toBe(false);
      }),
      { numRuns: 50 },
    );
  });

  test('undo brings back what was selected when the edit was made', () => {
    fc.assert(
      fc.property(arbitraryScenario(), (scenario) => {
        const before = select(initialState(saved(scenario)), { partId: 'p0' });
        const after = applyEdit(before, {
          label: 'add a part',
          selection: { partId: 'new' },
          change: (document) => addPart(document, emptyPart('other', 'New')),
        });
        expect(after.selection.partId).toBe('new');
        expect(undo(after).selection.partId).toBe('p0');
      }),
      { numRuns: 5 },
    );
  });
});

describe('saving and replacing', () => {
  test('markSaved: leaves later typing unsaved', () => {
    fc.assert(
      fc.property(arbitraryScenario(), (scenario) => {
        const edit = (state: EditorState, name: string) =>
          applyEdit(state, { label: 'the name', change: (before) => ({ ...before, name }) });
        const sent = edit(initialState(saved(scenario)), 'sent');
        const later = edit(sent, 'typed while saving');
        expect(isDirty(markSaved(later, saved(sent.document)))).toBe(true);
        expect(isDirty(markSaved(sent, saved(structuredClone(sent.document))))).toBe(false);
      }),
      { numRuns: 5 },
    );
  });

  test('replaceDocument: can be undone', () => {
    fc.assert(
      fc.property(arbitraryScenario(), arbitraryScenario(), (mine, theirs) => {
        const state = replaceDocument(initialState(saved(mine)), theirs, 'take theirs');
        expect(state.document).toBe(theirs);
        expect(undo(state).document).toBe(mine);
      }),
      { numRuns: 20 },
    );
  });

  test('setPending: keeps the text of a field until it is settled', () => {
    fc.assert(
      fc.property(arbitraryScenario(), (scenario) => {
        const state = setPending(initialState(saved(scenario)), 'target.lifeS', { text: '5 yea', message: 'no' });
        expect(state.pending['target.lifeS']?.text).toBe('5 yea');
        expect(setPending(state, 'target.lifeS', null).pending).toEqual({});
      }),
      { numRuns: 5 },
    );
  });
});
