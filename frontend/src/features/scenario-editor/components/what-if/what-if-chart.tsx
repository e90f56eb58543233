import { Chart, LinearScale, LineController, LineElement, PointElement } from 'chart.js';
import { useEffect, useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import { readChartTheme } from '#frontend/components/chart/chart-theme.ts';
import { useThemeKey } from '#frontend/hooks/use-theme-key.ts';
import {
  pointChartConfig,
  refreshPointChart,
  type PointChart,
  type PointContent,
} from '#frontend/features/scenario-editor/model/what-if/what-if-chart-config.ts';
import { deliveredWords, type ChartPoints } from '#frontend/features/scenario-editor/model/what-if/what-if-charts.ts';

Chart.register(LinearScale, LineController, LineElement, PointElement);

/** One small chart; pointer and arrow keys read out its points. */
export function WhatIfChart({ chart: points }: { chart: ChartPoints }) {
  const [pointed, setPointed] = useState<number | null>(null);
  const { canvas, indexAt } = useChart(points, pointed);
  const { plan, current } = points;
  const last = points.points.length - 1;
  const shown = Math.min(pointed ?? Math.max(current, 0), Math.max(last, 0));
  const words = wordsOf(points, shown);
  const handlePointer = (event: PointerEvent): void => setPointed(indexAt(event.clientX));
  const handleKey = (event: KeyboardEvent): void => {
    const next = keyTarget(event.key, shown, last);
    if (next === null) return;
    event.preventDefault();
    setPointed(next);
  };
  return (
    <figure>
      <figcaption className="text-small">
        <span className="block font-extrabold">{plan.title}</span>
        <span className="block min-h-5 text-muted tabular-nums" aria-hidden="true">
          {words}
        </span>
      </figcaption>
      <div
        role="slider"
        tabIndex={0}
        aria-label={plan.title}
        aria-valuemin={0}
        aria-valuemax={Math.max(last, 0)}
        aria-valuenow={shown}
        aria-valuetext={words}
        className="relative mt-1 h-44"
        onPointerMove={handlePointer}
        onPointerDown={handlePointer}
        onPointerLeave={() => setPointed(null)}
        onBlur={() => setPointed(null)}
        onKeyDown={handleKey}
      >
        <canvas ref={canvas} aria-hidden="true" />
      </div>
    </figure>
  );
}

/** The chart on its canvas, made anew for another theme only. */
function useChart(points: ChartPoints, pointed: number | null) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const chart = useRef<PointChart | null>(null);
  const content = useRef<PointContent>({ chart: points, pointed });
  const themeKey = useThemeKey();
  useEffect(() => {
    if (!canvas.current?.getContext('2d')) return undefined;
    const made = new Chart(canvas.current, pointChartConfig(content.current, readChartTheme(canvas.current)));
    chart.current = made;
    return () => {
      chart.current = null;
      made.destroy();
    };
  }, [themeKey]);
  useEffect(() => {
    content.current.chart = points;
    if (chart.current) refreshPointChart(chart.current, content.current);
  }, [points]);
  useEffect(() => {
    content.current.pointed = pointed;
    chart.current?.draw();
  }, [pointed]);
  const indexAt = (clientX: number): number | null => {
    const left = canvas.current?.getBoundingClientRect().left;
    if (!chart.current || left === undefined) return null;
    const distances = chart.current.getDatasetMeta(0).data.map(({ x }) => Math.abs(x - (clientX - left)));
    return distances.length === 0 ? null : distances.indexOf(Math.min(...distances));
  };
  return { canvas, indexAt };
}

function wordsOf({ plan, points, current }: ChartPoints, index: number): string {
  const point = points[index];
  if (!point) return 'no point yet';
  const told = [plan.tellY(point.y), deliveredWords(point)].filter((words) => words !== null).join(', ');
  return `${index === current ? 'now, ' : ''}${plan.tellX(point.x)}: ${told}`;
}

function keyTarget(key: string, from: number, last: number): number | null {
  const targets: Record<string, number> = {
    ArrowRight: from + 1,
    ArrowUp: from + 1,
    ArrowLeft: from - 1,
    ArrowDown: from - 1,
    Home: 0,
    End: last,
  };
  const next = targets[key];
  return next === undefined ? null : Math.max(0, Math.min(last, next));
}
