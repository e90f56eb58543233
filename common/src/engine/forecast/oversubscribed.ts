import { formatDuration } from '#common/units/format-duration.ts';
import { formatShare } from '#common/units/format-quantity.ts';
import { oversubscription } from '../node/duty-shares.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import type { Caution } from './forecast.types.ts';

/**
 * Whether the routines ask for more time than there is in any dekad of the year, and what does.
 *
 * @param compiled The scenario.
 * @returns A caution for each routine longer than its period and each part busy for more than all the time; none: enough time.
 * @example oversubscribed(compiled).length === 0
 */
export function oversubscribed(compiled: CompiledScenario): Caution[] {
  const { program, onByDekad, ratesPerS, scenario } = compiled;
  if (hasTimeForAll(compiled)) return [];
  const found = new Map<string, Caution>();
  for (const { isOn } of new Set(onByDekad)) {
    const rates = program.routines.map((_, index) => (isOn[index] === true ? (ratesPerS[index] ?? 0) : 0));
    const { routines, parts } = oversubscription(program, rates);
    for (const { routineId, cycleS, periodS } of routines) {
      const index = scenario.node.routines.findIndex(({ id }) => id === routineId);
      const name = scenario.node.routines[index]?.name ?? routineId;
      const message = `"${name}" takes ${formatDuration(cycleS)}, but comes again after ${formatDuration(periodS)}.`;
      found.set(`routine ${routineId}`, { code: 'oversubscribed', message, path: `node.routines[${index}].schedule` });
    }
    for (const { partId, share } of parts) {
      const index = scenario.node.parts.findIndex(({ id }) => id === partId);
      const name = scenario.node.parts[index]?.name ?? partId;
      const message = `"${name}" is asked for ${formatShare(share)} of the time.`;
      found.set(`part ${partId}`, { code: 'oversubscribed', message, path: `node.parts[${index}]` });
    }
  }
  return [...found.values()];
}

/** Whether even one after the other all routines find the time, as they do in most nodes. */
function hasTimeForAll({ program, ratesPerS }: CompiledScenario): boolean {
  let busyShare = 0;
  program.routines.forEach(({ schedule, intervals, cycleS }, index) => {
    const last = intervals.at(-1);
    const spanS = Math.max(cycleS, last ? last.startS + last.durationS : 0);
    const ratePerS = schedule.kind === 'window' ? 1 / schedule.periodS : (ratesPerS[index] ?? 0);
    busyShare += spanS * ratePerS;
  });
  return busyShare <= 1;
}
