import type { Decimal } from 'decimal.js';
import { DEKADS } from '../climate/dekads.ts';
import { LedgerDecimal, onGrid, plainDecimal, sumOnGrid } from '../node/ledger-decimal.ts';
import { ledgerLines } from '../node/ledger-lines.ts';
import type { LedgerLine } from '../node/ledger-lines.ts';
import type { Draw } from '../node/node-program.types.ts';
import { YEAR_S } from '#common/units/si.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { converted } from './converter.ts';
import type { Ledger, LedgerEntry, LedgerEntryKind } from './forecast.types.ts';
import { addDraw, groupOf, GROUP_WIDTH, weighGroups } from './load-vector.ts';
import type { OnceEvent } from './once-event.ts';
import type { Usage } from './run.types.ts';
import { freshYear, usageTotals } from './usage-sums.ts';

/**
 * Charge account at the cell of a mean year of life: each line of the node through the regulator, then the regulator's own current,
 * the monitor and self-discharge. Charges are sums over the dekads of life; each entry is rounded once to the ledger's grid, so
 * the entries add up to the total to the last digit.
 *
 * @param compiled The scenario.
 * @param usage Sums by dekad of the year: of life, or of a fresh year for a node that never lives.
 * @param startingC Starting charge, C.
 * @returns The ledger.
 * @example forecastLedger(compiled, run.usage, run.startingC).totalC
 */
export function forecastLedger(compiled: CompiledScenario, usage: Usage, startingC: number): Ledger {
  const totals = usageTotals(compiled, usage, startingC);
  const toYear = YEAR_S / totals.timeS;
  const fresh = freshYear(compiled);
  const charges: { entry: Omit<LedgerEntry, 'chargeC'>; chargeC: Decimal }[] = [];
  for (const line of ledgerLines(compiled.program)) {
    const { routineIndex } = line;
    const lifeC = lineC(compiled, usage, line);
    const cycles = routineIndex === null ? null : cyclesOf(compiled, usage, routineIndex);
    let perCycleC: number | null = null;
    if (cycles !== null) perCycleC = cycles > 0 ? lifeC / cycles : perCycleWithout(compiled, fresh, line);
    charges.push({ entry: entryOf(line, perCycleC), chargeC: toGrid(lifeC * toYear) });
  }
  const { converter, monitorA } = compiled;
  const monitorC = drawC(compiled, usage, { draw: constant(monitorA), weightOf: () => 1 });
  const others: [LedgerEntryKind, number, boolean][] = [
    ['regulator', converter.quiescentA * totals.timeS, converter.kind !== 'none'],
    ['monitor', monitorC, monitorA > 0],
    ['self-discharge', totals.lostC, true],
  ];
  for (const [kind, lifeC, isShown] of others) {
    if (isShown) charges.push({ entry: { ...NOWHERE, kind }, chargeC: toGrid(lifeC * toYear) });
  }
  return {
    side: 'cell',
    periodS: YEAR_S,
    entries: charges.map(({ entry, chargeC }) => ({ ...entry, chargeC: plainDecimal(chargeC) })),
    totalC: plainDecimal(sumOnGrid(charges.map(({ chargeC }) => chargeC))),
  };
}

const NOWHERE = {
  routineId: null,
  stepId: null,
  partId: null,
  stateId: null,
  fromStateId: null,
  leakageId: null,
  chargePerCycleC: null,
};

const toGrid = (chargeC: number): Decimal => onGrid(new LedgerDecimal(chargeC));

const constant = (currentA: number): Draw => ({
  currentA,
  law: 'constant-current',
  referenceVoltageV: 1,
  referenceTemperatureC: 0,
  doublingK: null,
});

function entryOf(line: LedgerLine, perCycleC: number | null): Omit<LedgerEntry, 'chargeC'> {
  const { kind, routineId, stepId, partId, stateId, fromStateId, leakageId } = line;
  const chargePerCycleC = perCycleC === null ? null : plainDecimal(toGrid(perCycleC));
  return { kind, routineId, stepId, partId, stateId, fromStateId, leakageId, chargePerCycleC };
}

