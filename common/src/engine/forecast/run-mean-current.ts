import { DEKADS, DEKAD_S } from '../climate/dekads.ts';
import { YEAR_S } from '#common/units/si.ts';
import { routineCandidates } from './candidates.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import type { DekadLoad } from './dekad-load.ts';
import { dekadPoint } from './dekad-point.ts';
import { firstFailure, leastHeadroom } from './first-failure.ts';
import type { Failure } from './first-failure.ts';
import { testCases } from './make-dekad-load.ts';
import { onceEvent } from './once-event.ts';
import type { Run, Stretch, Usage } from './run.types.ts';
import { startingCharge } from './starting-charge.ts';
import { walkOn } from './walk.ts';
import type { Walk } from './walk.ts';

/** No forecast looks further than this, s. */
export const HORIZON_S = 40 * YEAR_S;

interface Life {
  compiled: CompiledScenario;
  startingC: number;
  walk: Walk;
  usage: Usage;
  stretches: Stretch[];
  nextEvent: number;
}

/**
 * Follows a scenario's life at the mean-current level: dekad by dekad, routines as their mean, the critical moment on top.
 *
 * @param compiled The scenario.
 * @returns The life up to its end or the horizon.
 * @throws OutOfRangeError what the supply functions throw for figures outside their range.
 * @example runMeanCurrent(compileScenario(scenario)).endS
 */
export function runMeanCurrent(compiled: CompiledScenario): Run {
  const { scenario, startDekad } = compiled;
  const { startingC, firstYearCellA } = startingCharge(compiled);
  const life: Life = {
    compiled,
    startingC,
    walk: { spent: 0, timeS: 0, spentS: 0, perVoltS: 0, voltS: 0 },
    usage: emptyUsage(),
    stretches: [],
    nextEvent: 0,
  };
  const shelfS = shelfEndS(scenario.supply.cell.shelfLifeS, scenario.climate.storage?.durationS);
  const lastS = Math.min(shelfS, HORIZON_S);
  const points: Run['points'] = [];
  for (let dekadOfLife = 0; ; dekadOfLife++) {
    const load = compiled.dekadLoad((startDekad + dekadOfLife) % DEKADS);
    const fromS = life.walk.timeS;
    const drawnBeforeC = drawnC(life, load);
    const lostBeforeC = lostC(life, load);
    const failure = startingC > 0 ? passDekad(life, load, Math.min((dekadOfLife + 1) * DEKAD_S, lastS)) : EMPTY;
    const { spent, timeS } = life.walk;
    const least = criticalAt(life, load, failure);
    points.push(
      dekadPoint(compiled, load, {
        startingC,
        spent,
        timeS,
        least,
        drawnC: drawnC(life, load) - drawnBeforeC,
        lostC: lostC(life, load) - lostBeforeC,
        sinceS: timeS - fromS,
      }),
    );
    if (!failure && timeS < lastS) continue;
    return {
      outcome: failure ? failedAs(failure, timeS) : shelfS <= HORIZON_S ? 'shelf-life' : 'outlives-horizon',
      startingC,
      firstYearCellA,
      endS: timeS,
      spent,
      endLoad: load,
      dekadOfLife,
      critical: least,
      isExhausted: failure !== null && failure.testCase === null,
      points,
      stretches: life.stretches,
      usage: life.usage,
    };
  }
}

/** Nothing is left when life begins. */
const EMPTY: Failure = { spent: 0, testCase: null };

function shelfEndS(shelfLifeS = Infinity, storageS = 0): number {
  return Math.max(0, shelfLifeS - storageS);
}

function emptyUsage(): Usage {
  const sums = (): Float64Array => new Float64Array(DEKADS);
  return { timeS: sums(), perVoltS: sums(), voltS: sums(), leftS: sums(), once: [] };
}

/** Passes a dekad with the routines that run once in it; stops at the first failure. */
function passDekad(life: Life, load: DekadLoad, endS: number): Failure | null {
  const { onceEvents, onByDekad } = life.compiled;
  for (; ; life.nextEvent++) {
    const event = onceEvents[life.nextEvent];
    if (!event || event.timeS >= endS) return passStretch(life, load, endS);
    const isOn = onByDekad[load.dekad.dekadOfYear]?.isOn[event.routineIndex] === true;
    if (!isOn) continue;
    const failure = passStretch(life, load, event.timeS) ?? runOnce(life, load, event.routineIndex);
    if (failure) return failure;
  }
}

