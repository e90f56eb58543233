import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';
import { formatDuration, formatLifeYears, monthName } from '#common/units/format-duration.ts';

export interface ForecastWords {
  /** Light words, then the bold ones, then light ones again. */
  before: string;
  strong: string;
  after: string;
  /** What became of the target, in words; null where there is no life to compare. */
  target: { isMet: boolean; text: string } | null;
}

/** The forecast's sentence in short, for lists: "Lives 6.2 years, ends in February". */
export function forecastWords(forecast: ForecastSummary | null): ForecastWords {
  if (!forecast)
    return { before: '', strong: '', after: 'No forecast: its figures contradict each other', target: null };
  const target = targetWords(forecast);
  switch (forecast.outcome) {
    case 'oversubscribed':
      return { before: '', strong: 'Oversubscribed', after: ': steps need more time than there is', target: null };
    case 'never-starts':
      return { before: '', strong: 'Never starts', after: '', target };
    case 'outlives-horizon':
      return { before: 'Lives ', strong: 'longer than 40 years', after: '', target };
    case 'undervoltage':
    case 'charge-exhausted':
    case 'shelf-life':
      return { before: 'Lives ', strong: formatLifeYears(forecast.lifeS ?? 0), after: endWords(forecast), target };
  }
}

function endWords({ outcome, endMonth }: ForecastSummary): string {
  const month = endMonth === null ? '' : ` in ${monthName(endMonth)}`;
  return outcome === 'shelf-life' ? `, ends${month} with its shelf life` : `, ends${month}`;
}

function targetWords({ outcome, lifeS, targetLifeS }: ForecastSummary): ForecastWords['target'] {
  const isMet = outcome === 'outlives-horizon' || (lifeS !== null && lifeS >= targetLifeS);
  const target = formatDuration(targetLifeS);
  return { isMet, text: isMet ? `meets the target of ${target}` : `misses the target of ${target}` };
}
