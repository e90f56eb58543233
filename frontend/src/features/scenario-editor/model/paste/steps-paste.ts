import type { Scenario, Step } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { parseQuantity } from '#common/units/parse-quantity.ts';
import { REPEATS, STEP_TIME } from '../figure-options.ts';
import { addStep, durationOfKind, updateRoutine, withPartState } from '../operations/routine-operations.ts';
import { withOptional } from '../operations/supply-operations.ts';
import { layBlock, matchWord, splitBlock, type PasteColumn, type PastePreview } from './paste.ts';
import { nameColumn } from './name-column.ts';

/** Where a pasted block goes, worked out on the document of the moment. */
export type PasteTarget = (
  scenario: Scenario,
  block: { text: string; rowId: string; column: string },
) => PastePreview | null;

/** Pasting into the steps of a routine: name, duration, a state for each part, how many times. */
export function stepsPasteTarget(routineId: string): PasteTarget {
  return (scenario, { text, rowId, column }) => {
    const routine = scenario.node.routines.find(({ id }) => id === routineId);
    if (!routine) return null;
    const result = layBlock(
      {
        columns: columnsOf(scenario),
        items: routine.steps,
        nameOf: ({ name }) => name,
        blank: (count) => ({ id: '', name: `Step ${count}`, states: {}, duration: durationOfKind('fixed') }),
        limit: LIMITS.stepsPerRoutine,
      },
      splitBlock(text),
      {
        row: Math.max(
          0,
          routine.steps.findIndex(({ id }) => id === rowId),
        ),
        column,
      },
    );
    return {
      ...result,
      apply: (document) => withSteps(document, routineId, result.items),
    };
  };
}

function withSteps(scenario: Scenario, routineId: string, steps: readonly Step[]): Scenario {
  const kept = steps.filter(({ id }) => id !== '');
  const replaced = updateRoutine(scenario, routineId, (routine) => ({ ...routine, steps: kept }));
  return steps.filter(({ id }) => id === '').reduce((document, step) => addStep(document, routineId, step), replaced);
}

function columnsOf(scenario: Scenario): PasteColumn<Step>[] {
  const states = scenario.node.parts.map((part): PasteColumn<Step> => {
    const words = [
      { value: '', label: '·' },
      { value: '', label: 'rest' },
      { value: '', label: '-' },
      ...part.states.map(({ id, name }) => ({ value: id, label: name })),
    ];
    return {
      key: part.id,
      header: part.name,
      read: (text) => {
        const word = matchWord(words, text);
        if (word) return { kind: 'value', apply: (step) => withPartState(step, part.id, word.value) };
        const names = part.states.map(({ name }) => name).join(', ');
        return {
          kind: 'problem',
          message: `${part.name} has no state “${text}”. It has ${names}; leave the cell empty for rest.`,
        };
      },
    };
  });
  return [nameColumn('Step'), DURATION, ...states, TIMES];
}

const DURATION: PasteColumn<Step> = {
  key: 'duration',
  header: 'Duration',
  read: (text) => {
    const parsed = parseQuantity(text, STEP_TIME);
    if (parsed.kind === 'problem') return parsed;
    return {
      kind: 'value',
      apply: (step) => ({
        ...step,
        duration: {
          kind: 'fixed',
          typical: parsed.value,
          provenance: { kind: 'assumed', text: 'Pasted from a table.' },
        },
      }),
    };
  },
};

const TIMES: PasteColumn<Step> = {
  key: 'repeats',
  header: 'Times',
  read: (text) => {
    const parsed = parseQuantity(text, REPEATS);
    if (parsed.kind === 'problem') return parsed;
    const repeats = parsed.value === 1 ? undefined : parsed.value;
    return { kind: 'value', apply: (step) => withOptional(step, 'repeats', repeats) };
  },
};
