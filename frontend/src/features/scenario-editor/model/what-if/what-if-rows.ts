import { formatDuration } from '#common/units/format-duration.ts';
import { formatQuantity, formatShare } from '#common/units/format-quantity.ts';
import { DAY_S, YEAR_S } from '#common/units/si.ts';
import { figureWords } from '../link/figure-words.ts';
import type { WhatIfFigures, WhatIfLife, WhatIfOutcome } from './what-if-outcome.ts';

/** A figure of an alternative, and how far it is from the present one; null: nothing to tell. */
export interface Cell {
  text: string;
  change: string | null;
}

export interface Row {
  title: string;
  cells: Cell[];
}

const MINUS = '\u2212';

/** A difference with its sign; "same" where it is told by no digit. */
function signed(difference: number, format: (size: number) => string, smallest: number): string {
  if (Math.abs(difference) < smallest) return 'same';
  return `${difference < 0 ? MINUS : '+'}${format(Math.abs(difference))}`;
}

interface Metric {
  title: string;
  read: (figures: WhatIfFigures) => number | null;
  format: (value: number) => string;
  /** Share of the present value below which a change is none. */
  formatChange: (difference: number, before: number) => string;
}

const duration = (timeS: number): string => formatDuration(timeS, { significantDigits: 3 });
const charge = (chargeC: number): string => formatQuantity(chargeC, 'charge', { significantDigits: 3 });
const share = (value: number): string => figureWords({ value, unit: 'probability' });
const NEXT_TO_NOTHING = 1e-6;

const METRICS: readonly Metric[] = [
  {
    title: 'Mean duration',
    read: ({ meanS }) => meanS,
    format: duration,
    formatChange: (difference, before) => signed(difference, duration, NEXT_TO_NOTHING * before),
  },
  {
    title: 'Delivered',
    read: ({ deliveredProbability }) => deliveredProbability,
    format: share,
    formatChange: (difference) =>
      signed(difference, (size) => `${formatShare(size, { significantDigits: 2 }).replace('%', '')}points`, 1e-7),
  },
  {
    title: 'Charge per cycle',
    read: ({ cycleC }) => cycleC,
    format: charge,
    formatChange: (difference, before) => signed(difference, charge, NEXT_TO_NOTHING * before),
  },
  {
    title: 'Charge a day',
    // What happens once has no mean day.
    read: ({ dayC }) => (dayC === 0 ? null : dayC),
    format: charge,
    formatChange: (difference, before) => signed(difference, charge, NEXT_TO_NOTHING * before),
  },
];

/** A life in years with two decimals, shorter ones in days. */
function lifeText({ lifeS, outcome }: WhatIfLife): string {
  if (lifeS === null) return 'longer than looked';
  const text = lifeS < YEAR_S ? `${Math.round(lifeS / DAY_S)}\u00a0days` : `${(lifeS / YEAR_S).toFixed(1)}\u00a0years`;
  return outcome === 'shelf-life' ? `${text}, shelf life` : text;
}

function lifeChange(life: WhatIfLife, before: WhatIfLife): string | null {
  if (life.lifeS === null || before.lifeS === null) return life.lifeS === before.lifeS ? 'same' : null;
  const days = (size: number): string =>
    size < 2 * YEAR_S ? `${Math.round(size / DAY_S)}\u00a0days` : `${(size / YEAR_S).toFixed(1)}\u00a0years`;
  return signed(life.lifeS - before.lifeS, days, DAY_S / 2);
}

/**
 * The table of some alternatives: what each comes to, and how far that is from the present one.
 *
 * @param outcomes One for each alternative.
 * @param current Index of the present one.
 * @returns Rows that at least one alternative has a figure for.
 */
export function whatIfRows(outcomes: readonly WhatIfOutcome[], current: number): Row[] {
  const now = outcomes[current];
  if (now?.kind !== 'figures') return [];
  const rows = METRICS.filter(({ read }) => read(now.figures) !== null).map(
    ({ title, read, format, formatChange }) => ({
      title,
      cells: outcomes.map((outcome, index): Cell => {
        const value = outcome.kind === 'figures' ? read(outcome.figures) : null;
        const before = read(now.figures) ?? 0;
        if (value === null) return { text: '—', change: null };
        return { text: format(value), change: index === current ? null : formatChange(value - before, before) };
      }),
    }),
  );
  const lives = outcomes.map((outcome, index): Cell => {
    const life = outcome.kind === 'figures' ? outcome.life : null;
    if (!life) return { text: '—', change: null };
    return { text: lifeText(life), change: index === current || !now.life ? null : lifeChange(life, now.life) };
  });
  return now.life ? [...rows, { title: 'Life', cells: lives }] : rows;
}
