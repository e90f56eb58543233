/** The equations of the mean-current level, written again for `ode-reference.ts`. */
import { Solver } from 'odex';
import type { Draw, NodeProgram, RoutineProgram, Scenario, Table } from '#common/engine/index.ts';
import { compileNode } from '#common/engine/index.ts';
import { solve } from './ode-solve.ts';

const YEAR = 31_557_600;
export const DEKAD = YEAR / 36;
/** The model's floor of the voltage that mean currents see, V. */
const FLOOR_V = 0.01;

/** A load on the rail as the sum of its laws: `a + w/u + g·u`. */
interface Sum {
  a: number;
  w: number;
  g: number;
}

/** A load of a moment with its limit and duration. */
interface Moment {
  sum: Sum;
  railLimitV: number;
  durationS: number;
}

interface Dekad {
  month: number;
  meanC: number;
  amplitudeK: number;
  coldestC: number;
}

function linear(table: Table, x: number): number {
  let [beforeX, beforeY] = table[0] ?? [0, 0];
  if (x <= beforeX) return beforeY;
  for (const [rowX, rowY] of table) {
    if (x <= rowX && rowX > beforeX) return beforeY + ((rowY - beforeY) * (x - beforeX)) / (rowX - beforeX);
    [beforeX, beforeY] = [rowX, rowY];
  }
  return beforeY;
}

/** Mean over a day by a hundred equal parts; of a smooth function of a cosine that is all of its digits. */
function overDay({ meanC, amplitudeK }: Pick<Dekad, 'meanC' | 'amplitudeK'>, value: (c: number) => number): number {
  let sum = 0;
  for (let part = 0; part < 100; part++) sum += value(meanC + amplitudeK * Math.cos((2 * Math.PI * part) / 100));
  return sum / 100;
}

function calendarOf({ climate }: Scenario): Dekad[] {
  return Array.from({ length: 36 }, (_, index) => {
    // Middle of the dekad in months since the middle of January.
    const middle = (index + 0.5) / 3 - 0.5;
    const before = climate.months[(Math.floor(middle) + 12) % 12];
    const after = climate.months[(Math.floor(middle) + 13) % 12];
    if (!before || !after) throw new Error('A climate has twelve months.');
    const share = middle - Math.floor(middle);
    // Typed thresholds of a schedule are met to nine decimals.
    const meanC = Number((before.meanC * (1 - share) + after.meanC * share).toFixed(9));
    const amplitudeK = before.amplitudeK * (1 - share) + after.amplitudeK * share;
    const month = Math.floor(index / 3) + 1;
    const coldest = climate.extremes?.coldest;
    const nightC = coldest && index === 3 * (coldest.month - 1) + 1 ? coldest.temperatureC : 1e9;
    return { month, meanC, amplitudeK, coldestC: Math.min(meanC - amplitudeK, nightC) };
  });
}

/** First-order loss at one temperature, 1/s. */
function lossPerS({ supply }: Scenario, temperatureC: number): number {
  const { lossPerYear, referenceC, q10, activationEnergyJPerMol } = supply.cell.selfDischarge;
  const reference = -Math.log(1 - lossPerYear.typical) / YEAR;
  if (activationEnergyJPerMol === undefined) return reference * (q10 ?? 2) ** ((temperatureC - referenceC) / 10);
  const inverse = 1 / (temperatureC + 273.15) - 1 / (referenceC + 273.15);
  return reference * Math.exp((-activationEnergyJPerMol / 8.314462618) * inverse);
}

/** Mean of the smallest of n standard normal values, by a fine Riemann sum of `x·n·φ(x)·(1 − Φ(x))^(n−1)`. */
function meanOfSmallest(count: number): number {
  let above = 1;
  let mean = 0;
  const step = 1e-4;
  for (let x = -8; x < 8; x += step) {
    const mass = (Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI)) * step;
    above -= mass / 2;
    mean += x * count * mass * above ** (count - 1);
    above -= mass / 2;
  }
  return mean;
}

