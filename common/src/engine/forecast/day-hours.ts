import { temperatureAtHour } from '../supply/day-average.ts';
import type { Table } from '../scenario/scenario.types.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import type { DekadLoad, TestConditions } from './dekad-load.ts';
import { firstFailure, worksAt } from './first-failure.ts';
import { testConditions } from './make-dekad-load.ts';

/** The day as twelve pairs of hours of one temperature, at their middles: 15.5 h and 14.5 h, and so on to 26.5 h and 3.5 h. */
const PAIRS = 12;

/** Which hours of a dekad's day the node works in. */
export interface DayHours {
  /** Share of the hours that fail when a share of the starting charge is spent. */
  silentShare: (load: DekadLoad, spent: number) => number;
  /** Up to which charge of a range any hour works: Infinity to its end and beyond, null when none works at its beginning. */
  worksUntil: (load: DekadLoad, range: { fromSpent: number; toSpent: number }) => number | null;
}

/**
 * Judges the hours of the day, each at its middle. Where colder is never better, as in most cells, the border between hours that work
 * and hours that fail is found by halving, and the warmest hour is the last to work.
 *
 * @param compiled The scenario.
 * @returns The judge; it makes conditions when they are first asked for.
 * @example dayHours(compiled).silentShare(load, 0.5)
 */
export function dayHours(compiled: CompiledScenario): DayHours {
  const known: TestConditions[][] = [];
  const at = (load: DekadLoad, pair: number): TestConditions => {
    const pairs = (known[load.dekad.dekadOfYear] ??= []);
    return (pairs[pair] ??= testConditions(compiled, load.lists, pairC(load, pair)));
  };
  const { source, converter } = compiled;
  const works = (load: DekadLoad, pair: number, spent: number): boolean =>
    worksAt(source, at(load, pair), converter.sight, spent);
  const isOrdered = isColdNeverBetter(compiled);
  return {
    silentShare: (load, spent) => {
      const pairs = isOrdered ? workingPairs((pair) => works(load, pair, spent)) : null;
      return 1 - (pairs ?? count((pair) => works(load, pair, spent))) / PAIRS;
    },
    worksUntil: (load, range) => {
      let until: number | null = null;
      for (let pair = 0; pair < (isOrdered ? 1 : PAIRS); pair++) {
        if (!works(load, pair, range.fromSpent)) continue;
        const failure = firstFailure(source, at(load, pair), converter.sight, range);
        if (failure === null) return Infinity;
        until = Math.max(until ?? 0, failure.spent);
      }
      return until;
    },
  };
}

/** A coldest night deepens the cold half of the day. */
function pairC({ dekad }: DekadLoad, pair: number): number {
  const { meanC, amplitudeK, coldestC } = dekad;
  const hourC = temperatureAtHour(meanC, amplitudeK, 15.5 + pair);
  return hourC < meanC ? temperatureAtHour(meanC, meanC - coldestC, 15.5 + pair) : hourC;
}

function count(works: (pair: number) => boolean): number {
  let working = 0;
  for (let pair = 0; pair < PAIRS; pair++) if (works(pair)) working++;
  return working;
}

/** Pairs that work, when all that are warmer than a working one work. */
function workingPairs(works: (pair: number) => boolean): number {
  let working = 0;
  let failing = PAIRS;
  while (working < failing) {
    const middle = (working + failing) >> 1;
    if (works(middle)) working = middle + 1;
    else failing = middle;
  }
  return working;
}

function isColdNeverBetter({ loads, scenario }: CompiledScenario): boolean {
  const { cell } = scenario.supply;
  const falls = (table: Table): boolean => table.every(([, y], row) => row === 0 || y <= (table[row - 1]?.[1] ?? y));
  const rises = (table: Table): boolean => table.every(([, y], row) => row === 0 || y >= (table[row - 1]?.[1] ?? y));
  return (
    loads.groups.length === 1 &&
    (cell.openCircuitTemperatureVPerK ?? 0) >= 0 &&
    falls(cell.resistanceFactorByTemperature) &&
    rises(cell.capacityFactorByTemperature ?? []) &&
    // Depth is spent charge over the factor, so less charge to have must mean less voltage and more resistance.
    falls(cell.openCircuitTableV) &&
    rises(cell.resistanceFactorByDepth)
  );
}
