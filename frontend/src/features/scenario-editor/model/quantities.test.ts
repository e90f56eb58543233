import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import { arbitraryScenario } from '#test/support/arbitrary-scenario.ts';
import { editorScenario } from '#test/support/editor-scenario.ts';
import { assumeMaxima, mapQuantities, missingMaxima } from './quantities.ts';

describe('mapQuantities', () => {
  test('gives the same document when no figure changes', () => {
    fc.assert(
      fc.property(arbitraryScenario(), (scenario) => {
        expect(mapQuantities(scenario, (quantity) => quantity)).toBe(scenario);
      }),
      { numRuns: 30 },
    );
  });

  test('tells each figure by a field of its own', () => {
    const fields: string[] = [];
    mapQuantities(editorScenario(), (quantity, { field }) => {
      fields.push(field);
      return quantity;
    });
    expect(new Set(fields).size).toBe(fields.length);
    expect(fields).toContain('node.routines.report.steps.sense.duration');
    expect(fields).toContain('supply.cell.selfDischarge.lossPerYear');
  });
});

describe('missingMaxima', () => {
  test('lists currents, times, resistances and losses, but no voltage, no capacity and nothing that is zero', () => {
    const labels = missingMaxima(editorScenario()).map(({ site }) => site.label);
    expect(labels).toEqual([
      'Radio, Idle: current',
      'Radio, Sleep to Idle: duration',
      'Radio, Sleep to Idle: current',
      'Divider: current',
      'Report, Sense: duration',
      'Report, Wait: duration',
      'invented: resistance',
      'invented: self-discharge a year',
    ]);
  });
});

describe('assumeMaxima', () => {
  test('leaves no maximum missing and the document valid', () => {
    fc.assert(
      fc.property(arbitraryScenario(), fc.double({ min: 1, max: 20, noNaN: true }), (scenario, factor) => {
        const document = assumeMaxima(scenario, factor);
        expect(missingMaxima(document)).toEqual([]);
        expect(scenarioSchema.safeParse(document).error?.issues ?? []).toEqual([]);
      }),
      { numRuns: 50 },
    );
  });

  test('sets only the fields that are named, and marks them as assumed with the reason', () => {
    const field = 'node.parts.radio.states.idle.current';
    const document = assumeMaxima(editorScenario(), 1.5, new Set([field]));
    expect(document.node.parts[0]?.states[1]?.current).toEqual({
      typical: 400e-6,
      max: 600e-6,
      provenance: { kind: 'assumed', text: 'Maximum = typical × 1.5, assumed.' },
    });
    expect(missingMaxima(document)).toHaveLength(7);
  });

  test('keeps what was cited for the typical value in words', () => {
    const scenario = editorScenario();
    const divider = scenario.node.leakages[0];
    if (divider) divider.current.provenance = { kind: 'source', text: 'Data sheet, page 4.' };
    const [leakage] = assumeMaxima(scenario, 2).node.leakages;
    expect(leakage?.current.provenance).toEqual({
      kind: 'assumed',
      text: 'Typical: source, Data sheet, page 4. Maximum = typical × 2, assumed.',
    });
  });
});