function spreadOf({
  min,
  typical,
  max,
  distribution = 'triangular',
  deviation,
}: Scenario['supply']['cell']['capacityC']): number {
  const low = min ?? typical;
  const high = max ?? typical;
  if (distribution === 'fixed') return 0;
  if (distribution === 'normal') return deviation ?? (high - low) / 3.2897072539029444;
  if (distribution === 'uniform') return (high - low) / 12 ** 0.5;
  if (distribution === 'lognormal') throw new Error('The reference has no lognormal capacity.');
  return ((low * low + typical * typical + high * high - low * typical - low * high - typical * high) / 18) ** 0.5;
}

/** A scenario with its equations. */
export class Reference {
  readonly calendar: Dekad[];
  readonly program: NodeProgram;
  readonly moments: (Moment[] | undefined)[] = [];
  readonly means: (Sum | undefined)[] = [];
  readonly losses: (number | undefined)[] = [];
  readonly scenario: Scenario;

  constructor(scenario: Scenario) {
    this.scenario = scenario;
    this.calendar = calendarOf(scenario);
    const { regulator } = scenario.supply;
    const defaultReferenceVoltageV = regulator.kind === 'none' ? 3 : regulator.outputV;
    this.program = compileNode(scenario.node, { defaultReferenceVoltageV });
  }

  dekad(index: number): Dekad {
    const dekad = this.calendar[index % 36];
    if (!dekad) throw new Error('No such dekad.');
    return dekad;
  }

  isOn({ schedule: { when } }: RoutineProgram, { month, meanC }: Dekad): boolean {
    if (when?.months && !when.months.includes(month)) return false;
    return (
      !(when?.belowC !== undefined && meanC >= when.belowC) && !(when?.aboveC !== undefined && meanC < when.aboveC)
    );
  }

  perSecond({ schedule, cycleS }: RoutineProgram): number {
    if (schedule.kind === 'every') return 1 / schedule.periodS;
    if (schedule.kind === 'random') return schedule.meanPerDay / 86_400;
    if (schedule.kind === 'always') return cycleS > 0 ? 1 / cycleS : 0;
    if (schedule.kind === 'once') return 0;
    const hours = schedule.toHour - schedule.fromHour;
    return Math.ceil(((hours < 0 ? hours + 24 : hours) * 3600) / schedule.periodS - 1e-9) / 86_400;
  }

  /** Adds a draw, with its dependence on temperature averaged by `average`. */
  add(sum: Sum, draw: Draw, weight: number, average: (value: (c: number) => number) => number): void {
    const { doublingK, referenceTemperatureC, currentA, referenceVoltageV, law } = draw;
    const factor = doublingK === null ? 1 : average((c) => 2 ** ((c - referenceTemperatureC) / doublingK));
    if (law === 'constant-current') sum.a += weight * factor * currentA;
    if (law === 'constant-power') sum.w += weight * factor * currentA * referenceVoltageV;
    if (law === 'resistive') sum.g += (weight * factor * currentA) / referenceVoltageV;
  }

  rest(average: (value: (c: number) => number) => number): Sum {
    const sum = { a: 0, w: 0, g: 0 };
    for (const { restDraw } of this.program.parts) this.add(sum, restDraw, 1, average);
    for (const { draw } of this.program.leakages) this.add(sum, draw, 1, average);
    return sum;
  }

  /** Charge of a cycle in excess of rest, on the rail. */
  excess(routine: RoutineProgram, dekad: Dekad): Sum {
    const sum = { a: 0, w: 0, g: 0 };
    const average = (value: (c: number) => number): number => overDay(dekad, value);
    for (const { durationTermsS, draw, partIndex } of routine.segments) {
      const seconds = durationTermsS.reduce((total, term) => total + term, 0);
      this.add(sum, draw, seconds, average);
      const rest = this.program.parts[partIndex]?.restDraw;
      if (rest) this.add(sum, rest, -seconds, average);
    }
    return sum;
  }

  mean(index: number): Sum {
    const dekad = this.dekad(index);
    return (this.means[index % 36] ??= this.makeMean(dekad));
  }

  makeMean(dekad: Dekad): Sum {
    const sum = this.rest((value) => overDay(dekad, value));
    for (const routine of this.program.routines) {
      if (!this.isOn(routine, dekad)) continue;
      const excess = this.excess(routine, dekad);
      const rate = this.perSecond(routine);
      sum.a += rate * excess.a;
      sum.w += rate * excess.w;
      sum.g += rate * excess.g;
    }
    const monitor = this.scenario.supply.lowBattery;
    sum.a += ((monitor?.chargePerReadingC ?? 0) * (monitor?.readingsPerDay ?? 1)) / 86_400;
    return sum;
  }

