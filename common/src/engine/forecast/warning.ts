import { loadedVoltageV } from '../supply/cell-load.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { railVoltageV } from './converter.ts';
import type { DekadLoad } from './dekad-load.ts';
import { leastHeadroom } from './first-failure.ts';
import type { Warning } from './forecast.types.ts';
import type { Run, Stretch } from './run.types.ts';
import { sourceAt } from './source-tables.ts';
import { walkOn } from './walk.ts';

/** Halvings that locate an onset within a dekad to a fraction of a second. */
const HALVINGS = 50;

/** What a monitor says over a life. */
export interface Monitoring {
  /** Null when it has not warned when life ends, or life does not end. */
  warning: Warning | null;
  /** Onsets that were cleared again, s. */
  falseAlarmTimesS: number[];
}

/**
 * Threshold of a monitor that can only be set in steps, rounded up.
 *
 * @param monitor Threshold, V, and step, V; without a step any threshold can be set.
 * @returns Threshold, V.
 * @example quantisedThresholdV({ thresholdV: 2.23, stepV: 0.05 }) // 2.25
 */
export function quantisedThresholdV({ thresholdV, stepV }: { thresholdV: number; stepV?: number }): number {
  if (stepV === undefined) return thresholdV;
  // A threshold that is a whole number of steps stays, whatever the division rounds to.
  return Math.ceil(thresholdV / stepV - 1e-9) * stepV;
}

/**
 * Follows a low-battery monitor through a life. It warns when the rail, at the coldest hour and at rest or in the critical step,
 * falls below the threshold; it clears at threshold and hysteresis.
 *
 * @param compiled The scenario.
 * @param run Its life.
 * @param hasEnd Whether life ends before the horizon.
 * @returns Warning and false alarms; null without a monitor.
 * @example monitoring(compiled, run, true)?.warning?.leadS
 */
export function monitoring(compiled: CompiledScenario, run: Run, hasEnd: boolean): Monitoring | null {
  const { lowBattery } = compiled.scenario.supply;
  if (!lowBattery) return null;
  const thresholdV = quantisedThresholdV(lowBattery);
  const clearsV = thresholdV + lowBattery.hysteresisV;
  const falseAlarmTimesS: number[] = [];
  let sinceS: number | null = null;
  for (const stretch of run.stretches) {
    for (const spent of boundsOf(compiled, stretch)) {
      const readingV = readingAt(compiled, stretch.load, spent.to);
      if (sinceS === null && readingV < thresholdV) {
        sinceS = onsetS(compiled, run, stretch, { ...spent, thresholdV });
      } else if (sinceS !== null && readingV >= clearsV) {
        falseAlarmTimesS.push(sinceS);
        sinceS = null;
      }
    }
  }
  const warning =
    sinceS === null || !hasEnd ? null : { timeS: sinceS, leadS: run.endS - sinceS, falseAlarmTimesS, thresholdV };
  return { warning, falseAlarmTimesS };
}

/** Charges at which a stretch is looked at: its beginning, the rows of the tables in it, its end. */
function boundsOf({ source }: CompiledScenario, stretch: Stretch): { from: number; to: number }[] {
  const { fromSpent, toSpent, load } = stretch;
  const bounds = [{ from: fromSpent, to: fromSpent }];
  let from = fromSpent;
  for (const depth of source.depths) {
    const spent = depth * load.cold.capacityFactor;
    if (spent <= from || spent >= toSpent) continue;
    bounds.push({ from, to: spent });
    from = spent;
  }
  bounds.push({ from, to: toSpent });
  return bounds;
}

/** What the monitor reads: the rail at rest or in the critical step, V. */
function readingAt(compiled: CompiledScenario, load: DekadLoad, spent: number): number {
  const { source, converter } = compiled;
  const { cold } = load;
  if (cold.restCases.length === 0) {
    return railVoltageV(converter, leastHeadroom(source, cold, converter, spent)?.loadedV ?? 0);
  }
  const point = sourceAt(source, spent / cold.capacityFactor, { openCircuitV: 0, resistanceFactor: 0 });
  const openCircuitV = point.openCircuitV + cold.openCircuitShiftV;
  let lowestV = Infinity;
  for (const { load: restLoad, freshOhm } of cold.restCases) {
    const ohm = freshOhm * cold.resistanceFactor * point.resistanceFactor;
    const voltageV = loadedVoltageV(restLoad, converter.sight, openCircuitV, ohm);
    lowestV = Math.min(lowestV, Number.isNaN(voltageV) ? 0 : voltageV);
  }
  return railVoltageV(converter, lowestV);
}

/** Time at which the reading first lies below the threshold between two charges. */
function onsetS(
  compiled: CompiledScenario,
  { startingC }: Run,
  stretch: Stretch,
  { from, to, thresholdV }: { from: number; to: number; thresholdV: number },
): number {
  let good = from;
  let bad = to;
  for (let halving = 0; halving < HALVINGS && bad > good; halving++) {
    const middle = (good + bad) / 2;
    if (readingAt(compiled, stretch.load, middle) < thresholdV) bad = middle;
    else good = middle;
  }
  const walk = { spent: stretch.fromSpent, timeS: stretch.fromS, spentS: 0, perVoltS: 0, voltS: 0 };
  walkOn(stretch.load.mean, startingC, { timeS: stretch.toS - stretch.fromS, spent: bad }, walk);
  return walk.timeS;
}
