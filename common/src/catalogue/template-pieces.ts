import type {
  Climate,
  Leakage,
  Provenance,
  Quantity,
  Step,
  Supply,
  Target,
} from '#common/engine/scenario/scenario.types.ts';
import { fromUnit } from '#common/units/unit-lookup.ts';
import { catalogueCell, catalogueClimate } from './catalogue.ts';
import { typedFigure } from './typed-figure.ts';

/** Provenance of every figure that a template invents. */
export const EXAMPLE: Provenance = { kind: 'assumed', text: 'Example figure of a template' };

/**
 * A typed duration of a step of a template.
 *
 * @param time Such as `10 … 15 … 20 ms`.
 * @returns The duration.
 * @example fixed('3 ms').kind // 'fixed'
 */
export const fixed = (time: string): Step['duration'] => ({
  kind: 'fixed',
  ...typedFigure('duration', time, EXAMPLE),
});

/**
 * A figure without unit of a template, such as a probability.
 *
 * @param typical The figure.
 * @returns The quantity, marked as an example.
 * @example plain(0.1).typical // 0.1
 */
export const plain = (typical: number): Quantity => ({ typical, provenance: EXAMPLE });

/** Leakage of a board, which no template leaves out. */
export const boardLeakage = (): Leakage => ({
  id: 'board',
  name: 'Board leakage',
  current: typedFigure('current', '… 0.2 … 1 µA', EXAMPLE),
});

/**
 * The climate of templates.
 *
 * @param startMonth Calendar month in which life starts.
 * @returns An oceanic orchard.
 * @example orchard(4).startMonth // 4
 */
export const orchard = (startMonth: number): Climate => ({ ...catalogueClimate('oceanic-orchard'), startMonth });

/**
 * The target of templates.
 *
 * @param years Wanted life, years.
 * @returns That life with 90 % confidence.
 * @example target(5).confidence // 0.9
 */
export const target = (years: number): Target => ({ lifeS: fromUnit(years, 'y'), confidence: 0.9 });

/**
 * Cells without regulator and reserve.
 *
 * @param designation Of a cell of the catalogue.
 * @param series Cells in series.
 * @returns The supply.
 * @example supply('LR6', 2).series // 2
 */
export const supply = (designation: string, series: number): Supply => ({
  cell: catalogueCell(designation),
  series,
  parallel: 1,
  regulator: { kind: 'none' },
  reserveFraction: 0,
});
