import type { CompiledScenario } from './compile-scenario.ts';
import type { Candidate } from './candidates.ts';
import { throughRegulatorV } from './converter.ts';
import type { Forecast } from './forecast.types.ts';
import type { Run } from './run.types.ts';

type Limited = Pick<Forecast, 'criticalStepId' | 'criticalIntervalId' | 'failingPartId' | 'limitedBy'>;

/**
 * What is critical at the end of life, and what sets its limit. At equal limits the part is told before the regulator, the regulator
 * before the cut-off.
 *
 * @param compiled The scenario.
 * @param run Its life.
 * @returns Step, interval, part, and kind of limit.
 * @example limitedBy(compiled, run).limitedBy // 'part'
 */
export function limitedBy(compiled: CompiledScenario, run: Run): Limited {
  const candidate = run.critical?.testCase.candidate;
  const interval = candidate?.source?.interval;
  const where = {
    criticalStepId: candidate ? (interval?.stepId ?? 'rest') : null,
    criticalIntervalId: candidate ? (interval?.id ?? 'rest') : null,
  };
  if (run.isExhausted || !candidate) return { ...where, failingPartId: null, limitedBy: 'charge' };
  return { ...where, ...limitOf(compiled, candidate) };
}

function limitOf(compiled: CompiledScenario, candidate: Candidate): Pick<Limited, 'failingPartId' | 'limitedBy'> {
  const { converter, program } = compiled;
  const partV = throughRegulatorV(converter, candidate.limit.railV);
  const part = program.parts[candidate.limit.partIndex];
  if (part && partV >= candidate.limitV) {
    return { failingPartId: part.partId, limitedBy: ofStateOrPart(compiled, candidate) };
  }
  const { failureV, cutOffV, kind } = converter;
  // Without any limit only a collapse of the source can have ended it.
  if (candidate.limitV === 0 && kind === 'none') return { failingPartId: null, limitedBy: null };
  return { failingPartId: null, limitedBy: cutOffV > Math.max(failureV, partV) ? 'cut-off' : 'regulator' };
}

/** A limit above the part's own, or in rest, is that of the state. */
function ofStateOrPart({ scenario }: CompiledScenario, { limit, source }: Candidate): 'state' | 'part' {
  const { partIndex, railV } = limit;
  const isBusy = source?.interval.occupants.some((occupant) => occupant.partIndex === partIndex) === true;
  const partV = scenario.node.parts[partIndex]?.lowestVoltageV.typical ?? 0;
  return isBusy && railV <= partV ? 'part' : 'state';
}
