import type { ExchangeFigure } from '#common/engine/link/exchange-plan.types.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import { formatNumber, formatQuantity, formatShare, withUnit } from '#common/units/format-quantity.ts';

/** A figure of a plan as the page shows it. */
export function figureWords({ value, unit }: Pick<ExchangeFigure, 'value' | 'unit'>): string {
  switch (unit) {
    case 's':
      return phaseTime(value);
    case 'octets':
      return withUnit(formatNumber(value, { significantDigits: 4 }), value === 1 ? 'octet' : 'octets');
    case 'probability':
      return probability(value);
    case 'count':
      return formatNumber(value, { significantDigits: 4 });
    case 'ppm':
      return formatQuantity(value, 'tolerance');
    case 'dBm':
      return formatQuantity(value, 'level');
    case 'dB':
      return withUnit(formatNumber(value), 'dB');
    case 'per-day':
      return withUnit(formatNumber(value), 'a day');
  }
}

/** Close to 1 the rest is what counts, so it is not rounded away. */
function probability(value: number): string {
  const isNearOne = value > 0.99 && value < 1;
  return formatShare(value, { significantDigits: isNearOne ? 6 : 3 });
}

/** A time of the link: four digits, because a microsecond of some milliseconds is meant. */
export const phaseTime = (timeS: number): string => formatDuration(timeS, { significantDigits: 4 });
