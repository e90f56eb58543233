import { DEKADS, DEKAD_S } from '../climate/dekads.ts';
import { winterOfLife } from '../climate/winters.ts';
import { DAY_S, HOUR_S } from '#common/units/si.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { dayHours } from './day-hours.ts';
import type { DayHours } from './day-hours.ts';
import type { DekadLoad } from './dekad-load.ts';
import { firstFailure } from './first-failure.ts';
import type { Outage } from './forecast.types.ts';
import type { Run } from './run.types.ts';
import { HORIZON_S } from './run-mean-current.ts';
import { walkOn } from './walk.ts';
import type { Walk } from './walk.ts';

export interface AfterFailure {
  outages: Outage[];
  lastReportS: number;
}

/**
 * What would follow the first failure if the node recovered each time: it goes on drawing its mean current, is silent in the hours
 * in which it fails, and reports in the others. An outage lasts while the coldest hour fails; one that lasts over midsummer is told
 * as two. The day is judged at 24 hours, each at its middle.
 *
 * @param compiled The scenario.
 * @param run Its life, ended by charge or voltage.
 * @param latestS Nothing is said about later times, s: the end of shelf life.
 * @returns Outages up to the last possible report, and that report, s.
 * @example afterFailure(compiled, run, Infinity).lastReportS >= run.endS
 */
export function afterFailure(compiled: CompiledScenario, run: Run, latestS: number): AfterFailure {
  const lastS = Math.min(latestS, HORIZON_S);
  const state: Walk = { spent: run.spent, timeS: run.endS, spentS: 0, perVoltS: 0, voltS: 0 };
  const hours = dayHours(compiled);
  const silences: Silence[] = [];
  let lastReportS = run.endS;
  // A whole year without a report: later ones have less charge, so none follows.
  for (let dekad = run.dekadOfLife; state.timeS < lastS && state.spent < 1; dekad++) {
    if (state.timeS - lastReportS > DEKADS * DEKAD_S) break;
    const load = compiled.dekadLoad((compiled.startDekad + dekad) % DEKADS);
    const endS = Math.min((dekad + 1) * DEKAD_S, lastS);
    const winter = winterOf(compiled, dekad);
    const passed = passDekad(compiled, { load, startingC: run.startingC, endS, hours, winter }, state);
    lastReportS = Math.max(lastReportS, passed.lastReportS);
    if (passed.silence) silences.push(passed.silence);
  }
  return { outages: outagesOf(silences, lastReportS), lastReportS };
}

interface Silence {
  startS: number;
  endS: number;
  /** Share of the hours of the day that fail. */
  share: number;
  winter: number;
}

const winterOf = ({ startDekad, winterStart }: CompiledScenario, dekad: number): number =>
  winterOfLife(startDekad, dekad, winterStart);

interface Passage {
  load: DekadLoad;
  startingC: number;
  endS: number;
  hours: DayHours;
  winter: number;
}

/** Goes on to the end of a dekad, with its silence from the moment in which its coldest hour fails. */
function passDekad(
  compiled: CompiledScenario,
  { load, startingC, endS, hours, winter }: Passage,
  state: Walk,
): { silence: Silence | null; lastReportS: number } {
  const { source, converter } = compiled;
  const start = copyOf(state);
  walkOn(load.mean, startingC, { timeS: endS - start.timeS, spent: 1 }, state);
  state.timeS = endS;
  const range = { fromSpent: start.spent, toSpent: Math.max(start.spent, state.spent) };
  const cold = firstFailure(source, load.cold, converter.sight, range);
  if (!cold) return { silence: null, lastReportS: endS };
  const passage = { load, startingC, leftS: endS - start.timeS };
  const startS = timeAtS(passage, start, cold.spent);
  const middle = (cold.spent + range.toSpent) / 2;
  const silence = { startS, endS, share: hours.silentShare(load, middle), winter };
  // Until the coldest hour fails all hours work; where it fails from the beginning only the others can tell.
  const coldReportS = startS > start.timeS ? startS : 0;
  const until = hours.worksUntil(load, range);
  if (until === null) return { silence, lastReportS: coldReportS };
  return { silence, lastReportS: until === Infinity ? endS : Math.max(coldReportS, timeAtS(passage, start, until)) };
}

function copyOf({ spent, timeS, spentS, perVoltS, voltS }: Walk): Walk {
  return { spent, timeS, spentS, perVoltS, voltS };
}

/** Time at which a charge is spent, on the way on from a state. */
function timeAtS(
  { load, startingC, leftS }: { load: DekadLoad; startingC: number; leftS: number },
  start: Walk,
  spent: number,
): number {
  const until = copyOf(start);
  walkOn(load.mean, startingC, { timeS: leftS, spent }, until);
  return until.timeS;
}

/** Joins silences that follow each other within a winter, up to the last report. */
function outagesOf(silences: readonly Silence[], lastReportS: number): Outage[] {
  const outages: Outage[] = [];
  for (const { startS, endS, share, winter } of silences) {
    if (startS >= lastReportS) break;
    const untilS = Math.min(endS, lastReportS);
    const hours = (share * (untilS - startS)) / HOUR_S;
    const last = outages.at(-1);
    if (last && last.winter === winter && startS - last.endS < DAY_S / 24) {
      last.endS = untilS;
      last.hours += hours;
    } else {
      outages.push({ winter, startS, endS: untilS, hours });
    }
  }
  return outages;
}
