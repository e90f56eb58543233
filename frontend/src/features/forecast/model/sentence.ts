import type { Forecast, Scenario } from '#common/engine/index.ts';
import { monthName } from '#common/units/format-duration.ts';
import { depthAtEnd } from './depth.ts';
import { celsius, percent, volts } from './figures.ts';
import { endInWords, isWithTheEnd, lifeInWords, spanInWords, typedSpan } from './life-words.ts';
import { cellWords, findStep, midSentence, partNoun } from './names.ts';
import { oversubscriptions } from './oversubscribed.ts';
import { lifePrecision } from './precision.ts';

/** Figures of the sentence that open where they come from. */
export type FigureKey = 'life' | 'end' | 'limit' | 'charge-left' | 'warning' | 'shelf-life' | 'horizon' | 'need';

export interface SentencePart {
  text: string;
  /** `strong` is the answer itself, `figure` opens its origin, `quiet` is an aside. */
  emphasis: 'plain' | 'strong' | 'figure' | 'quiet';
  key: FigureKey | null;
}

/** An undervoltage at a greater depth is told as an empty cell. */
const EMPTY_DEPTH = 0.9;
const TYPICAL = ' with typical figures';

const plain = (text: string): SentencePart => ({ text, emphasis: 'plain', key: null });
const quiet = (text: string): SentencePart => ({ text, emphasis: 'quiet', key: null });
const strong = (text: string, key: FigureKey): SentencePart => ({ text, emphasis: 'strong', key });
const figure = (text: string, key: FigureKey): SentencePart => ({ text, emphasis: 'figure', key });

/** The forecast as a sentence: life, what ends it, charge left, warning. One entry a piece of text, in reading order. */
export function forecastSentence(scenario: Scenario, forecast: Forecast): SentencePart[] {
  switch (forecast.outcome) {
    case 'undervoltage':
      return depthAtEnd(scenario, forecast) > EMPTY_DEPTH
        ? emptied(scenario, forecast)
        : undervoltage(scenario, forecast);
    case 'charge-exhausted':
      return emptied(scenario, forecast);
    case 'shelf-life':
      return shelfLife(scenario, forecast);
    case 'outlives-horizon':
      return horizon(scenario, forecast);
    case 'never-starts':
      return neverStarts(scenario, forecast);
    case 'oversubscribed':
      return oversubscribed(scenario, forecast);
  }
}

/** The same as one text, for screen readers, titles and tests. */
export function sentenceText(parts: readonly SentencePart[]): string {
  return parts.map((part) => part.text).join('');
}

function lives(scenario: Scenario, forecast: Forecast): SentencePart[] {
  const life = lifeInWords(forecast.lifeS ?? 0, lifePrecision(scenario, forecast));
  return [plain('Lives '), strong(life, 'life'), quiet(TYPICAL), plain('. ')];
}

function end(scenario: Scenario, forecast: Forecast): SentencePart {
  return figure(endInWords(scenario, forecast, lifePrecision(scenario, forecast)), 'end');
}

function undervoltage(scenario: Scenario, forecast: Forecast): SentencePart[] {
  return [
    ...lives(scenario, forecast),
    plain('It ends in '),
    end(scenario, forecast),
    plain(', when '),
    ...pull(scenario, forecast),
    plain(', with '),
    chargeLeft(forecast),
    plain(' of the charge left.'),
    ...warning(scenario, forecast),
  ];
}

function emptied(scenario: Scenario, forecast: Forecast): SentencePart[] {
  const cell = cellWords(scenario);
  const coldestC = forecast.dekads.at(-1)?.coldestC;
  // Where much is left, it is the cold that keeps it in the cell.
  const isCold = coldestC !== undefined && forecast.chargeLeftFraction > 1 - EMPTY_DEPTH;
  const empty = `${cell.the} ${cell.isPlural ? 'are' : 'is'} empty${isCold ? ` at ${celsius(coldestC)}` : ''}`;
  const left = isCold ? ' of the charge out of reach' : ' of the charge left';
  return [
    ...lives(scenario, forecast),
    plain('It ends in '),
    end(scenario, forecast),
    plain(`, when ${empty}: with `),
    chargeLeft(forecast),
    plain(left),
    ...(forecast.outcome === 'undervoltage' ? [plain(', '), ...pull(scenario, forecast)] : []),
    plain('.'),
    ...warning(scenario, forecast),
  ];
}

function shelfLife(scenario: Scenario, forecast: Forecast): SentencePart[] {
  const cell = cellWords(scenario);
  const shelf = scenario.supply.cell.shelfLifeS;
  const named = shelf === undefined ? 'shelf life' : `shelf life of ${typedSpan(shelf)}`;
  return [
    ...lives(scenario, forecast),
    plain('It ends in '),
    end(scenario, forecast),
    plain(`, when ${cell.the} ${cell.isPlural ? 'reach' : 'reaches'} ${cell.its} `),
    figure(named, 'shelf-life'),
    plain(', with '),
    chargeLeft(forecast),
    plain(' of the charge left.'),
    ...warning(scenario, forecast),
  ];
}

