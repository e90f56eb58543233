import { Chart, LinearScale, LineController, LineElement, PointElement } from 'chart.js';
import { useEffect, useRef, type KeyboardEvent, type PointerEvent } from 'react';
import type { DekadPoint } from '#common/engine/index.ts';
import { readChartTheme } from '#frontend/components/chart/chart-theme.ts';
import { useThemeKey } from '#frontend/hooks/use-theme-key.ts';
import { chartConfig, refreshChart, type ChartContent } from '../model/chart-config.ts';
import { dekadInWords, valuesInWords, type CurvePicture, type TimeAxis } from '../model/curves.ts';

Chart.register(LinearScale, LineController, LineElement, PointElement);

const DEKADS_PER_YEAR = 36;

interface Props {
  picture: CurvePicture;
  time: TimeAxis;
  dekads: readonly DekadPoint[];
  /** Dekad that is read out in all charts together, or null. */
  pointed: number | null;
  onPoint: (index: number | null) => void;
}

/** One chart; pointer and arrow keys read out its values at a dekad. */
export function CurveChart({ picture, time, dekads, pointed, onPoint }: Props) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const chart = useRef<Chart<'line', { x: number; y: number }[]> | null>(null);
  const content = useRef<ChartContent>({ picture, time, pointed });
  const themeKey = useThemeKey();
  const last = dekads.length - 1;
  const shown = Math.min(pointed ?? last, last);
  const dekad = dekads[shown];

  useEffect(() => {
    if (!canvas.current?.getContext('2d')) return undefined;
    const made = new Chart(canvas.current, chartConfig(content.current, readChartTheme(canvas.current)));
    chart.current = made;
    // A canvas does not wait for web fonts.
    void document.fonts?.ready.then(() => {
      if (chart.current === made) made.update('none');
    });
    return () => {
      chart.current = null;
      made.destroy();
    };
  }, [themeKey]);

  useEffect(() => {
    Object.assign(content.current, { picture, time });
    if (chart.current) refreshChart(chart.current, content.current);
  }, [picture, time]);

  useEffect(() => {
    content.current.pointed = pointed;
    chart.current?.draw();
  }, [pointed]);

  const handlePointer = (event: PointerEvent): void => {
    const scale = chart.current?.scales['x'];
    const box = canvas.current?.getBoundingClientRect();
    if (!scale || !box) return;
    onPoint(nearest(time.values, scale.getValueForPixel(event.clientX - box.left) ?? 0));
  };
  const handleKey = (event: KeyboardEvent): void => {
    const next = keyTarget(event.key, shown, last);
    if (next === null) return;
    event.preventDefault();
    onPoint(next);
  };

  return (
    <figure>
      <figcaption className="text-small flex min-h-6 flex-wrap items-baseline gap-x-2.5">
        <span className="font-extrabold">{picture.title}</span>
        {picture.startsAt !== null && <span className="text-muted">axis begins at {picture.startsAt}</span>}
        <span className="text-muted ml-auto tabular-nums max-sm:min-h-[2.5rem] max-sm:basis-full" aria-hidden="true">
          {dekad ? `${dekadInWords(dekad)}: ${valuesInWords(picture, shown)}` : ''}
        </span>
      </figcaption>
      <div
        role="slider"
        tabIndex={0}
        aria-label={`${picture.title} over life`}
        aria-valuemin={0}
        aria-valuemax={last}
        aria-valuenow={shown}
        aria-valuetext={dekad ? `${dekadInWords(dekad)}: ${valuesInWords(picture, shown)}` : ''}
        className="relative h-48 overflow-x-clip"
        onPointerMove={handlePointer}
        onPointerDown={handlePointer}
        onPointerLeave={() => onPoint(null)}
        onBlur={() => onPoint(null)}
        onKeyDown={handleKey}
      >
        <canvas ref={canvas} aria-hidden="true" />
      </div>
    </figure>
  );
}

function nearest(values: readonly number[], wanted: number): number {
  let low = 0;
  let high = values.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((values[middle] ?? 0) < wanted) low = middle + 1;
    else high = middle;
  }
  return low;
}

function keyTarget(key: string, from: number, last: number): number | null {
  const targets: Record<string, number> = {
    ArrowRight: from + 1,
    ArrowUp: from + 1,
    ArrowLeft: from - 1,
    ArrowDown: from - 1,
    PageUp: from + DEKADS_PER_YEAR,
    PageDown: from - DEKADS_PER_YEAR,
    Home: 0,
    End: last,
  };
  const next = targets[key];
  return next === undefined ? null : Math.max(0, Math.min(last, next));
}
