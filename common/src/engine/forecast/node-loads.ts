import type { Interval, NodeProgram } from '../node/node-program.types.ts';
import { addDraw, GROUP_WIDTH, placeOf, temperatureGroups } from './load-vector.ts';
import type { TemperatureGroup } from './load-vector.ts';

/** What a node draws, as load vectors: rest with leakages, each routine's cycle and each interval in excess of rest. */
export interface NodeLoads {
  groups: TemperatureGroup[];
  /** Numbers per vector. */
  width: number;
  /** All parts at rest, and leakages. */
  rest: Float64Array;
  /** Charge per cycle in excess of rest by routine: the vectors times s. */
  cycleExcess: Float64Array;
  intervals: IntervalLoad[];
  /** Vectors of the intervals, in excess of rest. One array for all: a hundred small ones cost more than what they hold. */
  intervalExcess: Float64Array;
  /** Lowest rail voltage of each part's rest state, V; 0 where it gives none. */
  restLimitsV: number[];
}

export interface RailLimit {
  railV: number;
  /** Index into NodeProgram.parts; −1 where no part sets it. */
  partIndex: number;
}

export interface IntervalLoad {
  interval: Interval;
  routineIndex: number;
  /** Where its vector, in excess of rest, begins in `NodeLoads.intervalExcess`. */
  offset: number;
  /** Limit of the parts that it occupies. */
  busy: RailLimit;
  /** Which of the parts that it occupies have a limit at rest, one bit each: those limits do not hold meanwhile. */
  awayMask: number;
}

/**
 * Turns a compiled node into load vectors.
 *
 * @param program A compiled node.
 * @returns Its loads.
 * @example nodeLoads(compileNode(node, { defaultReferenceVoltageV: 3 }))
 */
export function nodeLoads(program: NodeProgram): NodeLoads {
  const groups = temperatureGroups(program);
  const width = groups.length * GROUP_WIDTH;
  const rest = new Float64Array(width);
  const draws = [...program.parts.map(({ restDraw }) => restDraw), ...program.leakages.map(({ draw }) => draw)];
  for (const draw of draws) addDraw(rest, placeOf(groups, draw), draw, 1);
  const restLimitsV = program.parts.map(({ restLowestVoltageV }) => restLowestVoltageV);
  const loads = { groups, width, rest, restLimitsV };
  return { ...loads, cycleExcess: cycleExcess(program, loads), ...intervalLoads(program, loads) };
}

function cycleExcess(program: NodeProgram, { groups, width }: Pick<NodeLoads, 'groups' | 'width'>): Float64Array {
  const vectors = new Float64Array(width * program.routines.length);
  program.routines.forEach(({ segments }, routineIndex) => {
    const offset = routineIndex * width;
    for (const { draw, durationTermsS, partIndex } of segments) {
      let durationS = 0;
      for (const termS of durationTermsS) durationS += termS;
      addDraw(vectors, offset + placeOf(groups, draw), draw, durationS);
      const restDraw = program.parts[partIndex]?.restDraw;
      if (restDraw) addDraw(vectors, offset + placeOf(groups, restDraw), restDraw, -durationS);
    }
  });
  return vectors;
}

function intervalLoads(
  program: NodeProgram,
  { groups, width, restLimitsV }: Pick<NodeLoads, 'groups' | 'width' | 'restLimitsV'>,
): Pick<NodeLoads, 'intervals' | 'intervalExcess'> {
  const loads: IntervalLoad[] = [];
  program.routines.forEach(({ intervals }, routineIndex) => {
    for (const interval of intervals) {
      if (!(interval.durationS > 0)) continue;
      const busy: RailLimit = { railV: 0, partIndex: -1 };
      let awayMask = 0;
      for (const { lowestVoltageV, partIndex } of interval.occupants) {
        raise(busy, lowestVoltageV, partIndex);
        if ((restLimitsV[partIndex] ?? 0) > 0) awayMask |= 1 << partIndex;
      }
      loads.push({ interval, routineIndex, offset: loads.length * width, busy, awayMask });
    }
  });
  const intervalExcess = new Float64Array(loads.length * width);
  for (const { interval, offset } of loads) {
    for (const { partIndex, draw } of interval.occupants) {
      addDraw(intervalExcess, offset + placeOf(groups, draw), draw, 1);
      const restDraw = program.parts[partIndex]?.restDraw;
      if (restDraw) addDraw(intervalExcess, offset + placeOf(groups, restDraw), restDraw, -1);
    }
  }
  return { intervals: loads, intervalExcess };
}

/**
 * Lowest rail voltage of a moment: that of the parts in use, and of the rest states of the others.
 *
 * @param restLimitsV Limits of the rest states by part, V.
 * @param busy Limit of the parts in use.
 * @param awayMask Parts with a limit at rest that are not at rest.
 * @returns The limit.
 * @example railLimit(loads.restLimitsV, { railV: 0, partIndex: -1 }, 0)
 */
export function railLimit(restLimitsV: readonly number[], busy: RailLimit, awayMask: number): RailLimit {
  let limit = busy;
  for (let partIndex = 0; partIndex < restLimitsV.length; partIndex++) {
    const railV = restLimitsV[partIndex] ?? 0;
    if (railV > limit.railV && (awayMask & (1 << partIndex)) === 0) limit = { railV, partIndex };
  }
  return limit;
}

function raise(limit: RailLimit, railV: number, partIndex: number): void {
  if (railV <= limit.railV) return;
  limit.railV = railV;
  limit.partIndex = partIndex;
}
