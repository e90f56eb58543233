import { CATALOGUE_CELLS } from '#common/catalogue/cells.ts';
import type { Cell, Provenance, Quantity, Table } from '#common/engine/scenario/scenario.types.ts';
import type { Dimension } from '#common/units/dimensions.table.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import {
  formatChargeMah,
  formatNumber,
  formatQuantity,
  formatShare,
  formatSpan,
  formatTemperature,
} from '#common/units/format-quantity.ts';

export interface FigureRow {
  label: string;
  value: string;
  /** The other ends of the range, where there are any. */
  range: string | null;
  /** Null: told by another row or not known. */
  provenance: Provenance | null;
}

export interface FigureTable {
  title: string;
  columns: readonly [string, string];
  rows: readonly (readonly [string, string])[];
  provenance: Provenance | null;
}

const DIGITS = { significantDigits: 3 };

/** Lowest to highest of a quantity in words, null when it has no range. */
export function rangeOf(quantity: Quantity, dimension: Dimension): string | null {
  const { min, typical, max } = quantity;
  if (min === undefined && max === undefined) return null;
  return dimension === 'charge'
    ? `${formatChargeMah(min ?? typical, DIGITS)} to ${formatChargeMah(max ?? typical, DIGITS)}`
    : formatSpan(min ?? typical, max ?? typical, dimension);
}

/** Origins of figures that have no place for them in the document, such as tables; known for the catalogue's cells only. */
function originOf(cell: Cell, path: string): Provenance | null {
  const entry = CATALOGUE_CELLS.find(({ name }) => name === cell.designation);
  // A copy whose figure was changed no longer has the catalogue's origin.
  const isSame =
    entry !== undefined && JSON.stringify(valueAt(entry.cell, path)) === JSON.stringify(valueAt(cell, path));
  return isSame ? (entry.origins.find((origin) => origin.path === path)?.provenance ?? null) : null;
}

function valueAt(value: unknown, path: string): unknown {
  return path.split('.').reduce<unknown>((at, key) => {
    if (typeof at !== 'object' || at === null) return undefined;
    return Object.entries(at).find(([name]) => name === key)?.[1];
  }, value);
}

/** The single figures of a cell, in reading order. */
export function cellFigures(cell: Cell): FigureRow[] {
  const plain = (label: string, path: string, value: string | undefined): FigureRow[] =>
    value === undefined ? [] : [{ label, value, range: null, provenance: originOf(cell, path) }];
  const { limits } = cell;
  const loss = cell.selfDischarge;
  return [
    {
      label: 'Capacity',
      value: formatChargeMah(cell.capacityC.typical),
      range: rangeOf(cell.capacityC, 'charge'),
      provenance: cell.capacityC.provenance ?? originOf(cell, 'capacityC'),
    },
    ...plain('Rated down to', 'ratingEndV', shown(cell.ratingEndV, 'voltage')),
    ...cell.resistanceOhm.map(({ pulseS, ohm }) => ({
      label: `Resistance, fresh, 20 °C${pulseS === undefined ? '' : `, pulse of ${formatQuantity(pulseS, 'duration')}`}`,
      value: formatQuantity(ohm.typical, 'resistance'),
      range: rangeOf(ohm, 'resistance'),
      provenance: ohm.provenance ?? originOf(cell, 'resistanceOhm'),
    })),
    {
      label: `Self-discharge a year at ${formatTemperature(loss.referenceC)}`,
      value: formatShare(loss.lossPerYear.typical),
      range: rangeOf(loss.lossPerYear, 'share'),
      provenance: loss.lossPerYear.provenance ?? originOf(cell, 'selfDischarge.lossPerYear'),
    },
    ...plain(
      'Activation energy of self-discharge',
      'selfDischarge.activationEnergyJPerMol',
      shown(loss.activationEnergyJPerMol, 'molar-energy'),
    ),
    ...plain(
      'Self-discharge grows by, each 10 K',
      'selfDischarge.q10',
      loss.q10 === undefined ? undefined : `× ${formatNumber(loss.q10)}`,
    ),
    ...plain('Shelf life', 'shelfLifeS', cell.shelfLifeS === undefined ? undefined : formatDuration(cell.shelfLifeS)),
    ...plain('Continuous current, at most', 'limits.continuousA', shown(limits?.continuousA, 'current')),
    ...plain('Pulse current, at most', 'limits.pulseA', shown(limits?.pulseA, 'current')),
    ...plain('Used between', 'limits.lowestC', temperatureRange(limits)),
    ...plain('Mass', 'massKg', shown(cell.massKg, 'mass')),
    ...plain('Volume', 'volumeM3', shown(cell.volumeM3, 'volume')),
  ];
}

function shown(value: number | undefined, dimension: Dimension): string | undefined {
  return value === undefined ? undefined : formatQuantity(value, dimension);
}

function temperatureRange(limits: Cell['limits']): string | undefined {
  if (limits?.lowestC === undefined && limits?.highestC === undefined) return undefined;
  const end = (value: number | undefined): string => (value === undefined ? 'not stated' : formatTemperature(value));
  return `${end(limits.lowestC)} and ${end(limits.highestC)}`;
}

/** The tables of a cell with readable columns. */
export function cellTables(cell: Cell): FigureTable[] {
  const table = (
    title: string,
    path: string,
    data: {
      rows: Table | undefined;
      columns: readonly [string, string];
      cells: readonly [(x: number) => string, (y: number) => string];
    },
  ): FigureTable[] =>
    data.rows === undefined
      ? []
      : [
          {
            title,
            columns: data.columns,
            rows: data.rows.map(([x, y]) => [data.cells[0](x), data.cells[1](y)]),
            provenance: originOf(cell, path),
          },
        ];
  const depth = (x: number): string => formatShare(x);
  const factor = (y: number): string => `× ${formatNumber(y)}`;
  const degrees = (x: number): string => formatTemperature(x);
  return [
    ...table('Open-circuit voltage at 20 °C', 'openCircuitTableV', {
      rows: cell.openCircuitTableV,
      columns: ['Charge drawn', 'Voltage'],
      cells: [depth, (y) => formatQuantity(y, 'voltage', { significantDigits: 3, keepZeros: true })],
    }),
    ...table('Resistance by temperature', 'resistanceFactorByTemperature', {
      rows: cell.resistanceFactorByTemperature,
      columns: ['Temperature', 'Factor'],
      cells: [degrees, factor],
    }),
    ...table('Resistance by charge drawn', 'resistanceFactorByDepth', {
      rows: cell.resistanceFactorByDepth,
      columns: ['Charge drawn', 'Factor'],
      cells: [depth, factor],
    }),
    ...table('Usable capacity by temperature', 'capacityFactorByTemperature', {
      rows: cell.capacityFactorByTemperature,
      columns: ['Temperature', 'Factor'],
      cells: [degrees, factor],
    }),
    ...table('Capacity by constant current', 'rateTable', {
      rows: cell.rateTable,
      columns: ['Current', 'Capacity'],
      cells: [(x) => formatQuantity(x, 'current'), (y) => formatChargeMah(y)],
    }),
  ];
}
