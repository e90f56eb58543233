import { describe, expect, it } from 'vitest';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { compileNode } from '#common/engine/node/compile-node.ts';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import { demoWorkspace } from './demo-workspace.ts';

interface Named {
  title: string;
  document: Scenario;
}

const revisions: Named[] = demoWorkspace.projects.flatMap((project) =>
  project.scenarios.flatMap((scenario) =>
    scenario.revisions.map(({ document }, index) => ({
      title: `${project.name} / ${document.name} / revision ${index + 1}`,
      document,
    })),
  ),
);

/** Provenance texts of every quantity inside a value; a quantity without one gives ''. */
function provenanceTexts(value: unknown): string[] {
  if (typeof value !== 'object' || value === null) return [];
  if ('typical' in value) return ['provenance' in value ? textOf(value.provenance) : ''];
  const inner: unknown[] = Object.values(value);
  return inner.flatMap(provenanceTexts);
}

function textOf(provenance: unknown): string {
  const isObject = typeof provenance === 'object' && provenance !== null;
  return isObject && 'text' in provenance && typeof provenance.text === 'string' ? provenance.text : '';
}

describe('demoWorkspace', () => {
  it('holds the four nodes of Tarnfold Orchards', () => {
    expect(demoWorkspace.projects.map(({ name }) => name)).toEqual([
      'Frost post',
      'Soil probe',
      'Gate counter',
      'Cold-store logger',
    ]);
  });

  it('has a project with several revisions of a scenario for each node', () => {
    const longest = demoWorkspace.projects.map(({ scenarios }) =>
      Math.max(...scenarios.map((scenario) => scenario.revisions.length)),
    );
    expect(Math.min(...longest)).toBeGreaterThan(1);
  });

  it.each(revisions)('$title passes the scenario schema', ({ document }) => {
    expect(scenarioSchema.safeParse(document).error).toBeUndefined();
  });

  it.each(revisions)('$title leaves out no transition that its routines take', ({ document }) => {
    expect(() => compileNode(document.node, { defaultReferenceVoltageV: 3 })).not.toThrow();
  });

  it.each(revisions)('$title says that each figure of its node is invented', ({ document }) => {
    const others = provenanceTexts(document.node).filter((text) => !text.startsWith('Invented for the demo'));
    expect(others).toEqual([]);
  });

  it('leaves some figures of the frost post without a maximum, for the page to list', () => {
    const latest = demoWorkspace.projects[0]?.scenarios[0]?.revisions.at(-1)?.document;
    expect(latest?.node.leakages.some(({ current }) => current.max === undefined)).toBe(true);
  });

  it('keeps the coldest night and the hottest hour of the orchards', () => {
    const orchard = demoWorkspace.projects[0]?.scenarios[0]?.revisions[0].document.climate.extremes;
    expect([orchard?.coldest?.temperatureC, orchard?.hottest?.temperatureC]).toEqual([-18, 36]);
  });
});
