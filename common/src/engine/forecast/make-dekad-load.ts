import { capacityTemperatureFactor, openCircuitShiftV, resistanceTemperatureFactor } from '../supply/cell-figures.ts';
import { selfDischargeRatePerS } from '../supply/self-discharge-rate.ts';
import type { Candidate, CandidateLists, TestCase } from './candidates.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { cellLoad } from './converter.ts';
import type { DekadLoad, MeanLoad, TestConditions } from './dekad-load.ts';
import { groupFactors, weighGroups } from './load-vector.ts';
import { meanPieces } from './mean-pieces.ts';

/** Loses everything within a microsecond; a document may ask for more. */
const FASTEST_LOSS_PER_S = 1e6;

/**
 * Makes what a calendar dekad brings: rates, mean load averaged over the day, and the tests at its coldest hour.
 *
 * @param compiled The scenario.
 * @param dekadOfYear 0 to 35.
 * @returns The load of the dekad.
 * @throws RangeError for a dekad that a year has not; a defect of the caller.
 * @example makeDekadLoad(compiled, 0).cold.cases.length
 */
export function makeDekadLoad(compiled: CompiledScenario, dekadOfYear: number): DekadLoad {
  const { calendar, onByDekad, loads, scenario, pack } = compiled;
  const dekad = calendar[dekadOfYear];
  const pattern = onByDekad[dekadOfYear];
  if (!dekad || !pattern) throw new RangeError(`There is no dekad ${dekadOfYear} in a year.`);
  const { cell } = scenario.supply;
  const meanFactors = groupFactors(loads.groups, dekad.meanC, dekad.amplitudeK);
  const capacityFactor = capacityTemperatureFactor(cell.capacityFactorByTemperature, dekad.meanC);
  const shiftV = pack.openCircuitFactor * openCircuitShiftV(cell, dekad.meanC);
  return {
    dekad,
    ratesPerS: pattern.ratesPerS,
    meanFactors,
    capacityFactor,
    openCircuitShiftV: shiftV,
    mean: meanLoad(compiled, { vector: pattern.meanVector, meanFactors, capacityFactor, shiftV, dekad }),
    lists: pattern.lists,
    cold: testConditions(compiled, pattern.lists, dekad.coldestC),
  };
}

function meanLoad(
  { converter, scenario, source }: CompiledScenario,
  given: { vector: Float64Array; meanFactors: number[]; capacityFactor: number; shiftV: number } & Pick<
    DekadLoad,
    'dekad'
  >,
): MeanLoad {
  const { lossPerYear, referenceC, q10, activationEnergyJPerMol } = scenario.supply.cell.selfDischarge;
  const { meanC, amplitudeK } = given.dekad;
  const load = cellLoad(converter, weighGroups(given.vector, 0, given.meanFactors));
  const ratePerS = selfDischargeRatePerS({
    lossPerYear: lossPerYear.typical,
    referenceC,
    q10,
    activationEnergyJPerMol,
    temperatureC: meanC,
    amplitudeK,
  });
  return {
    load,
    selfDischargePerS: Math.min(ratePerS, FASTEST_LOSS_PER_S),
    pieces: meanPieces(source, load, converter.sight, given),
  };
}

/**
 * What decides at a temperature whether the node works.
 *
 * @param compiled The scenario.
 * @param lists Candidates of the dekad.
 * @param temperatureC Temperature, °C.
 * @returns The conditions.
 * @example testConditions(compiled, lists, -20).capacityFactor
 */
export function testConditions(
  compiled: CompiledScenario,
  lists: CandidateLists,
  temperatureC: number,
): TestConditions {
  const { scenario, pack } = compiled;
  const { cell, lowBattery } = scenario.supply;
  return {
    temperatureC,
    capacityFactor: capacityTemperatureFactor(cell.capacityFactorByTemperature, temperatureC),
    openCircuitShiftV: pack.openCircuitFactor * openCircuitShiftV(cell, temperatureC),
    resistanceFactor: resistanceTemperatureFactor(cell.resistanceFactorByTemperature, temperatureC),
    cases: casesAt(compiled, lists, temperatureC),
    restCases: lowBattery?.readAt === 'rest' ? testCases(compiled, lists.rest, temperatureC) : [],
  };
}

/** All days share their cases where no load depends on temperature. */
function casesAt(compiled: CompiledScenario, lists: CandidateLists, temperatureC: number): TestCase[] {
  if (compiled.loads.groups.length > 1) return testCases(compiled, lists.all, temperatureC);
  return (lists.fixedCases ??= testCases(compiled, lists.all, temperatureC));
}

/**
 * Candidates at a temperature.
 *
 * @param compiled The scenario.
 * @param candidates The candidates.
 * @param temperatureC Temperature, °C.
 * @returns Loads, limits and fresh resistances.
 * @example testCases(compiled, lists.all, 20)
 */
export function testCases(
  { loads, converter }: CompiledScenario,
  candidates: readonly Candidate[],
  temperatureC: number,
): TestCase[] {
  const factors = groupFactors(loads.groups, temperatureC, 0);
  return candidates.map((candidate) => ({
    load: cellLoad(converter, weighGroups(candidate.vector, 0, factors)),
    limitV: candidate.limitV,
    freshOhm: candidate.freshOhm,
    candidate,
  }));
}
