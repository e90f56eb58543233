import { decayedS, fallS } from '../supply/decaying-fall.ts';
import type { MeanLoad, MeanPiece } from './dekad-load.ts';

/** Where a walk stands, and what it has added up on its way. `spent` is the share of the starting charge that is gone. */
export interface Walk {
  spent: number;
  timeS: number;
  /** ∫ spent dt, s. */
  spentS: number;
  /** ∫ 1/u dt of the voltage u that loads see, s/V; kept only while the load has a constant power. */
  perVoltS: number;
  /** ∫ u dt, V·s; kept only while the load depends on voltage. */
  voltS: number;
}

/** Nodes and weights of Gauss-Legendre quadrature with six points on −1 … 1: each weight serves a node and its mirror image. */
const NODES = [
  -0.2386191860831969, 0.2386191860831969, -0.6612093864662645, 0.6612093864662645, -0.9324695142031521,
  0.9324695142031521,
] as const;
const WEIGHTS = [0.46791393457269104, 0.3607615730481386, 0.17132449237917036] as const;

/** Largest ratio of speeds or voltages at the ends of a quadrature; six points are then exact to 1e-14. */
const LARGEST_RATIO = 1.25;
const MOST_HALVINGS = 60;
const MOST_NEWTON_STEPS = 50;

/**
 * Follows the charge under a mean load: `d(spent)/dt = (c + p/u + g·u)/Q0 + s·(1 − spent)` with u piecewise linear in `spent`.
 * Without constant power each piece has a closed form; with it the time to a given charge is an integral of a smooth function,
 * taken by quadrature and inverted by Newton's method.
 *
 * @param mean Load, self-discharge and pieces of the dekad.
 * @param startingC Starting charge Q0, C, above 0.
 * @param until Longest time, s, and the share spent to stop at (Infinity: none).
 * @param walk State at the start; advanced in place.
 * @example walkOn(mean, 1000, { timeS: 876_600, spent: Infinity }, walk)
 */
export function walkOn(mean: MeanLoad, startingC: number, until: { timeS: number; spent: number }, walk: Walk): void {
  const step: Step = { mean, startingC, targetSpent: 0, leftS: until.timeS };
  const endS = walk.timeS + until.timeS;
  for (const piece of mean.pieces) {
    if (walk.spent >= piece.toSpent) continue;
    step.targetSpent = Math.min(piece.toSpent, until.spent);
    if (walk.spent >= until.spent || step.leftS <= 0) break;
    const isClosed = mean.load.powerW === 0 || piece.slopeV === 0;
    step.leftS -= isClosed ? closedStep(step, piece, walk) : quadratureStep(step, piece, walk);
  }
  // The sum of parts may round; the end of a whole stretch must not.
  if (step.leftS <= 0) walk.timeS = endS;
}

interface Step {
  mean: MeanLoad;
  startingC: number;
  targetSpent: number;
  leftS: number;
}

const seenAt = (piece: MeanPiece, spent: number): number => piece.seenV + piece.slopeV * (spent - piece.fromSpent);

function closedStep({ mean, startingC, targetSpent, leftS }: Step, piece: MeanPiece, walk: Walk): number {
  const { load, selfDischargePerS } = mean;
  const { slopeV } = piece;
  const from = walk.spent;
  const seenV = slopeV === 0 ? piece.seenV : seenAt(piece, from);
  const drawnA = load.constantA + load.powerW / seenV + load.conductanceS * seenV;
  const speed = drawnA / startingC + selfDischargePerS * (1 - from);
  const decayPerS = selfDischargePerS - (load.conductanceS * slopeV) / startingC;
  const targetS = targetSpent === Infinity ? Infinity : fallS({ speed, decayPerS, fall: targetSpent - from });
  const timeS = Math.min(targetS, leftS);
  const once = decayedS(decayPerS, timeS);
  // The integral of the decayed time, in a form that keeps its digits for small k.
  const x = decayPerS * timeS;
  const twice =
    Math.abs(x) < 1e-3
      ? timeS * timeS * (1 / 2 - x * (1 / 6 - x * (1 / 24 - x * (1 / 120 - x / 720))))
      : (timeS - once) / decayPerS;
  const spentS = from * timeS + speed * twice;
  walk.spent = targetS <= leftS ? targetSpent : from + speed * once;
  walk.timeS += timeS;
  walk.spentS += spentS;
  walk.perVoltS += timeS / seenV;
  walk.voltS += slopeV === 0 ? seenV * timeS : seenAt(piece, 0) * timeS + slopeV * spentS;
  return timeS;
}

