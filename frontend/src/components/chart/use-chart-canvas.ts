import { Chart, LinearScale, LineController, LineElement, PointElement, type ChartConfiguration } from 'chart.js';
import { useEffect, useRef, type RefObject } from 'react';
import { useThemeKey } from '#frontend/hooks/use-theme-key.ts';
import { readChartTheme, type ChartTheme } from './chart-theme.ts';

Chart.register(LinearScale, LineController, LineElement, PointElement);

type Points = { x: number; y: number }[];

export type LineChart = Chart<'line', Points>;
export type LineChartConfig = ChartConfiguration<'line', Points>;

/** What a kind of chart is made of, and how new content gets into one that is there. */
export interface ChartKind<D extends object> {
  make: (content: D & { pointed: number | null }, theme: ChartTheme) => LineChartConfig;
  refresh: (chart: LineChart, content: D & { pointed: number | null }) => void;
}

/**
 * A chart on its canvas, made anew for another theme only.
 *
 * @param kind the same object in each render
 * @param data what it shows; the same object while nothing of it changes
 * @param pointed the point that is read out; the chart is only drawn again for it
 */
export function useChartCanvas<D extends object>(
  kind: ChartKind<D>,
  data: D,
  pointed: number | null,
): { canvas: RefObject<HTMLCanvasElement | null>; chart: RefObject<LineChart | null> } {
  const canvas = useRef<HTMLCanvasElement>(null);
  const chart = useRef<LineChart | null>(null);
  const content = useRef({ ...data, pointed });
  const themeKey = useThemeKey();
  useEffect(() => {
    if (!canvas.current?.getContext('2d')) return undefined;
    const made = new Chart(canvas.current, kind.make(content.current, readChartTheme(canvas.current)));
    chart.current = made;
    // A canvas does not wait for web fonts.
    void document.fonts?.ready.then(() => {
      if (chart.current === made) made.update('none');
    });
    return () => {
      chart.current = null;
      made.destroy();
    };
  }, [kind, themeKey]);
  useEffect(() => {
    Object.assign(content.current, data);
    if (chart.current) kind.refresh(chart.current, content.current);
  }, [kind, data]);
  useEffect(() => {
    content.current.pointed = pointed;
    chart.current?.draw();
  }, [pointed]);
  return { canvas, chart };
}
