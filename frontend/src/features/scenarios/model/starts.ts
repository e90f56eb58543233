import { CATALOGUE_CELLS } from '#common/catalogue/cells.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { SCHEMA_VERSION } from '#common/schemas/limits.ts';
import { YEAR_S } from '#common/units/si.ts';

export interface Start {
  id: string;
  name: string;
  description: string;
  document: Scenario;
}

/** The cell that an empty scenario begins with, until another is chosen. */
const FIRST_CELL = 'cell:LR6';

/** What a new scenario can begin with; the empty one first. */
export function starts(): Start[] {
  const empty = emptyScenario();
  return [
    ...(empty
      ? [
          {
            id: 'empty',
            name: 'Empty',
            description: `No parts and no routines yet; two ${empty.supply.cell.designation} in series, 20 °C all year, target 5 years.`,
            document: empty,
          },
        ]
      : []),
  ];
}

function emptyScenario(): Scenario | null {
  const cell = (CATALOGUE_CELLS.find((entry) => entry.id === FIRST_CELL) ?? CATALOGUE_CELLS[0])?.cell;
  if (!cell) return null;
  return {
    schemaVersion: SCHEMA_VERSION,
    name: '',
    node: { parts: [], leakages: [], routines: [] },
    supply: { cell, series: 2, parallel: 1, regulator: { kind: 'none' } },
    climate: { months: Array.from({ length: 12 }, () => ({ meanC: 20, amplitudeK: 0 })), startMonth: 1 },
    target: { lifeS: 5 * YEAR_S, confidence: 0.9 },
  };
}
