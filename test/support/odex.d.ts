/* eslint-disable max-params -- the signatures are the package's own */
/** What is used of `odex`. The package ships its TypeScript source, which the compiler would check with our strict settings. */

/** Computes y' = f(x, y). */
export type Derivative = (x: number, y: number[]) => number[];

/** Sees each step; `interpolate(i, x)` gives y[i] inside it. Returning false stops the solver. */
export type OutputFunction = (
  step: number,
  lastX: number,
  x: number,
  y: number[],
  interpolate?: (component: number, x: number) => number,
) => boolean | undefined;

export class Solver {
  constructor(dimension: number);
  relativeTolerance: number | number[];
  absoluteTolerance: number | number[];
  denseOutput: boolean;
  maxSteps: number;
  initialStepSize: number;
  solve(derivative: Derivative, fromX: number, y: number[], toX: number, output?: OutputFunction): { y: number[] };
}
