import type { Forecast, Scenario } from '#common/engine/index.ts';
import { formatNumber } from '#common/units/format-quantity.ts';
import { HOUR_S, YEAR_S } from '#common/units/si.ts';
import { amps, charge, percent, seconds } from './figures.ts';
import { isWithTheEnd, lifeInWords, spanInWords, typedSpan } from './life-words.ts';
import { findStep } from './names.ts';

export interface Fact {
  label: string;
  value: string;
  /** A second, quieter line; '' keeps its place. */
  note?: string;
}

/** The forecast as a handful of lines beside the sentence; the same lines for every outcome, so that nothing jumps. */
export function forecastFacts(scenario: Scenario, forecast: Forecast): Fact[] {
  return [
    targetFact(scenario, forecast),
    warningFact(scenario, forecast),
    { label: 'Mean current from the cell', value: amps(forecast.meanCurrentA) },
    { label: 'Charge a day', value: charge(forecast.chargePerDayC) },
    peakFact(scenario, forecast),
    { label: 'Charge left at the end', value: percent(forecast.chargeLeftFraction), note: chargeNote(forecast) },
    ...outageFacts(forecast),
  ];
}

function chargeNote(forecast: Forecast): string {
  const left = forecast.chargeLeftFraction * forecast.startingChargeC;
  return `${charge(left)} of ${charge(forecast.startingChargeC)}`;
}

function targetFact(scenario: Scenario, forecast: Forecast): Fact {
  const { lifeS: wantedS, outages } = scenario.target;
  const label = `Target, ${typedSpan(wantedS)}`;
  if (forecast.outcome === 'oversubscribed') return { label, value: 'not met', note: 'the steps do not fit' };
  const reachedS = outages === 'tolerated' ? forecast.lastReportS : forecast.lifeS;
  if (forecast.outcome === 'outlives-horizon' || reachedS === null)
    return { label, value: 'met', note: 'outlives what this forecast looks at' };
  const overS = reachedS - wantedS;
  if (Math.abs(overS) < 0.05 * YEAR_S) return { label, value: overS >= 0 ? 'just met' : 'just missed', note: '' };
  const by = spanInWords(Math.abs(overS));
  const tolerated = outages === 'tolerated' ? ', outages tolerated' : '';
  return { label, value: overS > 0 ? 'met' : 'not met', note: `${by} ${overS > 0 ? 'to spare' : 'short'}${tolerated}` };
}

function warningFact(scenario: Scenario, forecast: Forecast): Fact {
  const label = 'Low-battery warning';
  if (!scenario.supply.lowBattery) return { label, value: 'no monitor' };
  if (!forecast.warning) return { label, value: 'does not come' };
  const cleared = forecast.warning.falseAlarmTimesS.length;
  const note = cleared > 0 ? { note: `${cleared} earlier, cleared again` } : {};
  const value = isWithTheEnd(forecast.warning) ? 'only with the end' : `${spanInWords(forecast.warning.leadS)} ahead`;
  return { label, value, ...note };
}

function peakFact(scenario: Scenario, forecast: Forecast): Fact {
  const label = 'Heaviest pulse';
  const { peak } = forecast;
  if (!peak) return { label, value: 'none', note: '' };
  const value = `${amps(peak.currentA)} for ${seconds(peak.durationS)}`;
  const step = findStep(scenario, peak.stepId)?.step.name;
  const meeting = peak.meeting
    ? `${amps(peak.meeting.currentA)} when routines meet, ${timesAYear(peak.meeting.perYear)}`
    : undefined;
  return { label, value, note: meeting ?? step ?? '' };
}

function timesAYear(perYear: number): string {
  if (perYear < 0.95) return `once in ${formatNumber(1 / Math.max(perYear, 1e-3), { significantDigits: 2 })} years`;
  return perYear < 1.5 ? 'about once a year' : `about ${formatNumber(perYear, { significantDigits: 2 })} times a year`;
}

function outageFacts(forecast: Forecast): Fact[] {
  if (forecast.outages.length === 0 || forecast.lastReportS === null) return [];
  const hours = forecast.outages.reduce((sum, outage) => sum + outage.hours, 0);
  return [
    {
      label: 'Last report if it recovers each time',
      value: lifeInWords(forecast.lastReportS),
      note: `silent for ${spanInWords(hours * HOUR_S)} in ${forecast.outages.length} ${forecast.outages.length === 1 ? 'winter' : 'winters'}`,
    },
  ];
}