  loss(index: number): number {
    const dekad = this.dekad(index);
    return (this.losses[index % 36] ??= overDay(dekad, (c) => lossPerS(this.scenario, c)));
  }

  capacityFactor(temperatureC: number): number {
    const table = this.scenario.supply.cell.capacityFactorByTemperature;
    return table ? linear(table, temperatureC) : 1;
  }

  openCircuitV(depth: number, temperatureC: number): number {
    const { series, cell } = this.scenario.supply;
    return (
      series * (linear(cell.openCircuitTableV, depth) + (cell.openCircuitTemperatureVPerK ?? 0) * (temperatureC - 20))
    );
  }

  resistanceOhm(durationS: number, depth: number, temperatureC: number): number {
    const { cell, series, parallel } = this.scenario.supply;
    const dated = cell.resistanceOhm
      .map(({ pulseS = Infinity, ohm }) => ({ pulseS, ohm: ohm.typical }))
      .sort((a, b) => a.pulseS - b.pulseS);
    const fresh = (dated.find(({ pulseS }) => pulseS >= durationS) ?? dated.at(-1))?.ohm ?? 0;
    const logs = cell.resistanceFactorByTemperature.map(([c, factor]): [number, number] => [c, Math.log(factor)]);
    const factor = Math.exp(linear(logs, temperatureC)) * linear(cell.resistanceFactorByDepth, depth);
    return (fresh * factor * series) / parallel;
  }

  /** Current at the cell of a load on the rail, without the regulator's own, at a voltage of the cell. */
  atCell(sum: Sum, cellV: number): number {
    const { regulator } = this.scenario.supply;
    const at = (u: number): number => sum.a + sum.w / u + sum.g * u;
    if (regulator.kind === 'none') return at(Math.max(FLOOR_V, cellV));
    if (regulator.kind === 'linear') {
      return at(Math.max(FLOOR_V, Math.min(regulator.outputV, cellV - regulator.dropoutV)));
    }
    const efficiency =
      typeof regulator.efficiency === 'number'
        ? regulator.efficiency
        : Math.min(...regulator.efficiency.map(([, value]) => value));
    return (regulator.outputV * at(regulator.outputV)) / (efficiency * Math.max(FLOOR_V, cellV));
  }

  quiescentA(): number {
    const { regulator } = this.scenario.supply;
    return regulator.kind === 'none' ? 0 : regulator.quiescentA;
  }

  speed(index: number, startingC: number, leftC: number): number {
    const { meanC } = this.dekad(index);
    const depth = (startingC - leftC) / (this.capacityFactor(meanC) * startingC);
    const currentA = this.atCell(this.mean(index), this.openCircuitV(depth, meanC)) + this.quiescentA();
    return -currentA - this.loss(index) * leftC;
  }

  momentsAt(index: number): Moment[] {
    return (this.moments[index % 36] ??= this.makeMoments(this.dekad(index), null));
  }

  /** Every interval with every interval of what runs always, and rest; of one routine alone where one is named. */
  makeMoments(dekad: Dekad, only: RoutineProgram | null): Moment[] {
    const average = (value: (c: number) => number): number => value(dekad.coldestC);
    const routines = this.program.routines.filter((routine) => this.isOn(routine, dekad));
    let grounds: RoutineProgram['intervals'][] = [[]];
    for (const routine of routines.filter(({ schedule }) => schedule.kind === 'always')) {
      const intervals = routine.intervals.filter(({ durationS }) => durationS > 0);
      if (intervals.length > 0)
        grounds = grounds.flatMap((ground) => intervals.map((interval) => [...ground, interval]));
    }
    const others = only
      ? [only]
      : routines.filter(({ schedule }) => schedule.kind !== 'always' && schedule.kind !== 'once');
    const tops = others.flatMap(({ intervals }) => intervals.filter(({ durationS }) => durationS > 0));
    const sets = [...tops.flatMap((top) => grounds.map((ground) => [...ground, top])), ...(only ? [] : grounds)];
    return sets.map((set) => this.moment(set, average));
  }

