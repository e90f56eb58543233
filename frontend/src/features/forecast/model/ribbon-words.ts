import { monthName } from '#common/units/format-duration.ts';
import { celsius, fineVolts, percent } from './figures.ts';
import type { RibbonMonth } from './ribbon.ts';

export interface MonthWords {
  when: string;
  /** With unit, as before the word "headroom"; "no" where there is none. */
  headroom: string;
  coldest: string;
  chargeLeft: string;
  /** What happens in this month besides; '' if nothing. */
  event: string;
}

/** A month of the ribbon in words, the same for pointer, keyboard and table. */
export function monthInWords(month: RibbonMonth): MonthWords {
  const events = [month.hasWarning ? 'warning' : '', month.hasEnd ? 'end' : ''].filter(Boolean);
  return {
    when: `${monthName(month.month)}, year ${month.year}`,
    headroom: month.headroomV < 0.0005 ? 'no' : fineVolts(month.headroomV),
    coldest: celsius(month.coldestC),
    chargeLeft: percent(month.chargeLeftFraction),
    event: events.join(', '),
  };
}

export function monthSentence(month: RibbonMonth): string {
  const { when, headroom, coldest, chargeLeft, event } = monthInWords(month);
  const tail = event === '' ? '' : `; ${event}`;
  return `${when}: ${headroom} headroom, coldest ${coldest}, ${chargeLeft} of the charge left${tail}`;
}
