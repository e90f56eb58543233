import { DEKADS } from '../climate/dekads.ts';
import { freshResistanceOhm, openCircuitShiftV, resistanceTemperatureFactor } from '../supply/cell-figures.ts';
import { loadCurrentA, loadedVoltageV } from '../supply/cell-load.ts';
import type { CellLoad } from '../supply/cell-load.ts';
import { YEAR_S } from '#common/units/si.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { cellLoad } from './converter.ts';
import type { Peak } from './forecast.types.ts';
import { groupFactors, weighGroups } from './load-vector.ts';
import type { RailLoad } from './load-vector.ts';
import type { IntervalLoad } from './node-loads.ts';
import { sourceAt } from './source-tables.ts';

/** Where the highest current is asked for: charge and temperature of the end of life. */
export interface PeakMoment {
  spent: number;
  temperatureC: number;
  capacityFactor: number;
}

/**
 * Highest current at the cell in one step, and the highest sum when two routines meet, at the charge and temperature of the end
 * of life, where a load of constant power takes most. Every enabled routine counts, whether or not it is on then.
 *
 * Meetings are counted for independent starts: `rate_i · rate_j · (duration_i + duration_j)` of the two intervals, a year, over
 * the dekads in which both are on. `always` and `once` routines do not meet: the first is in every sum, the second has no rate.
 *
 * @param compiled The scenario.
 * @param moment Charge and temperature.
 * @returns The peak; null for a node without routines.
 * @example peakOf(compiled, { spent: 0, temperatureC: 20, capacityFactor: 1 })?.currentA
 */
export function peakOf(compiled: CompiledScenario, moment: PeakMoment): Peak | null {
  const { routines } = compiled.program;
  const isAlways = (load: IntervalLoad): boolean => routines[load.routineIndex]?.schedule.kind === 'always';
  const always = [...heaviestByRoutine(compiled.loads.intervals.filter(isAlways), currentsAt(compiled, moment, []))];
  const currents = currentsAt(compiled, moment, always);
  const others = heaviestByRoutine(
    compiled.loads.intervals.filter((load) => !isAlways(load)),
    currents,
  );
  const [peak] = [...others, ...always]
    .map((load) => ({ interval: load.interval, currentA: currents([load]) }))
    .sort((a, b) => b.currentA - a.currentA);
  if (!peak) return null;
  const { id: intervalId, stepId, longestS: durationS } = peak.interval;
  return { currentA: peak.currentA, intervalId, stepId, durationS, meeting: meetingOf(compiled, others, currents) };
}

type CurrentOf = (loads: readonly IntervalLoad[]) => number;

/** The interval with the highest current of each routine. */
function heaviestByRoutine(loads: readonly IntervalLoad[], currents: CurrentOf): IntervalLoad[] {
  const heaviest = new Map<number, { load: IntervalLoad; currentA: number }>();
  const one: IntervalLoad[] = [];
  for (const load of loads) {
    one[0] = load;
    const currentA = currents(one);
    if (currentA > (heaviest.get(load.routineIndex)?.currentA ?? -Infinity)) {
      heaviest.set(load.routineIndex, { load, currentA });
    }
  }
  return [...heaviest.values()].map(({ load }) => load);
}

/** Current at the cell of intervals on top of rest and of the heaviest intervals of other `always` routines. */
function currentsAt(compiled: CompiledScenario, moment: PeakMoment, always: readonly IntervalLoad[]): CurrentOf {
  const { source, converter, pack, scenario, loads } = compiled;
  const { cell } = scenario.supply;
  const point = sourceAt(source, moment.spent / moment.capacityFactor, { openCircuitV: 0, resistanceFactor: 0 });
  const shiftV = pack.openCircuitFactor * openCircuitShiftV(cell, moment.temperatureC);
  const openCircuitV = point.openCircuitV + shiftV;
  const temperatureFactor = resistanceTemperatureFactor(cell.resistanceFactorByTemperature, moment.temperatureC);
  const packFactor = pack.resistanceFactor * temperatureFactor * point.resistanceFactor;
  const factors = groupFactors(loads.groups, moment.temperatureC, 0);
  const rest = weighGroups(loads.rest, 0, factors);
  return (intervals) => {
    const rail = { constantA: rest.constantA, powerW: rest.powerW, conductanceS: rest.conductanceS };
    let durationS = Infinity;
    for (const load of intervals) {
      addLoad(rail, weighGroups(loads.intervalExcess, load.offset, factors));
      durationS = Math.min(durationS, load.interval.longestS);
    }
    for (const load of always) {
      if (intervals.some(({ routineIndex }) => routineIndex === load.routineIndex)) continue;
      addLoad(rail, weighGroups(loads.intervalExcess, load.offset, factors));
    }
    const ohm = freshResistanceOhm(cell.resistanceOhm, durationS) * packFactor;
    return currentUnder(compiled, cellLoad(converter, rail), openCircuitV, ohm);
  };
}

function addLoad(sum: RailLoad, { constantA, powerW, conductanceS }: RailLoad): void {
  sum.constantA += constantA;
  sum.powerW += powerW;
  sum.conductanceS += conductanceS;
}

/** Current in operation; where the source collapses, what it would take without any resistance. */
function currentUnder({ converter }: CompiledScenario, load: CellLoad, openCircuitV: number, ohm: number): number {
  const loadedV = loadedVoltageV(load, converter.sight, openCircuitV, ohm);
  return loadCurrentA(load, converter.sight, Number.isNaN(loadedV) ? openCircuitV : loadedV);
}

function meetingOf(
  compiled: CompiledScenario,
  heaviest: readonly IntervalLoad[],
  currents: CurrentOf,
): Peak['meeting'] {
  const { routines } = compiled.program;
  let best: Peak['meeting'] = null;
  heaviest.forEach((first, index) => {
    for (const second of heaviest.slice(index + 1)) {
      const perYear = meetingsPerYear(compiled, first, second);
      if (perYear === 0) continue;
      const currentA = currents([first, second]);
      if (best && currentA <= best.currentA) continue;
      const routineIds = [first, second].map(({ routineIndex }) => routines[routineIndex]?.routineId ?? '');
      best = { currentA, perYear, routineIds };
    }
  });
  return best;
}

function meetingsPerYear(
  { ratesPerS, onByDekad }: CompiledScenario,
  first: IntervalLoad,
  second: IntervalLoad,
): number {
  const both = onByDekad.filter(({ isOn }) => isOn[first.routineIndex] === true && isOn[second.routineIndex] === true);
  const rates = (ratesPerS[first.routineIndex] ?? 0) * (ratesPerS[second.routineIndex] ?? 0);
  return (rates * (first.interval.durationS + second.interval.durationS) * YEAR_S * both.length) / DEKADS;
}
