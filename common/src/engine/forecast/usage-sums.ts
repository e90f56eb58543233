import { DEKADS, DEKAD_S } from '../climate/dekads.ts';
import { seenVoltageV } from '../supply/cell-load.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { meanOpenCircuitV } from './once-event.ts';
import type { Usage } from './run.types.ts';

/** Charge of a life, or of the fresh year that stands for one, C, and its time, s. */
export interface UsageTotals {
  timeS: number;
  drawnC: number;
  lostC: number;
}

/**
 * A year at the voltage of the fresh pack, for a node that never lives: what it would draw.
 *
 * @param compiled The scenario.
 * @returns Sums of one year.
 * @example freshYear(compiled).timeS[0] // 876,600
 */
export function freshYear(compiled: CompiledScenario): Usage {
  const usage: Usage = {
    timeS: new Float64Array(DEKADS).fill(DEKAD_S),
    perVoltS: new Float64Array(DEKADS),
    voltS: new Float64Array(DEKADS),
    leftS: new Float64Array(DEKADS).fill(DEKAD_S),
    once: [],
  };
  for (let dekad = 0; dekad < DEKADS; dekad++) {
    const seenV = seenVoltageV(compiled.converter.sight, meanOpenCircuitV(compiled, compiled.dekadLoad(dekad), 0));
    usage.perVoltS[dekad] = DEKAD_S / seenV;
    usage.voltS[dekad] = DEKAD_S * seenV;
  }
  return usage;
}

/**
 * Adds up what was drawn from the cell and what was lost to self-discharge.
 *
 * @param compiled The scenario.
 * @param usage Sums by dekad of the year.
 * @param startingC Starting charge, C.
 * @returns Totals.
 * @example usageTotals(compiled, run.usage, run.startingC).drawnC
 */
export function usageTotals(compiled: CompiledScenario, usage: Usage, startingC: number): UsageTotals {
  const totals = { timeS: 0, drawnC: 0, lostC: 0 };
  for (let dekad = 0; dekad < DEKADS; dekad++) {
    const timeS = usage.timeS[dekad] ?? 0;
    if (timeS === 0) continue;
    const { load, selfDischargePerS } = compiled.dekadLoad(dekad).mean;
    totals.timeS += timeS;
    totals.drawnC +=
      load.constantA * timeS +
      load.powerW * (usage.perVoltS[dekad] ?? 0) +
      load.conductanceS * (usage.voltS[dekad] ?? 0);
    totals.lostC += selfDischargePerS * startingC * (usage.leftS[dekad] ?? 0);
  }
  for (const { chargeC } of usage.once) totals.drawnC += chargeC;
  return totals;
}
