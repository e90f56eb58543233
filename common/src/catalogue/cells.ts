import type { Cell, Provenance, Quantity, Table } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { formatNumber } from '#common/units/format-quantity.ts';
import { fromUnit } from '#common/units/unit-lookup.ts';
import type { CatalogueCell, FigureOrigin } from './catalogue.types.ts';
import type { CellRow, CellSource, Figure, FigureTable } from './cells.table.ts';
import { CELL_ROWS, CELL_SOURCES } from './cells.table.ts';

/** A figure that any source states counts as sourced, even where memory rounds it off; the text says both. */
function provenanceOf(sources: readonly CellSource[], condition?: string): Provenance {
  const texts = sources.map((key) => (key === 'M' ? CELL_SOURCES.M : `${key}: ${CELL_SOURCES[key]}`));
  const text = [...(condition === undefined ? [] : [condition]), ...texts].join('. ');
  const kind = sources.every((key) => key === 'M') ? 'memory' : 'source';
  return {
    kind,
    text: text.length > LIMITS.provenanceLength ? `${text.slice(0, LIMITS.provenanceLength - 1)}…` : text,
  };
}

function quantityOf([min, typical, max, sources, condition]: Figure, unit: string): Quantity {
  return {
    ...(min !== null && { min: fromUnit(min, unit) }),
    typical: fromUnit(typical, unit),
    ...(max !== null && { max: fromUnit(max, unit) }),
    provenance: provenanceOf(sources, condition),
  };
}

const tableOf = (table: FigureTable, firstUnit?: string, secondUnit?: string): Table =>
  table.rows.map(([first, second]) => [
    firstUnit === undefined ? first : fromUnit(first, firstUnit),
    secondUnit === undefined ? second : fromUnit(second, secondUnit),
  ]);

/** Three significant digits: more would only pretend, as the figures behind are good to 20 %. */
const toThreeDigits = (value: number): number => Number(value.toPrecision(3));

/** A straight line from the fresh to the spent resistance where no source says how it rises between. */
function depthFactors(row: CellRow): Table {
  return row.depthFactor
    ? tableOf(row.depthFactor)
    : [
        [0, 1],
        [1, toThreeDigits(row.endOhm[1] / row.freshOhm[1])],
      ];
}

function volumeM3({ diameter, height }: CellRow['sizeMm']): number {
  return toThreeDigits(fromUnit((Math.PI / 4) * diameter * diameter * height, 'mm³'));
}

function cellOf(row: CellRow): Cell {
  return {
    designation: row.designation,
    chemistry: row.chemistry,
    capacityC: quantityOf(row.capacityMah, 'mAh'),
    ...(row.rateMaMah && { rateTable: tableOf(row.rateMaMah, 'mA', 'mAh') }),
    openCircuitTableV: tableOf(row.openCircuitV),
    resistanceOhm: [{ ohm: quantityOf(row.freshOhm, 'Ω') }],
    resistanceFactorByTemperature: tableOf(row.resistanceFactorByC),
    resistanceFactorByDepth: depthFactors(row),
    capacityFactorByTemperature: tableOf(row.capacityFactorByC),
    selfDischarge: {
      lossPerYear: quantityOf(row.lossPercentPerYear, '%/year'),
      referenceC: 20,
      activationEnergyJPerMol: fromUnit(row.activationEnergyKjPerMol[1], 'kJ/mol'),
    },
    shelfLifeS: fromUnit(row.shelfLifeYears[1], 'y'),
    limits: {
      continuousA: fromUnit(row.continuousMa[2] ?? row.continuousMa[1], 'mA'),
      pulseA: fromUnit(row.pulseMa[1], 'mA'),
      ...(row.temperatureC[0] !== null && { lowestC: row.temperatureC[0] }),
      ...(row.temperatureC[2] !== null && { highestC: row.temperatureC[2] }),
    },
    ratingEndV: row.cutOffV[1],
    massKg: fromUnit(row.massG[1], 'g'),
    volumeM3: volumeM3(row.sizeMm),
  };
}

