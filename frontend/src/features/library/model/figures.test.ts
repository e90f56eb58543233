import { describe, expect, it } from 'vitest';
import { catalogueCell } from '#common/catalogue/catalogue.ts';
import { cellFigures, cellTables } from './figures.ts';

describe('cellFigures', () => {
  it('says of every figure of a catalogue cell where it comes from', () => {
    const rows = cellFigures(catalogueCell('CR2032'));
    expect(rows.length).toBeGreaterThan(5);
    expect(rows.filter((row) => row.provenance === null && row.label !== 'Volume')).toEqual([]);
  });

  it('drops the catalogue’s origin of a figure that was changed', () => {
    const cell = { ...catalogueCell('CR2032'), shelfLifeS: 1e8 };
    expect(cellFigures(cell).find((row) => row.label === 'Shelf life')?.provenance).toBeNull();
  });

  it('shows capacity in mAh with its range', () => {
    const [capacity] = cellFigures({ ...catalogueCell('CR2032'), capacityC: { min: 756, typical: 810, max: 864 } });
    expect(capacity?.value.replace('\u00a0', ' ')).toBe('225 mAh');
    expect(capacity?.range?.replaceAll('\u00a0', ' ')).toBe('210 mAh to 240 mAh');
  });
});

describe('cellTables', () => {
  it('leaves out tables that the cell does not have', () => {
    const cell = { ...catalogueCell('CR2032'), rateTable: undefined, capacityFactorByTemperature: undefined };
    expect(cellTables(cell).map(({ title }) => title)).toEqual([
      'Open-circuit voltage at 20 °C',
      'Resistance by temperature',
      'Resistance by charge drawn',
    ]);
  });

  it('has a row for each row of the cell’s table', () => {
    const cell = catalogueCell('CR2032');
    expect(cellTables(cell)[0]?.rows).toHaveLength(cell.openCircuitTableV.length);
  });
});
