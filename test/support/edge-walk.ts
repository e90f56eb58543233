/**
 * The reference for short lives: walks every edge of every cycle of every routine in integer microseconds, for loads of constant
 * current without dependence on temperature and without a regulator. Seconds in a double drift by minutes over years, and plain sums
 * lose what is small beside the rest: hence whole microseconds and compensated sums.
 *
 * It tests voltage and exhaustion at each edge, before and after it, at the coldest hour of the dekad, so a life ends inside the
 * cycle that ends it. Charge between two edges falls linearly, or exponentially under self-discharge.
 */
import type { NodeProgram, RoutineProgram, Scenario, Table } from '#common/engine/index.ts';
import { compileNode, dekadsOfYear, selfDischargeRatePerS } from '#common/engine/index.ts';

const DEKAD_US = 876_600_000_000;
const DAY_US = 86_400_000_000;

export interface EdgeWalk {
  /** Time of the failure, µs; null when nothing fails before `untilS`. */
  lifeUs: number | null;
  outcome: 'charge-exhausted' | 'undervoltage' | null;
  leftC: number;
  /** Edges walked, to tell how much work the reference does. */
  edges: number;
}

/** Neumaier's compensated sum. */
class Sum {
  #sum: number;
  #lost = 0;

  constructor(start: number) {
    this.#sum = start;
  }

  add(value: number): void {
    const next = this.#sum + value;
    this.#lost += Math.abs(this.#sum) >= Math.abs(value) ? this.#sum - next + value : value - next + this.#sum;
    this.#sum = next;
  }

  get value(): number {
    return this.#sum + this.#lost;
  }
}

/** A routine as it runs: current on top of rest from each edge to the next, and the lowest voltage meanwhile. */
interface Runner {
  /** Starts of cycles, µs: the next one, and the one after a given one. */
  nextUs: number;
  after: (startUs: number) => number;
  edges: { atUs: number; excessA: number; lowestV: number; durationS: number }[];
  /** Position in `edges`, -1 before the cycle. */
  at: number;
  startUs: number;
}

function interpolate(table: Table, x: number): number {
  const next = table.findIndex(([rowX]) => rowX >= x);
  const last = table.at(-1);
  if (next === -1) return last?.[1] ?? NaN;
  const [toX, toY] = table[next] ?? [NaN, NaN];
  const [fromX, fromY] = table[next - 1] ?? [toX, toY];
  return toX === fromX ? toY : fromY + ((toY - fromY) * (x - fromX)) / (toX - fromX);
}

function runnerOf(program: NodeProgram, routine: RoutineProgram): Runner {
  const { schedule, intervals } = routine;
  const edges = intervals.map(({ startS, longestS, occupants }) => ({
    atUs: Math.round(startS * 1e6),
    excessA: occupants.reduce(
      (sumA, { draw, partIndex }) => sumA + draw.currentA - (program.parts[partIndex]?.restDraw.currentA ?? 0),
      0,
    ),
    lowestV: Math.max(0, ...occupants.map(({ lowestVoltageV }) => lowestVoltageV)),
    durationS: longestS,
  }));
  const last = intervals.at(-1);
  const endUs = last ? Math.round((last.startS + last.durationS) * 1e6) : 0;
  edges.push({ atUs: endUs, excessA: 0, lowestV: 0, durationS: Infinity });
  const base = { edges, at: -1, startUs: 0 };
  if (schedule.kind === 'every') {
    const periodUs = Math.round(schedule.periodS * 1e6);
    return { ...base, nextUs: 0, after: (startUs) => startUs + periodUs };
  }
  if (schedule.kind === 'once') {
    return { ...base, nextUs: Math.round(schedule.afterS * 1e6), after: () => Infinity };
  }
  if (schedule.kind === 'window') {
    const periodUs = Math.round(schedule.periodS * 1e6);
    const fromUs = Math.round(schedule.fromHour * 3_600e6);
    const spanUs = (Math.round((schedule.toHour - schedule.fromHour) * 3_600e6) + DAY_US) % DAY_US;
    const after = (startUs: number): number => {
      const dayUs = startUs - ((((startUs - fromUs) % DAY_US) + DAY_US) % DAY_US);
      return startUs + periodUs < dayUs + spanUs ? startUs + periodUs : dayUs + DAY_US;
    };
    return { ...base, nextUs: fromUs, after };
  }
  throw new Error(`The edge walk knows no schedule "${schedule.kind}".`);
}

