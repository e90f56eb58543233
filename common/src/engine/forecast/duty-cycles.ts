import { DEKADS } from '../climate/dekads.ts';
import { drawAt } from '../node/draw.ts';
import { dutyShares } from '../node/duty-shares.ts';
import { seenVoltageV } from '../supply/cell-load.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import type { DutyCycle } from './forecast.types.ts';
import { groupOf } from './load-vector.ts';
import { meanOpenCircuitV } from './once-event.ts';
import type { Usage } from './run.types.ts';

/**
 * Share of time that each part spends in each state and transition, averaged over life, and the rail current that comes to. The
 * current is the mean of the state's current over life times its share.
 *
 * @param compiled The scenario.
 * @param usage Sums by dekad of the year.
 * @returns Lines by part, rest first.
 * @example dutyCycles(compiled, run.usage)
 */
export function dutyCycles(compiled: CompiledScenario, usage: Usage): DutyCycle[] {
  const { program, loads } = compiled;
  const lifeS = usage.timeS.reduce((sumS, timeS) => sumS + timeS, 0);
  const cycles = program.routines.map(() => 0);
  const unitFactors = loads.groups.map(() => 0);
  let voltS = 0;
  for (let dekad = 0; dekad < DEKADS; dekad++) {
    const timeS = usage.timeS[dekad] ?? 0;
    if (timeS === 0) continue;
    const load = compiled.dekadLoad(dekad);
    addTimes(cycles, load.ratesPerS, timeS);
    addTimes(unitFactors, load.meanFactors, timeS);
    voltS += timeS * railAt(compiled, dekad, usage);
  }
  for (const { routineIndex } of usage.once) cycles[routineIndex] = (cycles[routineIndex] ?? 0) + 1;
  const railV = voltS / lifeS;
  return dutyShares(
    program,
    cycles.map((count) => count / lifeS),
  ).map((duty) => {
    const { partId, stateId, fromStateId, share, draw } = duty;
    const factor = (unitFactors[groupOf(loads.groups, draw)] ?? 0) / lifeS;
    // At the reference temperature a doubling has no effect.
    const nominalA = drawAt(draw, { voltageV: railV, temperatureC: draw.referenceTemperatureC });
    return { partId, stateId, fromStateId, share, meanCurrentA: share * factor * nominalA };
  });
}

function addTimes(sums: number[], values: ArrayLike<number>, timeS: number): void {
  for (let index = 0; index < sums.length; index++) sums[index] = (sums[index] ?? 0) + (values[index] ?? 0) * timeS;
}

/** Mean rail voltage in a calendar dekad of life, V. */
function railAt(compiled: CompiledScenario, dekad: number, usage: Usage): number {
  const { converter } = compiled;
  if (converter.kind === 'switching') return converter.highestRailV;
  const load = compiled.dekadLoad(dekad);
  const leftShare = (usage.leftS[dekad] ?? 0) / (usage.timeS[dekad] ?? 1);
  return seenVoltageV(converter.sight, meanOpenCircuitV(compiled, load, Math.max(0, 1 - leftShare)));
}
