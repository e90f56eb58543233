import type { Quantity, Scenario, State } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { formatForEdit } from '#common/units/format-for-edit.ts';
import { parseQuantity } from '#common/units/parse-quantity.ts';
import { CURRENT } from '../figure-options.ts';
import { addState, renameState, updatePart } from '../operations/part-operations.ts';
import { type Side, withSide } from '../quantity-sides.ts';
import { ROLES } from '../words.ts';
import { layBlock, matchWord, splitBlock, type PasteColumn, type PasteInto, type PasteResult } from './paste.ts';
import { nameColumn } from './name-column.ts';
import type { PasteTarget } from './steps-paste.ts';

/** Pasting into the states of a part: name, role, minimum, typical and maximum current. */
export function statesPasteTarget(partId: string): PasteTarget {
  return (scenario, { text, rowId, column }) => {
    const part = scenario.node.parts.find(({ id }) => id === partId);
    if (!part) return null;
    const start = Math.max(
      0,
      part.states.findIndex(({ id }) => id === rowId),
    );
    const into: PasteInto<State> = {
      columns: COLUMNS,
      items: part.states,
      nameOf: ({ name }) => name,
      blank: (count) => ({ id: '', name: `State ${count}`, current: NO_CURRENT }),
      limit: LIMITS.statesPerPart,
    };
    const result = layBlock(into, splitBlock(text), { row: start, column });
    const checked = withOrder(result, part.states, start);
    return { ...result, rows: checked.rows, apply: (document) => withStates(document, partId, checked.items) };
  };
}

const NO_CURRENT: Quantity = { typical: 0, provenance: { kind: 'assumed' } };

/** A row whose figures do not rise from minimum to maximum keeps its current as it was, and says why. */
function withOrder({ items, rows }: PasteResult<State>, before: readonly State[], start: number) {
  const show = (currentA: number): string => formatForEdit(currentA, 'current', 'µA');
  const kept = [...items];
  const marked = rows.map((row, offset) => {
    const index = start + offset;
    const state = kept[index];
    if (!state) return row;
    const { min, typical, max } = state.current;
    if ((min ?? typical) <= typical && typical <= (max ?? typical)) return row;
    kept[index] = { ...state, current: before[index]?.current ?? NO_CURRENT };
    const figures = [min, typical, max].flatMap((value) => (value === undefined ? [] : [show(value)])).join(', ');
    const problem = `The figures must rise from minimum to typical to maximum; here they are ${figures}.`;
    return { ...row, cells: row.cells.map((cell, at) => (at === row.cells.length - 1 ? { ...cell, problem } : cell)) };
  });
  return { items: kept, rows: marked };
}

function withStates(scenario: Scenario, partId: string, states: readonly State[]): Scenario {
  const kept = states.filter(({ id }) => id !== '');
  const replaced = updatePart(scenario, partId, (part) => ({ ...part, states: kept }));
  return states.filter(({ id }) => id === '').reduce((document, state) => addState(document, partId, state), replaced);
}

/** The three sides may come in any order, so a lone side may for a moment lie beyond the typical one. */
function side(key: Side, header: string): PasteColumn<State> {
  return {
    key,
    header,
    read: (text) => {
      const parsed = parseQuantity(text, CURRENT);
      if (parsed.kind === 'problem') return parsed;
      return {
        kind: 'value',
        apply: (state) => {
          const current: Quantity = withSide(state.current, key, parsed.value);
          return { ...state, current };
        },
      };
    },
  };
}

const NAME: PasteColumn<State> = {
  ...nameColumn<State>('State'),
  read: (text, state) => {
    const result = nameColumn<State>('State').read(text, state);
    return result.kind === 'problem' ? result : { kind: 'value', apply: (before) => renameState(before, text) };
  },
};

const ROLE: PasteColumn<State> = {
  key: 'role',
  header: 'Role',
  read: (text) => {
    const role = matchWord(ROLES, text);
    if (role) return { kind: 'value', apply: (state) => ({ ...state, role: role.value }) };
    return {
      kind: 'problem',
      message: `“${text}” is no role. Roles are ${ROLES.map(({ label }) => label).join(', ')}.`,
    };
  },
};

const COLUMNS: PasteColumn<State>[] = [
  NAME,
  ROLE,
  side('min', 'Minimum'),
  side('typical', 'Typical'),
  side('max', 'Maximum'),
];