/** Walks a scenario's life edge by edge up to `untilS`. */
export function edgeWalk(scenario: Scenario, untilS: number): EdgeWalk {
  const { cell, regulator, series, parallel, cutOffV = 0, reserveFraction = 0 } = scenario.supply;
  if (regulator.kind !== 'none') throw new Error('The edge walk knows no regulator.');
  const program = compileNode(scenario.node, { defaultReferenceVoltageV: 3 });
  const startingC = cell.capacityC.typical * parallel * (1 - reserveFraction);
  const left = new Sum(startingC);
  const restA =
    program.parts.reduce((sumA, { restDraw }) => sumA + restDraw.currentA, 0) +
    program.leakages.reduce((sumA, { draw }) => sumA + draw.currentA, 0);
  const restV = Math.max(cutOffV, ...program.parts.map(({ restLowestVoltageV }) => restLowestVoltageV));
  const runners = program.routines.map((routine) => runnerOf(program, routine));
  const dekads = dekadsOfYear(scenario.climate);
  const startDekad = 3 * (scenario.climate.startMonth - 1);
  const untilUs = Math.min(Math.round(untilS * 1e6), Number.MAX_SAFE_INTEGER);
  let nowUs = 0;
  let edges = 0;
  let conditions = conditionsOf(0);

  function conditionsOf(index: number): { lossPerS: number; coldestC: number; factor: number; borderUs: number } {
    const dekad = dekads[(startDekad + index) % 36];
    if (!dekad) throw new Error('A year has 36 dekads.');
    const { lossPerYear, referenceC, q10, activationEnergyJPerMol } = cell.selfDischarge;
    const { meanC, amplitudeK, coldestC } = dekad;
    const law = { lossPerYear: lossPerYear.typical, referenceC, q10, activationEnergyJPerMol };
    const lossPerS = selfDischargeRatePerS({ ...law, temperatureC: meanC, amplitudeK });
    const factor = cell.capacityFactorByTemperature ? interpolate(cell.capacityFactorByTemperature, coldestC) : 1;
    return { lossPerS, coldestC, factor, borderUs: (index + 1) * DEKAD_US };
  }

  /** Current, limit and length of what runs now. One routine at a time is tested, as the forecast does. */
  function running(): { currentA: number; tests: { currentA: number; limitV: number; durationS: number }[] } {
    let currentA = restA;
    const tests = [{ currentA: restA, limitV: restV, durationS: Infinity }];
    for (const { edges: own, at } of runners) {
      const edge = own[at];
      if (at < 0 || !edge) continue;
      currentA += edge.excessA;
      const limitV = Math.max(restV, edge.lowestV);
      tests.push({ currentA: restA + edge.excessA, limitV, durationS: edge.durationS });
    }
    return { currentA, tests };
  }

  function resistanceOhm(durationS: number, depth: number): number {
    const rows = cell.resistanceOhm.map(({ pulseS = Infinity, ohm }) => ({ pulseS, ohm: ohm.typical }));
    rows.sort((a, b) => a.pulseS - b.pulseS);
    const fresh = (rows.find(({ pulseS }) => pulseS >= durationS) ?? rows.at(-1))?.ohm ?? 0;
    const logs = cell.resistanceFactorByTemperature.map(([c, factor]): [number, number] => [c, Math.log(factor)]);
    const byTemperature = Math.exp(interpolate(logs, conditions.coldestC));
    return ((fresh * series) / parallel) * byTemperature * interpolate(cell.resistanceFactorByDepth, depth);
  }

  function failureAt(leftC: number, tests: ReturnType<typeof running>['tests']): EdgeWalk['outcome'] {
    const depth = (startingC - leftC) / (conditions.factor * startingC);
    if (depth >= 1) return 'charge-exhausted';
    const shiftV = (cell.openCircuitTemperatureVPerK ?? 0) * (conditions.coldestC - 20);
    const openCircuitV = series * (interpolate(cell.openCircuitTableV, depth) + shiftV);
    const fails = tests.some(
      ({ currentA, limitV, durationS }) => openCircuitV - resistanceOhm(durationS, depth) * currentA < limitV,
    );
    return fails ? 'undervoltage' : null;
  }

  /** Charge that is gone after some time of a constant current. */
  function goneC(currentA: number, timeS: number): number {
    const { lossPerS } = conditions;
    if (lossPerS === 0) return currentA * timeS;
    return (currentA / lossPerS + left.value) * -Math.expm1(-lossPerS * timeS);
  }

  function edgeUs(runner: Runner): number {
    if (runner.at < 0) return runner.nextUs;
    const next = runner.edges[runner.at + 1];
    return next ? runner.startUs + next.atUs : runner.nextUs;
  }

  while (nowUs < untilUs) {
    const now = running();
    const failed = failureAt(left.value, now.tests);
    if (failed) return { lifeUs: nowUs, outcome: failed, leftC: left.value, edges };
    const nextUs = Math.min(untilUs, conditions.borderUs, ...runners.map((runner) => Math.max(nowUs, edgeUs(runner))));
    const spanS = (nextUs - nowUs) / 1e6;
    const after = left.value - goneC(now.currentA, spanS);
    const failsAfter = failureAt(after, now.tests);
    if (failsAfter) {
      let good = 0;
      let bad = nextUs - nowUs;
      while (bad - good > 1) {
        const middle = Math.floor((good + bad) / 2);
        if (failureAt(left.value - goneC(now.currentA, middle / 1e6), now.tests)) bad = middle;
        else good = middle;
      }
      const leftC = left.value - goneC(now.currentA, bad / 1e6);
      return { lifeUs: nowUs + bad, outcome: failureAt(leftC, now.tests), leftC, edges };
    }
    left.add(-goneC(now.currentA, spanS));
    nowUs = nextUs;
    if (nowUs === conditions.borderUs) conditions = conditionsOf(nowUs / DEKAD_US);
    for (const runner of runners) edges += passEdges(runner, nowUs);
  }
  return { lifeUs: null, outcome: null, leftC: left.value, edges };
}

/** Moves a routine past the edges that lie at or before a time. */
function passEdges(runner: Runner, nowUs: number): number {
  let passed = 0;
  for (;;) {
    const next = runner.at < 0 ? undefined : runner.edges[runner.at + 1];
    if (next) {
      if (runner.startUs + next.atUs > nowUs) return passed;
      runner.at += 1;
    } else {
      if (runner.nextUs > nowUs) return passed;
      runner.startUs = runner.nextUs;
      runner.nextUs = runner.after(runner.startUs);
      runner.at = 0;
    }
    passed += 1;
  }
}