function cyclesOf(compiled: CompiledScenario, usage: Usage, routineIndex: number): number {
  let cycles = usage.once.filter((event) => event.routineIndex === routineIndex).length;
  for (let dekad = 0; dekad < DEKADS; dekad++) {
    const timeS = usage.timeS[dekad] ?? 0;
    if (timeS > 0) cycles += timeS * (compiled.dekadLoad(dekad).ratesPerS[routineIndex] ?? 0);
  }
  return cycles;
}

const secondsOf = ({ durationTermsS }: LedgerLine): number => durationTermsS.reduce((sumS, termS) => sumS + termS, 0);

/** Charge of a line over life, at the cell, C; routines in excess of rest. */
function lineC(compiled: CompiledScenario, usage: Usage, line: LedgerLine): number {
  const { routineIndex, draw, restDraw } = line;
  if (routineIndex === null) return drawC(compiled, usage, { draw, weightOf: () => 1 });
  const cycleS = secondsOf(line);
  const weightOf = (dekad: number): number => cycleS * (compiled.dekadLoad(dekad).ratesPerS[routineIndex] ?? 0);
  const once = usage.once.filter((event) => event.routineIndex === routineIndex);
  const whole = (of: Draw): number =>
    drawC(compiled, usage, { draw: of, weightOf }) +
    once.reduce((sumC, event) => sumC + cycleS * onceA(compiled, event, of), 0);
  return whole(draw) - (restDraw ? whole(restDraw) : 0);
}

/** What a cycle would take in a fresh year, where life saw none. */
function perCycleWithout(compiled: CompiledScenario, fresh: Usage, line: LedgerLine): number {
  const { draw, restDraw } = line;
  const yearC = (of: Draw): number => drawC(compiled, fresh, { draw: of, weightOf: () => 1 });
  return (secondsOf(line) * (yearC(draw) - (restDraw ? yearC(restDraw) : 0))) / YEAR_S;
}

/** Charge at the cell of a draw that runs for a share of the time, by dekad of the year, C. */
function drawC(
  compiled: CompiledScenario,
  usage: Usage,
  { draw, weightOf }: { draw: Draw; weightOf: (dekad: number) => number },
): number {
  const { groups } = compiled.loads;
  const group = groupOf(groups, draw);
  const unit = new Float64Array(GROUP_WIDTH);
  addDraw(unit, 0, draw, 1);
  const load = converted(compiled.converter, weighGroups(unit, 0, ONE_GROUP));
  let chargeC = 0;
  for (let dekad = 0; dekad < DEKADS; dekad++) {
    const timeS = usage.timeS[dekad] ?? 0;
    if (timeS === 0) continue;
    const seconds =
      load.constantA * timeS +
      load.powerW * (usage.perVoltS[dekad] ?? 0) +
      load.conductanceS * (usage.voltS[dekad] ?? 0);
    chargeC += weightOf(dekad) * (compiled.dekadLoad(dekad).meanFactors[group] ?? 1) * seconds;
  }
  return chargeC;
}

const ONE_GROUP = [1];

/** Current at the cell of a draw at the moment of a routine that runs once, A. */
function onceA(compiled: CompiledScenario, { dekadOfYear, seenV }: OnceEvent, draw: Draw): number {
  const unit = new Float64Array(GROUP_WIDTH);
  addDraw(unit, 0, draw, 1);
  const { constantA, powerW, conductanceS } = converted(compiled.converter, weighGroups(unit, 0, ONE_GROUP));
  const factor = compiled.dekadLoad(dekadOfYear).meanFactors[groupOf(compiled.loads.groups, draw)] ?? 1;
  return factor * (constantA + powerW / seenV + conductanceS * seenV);
}