function originsOf(row: CellRow): FigureOrigin[] {
  const figure = (path: string, [, , , sources, condition]: Figure): FigureOrigin => ({
    path,
    provenance: provenanceOf(sources, condition),
  });
  const table = (path: string, { sources, note }: FigureTable): FigureOrigin => ({
    path,
    provenance: provenanceOf(sources, note),
  });
  const straight: FigureTable = {
    rows: [],
    sources: row.endOhm[3],
    note: `straight line from fresh to ${formatNumber(row.endOhm[1])} Ω at the end`,
  };
  return [
    figure('capacityC', row.capacityMah),
    ...(row.rateMaMah ? [table('rateTable', row.rateMaMah)] : []),
    table('openCircuitTableV', row.openCircuitV),
    figure('resistanceOhm', row.freshOhm),
    table('resistanceFactorByTemperature', row.resistanceFactorByC),
    table('resistanceFactorByDepth', row.depthFactor ?? straight),
    table('capacityFactorByTemperature', row.capacityFactorByC),
    figure('selfDischarge.lossPerYear', row.lossPercentPerYear),
    figure('selfDischarge.activationEnergyJPerMol', row.activationEnergyKjPerMol),
    figure('shelfLifeS', row.shelfLifeYears),
    figure('limits.continuousA', row.continuousMa),
    figure('limits.pulseA', row.pulseMa),
    figure('limits.lowestC', row.temperatureC),
    figure('ratingEndV', row.cutOffV),
    figure('massKg', row.massG),
    table('volumeM3', { rows: [], sources: row.sizeMm.sources }),
  ];
}

const WORDS: Readonly<Record<string, string>> = {
  capacityC: 'capacity',
  rateTable: 'capacity by current',
  openCircuitTableV: 'open-circuit voltage',
  resistanceOhm: 'resistance',
  resistanceFactorByTemperature: 'resistance by temperature',
  resistanceFactorByDepth: 'resistance by depth',
  capacityFactorByTemperature: 'capacity by temperature',
  'selfDischarge.lossPerYear': 'self-discharge',
  'selfDischarge.activationEnergyJPerMol': 'its rise with temperature',
  shelfLifeS: 'shelf life',
  'limits.continuousA': 'continuous current',
  'limits.pulseA': 'pulse current',
  'limits.lowestC': 'temperature range',
  ratingEndV: 'rating end',
  massKg: 'mass',
  volumeM3: 'size',
};

function noteOf(row: CellRow, origins: readonly FigureOrigin[]): string {
  const words = (kind: Provenance['kind']): string =>
    origins
      .filter(({ provenance }) => provenance.kind === kind)
      .map(({ path }) => WORDS[path] ?? path)
      .join(', ');
  return [
    `Generic ${row.chemistry} cell, of no particular make${row.isRechargeable ? '; rechargeable, treated here as charged once' : ''}.`,
    `From public sources: ${words('source')}.`,
    `From memory, ±20 %: ${words('memory')}.`,
    ...(row.rateMaMah?.note === undefined ? [] : [`Capacity by current: ${row.rateMaMah.note}.`]),
    ...(row.remark === undefined ? [] : [`${row.remark}.`]),
    'Overwrite figures with those of your data sheet.',
  ].join(' ');
}

const idOf = (designation: string): string => `cell:${designation.replace(/[^A-Za-z0-9]+/g, '-').replace(/-$/, '')}`;

/** All cells of the catalogue, in SI units, with the origin of every figure. */
export const CATALOGUE_CELLS: readonly CatalogueCell[] = CELL_ROWS.map((row) => {
  const origins = originsOf(row);
  return { id: idOf(row.designation), name: row.designation, note: noteOf(row, origins), cell: cellOf(row), origins };
});
