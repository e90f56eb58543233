import type { Decimal } from 'decimal.js';
import { requireNumber } from '../link/checks.ts';
import type { Ledger, LedgerEntry } from '../forecast/forecast.types.ts';
import type { Node } from '../scenario/scenario.types.ts';
import { DAY_S } from '#common/units/si.ts';
import { compileNode } from './compile-node.ts';
import { LedgerDecimal, onGrid, plainDecimal, sumOnGrid } from './ledger-decimal.ts';
import { exactDurationS, ledgerLines } from './ledger-lines.ts';
import type { LedgerLine } from './ledger-lines.ts';
import type { Draw, RoutineProgram } from './node-program.types.ts';
import { exactCyclesPerDay, isOnAt, monthsOn } from './schedule-rate.ts';

/** Reference voltage of states that give none, where no regulator is known, V. */
const DEFAULT_REFERENCE_V = 3;

/** Rail voltage and temperature that a ledger of the rail is made for. */
export interface ChargeLedgerOptions {
  /** Rail voltage, V, above 0. */
  railVoltageV: number;
  /** Temperature, °C; it also decides which schedules are on. */
  temperatureC: number;
  /** Reference voltage of states that give none, V; default 3.0 V, the model's value without a regulator. */
  defaultReferenceVoltageV?: number;
}

/**
 * Exact charge account of the rail at one voltage and temperature, for a mean day: routine × step × part × state in excess of
 * rest, transitions as entries of their own, rest of each part, leakages.
 *
 * Arithmetic is decimal with 40 significant digits, each double taken as its shortest decimal. Every entry is rounded once to
 * a grid of 1e-30 C, and the total is the exact sum of the entries. So the entries shown add up to the total shown to the last
 * digit, also for a reader who adds them in whichever order with 40-digit decimals.
 *
 * Rates are those of `cyclesPerDay`; a schedule's months count as their share of twelve, its temperatures are judged at
 * `temperatureC`. `once` has a charge per cycle and none per mean day.
 *
 * @param node The node.
 * @param options Rail voltage, V, above 0; temperature, °C, −273.15 or more.
 * @returns The ledger, decimal strings in plain notation, C.
 * @throws OutOfRangeError code `out-of-range` for a voltage or temperature outside its range.
 * @throws EngineErrors what `compileNode` throws.
 * @example chargeLedger(node, { railVoltageV: 3, temperatureC: 25 }).totalC // '0.6048'
 */
export function chargeLedger(node: Node, options: ChargeLedgerOptions): Ledger {
  const { railVoltageV, temperatureC, defaultReferenceVoltageV = DEFAULT_REFERENCE_V } = options;
  requireNumber(railVoltageV, { field: 'railVoltageV', min: Number.MIN_VALUE, unit: 'V' });
  requireNumber(temperatureC, { field: 'temperatureC', min: -273.15, unit: '°C' });
  const program = compileNode(node, { defaultReferenceVoltageV });
  const ratesPerDay = program.routines.map((routine) => meanCyclesPerDay(routine, temperatureC));
  const currents = exactCurrents(railVoltageV, temperatureC);
  const charges = ledgerLines(program).map((line) => {
    const currentA = currents(line.draw).minus(line.restDraw ? currents(line.restDraw) : 0);
    const ratePerDay = line.routineIndex === null ? undefined : ratesPerDay[line.routineIndex];
    if (ratePerDay === undefined) return { line, perCycleC: null, chargeC: onGrid(currentA.times(DAY_S)) };
    const perCycleC = currentA.times(exactDurationS(line.durationTermsS));
    return { line, perCycleC: onGrid(perCycleC), chargeC: onGrid(perCycleC.times(ratePerDay)) };
  });
  return {
    side: 'rail',
    periodS: DAY_S,
    entries: charges.map(({ line, perCycleC, chargeC }) => entryOf(line, perCycleC, chargeC)),
    totalC: plainDecimal(sumOnGrid(charges.map(({ chargeC }) => chargeC))),
  };
}

function meanCyclesPerDay({ schedule, cycleS }: RoutineProgram, temperatureC: number): Decimal {
  if (!isOnAt(schedule.when, temperatureC)) return new LedgerDecimal(0);
  return exactCyclesPerDay(schedule, cycleS).times(monthsOn(schedule.when)).div(12);
}

/** Current of a draw; draws are shared between lines, so each is computed once. */
function exactCurrents(voltageV: number, temperatureC: number): (draw: Draw) => Decimal {
  const known = new Map<Draw, Decimal>();
  return (draw) => {
    const found = known.get(draw) ?? exactDrawAt(draw, voltageV, temperatureC);
    known.set(draw, found);
    return found;
  };
}

/**
 * Current of a draw in decimal arithmetic of 40 digits; as `drawAt` otherwise.
 *
 * @param draw The draw.
 * @param voltageV Rail voltage, V, above 0.
 * @param temperatureC Temperature, °C.
 * @returns Current, A.
 * @example exactDrawAt(draw, 3, 25).toFixed() // '0.01'
 */
export function exactDrawAt(draw: Draw, voltageV: number, temperatureC: number): Decimal {
  const { law, referenceVoltageV, referenceTemperatureC, doublingK } = draw;
  const nominalA = new LedgerDecimal(draw.currentA);
  let currentA = nominalA;
  if (law === 'constant-power') currentA = nominalA.times(referenceVoltageV).div(voltageV);
  if (law === 'resistive') currentA = nominalA.times(voltageV).div(referenceVoltageV);
  if (doublingK === null) return currentA;
  const doublings = new LedgerDecimal(temperatureC).minus(referenceTemperatureC).div(doublingK);
  return currentA.times(new LedgerDecimal(2).pow(doublings));
}

function entryOf(line: LedgerLine, perCycleC: Decimal | null, chargeC: Decimal): LedgerEntry {
  const { kind, routineId, stepId, partId, stateId, fromStateId, leakageId } = line;
  return {
    kind,
    routineId,
    stepId,
    partId,
    stateId,
    fromStateId,
    leakageId,
    chargePerCycleC: perCycleC && plainDecimal(perCycleC),
    chargeC: plainDecimal(chargeC),
  };
}
