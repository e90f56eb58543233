import { formatNumber } from '#common/units/format-quantity.ts';
import type { ChartTheme } from './chart-theme.ts';

/** A linear axis in the theme, with its quantity and unit as title. */
export function linearScale(theme: ChartTheme, title: string) {
  return {
    type: 'linear' as const,
    title: { display: true, text: title, color: theme.tones.muted, font: theme.font, padding: 2 },
    ticks: {
      color: theme.tones.muted,
      font: theme.font,
      maxTicksLimit: 7,
      includeBounds: false,
      callback: (value: number | string) => formatNumber(Number(value)),
    },
    grid: { color: theme.grid, tickColor: theme.axis, tickLength: 4 },
    border: { color: theme.axis },
  };
}
