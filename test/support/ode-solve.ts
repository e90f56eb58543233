import { Solver } from 'odex';
import type { OutputFunction } from 'odex';

/** Samples of a step between which a failure is bracketed. */
const SAMPLES = 4;

/** Integrates one stretch; `check` sees samples and stops it. */
export function solve(
  speed: (leftC: number) => number,
  leftC: number,
  { fromS, toS }: { fromS: number; toS: number },
  check: (sampleS: number, leftC: number, at: (timeS: number) => number) => boolean,
): number {
  if (toS <= fromS) return leftC;
  const solver = new Solver(1);
  solver.relativeTolerance = 1e-11;
  solver.absoluteTolerance = 1e-12 * Math.max(1, leftC);
  solver.denseOutput = true;
  solver.maxSteps = 100_000;
  solver.initialStepSize = (toS - fromS) / 50;
  let reached = leftC;
  const output: OutputFunction = (...[, lastS, nowS, y, dense]) => {
    reached = y[0] ?? NaN;
    if (nowS <= lastS || !dense) return true;
    for (let sample = 1; sample <= SAMPLES; sample++) {
      const sampleS = lastS + ((nowS - lastS) * sample) / SAMPLES;
      const at = (timeS: number): number => (timeS >= nowS ? reached : dense(0, timeS));
      if (!check(sampleS, at(sampleS), at)) return false;
    }
    return true;
  };
  solver.solve((_, y) => [speed(y[0] ?? NaN)], fromS, [leftC], toS, output);
  return reached;
}
