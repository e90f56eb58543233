import type {
  Cell,
  Climate,
  Regulator,
  Scenario,
  Supply,
  Table,
  Target,
} from '#common/engine/scenario/scenario.types.ts';
import { updateAt } from '../list.ts';

export function updateSupply(scenario: Scenario, change: (supply: Supply) => Supply): Scenario {
  const supply = change(scenario.supply);
  return supply === scenario.supply ? scenario : { ...scenario, supply };
}

export function updateCell(scenario: Scenario, change: (cell: Cell) => Cell): Scenario {
  return updateSupply(scenario, (supply) => {
    const cell = change(supply.cell);
    return cell === supply.cell ? supply : { ...supply, cell };
  });
}

/** Another kind of regulator with usual figures; the output voltage stays where both have one. */
export function regulatorOfKind(kind: Regulator['kind'], previous: Regulator): Regulator {
  const outputV = previous.kind === 'none' ? 3 : previous.outputV;
  const quiescentA = previous.kind === 'none' ? 1e-6 : previous.quiescentA;
  switch (kind) {
    case 'none':
      return { kind };
    case 'linear':
      return { kind, outputV, quiescentA, dropoutV: 0.1 };
    case 'switching':
      return { kind, outputV, quiescentA, efficiency: 0.85, minimumInputV: 0.9 };
  }
}

export function updateClimate(scenario: Scenario, change: (climate: Climate) => Climate): Scenario {
  const climate = change(scenario.climate);
  return climate === scenario.climate ? scenario : { ...scenario, climate };
}

/** Takes over the temperatures of a climate; start month and storage belong to the scenario and stay. */
export function applyClimate(scenario: Scenario, from: Pick<Climate, 'months' | 'extremes'>): Scenario {
  return updateClimate(scenario, ({ startMonth, storage }) => ({
    months: from.months,
    startMonth,
    ...(from.extremes === undefined ? {} : { extremes: from.extremes }),
    ...(storage === undefined ? {} : { storage }),
  }));
}

export function updateMonth(
  scenario: Scenario,
  monthIndex: number,
  change: (month: Climate['months'][number]) => Climate['months'][number],
): Scenario {
  return updateClimate(scenario, (climate) => {
    const months = updateAt(climate.months, monthIndex, change);
    return months === climate.months ? climate : { ...climate, months };
  });
}

export function updateTarget(scenario: Scenario, change: (target: Target) => Target): Scenario {
  const target = change(scenario.target);
  return target === scenario.target ? scenario : { ...scenario, target };
}

/** A table with a row put where its first column belongs; a row with the same first value is replaced. */
export function withTableRow(table: Table, row: [number, number]): Table {
  const others = table.filter(([first]) => first !== row[0]);
  return [...others, row].sort((a, b) => a[0] - b[0]);
}

/** The object without a key that is undefined, so that documents hold no empty keys. */
export function withOptional<T extends object, K extends keyof T>(object: T, key: K, value: T[K] | undefined): T {
  if (value === undefined) {
    const copy = { ...object };
    delete copy[key];
    return copy;
  }
  return { ...object, [key]: value };
}