  moment(set: RoutineProgram['intervals'], average: (value: (c: number) => number) => number): Moment {
    const sum = this.rest(average);
    let railLimitV = 0;
    const busy = new Set<number>();
    for (const { partIndex, draw, lowestVoltageV } of set.flatMap(({ occupants }) => occupants)) {
      busy.add(partIndex);
      this.add(sum, draw, 1, average);
      const rest = this.program.parts[partIndex]?.restDraw;
      if (rest) this.add(sum, rest, -1, average);
      railLimitV = Math.max(railLimitV, lowestVoltageV);
    }
    this.program.parts.forEach(({ restLowestVoltageV }, index) => {
      if (!busy.has(index)) railLimitV = Math.max(railLimitV, restLowestVoltageV);
    });
    return { sum, railLimitV, durationS: set.at(-1)?.longestS ?? Infinity };
  }

  /** Loaded voltage of a moment; null when there is no operating point. */
  loadedV(moment: Moment, openCircuitV: number, ohm: number): number | null {
    const { regulator } = this.scenario.supply;
    const lacksV = (cellV: number): number =>
      openCircuitV - ohm * (this.atCellUnbound(moment.sum, cellV) + this.quiescentA()) - cellV;
    let highV = openCircuitV;
    let lowV = regulator.kind === 'linear' ? regulator.dropoutV : 0;
    if (regulator.kind === 'linear') {
      const cornerV = regulator.outputV + regulator.dropoutV;
      if (openCircuitV >= cornerV && lacksV(cornerV) >= 0) lowV = cornerV;
      else highV = Math.min(highV, cornerV);
    }
    // The lack is concave below: go down from the top in small steps to the first voltage that the source can hold.
    if (!(highV > lowV)) return null;
    let top = highV;
    const step = (highV - lowV) / 4000;
    let found = false;
    for (let v = highV; v > lowV; v -= step) {
      if (lacksV(v) >= 0) {
        lowV = v;
        found = true;
        break;
      }
      top = v;
    }
    if (!found) return lacksV(lowV + 1e-12) >= 0 ? lowV : null;
    for (let halving = 0; halving < 60; halving++) {
      const middle = (lowV + top) / 2;
      if (lacksV(middle) >= 0) lowV = middle;
      else top = middle;
    }
    return lowV;
  }

  atCellUnbound(sum: Sum, cellV: number): number {
    const { regulator } = this.scenario.supply;
    const at = (u: number): number => sum.a + sum.w / u + sum.g * u;
    if (regulator.kind === 'none') return at(cellV);
    if (regulator.kind === 'linear') return at(Math.min(regulator.outputV, cellV - regulator.dropoutV));
    return this.atCell(sum, cellV);
  }

  limitV({ railLimitV }: Moment): number {
    const { regulator, cutOffV = 0 } = this.scenario.supply;
    if (regulator.kind === 'none') return Math.max(railLimitV, cutOffV);
    if (railLimitV > regulator.outputV) return Infinity;
    const { minimumInputV = 0 } = regulator;
    const seenV = regulator.kind === 'linear' ? railLimitV + regulator.dropoutV : 0;
    return Math.max(seenV, minimumInputV, cutOffV);
  }

  failure(index: number, moments: Moment[], startingC: number, leftC: number): 'charge' | 'voltage' | null {
    const { coldestC } = this.dekad(index);
    const depth = (startingC - leftC) / (this.capacityFactor(coldestC) * startingC);
    if (depth >= 1) return 'charge';
    const openCircuitV = this.openCircuitV(depth, coldestC);
    for (const moment of moments) {
      const limitV = this.limitV(moment);
      const ohm = this.resistanceOhm(moment.durationS, depth, coldestC);
      if (this.isSafe(moment, { limitV, openCircuitV, ohm })) continue;
      const loadedV = this.loadedV(moment, openCircuitV, ohm);
      if (loadedV === null || loadedV < limitV) return 'voltage';
    }
    return null;
  }

  /** At the limit the source holds more than the load takes, so its operating point lies above. */
  isSafe(
    moment: Moment,
    { limitV, openCircuitV, ohm }: { limitV: number; openCircuitV: number; ohm: number },
  ): boolean {
    if (!(limitV > 0.3) || limitV === Infinity) return false;
    const takenA = this.atCellUnbound(moment.sum, limitV) + this.quiescentA();
    return openCircuitV - ohm * takenA - limitV >= 0;
  }