/** Share spent per second at a share spent. */
function speedAt({ mean, startingC }: Step, piece: MeanPiece, spent: number): number {
  const { constantA, powerW, conductanceS } = mean.load;
  const seenV = seenAt(piece, spent);
  return (constantA + powerW / seenV + conductanceS * seenV) / startingC + mean.selfDischargePerS * (1 - spent);
}

/** ∫ dt, spent dt, dt/u and u dt over a range of spent charge. */
interface Integrals {
  timeS: number;
  spentS: number;
  perVoltS: number;
  voltS: number;
}

function quadratureStep(step: Step, piece: MeanPiece, walk: Walk): number {
  const from = walk.spent;
  const { targetSpent, leftS } = step;
  const fromSpeed = speedAt(step, piece, from);
  const sums: Integrals = { timeS: 0, spentS: 0, perVoltS: 0, voltS: 0 };
  let to = targetSpent;
  // The speed is convex in the charge, so its larger end bounds it: often the piece's end is clearly out of reach.
  const isInReach = Math.max(fromSpeed, speedAt(step, piece, targetSpent)) * leftS >= targetSpent - from;
  if (isInReach) integrate(step, piece, { from, to }, sums);
  if (!isInReach || sums.timeS > leftS) {
    const guess = from + leftS * speedAt(step, piece, Math.min(targetSpent, from + (leftS / 2) * fromSpeed));
    to = integrateFor(step, piece, { from, to: guess }, sums);
  }
  walk.spent = to;
  walk.timeS += sums.timeS;
  walk.spentS += sums.spentS;
  walk.perVoltS += sums.perVoltS;
  walk.voltS += sums.voltS;
  return sums.timeS;
}

/** Integrates up to the charge that is spent when the step's time is over, and returns that charge. */
function integrateFor(
  step: Step,
  piece: MeanPiece,
  { from, to: guess }: { from: number; to: number },
  sums: Integrals,
): number {
  const { targetSpent, leftS } = step;
  let to = from;
  let next = guess;
  for (let round = 0; round < MOST_NEWTON_STEPS; round++) {
    to = Math.min(Math.max(next, from), targetSpent);
    integrate(step, piece, { from, to }, sums);
    next = to + (leftS - sums.timeS) * speedAt(step, piece, to);
    if (Math.abs(next - to) <= 1e-13 * (to - from) + Number.EPSILON * to) break;
  }
  sums.timeS = leftS;
  return to;
}

function integrate(step: Step, piece: MeanPiece, { from, to }: { from: number; to: number }, sums: Integrals): void {
  sums.timeS = 0;
  sums.spentS = 0;
  sums.perVoltS = 0;
  sums.voltS = 0;
  addIntegrals(step, piece, { from, to, halvings: 0 }, sums);
}

function addIntegrals(
  step: Step,
  piece: MeanPiece,
  range: { from: number; to: number; halvings: number },
  sums: Integrals,
): void {
  const { from, to, halvings } = range;
  const middle = (from + to) / 2;
  if (halvings < MOST_HALVINGS && isRough(step, piece, from, to)) {
    addIntegrals(step, piece, { from, to: middle, halvings: halvings + 1 }, sums);
    addIntegrals(step, piece, { from: middle, to, halvings: halvings + 1 }, sums);
    return;
  }
  const half = (to - from) / 2;
  // Kept out of the object while adding: this is the innermost loop of a forecast behind a switching regulator.
  let { timeS, spentS, perVoltS, voltS } = sums;
  for (let node = 0; node < NODES.length; node++) {
    const spent = middle + half * (NODES[node] ?? 0);
    const nodeS = (half * (WEIGHTS[node >> 1] ?? 0)) / speedAt(step, piece, spent);
    const seenV = seenAt(piece, spent);
    timeS += nodeS;
    spentS += spent * nodeS;
    perVoltS += nodeS / seenV;
    voltS += seenV * nodeS;
  }
  sums.timeS = timeS;
  sums.spentS = spentS;
  sums.perVoltS = perVoltS;
  sums.voltS = voltS;
}

function isRough(step: Step, piece: MeanPiece, from: number, to: number): boolean {
  const speedRatio = speedAt(step, piece, to) / speedAt(step, piece, from);
  const voltageRatio = seenAt(piece, to) / seenAt(piece, from);
  return isWide(speedRatio) || isWide(voltageRatio);
}

function isWide(ratio: number): boolean {
  return ratio > LARGEST_RATIO || ratio < 1 / LARGEST_RATIO;
}
