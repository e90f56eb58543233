import { useMemo, type KeyboardEvent, type PointerEvent } from 'react';
import type { DekadPoint } from '#common/engine/index.ts';
import { pointAfterKey } from '#frontend/components/chart/point-keys.ts';
import { useChartCanvas } from '#frontend/components/chart/use-chart-canvas.ts';
import { chartConfig, refreshChart } from '../model/chart-config.ts';
import { dekadInWords, valuesInWords, type CurvePicture, type TimeAxis } from '../model/curves.ts';

const DEKADS_PER_YEAR = 36;
const CURVES = { make: chartConfig, refresh: refreshChart };

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
  const data = useMemo(() => ({ picture, time }), [picture, time]);
  const { canvas, chart } = useChartCanvas(CURVES, data, pointed);
  const last = dekads.length - 1;
  const shown = Math.min(pointed ?? last, last);
  const dekad = dekads[shown];

  const handlePointer = (event: PointerEvent): void => {
    const scale = chart.current?.scales['x'];
    const box = canvas.current?.getBoundingClientRect();
    if (!scale || !box) return;
    onPoint(nearest(time.values, scale.getValueForPixel(event.clientX - box.left) ?? 0));
  };
  const handleKey = (event: KeyboardEvent): void => {
    const next = pointAfterKey(event.key, { from: shown, last, page: DEKADS_PER_YEAR });
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
