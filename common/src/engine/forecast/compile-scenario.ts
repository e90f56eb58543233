import { dekadsOfYear } from '../climate/dekads.ts';
import type { CalendarDekad } from '../climate/dekads.ts';
import { winterStartMonth } from '../climate/winters.ts';
import { compileNode } from '../node/compile-node.ts';
import type { NodeProgram } from '../node/node-program.types.ts';
import { cyclesPerDay, isOnAt, isOnInMonth } from '../node/schedule-rate.ts';
import type { Scenario } from '../scenario/scenario.types.ts';
import { packOf } from '../supply/pack-of.ts';
import type { PackFactors } from '../supply/pack-of.ts';
import { DAY_S } from '#common/units/si.ts';
import type { CandidateContext, CandidateLists } from './candidates.ts';
import { candidateLists } from './candidates.ts';
import { converterOf } from './converter.ts';
import type { Converter } from './converter.ts';
import type { DekadLoad } from './dekad-load.ts';
import { makeDekadLoad } from './make-dekad-load.ts';
import { nodeLoads } from './node-loads.ts';
import type { NodeLoads } from './node-loads.ts';
import { sourceTables } from './source-tables.ts';
import type { SourceTables } from './source-tables.ts';

/** Reference voltage of states that give none, where nothing regulates the rail, V. */
const UNREGULATED_V = 3;

/** Routines that are on in the same dekads, and what follows from that alone. */
export interface Pattern {
  /** Whether each routine is on. */
  isOn: boolean[];
  lists: CandidateLists;
  /** Cycles per second by routine while it is on, otherwise 0. */
  ratesPerS: Float64Array;
  /** Mean load on the rail, the monitor's readings included. */
  meanVector: Float64Array;
}

/** A scenario made ready for forecasts: nothing in it depends on the charge that the pack starts with. */
export interface CompiledScenario {
  scenario: Scenario;
  program: NodeProgram;
  loads: NodeLoads;
  converter: Converter;
  pack: PackFactors;
  source: SourceTables;
  candidateContext: CandidateContext;
  calendar: CalendarDekad[];
  /** Dekad of the year in which life starts, 0 to 35. */
  startDekad: number;
  /** First month of winter, 1 to 12. */
  winterStart: number;
  /** Cycles per second while on, by routine; 0 for `once`. */
  ratesPerS: Float64Array;
  /** Current of the low-battery monitor's readings on the rail, A. */
  monitorA: number;
  /** Routine indices of `once` routines with their time, s, in the order of time. */
  onceEvents: { timeS: number; routineIndex: number }[];
  /** What is on, by calendar dekad. */
  onByDekad: Pattern[];
  /** What a dekad of the year, 0 to 35, brings; made when it is first asked for. */
  dekadLoad: (dekadOfYear: number) => DekadLoad;
}

/**
 * Compiles a scenario: node, loads, regulator, calendar and the moments that may be critical.
 *
 * @param scenario A valid scenario.
 * @returns The compiled scenario, which several forecasts may share.
 * @throws EngineErrors what `compileNode` throws.
 * @example compileScenario(scenario).calendar.length // 36
 */
export function compileScenario(scenario: Scenario): CompiledScenario {
  const { node, supply, climate } = scenario;
  const { cell, regulator, lowBattery } = supply;
  const defaultReferenceVoltageV = regulator.kind === 'none' ? UNREGULATED_V : regulator.outputV;
  const program = compileNode(node, { defaultReferenceVoltageV });
  const loads = nodeLoads(program);
  const converter = converterOf(supply);
  const pack = packOf(cell, supply);
  const candidateContext = {
    loads,
    converter,
    resistanceOhm: cell.resistanceOhm,
    resistanceFactor: pack.resistanceFactor,
  };
  const calendar = dekadsOfYear(climate);
  const ratesPerS = Float64Array.from(
    program.routines,
    ({ schedule, cycleS }) => cyclesPerDay(schedule, cycleS) / DAY_S,
  );
  const monitorA = lowBattery ? ((lowBattery.chargePerReadingC ?? 0) * (lowBattery.readingsPerDay ?? 1)) / DAY_S : 0;
  const known: DekadLoad[] = [];
  const compiled: CompiledScenario = {
    scenario,
    program,
    loads,
    converter,
    pack,
    source: sourceTables(cell, pack),
    candidateContext,
    calendar,
    startDekad: 3 * (climate.startMonth - 1),
    winterStart: winterStartMonth(climate.months),
    ratesPerS,
    monitorA,
    onceEvents: onceEvents(program),
    onByDekad: onByDekad(program, calendar, candidateContext, { ratesPerS, monitorA }),
    dekadLoad: (dekadOfYear) => (known[dekadOfYear] ??= makeDekadLoad(compiled, dekadOfYear)),
  };
  return compiled;
}

function onceEvents(program: NodeProgram): CompiledScenario['onceEvents'] {
  return program.routines
    .flatMap(({ schedule }, routineIndex) =>
      schedule.kind === 'once' ? [{ timeS: schedule.afterS, routineIndex }] : [],
    )
    .sort((a, b) => a.timeS - b.timeS);
}

/** Most years know one or two patterns of routines that are on, so what follows from them is made once for each. */
function onByDekad(
  { routines }: NodeProgram,
  calendar: readonly CalendarDekad[],
  context: CandidateContext,
  draws: Pick<CompiledScenario, 'ratesPerS' | 'monitorA'>,
): Pattern[] {
  const known: Pattern[] = [];
  const isAlways = (index: number): boolean => routines[index]?.schedule.kind === 'always';
  return calendar.map(({ month, meanC }) => {
    const isOn = routines.map(({ schedule: { when } }) => isOnInMonth(when, month) && isOnAt(when, meanC));
    const found = known.find((pattern) => pattern.isOn.every((on, index) => on === isOn[index]));
    if (found) return found;
    const isCase = (index: number): boolean => isOn[index] === true && routines[index]?.schedule.kind !== 'once';
    const ratesPerS = draws.ratesPerS.map((ratePerS, index) => (isOn[index] === true ? ratePerS : 0));
    const pattern: Pattern = {
      isOn,
      lists: candidateLists(context, isCase, isAlways),
      ratesPerS,
      meanVector: meanVector(context.loads, ratesPerS, draws.monitorA),
    };
    known.push(pattern);
    return pattern;
  });
}

function meanVector({ rest, width, cycleExcess }: NodeLoads, ratesPerS: Float64Array, monitorA: number): Float64Array {
  const mean = new Float64Array(rest);
  mean[0] = (mean[0] ?? 0) + monitorA;
  ratesPerS.forEach((ratePerS, routineIndex) => {
    if (ratePerS === 0) return;
    const offset = routineIndex * width;
    for (let at = 0; at < width; at++) mean[at] = (mean[at] ?? 0) + ratePerS * (cycleExcess[offset + at] ?? 0);
  });
  return mean;
}
