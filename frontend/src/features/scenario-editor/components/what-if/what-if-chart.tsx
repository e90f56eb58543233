import { useMemo, useState, type KeyboardEvent, type PointerEvent } from 'react';
import { pointAfterKey } from '#frontend/components/chart/point-keys.ts';
import { useChartCanvas } from '#frontend/components/chart/use-chart-canvas.ts';
import {
  pointChartConfig,
  refreshPointChart,
} from '#frontend/features/scenario-editor/model/what-if/what-if-chart-config.ts';
import { deliveredWords, type ChartPoints } from '#frontend/features/scenario-editor/model/what-if/what-if-charts.ts';

const POINTS = { make: pointChartConfig, refresh: refreshPointChart };

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
    const next = pointAfterKey(event.key, { from: shown, last });
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

/** The chart on its canvas, and which point lies nearest to a place on it. */
function useChart(points: ChartPoints, pointed: number | null) {
  const data = useMemo(() => ({ chart: points }), [points]);
  const { canvas, chart } = useChartCanvas(POINTS, data, pointed);
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