function passStretch(
  { compiled, startingC, walk, usage, stretches }: Life,
  load: DekadLoad,
  endS: number,
): Failure | null {
  const { spent, timeS, spentS, perVoltS, voltS } = walk;
  const dekad = load.dekad.dekadOfYear;
  walkOn(load.mean, startingC, { timeS: endS - timeS, spent: Infinity }, walk);
  const range = { fromSpent: spent, toSpent: Math.max(spent, walk.spent) };
  const failure = firstFailure(compiled.source, load.cold, compiled.converter.sight, range);
  if (failure) {
    walk.spent = spent;
    walk.timeS = timeS;
    walk.spentS = spentS;
    walk.perVoltS = perVoltS;
    walk.voltS = voltS;
    walkOn(load.mean, startingC, { timeS: endS - timeS, spent: failure.spent }, walk);
    walk.spent = failure.spent;
  }
  const passedS = walk.timeS - timeS;
  usage.timeS[dekad] = (usage.timeS[dekad] ?? 0) + passedS;
  usage.perVoltS[dekad] = (usage.perVoltS[dekad] ?? 0) + walk.perVoltS - perVoltS;
  usage.voltS[dekad] = (usage.voltS[dekad] ?? 0) + walk.voltS - voltS;
  usage.leftS[dekad] = (usage.leftS[dekad] ?? 0) + passedS - (walk.spentS - spentS);
  // Only a monitor looks back.
  if (compiled.scenario.supply.lowBattery) {
    stretches.push({ load, fromS: timeS, toS: walk.timeS, fromSpent: spent, toSpent: walk.spent });
  }
  return failure;
}

/** A routine that runs once draws all at its moment and is tested after it. */
function runOnce({ compiled, startingC, walk, usage }: Life, load: DekadLoad, routineIndex: number): Failure | null {
  const { candidateContext, source, converter } = compiled;
  const event = onceEvent(compiled, load, routineIndex, walk.spent);
  usage.once.push(event);
  walk.spent = Math.max(0, walk.spent + event.chargeC / startingC);
  const candidates = routineCandidates(candidateContext, load.lists.rest, routineIndex);
  const cases = testCases(compiled, candidates, load.cold.temperatureC);
  const range = { fromSpent: walk.spent, toSpent: walk.spent };
  return firstFailure(source, { ...load.cold, cases }, converter.sight, range);
}

function failedAs({ testCase }: Failure, timeS: number): Run['outcome'] {
  if (timeS === 0) return 'never-starts';
  return testCase ? 'undervoltage' : 'charge-exhausted';
}

/** The critical moment; of a failure the one that failed, whatever rounding makes of its headroom. */
function criticalAt({ compiled, walk }: Life, load: DekadLoad, failure: Failure | null): Run['critical'] {
  const { source, converter } = compiled;
  const conditions = failure?.testCase ? { ...load.cold, cases: [failure.testCase] } : load.cold;
  return leastHeadroom(source, conditions, converter, walk.spent);
}

/** Charge drawn so far in a calendar dekad, C. */
function drawnC({ usage }: Life, { dekad: { dekadOfYear }, mean }: DekadLoad): number {
  const { constantA, powerW, conductanceS } = mean.load;
  let onceC = 0;
  for (const event of usage.once) if (event.dekadOfYear === dekadOfYear) onceC += event.chargeC;
  return (
    onceC +
    constantA * (usage.timeS[dekadOfYear] ?? 0) +
    powerW * (usage.perVoltS[dekadOfYear] ?? 0) +
    conductanceS * (usage.voltS[dekadOfYear] ?? 0)
  );
}

/** Charge lost to self-discharge so far in a calendar dekad, C. */
function lostC({ usage, startingC }: Life, { dekad: { dekadOfYear }, mean }: DekadLoad): number {
  return mean.selfDischargePerS * startingC * (usage.leftS[dekadOfYear] ?? 0);
}
