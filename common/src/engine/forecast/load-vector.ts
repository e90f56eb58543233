import { dayAverageOfPower } from '../supply/day-average.ts';
import type { Draw, NodeProgram } from '../node/node-program.types.ts';

/**
 * Loads as vectors: three numbers per temperature group: current in A that is constant, power in W, conductance in S. A group
 * holds the draws that rise with temperature in the same way, so that a load at any temperature is a weighted sum of groups.
 */
export interface TemperatureGroup {
  referenceTemperatureC: number;
  /** Infinity: no dependence. */
  doublingK: number;
}

/** Numbers per group. */
export const GROUP_WIDTH = 3;

/** Beyond any sense, but finite: a document may ask for a current that doubles every millikelvin. */
const LARGEST_FACTOR = 1e30;

/**
 * Collects how the draws of a node depend on temperature.
 *
 * @param program A compiled node.
 * @returns Groups, the first being no dependence at all.
 * @example temperatureGroups(program).length // 1 where no state has a doubling
 */
export function temperatureGroups(program: NodeProgram): TemperatureGroup[] {
  const groups: TemperatureGroup[] = [{ referenceTemperatureC: 0, doublingK: Infinity }];
  const add = (draw: Draw): void => {
    if (draw.doublingK === null || groupOf(groups, draw) > 0) return;
    groups.push({ referenceTemperatureC: draw.referenceTemperatureC, doublingK: draw.doublingK });
  };
  for (const { restDraw } of program.parts) add(restDraw);
  for (const { draw } of program.leakages) add(draw);
  for (const { segments } of program.routines) for (const { draw } of segments) add(draw);
  return groups;
}

/**
 * Index of the group that a draw belongs to.
 *
 * @param groups Groups, the first being no dependence.
 * @param draw The draw.
 * @returns Index; 0 where the draw does not depend on temperature.
 * @example groupOf(groups, draw)
 */
export function groupOf(groups: readonly TemperatureGroup[], draw: Draw): number {
  const { doublingK, referenceTemperatureC } = draw;
  if (doublingK === null) return 0;
  for (let index = 1; index < groups.length; index++) {
    const group = groups[index];
    if (group?.doublingK === doublingK && group.referenceTemperatureC === referenceTemperatureC) return index;
  }
  return 0;
}

/**
 * Where a draw's group begins in a load vector.
 *
 * @param groups Groups, the first being no dependence.
 * @param draw The draw.
 * @returns Index of its first number.
 * @example placeOf(groups, draw)
 */
export function placeOf(groups: readonly TemperatureGroup[], draw: Draw): number {
  return GROUP_WIDTH * groupOf(groups, draw);
}

/**
 * Adds a draw, times a weight, to a load vector.
 *
 * @param vector The vector, changed in place.
 * @param at Where the draw's group begins in it.
 * @param draw The draw.
 * @param weight Weight: 1, −1, or a time in s.
 * @example addDraw(vector, placeOf(groups, draw), draw, 1)
 */
export function addDraw(vector: Float64Array, at: number, draw: Draw, weight: number): void {
  const { law, currentA, referenceVoltageV } = draw;
  if (law === 'constant-current') vector[at] = (vector[at] ?? 0) + weight * currentA;
  else if (law === 'constant-power') vector[at + 1] = (vector[at + 1] ?? 0) + weight * currentA * referenceVoltageV;
  else vector[at + 2] = (vector[at + 2] ?? 0) + (weight * currentA) / referenceVoltageV;
}

/**
 * Factors of the groups at a temperature, or averaged over a day: `2^((T − Tref)/doubling)`.
 *
 * @param groups The groups.
 * @param temperatureC Temperature, or mean of the day, °C.
 * @param amplitudeK Amplitude of the day, K; 0 for one temperature.
 * @returns Factor by group; 1 for the first.
 * @example groupFactors(groups, 25, 0)[0] // 1
 */
export function groupFactors(groups: readonly TemperatureGroup[], temperatureC: number, amplitudeK: number): number[] {
  return groups.map(({ referenceTemperatureC, doublingK }) => {
    const aboveReferenceK = temperatureC - referenceTemperatureC;
    const factor = doublingK === Infinity ? 1 : dayAverageOfPower(2, doublingK, { aboveReferenceK, amplitudeK });
    return factor < LARGEST_FACTOR ? factor : LARGEST_FACTOR;
  });
}

/** A load as seen at its own voltage u: `constantA + powerW/u + conductanceS·u`. */
export interface RailLoad {
  constantA: number;
  powerW: number;
  conductanceS: number;
}

/**
 * Weighs the groups of a load vector.
 *
 * @param vector Vectors.
 * @param offset Where the wanted one begins.
 * @param factors Factor by group.
 * @returns The load at the temperature of the factors.
 * @example weighGroups(rest, 0, factors).constantA
 */
export function weighGroups(vector: Float64Array, offset: number, factors: readonly number[]): RailLoad {
  let constantA = 0;
  let powerW = 0;
  let conductanceS = 0;
  for (let group = 0; group < factors.length; group++) {
    const at = offset + GROUP_WIDTH * group;
    const factor = factors[group] ?? 0;
    constantA += factor * (vector[at] ?? 0);
    powerW += factor * (vector[at + 1] ?? 0);
    conductanceS += factor * (vector[at + 2] ?? 0);
  }
  return { constantA, powerW, conductanceS };
}
