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
  /** Whether each routine is on, by calendar dekad, and the candidates of each such pattern. */
  onByDekad: { isOn: boolean[]; lists: CandidateLists }[];
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
    ratesPerS: Float64Array.from(program.routines, ({ schedule, cycleS }) => cyclesPerDay(schedule, cycleS) / DAY_S),
    monitorA: lowBattery ? ((lowBattery.chargePerReadingC ?? 0) * (lowBattery.readingsPerDay ?? 1)) / DAY_S : 0,
    onceEvents: onceEvents(program),
    onByDekad: onByDekad(program, calendar, candidateContext),
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

/** Most years know one or two patterns of routines that are on, so their candidates are listed once for each. */
function onByDekad(
  { routines }: NodeProgram,
  calendar: readonly CalendarDekad[],
  context: CandidateContext,
): CompiledScenario['onByDekad'] {
  const known = new Map<string, CompiledScenario['onByDekad'][number]>();
  const isAlways = (index: number): boolean => routines[index]?.schedule.kind === 'always';
  return calendar.map(({ month, meanC }) => {
    const isOn = routines.map(({ schedule: { when } }) => isOnInMonth(when, month) && isOnAt(when, meanC));
    const key = isOn.map(Number).join('');
    const found = known.get(key);
    if (found) return found;
    const isCase = (index: number): boolean => isOn[index] === true && routines[index]?.schedule.kind !== 'once';
    const pattern = { isOn, lists: candidateLists(context, isCase, isAlways) };
    known.set(key, pattern);
    return pattern;
  });
}
