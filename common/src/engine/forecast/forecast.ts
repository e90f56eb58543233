import { DEKADS, DEKAD_S } from '../climate/dekads.ts';
import { wintersPassed } from '../climate/winters.ts';
import type { Scenario } from '../scenario/scenario.types.ts';
import { DAY_S } from '#common/units/si.ts';
import { cautionsOf } from './cautions.ts';
import { compileScenario } from './compile-scenario.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { dutyCycles } from './duty-cycles.ts';
import { ENGINE_VERSION } from './engine-version.ts';
import { forecastLedger } from './forecast-ledger.ts';
import type { Forecast, ForecastOptions } from './forecast.types.ts';
import { limitedBy } from './limited-by.ts';
import { afterFailure } from './outages.ts';
import { oversubscribed } from './oversubscribed.ts';
import { peakOf } from './peak.ts';
import { runMeanCurrent } from './run-mean-current.ts';
import type { Run, Usage } from './run.types.ts';
import { startingCharge } from './starting-charge.ts';
import { freshYear, usageTotals } from './usage-sums.ts';
import { monitoring } from './warning.ts';

/**
 * Forecasts how long a node lives on its supply in its climate, and what ends it.
 *
 * Level `mean-current`: routines enter as their mean current, taken step by step through the regulator, with the dekads' day-averaged
 * rates; after each dekad and at every moment inside it the critical step is tested at the coldest hour. Constant and resistive loads
 * have a closed form between the rows of the tables, constant-power ones are integrated to the last digits; nothing loops over cycles.
 *
 * Source: charge balance `dQ/dt = −(c + p/V + r·V) − s·Q`; Ohm's law for the loaded voltage.
 * Valid for: time constants of the cell that are short against a dekad, and a ripple of one cycle that is small against the charge.
 *
 * @param scenario A valid scenario. It is not changed.
 * @param options Level, and whether the ledger is made (default: yes).
 * @returns The forecast; every outcome is an answer.
 * @throws EngineErrors when the node cannot run its routines, with every problem.
 * @throws OutOfRangeError, InconsistentInputError for figures that no formula takes, such as two laws of self-discharge.
 * @example forecast(scenario, { withLedger: false }).lifeS
 */
export function forecast(scenario: Scenario, options: ForecastOptions = {}): Forecast {
  const { withLedger = true } = options;
  const compiled = compileScenario(scenario);
  const tooMuch = oversubscribed(compiled);
  if (tooMuch.length > 0) return oversubscribedForecast(compiled, tooMuch, withLedger);
  return livedForecast(compiled, runMeanCurrent(compiled), withLedger);
}

function livedForecast(compiled: CompiledScenario, run: Run, withLedger: boolean): Forecast {
  const { outcome, startingC, endS, spent, dekadOfLife, firstYearCellA } = run;
  const hasEnd = outcome !== 'outlives-horizon';
  const monitored = monitoring(compiled, run, hasEnd);
  const { capacityFactor, temperatureC } = run.endLoad.cold;
  const peak = peakOf(compiled, { spent, temperatureC, capacityFactor });
  // A node that never lives has no use of its own.
  const told = toldOf(compiled, { usage: endS > 0 ? run.usage : freshYear(compiled), startingC, withLedger });
  const falseAlarms = monitored?.falseAlarmTimesS.length ?? 0;
  return {
    ...HEAD,
    outcome,
    lifeS: hasEnd ? endS : null,
    endMonth: hasEnd ? run.endLoad.dekad.month : null,
    wintersSurvived: wintersOf(compiled, dekadOfLife, endS),
    ...limitedBy(compiled, run),
    chargeLeftFraction: startingC > 0 ? Math.max(0, 1 - spent) : 0,
    startingChargeC: startingC,
    ...reportsOf(compiled, run),
    ...told,
    peak,
    dekads: run.points,
    warning: monitored?.warning ?? null,
    cautions: cautionsOf(compiled, { peak, meanCurrentA: told.meanCurrentA, firstYearCellA, falseAlarms }),
  };
}

/** Outages and the last report: those of a failure, of a life that ends by age its end, of one without an end none. */
function reportsOf(compiled: CompiledScenario, run: Run): Pick<Forecast, 'outages' | 'lastReportS'> {
  const { outcome, endS, startingC } = run;
  if (outcome === 'outlives-horizon') return { outages: [], lastReportS: null };
  if (outcome === 'shelf-life' || startingC === 0) return { outages: [], lastReportS: endS };
  return afterFailure(compiled, run, shelfEndS(compiled));
}

/** What use tells: mean current, shares of time, ledger. */
function toldOf(
  compiled: CompiledScenario,
  { usage, startingC, withLedger }: { usage: Usage; startingC: number; withLedger: boolean },
): Pick<Forecast, 'meanCurrentA' | 'chargePerDayC' | 'dutyCycles' | 'ledger'> {
  const { drawnC, timeS } = usageTotals(compiled, usage, startingC);
  const meanCurrentA = drawnC / timeS;
  return {
    meanCurrentA,
    chargePerDayC: meanCurrentA * DAY_S,
    dutyCycles: dutyCycles(compiled, usage),
    ledger: withLedger ? forecastLedger(compiled, usage, startingC) : null,
  };
}

const HEAD = { engineVersion: ENGINE_VERSION, level: 'mean-current' } as const;

function shelfEndS({ scenario }: CompiledScenario): number {
  return (scenario.supply.cell.shelfLifeS ?? Infinity) - (scenario.climate.storage?.durationS ?? 0);
}

/** Winters whose last dekad has passed at a time; the dekad that has just ended counts. */
function wintersOf({ startDekad, winterStart }: CompiledScenario, dekadOfLife: number, endS: number): number {
  const hasPassed = endS >= (dekadOfLife + 1) * DEKAD_S;
  return wintersPassed(startDekad, dekadOfLife + (hasPassed ? 1 : 0), winterStart);
}

/** A node that cannot do what it is asked for has no life; what it would draw in a fresh year is told all the same. */
function oversubscribedForecast(
  compiled: CompiledScenario,
  tooMuch: Forecast['cautions'],
  withLedger: boolean,
): Forecast {
  const { startingC, firstYearCellA } = startingCharge(compiled);
  const told = toldOf(compiled, { usage: freshYear(compiled), startingC, withLedger });
  const { capacityFactor, temperatureC } = compiled.dekadLoad(compiled.startDekad % DEKADS).cold;
  const peak = peakOf(compiled, { spent: 0, temperatureC, capacityFactor });
  const findings = { peak, meanCurrentA: told.meanCurrentA, firstYearCellA, falseAlarms: 0 };
  return {
    ...HEAD,
    outcome: 'oversubscribed',
    lifeS: null,
    endMonth: null,
    wintersSurvived: 0,
    criticalStepId: null,
    criticalIntervalId: null,
    failingPartId: null,
    limitedBy: null,
    chargeLeftFraction: 1,
    startingChargeC: startingC,
    outages: [],
    lastReportS: null,
    ...told,
    peak,
    dekads: [],
    warning: null,
    cautions: [...tooMuch, ...cautionsOf(compiled, findings)],
  };
}