function horizon(scenario: Scenario, forecast: Forecast): SentencePart[] {
  const noShelfLife = scenario.supply.cell.shelfLifeS === undefined;
  return [
    plain('Lives '),
    strong('longer than 40 years', 'horizon'),
    quiet(TYPICAL),
    plain(': '),
    chargeLeft(forecast),
    plain(' of the charge is left when this forecast stops looking.'),
    ...(noShelfLife ? [plain(' No shelf life is given for the cell, and few cells keep that long.')] : []),
  ];
}

function neverStarts(scenario: Scenario, forecast: Forecast): SentencePart[] {
  const month = monthName(forecast.endMonth ?? scenario.climate.startMonth);
  const cell = cellWords(scenario);
  const cause =
    forecast.limitedBy === 'charge'
      ? [plain(`${cell.the} ${cell.isPlural ? 'are' : 'is'} empty from the start`)]
      : pull(scenario, forecast);
  return [
    strong('Never starts', 'life'),
    quiet(TYPICAL),
    plain(': in its first month, '),
    figure(month, 'end'),
    plain(', '),
    ...cause,
    plain(', with '),
    chargeLeft(forecast),
    plain(' of the charge left.'),
  ];
}

function oversubscribed(scenario: Scenario, forecast: Forecast): SentencePart[] {
  const [first, ...others] = oversubscriptions(scenario);
  const why = first
    ? [plain(`: ${midSentence(first.name)} needs `), figure(first.need, 'need'), plain(` ${first.available}`)]
    : [plain(': its steps need more time than there is')];
  const more = others.length > 0 ? ` So ${others.length === 1 ? 'does one other' : `do ${others.length} others`}.` : '';
  return [
    strong('Oversubscribed', 'need'),
    quiet(TYPICAL),
    ...why,
    plain(`.${more} No life can be told, and `),
    chargeLeft(forecast),
    plain(' of the charge is left.'),
  ];
}

/** "the radio’s transmit step pulls the cell under 2.0 V". */
function pull(scenario: Scenario, forecast: Forecast): SentencePart[] {
  const limitV = forecast.dekads.at(-1)?.limitV;
  const limit = limitV === undefined ? 'its limit' : volts(limitV);
  const { subject, namesPart } = subjectOf(scenario, forecast);
  return [
    plain(`${subject} pulls ${cellWords(scenario).the} under `),
    figure(limit, 'limit'),
    plain(limitClause(scenario, forecast, namesPart)),
  ];
}

function subjectOf(scenario: Scenario, forecast: Forecast): { subject: string; namesPart: boolean } {
  if (forecast.criticalStepId === 'rest') return { subject: 'the load at rest', namesPart: false };
  const step = findStep(scenario, forecast.criticalStepId)?.step.name ?? 'heaviest';
  const stepWords = /^[\p{L}-]+$/u.test(step) ? `${midSentence(step)} step` : `step “${step}”`;
  if (forecast.failingPartId === null) return { subject: `the ${stepWords}`, namesPart: false };
  const owner = partNoun(scenario, forecast.failingPartId);
  return { subject: `the ${owner}${owner.endsWith('s') ? '’' : '’s'} ${stepWords}`, namesPart: true };
}

function limitClause(scenario: Scenario, forecast: Forecast, namesPart: boolean): string {
  if (forecast.limitedBy === 'regulator') return ', below which its regulator stops';
  if (forecast.limitedBy === 'cut-off') return ', the cut-off';
  if (namesPart || forecast.failingPartId === null) return '';
  return `, the least that the ${partNoun(scenario, forecast.failingPartId)} needs`;
}

function chargeLeft(forecast: Forecast): SentencePart {
  return figure(percent(forecast.chargeLeftFraction), 'charge-left');
}

function warning(scenario: Scenario, forecast: Forecast): SentencePart[] {
  if (!scenario.supply.lowBattery) return [];
  if (!forecast.warning)
    return [plain(' The low-battery warning does '), figure('not come', 'warning'), plain(' before.')];
  const cleared = forecast.warning.falseAlarmTimesS.length;
  const after = cleared === 0 ? '' : `, after ${cleared === 1 ? 'one that was' : `${cleared} that were`} cleared again`;
  if (isWithTheEnd(forecast.warning)) {
    return [plain(' The low-battery warning comes '), figure('only with the end', 'warning'), plain(`${after}.`)];
  }
  return [
    plain(' The low-battery warning comes '),
    figure(spanInWords(forecast.warning.leadS), 'warning'),
    plain(` earlier${after}.`),
  ];
}
