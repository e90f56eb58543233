import { describe, expect, test } from 'vitest';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import { editorScenario } from '#test/support/editor-scenario.ts';
import { pairsPasteTarget } from './pairs-paste.ts';
import { splitBlock, type PastePreview } from './paste.ts';
import { statesPasteTarget } from './states-paste.ts';
import { stepsPasteTarget } from './steps-paste.ts';
import { DEPTH, VOLTAGE } from '../figure-options.ts';
import { updateCell } from '../operations/supply-operations.ts';

const problemsOf = (preview: PastePreview | null): (string | null)[][] =>
  preview?.rows.map((row) => row.cells.map(({ problem }) => problem)) ?? [];

describe('splitBlock', () => {
  test('splits at tabs and line ends and keeps quoted line breaks', () => {
    expect(splitBlock('a\tb\r\n"c\nd"\t"say ""no"""\n')).toEqual([
      ['a', 'b'],
      ['c\nd', 'say "no"'],
    ]);
  });
});

describe('pasting into states', () => {
  const target = statesPasteTarget('radio');

  test('overwrites from the cell on, adds rows, and leaves what empty cells cover', () => {
    const block = { text: 'Off\t\t\t2u\nListen\tlisten\t12 mA\t12.8 mA\t14 mA', rowId: 'transmit', column: 'name' };
    const preview = target(editorScenario(), block);
    expect(problemsOf(preview).flat().filter(Boolean)).toEqual([
      'The figures must rise from minimum to typical to maximum; here they are 13 mA, 2 µA, 16 mA.',
    ]);
    const states = preview?.apply(editorScenario()).node.parts[0]?.states ?? [];
    expect(states.map(({ id, name }) => [id, name])).toEqual([
      ['sleep', 'Sleep'],
      ['idle', 'Idle'],
      ['transmit', 'Off'],
      ['listen', 'Listen'],
    ]);
    expect(states[2]?.current.typical).toBe(0.0142);
    expect(states[3]).toMatchObject({ role: 'listen', current: { min: 0.012, typical: 0.0128, max: 0.014 } });
  });

  test('says which cell is wrong and what would be right', () => {
    const preview = target(editorScenario(), {
      text: 'Sleep\tslumber\nIdle\tidle\tfast',
      rowId: 'sleep',
      column: 'name',
    });
    const [first, second] = problemsOf(preview);
    expect(first?.[1]).toContain('“slumber” is no role. Roles are sleep, idle');
    expect(second?.[2]).toContain('1.7 µA');
  });

  test('leaves out a line of headings', () => {
    const preview = target(editorScenario(), {
      text: 'State\tRole\tMin\tTypical\nNap\tsleep\t1u\t2u',
      rowId: 'sleep',
      column: 'name',
    });
    expect(preview?.rows).toHaveLength(1);
    expect(preview?.apply(editorScenario()).node.parts[0]?.states[0]?.name).toBe('Nap');
  });
});

describe('pasting into steps', () => {
  const target = stepsPasteTarget('report');

  test('reads durations and the states of parts by name', () => {
    const preview = target(editorScenario(), {
      text: 'Wake\t3 ms\tidle\trest\nLook\t14 ms\t\tmeasure\t2\nStay\t1 ms\tsleep',
      rowId: 'sense',
      column: 'name',
    });
    expect(problemsOf(preview).flat().filter(Boolean)).toEqual([]);
    const document = preview?.apply(editorScenario());
    expect(document?.node.routines[0]?.steps).toMatchObject([
      { id: 'sense', name: 'Wake', states: { radio: 'idle' }, duration: { typical: 0.003 } },
      { id: 'wait', name: 'Look', states: { radio: 'idle', sensor: 'measure' }, repeats: 2 },
      { name: 'Stay', states: { radio: 'sleep' } },
    ]);
    expect(scenarioSchema.safeParse(document).success).toBe(true);
  });

  test('names the states that a part has when a cell names none of them', () => {
    const preview = target(editorScenario(), { text: 'Wake\t3 ms\tturbo', rowId: 'sense', column: 'name' });
    expect(problemsOf(preview)[0]?.[2]).toBe(
      'Radio has no state “turbo”. It has Sleep, Idle, Transmit; leave the cell empty for rest.',
    );
  });
});

describe('pasting into a table of pairs', () => {
  const target = pairsPasteTarget(
    [
      { header: 'Charge drawn', options: DEPTH },
      { header: 'Voltage', options: VOLTAGE },
    ],
    (document) => document.supply.cell.openCircuitTableV,
    (document, openCircuitTableV) => updateCell(document, (cell) => ({ ...cell, openCircuitTableV })),
  );

  test('takes rows that rise and leaves out one that does not', () => {
    const preview = target(editorScenario(), {
      text: '0 %\t3.3\n50 %\t3\n40 %\t2.9\n100 %\t2',
      rowId: '0',
      column: '0',
    });
    expect(preview?.apply(editorScenario()).supply.cell.openCircuitTableV).toEqual([
      [0, 3.3],
      [0.5, 3],
      [1, 2],
    ]);
    expect(problemsOf(preview)[2]?.[0]).toContain('must rise');
  });
});
