import { freshResistanceOhm, packOf, resistanceTemperatureFactor, tableValue } from '#common/engine/index.ts';
import type { DekadPoint, Forecast, Scenario } from '#common/engine/index.ts';
import { monthName } from '#common/units/format-duration.ts';
import { formatChargeMah, formatNumber } from '#common/units/format-quantity.ts';
import { MAH_C } from '#common/units/si.ts';
import { depthAtEnd } from './depth.ts';
import { amps, celsius, fineVolts, ohms, percent, volts } from './figures.ts';
import { lifeInWords, spanInWords, typedSpan } from './life-words.ts';
import { findStep, partName } from './names.ts';
import { oversubscriptions } from './oversubscribed.ts';
import { lifePrecision } from './precision.ts';
import type { FigureKey } from './sentence.ts';

export interface Explanation {
  title: string;
  /** The formula in words. */
  words: string;
  rows: { label: string; value: string }[];
}

/** Where a figure of the sentence comes from: the formula in words and the figures it was made of. */
export function explainFigure(key: FigureKey, scenario: Scenario, forecast: Forecast): Explanation {
  switch (key) {
    case 'life':
      return explainLife(scenario, forecast);
    case 'end':
      return explainEnd(forecast);
    case 'limit':
      return explainLimit(scenario, forecast);
    case 'charge-left':
      return explainCharge(scenario, forecast);
    case 'warning':
      return explainWarning(scenario, forecast);
    case 'shelf-life':
      return explainShelfLife(scenario);
    case 'horizon':
      return explainHorizon(scenario, forecast);
    case 'need':
      return explainNeed(scenario);
  }
}

function explainLife(scenario: Scenario, forecast: Forecast): Explanation {
  const memory = lifePrecision(scenario, forecast) === 'half-years';
  return {
    title: 'The life',
    words:
      'Starting charge, less what the node draws and what the cell loses by itself, month by month through the climate, until the first report is missed.' +
      (memory ? ' All figures that drive it are from memory, so it is told in half years.' : ''),
    rows: chargeRows(scenario, forecast),
  };
}

/** Start − drawn − lost = left on one grid, so that the shown figures can be checked by hand. */
function chargeRows(scenario: Scenario, forecast: Forecast): Explanation['rows'] {
  const spanS = forecast.dekads.at(-1)?.timeS ?? 0;
  const { startingChargeC } = forecast;
  const leftC = forecast.chargeLeftFraction * startingChargeC;
  const lostC = Math.max(0, startingChargeC - leftC - forecast.meanCurrentA * spanS);
  const stepC = MAH_C * 10 ** (Math.floor(Math.log10(Math.max(startingChargeC / MAH_C, 1e-9))) - 3);
  const steps = (chargeC: number): number => Math.round(chargeC / stepC);
  const told = (count: number): string => formatChargeMah(count * stepC);
  const drawn = steps(startingChargeC) - steps(lostC) - steps(leftC);
  const reserve = scenario.supply.reserveFraction ?? 0;
  const storage = scenario.climate.storage ? ', after storage' : '';
  const kept = reserve > 0 ? `, without a reserve of ${percent(reserve)}` : '';
  return [
    { label: `Starting charge${kept}${storage}`, value: told(steps(startingChargeC)) },
    { label: 'Mean current from the cell', value: amps(forecast.meanCurrentA) },
    { label: 'Drawn by the node', value: told(drawn) },
    { label: 'Lost by self-discharge', value: told(steps(lostC)) },
    { label: 'Left at the end', value: told(steps(leftC)) },
  ];
}

function explainEnd(forecast: Forecast): Explanation {
  const last = forecast.dekads.at(-1);
  const yearBefore = forecast.dekads.at(-37);
  return {
    title: 'When it ends',
    words:
      'Voltage and charge are tested at the coldest hour of each third of a month. Life ends at the first one that fails, although a warmer hour might revive the node.',
    rows: last
      ? [
          { label: 'Month', value: monthName(last.month) },
          { label: 'Mean temperature', value: celsius(last.meanC) },
          { label: 'Coldest hour', value: celsius(last.coldestC) },
          ...(yearBefore ? [{ label: 'Headroom a year earlier', value: fineVolts(yearBefore.headroomV) }] : []),
          { label: 'Winters survived', value: String(forecast.wintersSurvived) },
        ]
      : [{ label: 'Month', value: monthName(forecast.endMonth ?? 1) }],
  };
}

function explainLimit(scenario: Scenario, forecast: Forecast): Explanation {
  const last = forecast.dekads.at(-1);
  const step = findStep(scenario, forecast.criticalStepId);
  const where = step ? `${step.step.name}, in ${step.routine.name}` : 'Rest';
  return {
    title: 'The voltage that ends it',
    words:
      'Open-circuit voltage of the cell, less the current of the critical step times the resistance of the cell at that temperature and depth. It fails when the result falls under the highest limit of the parts at work.',
    rows: [
      { label: 'Critical step', value: where },
      { label: 'Limit set by', value: limitOwner(scenario, forecast) },
      ...(last ? voltageRows(scenario, forecast, last) : []),
    ],
  };
}