  startingC(): number {
    const { rateTable, capacityC } = this.scenario.supply.cell;
    if (!rateTable) return this.fromCellC(capacityC.typical);
    const logs = rateTable.map(([a, c]): [number, number] => [Math.log(a), c]);
    let startingC = this.fromCellC(capacityC.typical);
    for (let round = 0; round < 30; round++) {
      const before = startingC;
      const currentA = this.firstYearA(startingC) / this.scenario.supply.parallel;
      startingC = this.fromCellC(linear(logs, Math.log(currentA)));
      if (Math.abs(startingC - before) < 1e-11 * startingC) break;
    }
    return startingC;
  }

  /** Routines that run once and are on, in a dekad of life before some time. */
  onceIn(lifeDekad: number, beforeS: number): { routine: RoutineProgram; timeS: number }[] {
    const fromS = lifeDekad * DEKAD;
    const toS = Math.min(fromS + DEKAD, beforeS);
    const dekad = this.dekad(3 * (this.scenario.climate.startMonth - 1) + lifeDekad);
    return this.program.routines
      .flatMap((routine) => (routine.schedule.kind === 'once' ? [{ routine, timeS: routine.schedule.afterS }] : []))
      .filter(({ routine, timeS }) => timeS >= fromS && timeS < toS && this.isOn(routine, dekad))
      .sort((a, b) => a.timeS - b.timeS);
  }

  /** Charge at the cell of a routine that runs once, at the open-circuit voltage of its moment. */
  onceC(routine: RoutineProgram, index: number, startingC: number, leftC: number): number {
    const dekad = this.dekad(index);
    const depth = (startingC - leftC) / (this.capacityFactor(dekad.meanC) * startingC);
    return this.atCell(this.excess(routine, dekad), this.openCircuitV(depth, dekad.meanC));
  }

  fromCellC(cellC: number): number {
    const { supply, climate } = this.scenario;
    const spread = spreadOf(supply.cell.capacityC) / supply.cell.capacityC.typical / Math.sqrt(supply.parallel);
    const weakest = supply.series > 1 && spread > 0 ? 1 + spread * meanOfSmallest(supply.series) : 1;
    const freshC = cellC * supply.parallel * weakest * (1 - (supply.reserveFraction ?? 0));
    if (!climate.storage) return freshC;
    const { durationS, temperatureC, currentA } = climate.storage;
    const loss = lossPerS(this.scenario, temperatureC);
    return solve(
      (leftC) => -currentA - loss * leftC,
      freshC,
      { fromS: 0, toS: durationS },
      () => true,
    );
  }

  /** Mean current of the pack over the whole first year, as a second component of the equations. */
  firstYearA(startingC: number): number {
    let y = [startingC, 0];
    const start = 3 * (this.scenario.climate.startMonth - 1);
    for (let dekad = start; dekad < start + 36; dekad++) {
      const { meanC } = this.dekad(dekad);
      const currentA = (leftC: number): number => {
        const depth = (startingC - leftC) / (this.capacityFactor(meanC) * startingC);
        return this.atCell(this.mean(dekad), this.openCircuitV(depth, meanC)) + this.quiescentA();
      };
      const loss = this.loss(dekad);
      const lifeDekad = dekad - start;
      let nowS = lifeDekad * DEKAD;
      for (const { routine, timeS } of [...this.onceIn(lifeDekad, Infinity), { routine: null, timeS: nowS + DEKAD }]) {
        const solver = new Solver(2);
        solver.relativeTolerance = 1e-10;
        solver.absoluteTolerance = 1e-10 * startingC;
        solver.maxSteps = 100_000;
        const rhs = (_: number, [leftC = NaN]: number[]): number[] => [
          -currentA(leftC) - loss * leftC,
          currentA(leftC),
        ];
        if (timeS > nowS) y = solver.solve(rhs, nowS, y, timeS).y;
        nowS = timeS;
        if (!routine) continue;
        const chargeC = this.onceC(routine, dekad, startingC, y[0] ?? NaN);
        y = [(y[0] ?? NaN) - chargeC, (y[1] ?? NaN) + chargeC];
      }
    }
    return (y[1] ?? NaN) / YEAR;
  }
}
