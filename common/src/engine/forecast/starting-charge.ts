import { DEKADS, DEKAD_S } from '../climate/dekads.ts';
import type { Table } from '../scenario/scenario.types.ts';
import { capacityAtCurrentC } from '../supply/capacity-at-current.ts';
import { decayedS } from '../supply/decaying-fall.ts';
import { selfDischargeRatePerS } from '../supply/self-discharge-rate.ts';
import { YEAR_S } from '#common/units/si.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { onceEvent } from './once-event.ts';
import { walkOn } from './walk.ts';

export interface StartingCharge {
  /** Charge of the pack when life begins, C, 0 or more. */
  startingC: number;
  /** Mean current of one cell in the first year, A, where a rate table asked for it. */
  firstYearCellA: number | null;
}

/**
 * Charge of the pack when life begins: typical capacity of a cell, or that of its rate table at the mean current of the first year,
 * for the pack, less reserve and what storage takes.
 *
 * @param compiled The scenario.
 * @returns Starting charge.
 * @throws OutOfRangeError what `selfDischargeRatePerS` and `capacityAtCurrentC` throw.
 * @example startingCharge(compileScenario(scenario)).startingC
 */
export function startingCharge(compiled: CompiledScenario): StartingCharge {
  const { rateTable, capacityC } = compiled.scenario.supply.cell;
  if (!rateTable) return { startingC: afterStorageC(compiled, capacityC.typical), firstYearCellA: null };
  const startingC = settledC(compiled, rateTable);
  return { startingC, firstYearCellA: firstYearCellA(compiled, startingC) };
}

const MOST_ROUNDS = 40;
const MOST_HALVINGS = 80;

/** The charge that its own first year's current gives: a load that depends on voltage depends a little on the charge. */
function settledC(compiled: CompiledScenario, table: Table): number {
  const next = (startingC: number): number =>
    afterStorageC(compiled, capacityAtCurrentC({ table, currentA: firstYearCellA(compiled, startingC) }));
  const capacities = table.map(([, capacityC]) => capacityC);
  let startingC = afterStorageC(compiled, Math.max(...capacities));
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const nextC = next(startingC);
    if (Math.abs(nextC - startingC) <= 1e-13 * startingC) return nextC;
    startingC = nextC;
  }
  // It swings between two values: the answer lies between the least and the greatest capacity.
  let low = afterStorageC(compiled, Math.min(...capacities));
  let high = afterStorageC(compiled, Math.max(...capacities));
  for (let halving = 0; halving < MOST_HALVINGS; halving++) {
    const middle = (low + high) / 2;
    if (next(middle) > middle) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

function afterStorageC({ scenario, pack }: CompiledScenario, capacityC: number): number {
  const { supply, climate } = scenario;
  const freshC = capacityC * pack.capacityFactor * (1 - (supply.reserveFraction ?? 0));
  if (!climate.storage) return freshC;
  const { durationS, temperatureC, currentA } = climate.storage;
  const { lossPerYear, referenceC, q10, activationEnergyJPerMol } = supply.cell.selfDischarge;
  const ratePerS = selfDischargeRatePerS({
    lossPerYear: lossPerYear.typical,
    referenceC,
    q10,
    activationEnergyJPerMol,
    temperatureC,
  });
  return Math.max(0, freshC - (currentA + ratePerS * freshC) * decayedS(ratePerS, durationS));
}

/** Mean current of one cell over the whole first year, whether or not the charge lasts as long. */
function firstYearCellA(compiled: CompiledScenario, startingC: number): number {
  if (startingC === 0) return 0;
  const walk = { spent: 0, timeS: 0, spentS: 0, perVoltS: 0, voltS: 0 };
  let chargeC = 0;
  let nextEvent = 0;
  for (let dekad = 0; dekad < DEKADS; dekad++) {
    const load = compiled.dekadLoad((compiled.startDekad + dekad) % DEKADS);
    const { constantA, powerW, conductanceS } = load.mean.load;
    const before = { ...walk };
    const endS = (dekad + 1) * DEKAD_S;
    for (; ; nextEvent++) {
      const event = compiled.onceEvents[nextEvent];
      if (!event || event.timeS >= endS) break;
      walkOn(load.mean, startingC, { timeS: event.timeS - walk.timeS, spent: Infinity }, walk);
      if (!compiled.onByDekad[load.dekad.dekadOfYear]?.isOn[event.routineIndex]) continue;
      const drawn = onceEvent(compiled, load, event.routineIndex, walk.spent).chargeC;
      walk.spent += drawn / startingC;
      chargeC += drawn;
    }
    walkOn(load.mean, startingC, { timeS: endS - walk.timeS, spent: Infinity }, walk);
    chargeC +=
      constantA * DEKAD_S + powerW * (walk.perVoltS - before.perVoltS) + conductanceS * (walk.voltS - before.voltS);
  }
  return Math.max(0, chargeC) / YEAR_S / compiled.scenario.supply.parallel;
}