function voltageRows(scenario: Scenario, forecast: Forecast, last: DekadPoint): Explanation['rows'] {
  const { cell, series, parallel } = scenario.supply;
  const isPeak = forecast.peak !== null && forecast.peak.intervalId === forecast.criticalIntervalId;
  const durationS = isPeak ? (forecast.peak?.durationS ?? 0) : 0;
  const freshOhm =
    freshResistanceOhm(cell.resistanceOhm, durationS) * packOf(cell, { series, parallel }).resistanceFactor;
  const cold = resistanceTemperatureFactor(cell.resistanceFactorByTemperature, last.coldestC);
  const depth = depthAtEnd(scenario, forecast);
  const deep = tableValue(cell.resistanceFactorByDepth, depth);
  const factor = (value: number): string => `× ${formatNumber(value, { significantDigits: 2 })}`;
  return [
    { label: 'Open circuit, at the month’s mean', value: fineVolts(last.openCircuitV) },
    { label: 'Loaded, at the coldest hour', value: last.loadedV > 0 ? fineVolts(last.loadedV) : 'collapses' },
    { label: 'Limit', value: fineVolts(last.limitV) },
    ...(isPeak && forecast.peak ? [{ label: 'Current in the step', value: amps(forecast.peak.currentA) }] : []),
    { label: 'Resistance, fresh and at 20 °C', value: ohms(freshOhm) },
    { label: `At ${celsius(last.coldestC)}`, value: factor(cold) },
    { label: `At a depth of ${percent(depth)}`, value: factor(deep) },
    { label: 'Resistance then', value: ohms(freshOhm * cold * deep) },
  ];
}

/** What sets the limit, in words. */
export function limitOwner(scenario: Scenario, forecast: Forecast): string {
  switch (forecast.limitedBy) {
    case 'regulator':
      return 'the regulator';
    case 'cut-off':
      return 'the cut-off of the supply';
    case 'charge':
      return 'the charge';
    default:
      return forecast.failingPartId === null ? 'the node' : partName(scenario, forecast.failingPartId);
  }
}

function explainCharge(scenario: Scenario, forecast: Forecast): Explanation {
  const why =
    forecast.outcome === 'undervoltage'
      ? ' Voltage ends this life, so the rest stays in the cell unused.'
      : forecast.outcome === 'charge-exhausted' && forecast.chargeLeftFraction >= 0.005
        ? ' In the cold only a part of the charge can be had.'
        : '';
  return {
    title: 'The charge left',
    words: `Starting charge, less what was drawn and lost until then.${why}`,
    rows: chargeRows(scenario, forecast).filter((row) => row.label !== 'Mean current from the cell'),
  };
}

function explainWarning(scenario: Scenario, forecast: Forecast): Explanation {
  const monitor = scenario.supply.lowBattery;
  const at = monitor?.readAt === 'critical' ? 'in the critical step' : 'at rest';
  const rows = monitor ? [{ label: 'Threshold', value: volts(monitor.thresholdV) }] : [];
  if (forecast.warning) {
    rows.push(
      { label: 'Threshold after rounding to the monitor’s steps', value: volts(forecast.warning.thresholdV) },
      { label: 'Warns after', value: lifeInWords(forecast.warning.timeS) },
      { label: 'Before the end', value: spanInWords(forecast.warning.leadS) },
      { label: 'Earlier warnings that were cleared', value: String(forecast.warning.falseAlarmTimesS.length) },
    );
  }
  return {
    title: 'The low-battery warning',
    words: `The monitor reads the supply voltage at the coldest hour, ${at}. The warning is the last one before the end that is not cleared again.`,
    rows,
  };
}

function explainShelfLife(scenario: Scenario): Explanation {
  const { shelfLifeS, designation } = scenario.supply.cell;
  const storage = scenario.climate.storage;
  return {
    title: 'The shelf life',
    words: 'Counted from the start of storage. Past it nobody answers for the cell, whatever charge is left.',
    rows: [
      { label: `Shelf life of ${designation}`, value: shelfLifeS === undefined ? 'not given' : typedSpan(shelfLifeS) },
      ...(storage ? [{ label: 'Spent in storage', value: spanInWords(storage.durationS) }] : []),
    ],
  };
}

function explainHorizon(scenario: Scenario, forecast: Forecast): Explanation {
  const last = forecast.dekads.at(-1);
  return {
    title: 'Longer than 40 years',
    words: 'The forecast looks 40 years ahead. Neither charge nor voltage nor a shelf life ends the life before.',
    rows: [
      ...chargeRows(scenario, forecast),
      ...(last ? [{ label: 'Headroom in the last month', value: fineVolts(last.headroomV) }] : []),
      ...(last ? [{ label: 'Looked ahead', value: typedSpan(last.timeS) }] : []),
    ],
  };
}

function explainNeed(scenario: Scenario): Explanation {
  return {
    title: 'More time than there is',
    words:
      'A routine must be shorter than its period, and the states of a part must fit into the day. Lengthen the period, or shorten or remove steps.',
    rows: oversubscriptions(scenario).map(({ name, need, available }) => ({
      label: name,
      value: `${need} ${available}`,
    })),
  };
}
