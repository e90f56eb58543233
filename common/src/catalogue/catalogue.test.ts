import { describe, expect, it } from 'vitest';
import type { Quantity } from '#common/engine/scenario/scenario.types.ts';
import { libraryItemSchema } from '#common/schemas/api/library.ts';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import { catalogueCell, catalogueClimate, catalogueItem, catalogueItems, cataloguePart } from './catalogue.ts';
import { CATALOGUE_CELLS } from './cells.ts';
import { CATALOGUE_PARTS } from './parts.ts';
import { scenarioTemplate, scenarioTemplates } from './templates.ts';
import { typedFigure } from './typed-figure.ts';

/** Every quantity inside a value, with its path. */
function quantitiesIn(value: unknown, path = ''): { path: string; quantity: Quantity }[] {
  if (typeof value !== 'object' || value === null) return [];
  const inner = Object.entries(value).flatMap(([key, item]) => quantitiesIn(item, `${path}.${key}`));
  return 'typical' in value && typeof value.typical === 'number'
    ? [{ path, quantity: { ...value, typical: value.typical } }]
    : inner;
}

describe('catalogueItems', () => {
  it.each(catalogueItems().map((item) => [item.id, item]))('%s passes the schema of library items', (_, item) => {
    expect(libraryItemSchema.safeParse(item).error).toBeUndefined();
  });

  it('gives every item an id of its own', () => {
    const ids = catalogueItems().map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
  });

  it('uses ids that need no escape in an address', () => {
    for (const { id } of catalogueItems()) expect(id).toMatch(/^(cell|climate|part):[A-Za-z0-9-]+$/);
  });

  it('holds 15 cells and 5 climates', () => {
    const kinds = catalogueItems().map(({ content }) => content.kind);
    expect([kinds.filter((kind) => kind === 'cell').length, kinds.filter((kind) => kind === 'climate').length]).toEqual(
      [15, 5],
    );
  });

  it.each(catalogueItems().map((item) => [item.id, item]))('%s gives each figure a provenance', (_, item) => {
    const without = quantitiesIn(item.content).filter(({ quantity }) => !quantity.provenance?.text);
    expect(without.map(({ path }) => path)).toEqual([]);
  });

  it.each(catalogueItems().map((item) => [item.id, item]))('%s keeps min ≤ typical ≤ max', (_, item) => {
    const disordered = quantitiesIn(item.content).filter(
      ({ quantity: { min = -Infinity, typical, max = Infinity } }) => min > typical || typical > max,
    );
    expect(disordered).toEqual([]);
  });

  it('gives copies', () => {
    const [first] = catalogueItems();
    if (first) first.name = 'changed';
    expect(catalogueItems()[0]?.name).not.toBe('changed');
  });
});

describe('catalogueItem', () => {
  it('finds by id', () => {
    expect(catalogueItem('climate:oceanic-orchard')?.name).toBe('Oceanic orchard');
  });

  it('is null for an id that is not there', () => {
    expect(catalogueItem('cell:XX')).toBeNull();
  });
});

describe('catalogueCell', () => {
  it('turns the figures of the sources into SI units exactly', () => {
    const cell = catalogueCell('CR2032');
    expect(cell).toMatchObject({
      capacityC: { min: 756, typical: 810, max: 864 },
      selfDischarge: { lossPerYear: { min: 0.01, typical: 0.015, max: 0.02 }, activationEnergyJPerMol: 50_000 },
      limits: { continuousA: 0.003, pulseA: 0.015, lowestC: -20, highestC: 70 },
      shelfLifeS: 315_576_000,
      ratingEndV: 2,
      massKg: 0.0031,
      volumeM3: 1.01e-6,
    });
  });

  it('tells sourced figures from remembered ones', () => {
    const cell = catalogueCell('CR2477');
    expect([cell.capacityC.provenance?.kind, cell.resistanceOhm[0]?.ohm.provenance?.kind]).toEqual([
      'source',
      'memory',
    ]);
  });

  it('raises the resistance from the fresh to the spent figure', () => {
    expect(catalogueCell('LR6').resistanceFactorByDepth).toEqual([
      [0, 1],
      [1, 4],
    ]);
  });

  it('leaves out of the ER34615 rate table what self-discharge already counts', () => {
    expect(catalogueCell('ER34615').rateTable?.[0]).toEqual([0.004, 68_400]);
  });

  it('throws for a designation that is not there', () => {
    expect(() => catalogueCell('CR9999')).toThrow('no "cell:CR9999"');
  });
});

describe('CATALOGUE_CELLS', () => {
  it.each(CATALOGUE_CELLS.map((entry) => [entry.name, entry]))('%s says where each table comes from', (_, entry) => {
    const paths = entry.origins.map(({ path }) => path);
    expect(paths).toEqual(
      expect.arrayContaining(['openCircuitTableV', 'resistanceFactorByTemperature', 'resistanceFactorByDepth']),
    );
  });

  it.each(CATALOGUE_CELLS.map((entry) => [entry.name, entry]))('%s cuts no provenance short', (_, entry) => {
    expect(entry.origins.filter(({ provenance }) => provenance.text?.endsWith('…'))).toEqual([]);
  });

  it.each(CATALOGUE_CELLS.map((entry) => [entry.name, entry]))('%s loses voltage from full to empty', (_, { cell }) => {
    const voltages = cell.openCircuitTableV.map(([, voltageV]) => voltageV);
    expect([...voltages].sort((a, b) => b - a)).toEqual(voltages);
  });
});

describe('cataloguePart', () => {
  it('takes an id of its own in a node', () => {
    expect(cataloguePart('transceiver-2450', 'radio').id).toBe('radio');
  });

  it('throws for a key that is not there', () => {
    expect(() => cataloguePart('nothing')).toThrow('no "part:nothing"');
  });

  it.each(CATALOGUE_PARTS.map((entry) => [entry.id, entry]))(
    '%s says that it is an example from memory',
    (_, entry) => {
      expect(entry.note).toMatch(/Example part: .* from memory/);
    },
  );
});

describe('catalogueClimate', () => {
  it('is −20 °C in each month of the cold store', () => {
    expect(catalogueClimate('cold-store').months.map(({ meanC }) => meanC)).toEqual(new Array(12).fill(-20));
  });

  it('throws for a key that is not there', () => {
    expect(() => catalogueClimate('nowhere')).toThrow('no "climate:nowhere"');
  });
});

describe('scenarioTemplates', () => {
  it.each(scenarioTemplates().map((template) => [template.id, template]))(
    '%s passes the scenario schema',
    (_, template) => {
      expect(scenarioSchema.safeParse(template.document).error).toBeUndefined();
    },
  );

  it('begins with the empty one', () => {
    expect(scenarioTemplates()[0]?.document.node.parts).toEqual([]);
  });
});

describe('scenarioTemplate', () => {
  it('throws for an id that is not there', () => {
    expect(() => scenarioTemplate('nothing')).toThrow('no template "nothing"');
  });
});

describe('typedFigure', () => {
  it('reads a figure with its range', () => {
    expect(typedFigure('current', '… 1.7 … 3.1 µA', { kind: 'memory' })).toEqual({
      typical: 1.7e-6,
      max: 3.1e-6,
      provenance: { kind: 'memory' },
    });
  });

  it('throws for a text that is none', () => {
    expect(() => typedFigure('current', '3 V', { kind: 'memory' })).toThrow('"V" is a unit of voltage');
  });
});
