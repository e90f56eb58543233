import type { Chart, ChartConfiguration, Plugin } from 'chart.js';
import { linearScale } from '#frontend/components/chart/chart-scale.ts';
import type { ChartTheme } from '#frontend/components/chart/chart-theme.ts';
import type { CurvePicture, TimeAxis } from './curves.ts';

export type LineChart = ChartConfiguration<'line', { x: number; y: number }[]>;

/** What a chart shows at present. Its plugins look here each time they draw, so that a new forecast needs no new chart. */
export interface ChartContent {
  picture: CurvePicture;
  time: TimeAxis;
  /** Dekad that is read out, or null. */
  pointed: number | null;
}

/** A chart of one picture: lines told apart by dashes, named at their ends, an axis for each quantity with its unit. */
export function chartConfig(content: ChartContent, theme: ChartTheme): LineChart {
  const { picture, time } = content;
  return {
    type: 'line',
    data: {
      datasets: picture.curves.map((curve, i) => ({
        label: curve.label,
        data: pointsOf(content, i),
        borderColor: theme.tones[curve.style.tone],
        borderWidth: curve.style.widthPx,
        borderDash: [...curve.style.dash],
        pointRadius: 0,
        tension: 0,
      })),
    },
    options: {
      animation: false,
      responsive: true,
      maintainAspectRatio: false,
      parsing: false,
      normalized: true,
      events: [],
      font: theme.font,
      layout: { padding: { top: 6, right: picture.curves.length > 1 ? 94 : 10 } },
      scales: {
        x: { ...linearScale(theme, time.title), min: 0, max: time.max },
        y: { ...linearScale(theme, picture.unit), min: picture.min, max: picture.max },
      },
    },
    plugins: [endLabels(content, theme), axisMarks(content, theme), cursor(content, theme)],
  };
}

/** Puts new content into a chart that is there already. */
export function refreshChart(chart: Chart<'line', { x: number; y: number }[]>, content: ChartContent): void {
  const { picture, time } = content;
  chart.data.datasets.forEach((dataset, i) => (dataset.data = pointsOf(content, i)));
  const { x, y } = chart.options.scales ?? {};
  Object.assign(x ?? {}, { max: time.max });
  Object.assign(x?.title ?? {}, { text: time.title });
  Object.assign(y ?? {}, { min: picture.min, max: picture.max });
  chart.update('none');
}

function pointsOf({ picture, time }: ChartContent, curve: number): { x: number; y: number }[] {
  return (picture.curves[curve]?.values ?? []).map((y, i) => ({ x: time.values[i] ?? 0, y }));
}

/** Names of the lines at their right ends, moved apart where they would overlap. */
function endLabels(content: ChartContent, theme: ChartTheme): Plugin<'line'> {
  return {
    id: 'end-labels',
    afterDatasetsDraw(chart) {
      const { picture } = content;
      if (picture.curves.length < 2) return;
      const { ctx, chartArea } = chart;
      const labels = picture.curves
        .map((curve, i) => ({ curve, y: chart.getDatasetMeta(i).data.at(-1)?.y ?? chartArea.bottom }))
        .sort((a, b) => a.y - b.y);
      const lineHeight = theme.font.size + 3;
      let nextFree = chartArea.top;
      ctx.save();
      ctx.font = `600 ${theme.font.size}px ${theme.font.family}`;
      ctx.textBaseline = 'middle';
      labels.forEach(({ curve, y }, i) => {
        const room = chartArea.bottom - (labels.length - 1 - i) * lineHeight;
        const at = Math.min(Math.max(y, nextFree), room);
        nextFree = at + lineHeight;
        ctx.fillStyle = theme.tones[curve.style.tone];
        ctx.fillText(curve.label, chartArea.right + 8, at);
      });
      ctx.restore();
    },
  };
}

/** A break in a vertical axis that does not begin at zero, and a firm line at zero where values go below it. */
function axisMarks(content: ChartContent, theme: ChartTheme): Plugin<'line'> {
  return {
    id: 'axis-marks',
    beforeDatasetsDraw(chart) {
      const { picture } = content;
      const { ctx, chartArea, scales } = chart;
      ctx.save();
      ctx.strokeStyle = theme.axis;
      ctx.lineWidth = 1;
      if (picture.startsAt !== null) {
        ctx.fillStyle = theme.paper;
        ctx.fillRect(chartArea.left - 5, chartArea.bottom - 14, 10, 6);
        ctx.beginPath();
        for (const offset of [8, 14]) {
          ctx.moveTo(chartArea.left - 5, chartArea.bottom - offset + 2);
          ctx.lineTo(chartArea.left + 5, chartArea.bottom - offset - 2);
        }
        ctx.stroke();
      }
      const zero = scales['y']?.getPixelForValue(0);
      if (picture.min < 0 && zero !== undefined) {
        ctx.beginPath();
        ctx.moveTo(chartArea.left, zero);
        ctx.lineTo(chartArea.right, zero);
        ctx.stroke();
      }
      ctx.restore();
    },
  };
}

/** A line at the dekad that is read out, with a dot on each curve. */
function cursor(content: ChartContent, theme: ChartTheme): Plugin<'line'> {
  return {
    id: 'cursor',
    afterDatasetsDraw(chart) {
      const { pointed: index, time } = content;
      const value = index === null ? undefined : time.values[index];
      const x = value === undefined ? undefined : chart.scales['x']?.getPixelForValue(value);
      if (index === null || x === undefined) return;
      const { ctx, chartArea } = chart;
      ctx.save();
      ctx.strokeStyle = theme.tones.ink;
      ctx.lineWidth = 1;
      ctx.beginPath();
      ctx.moveTo(x, chartArea.top);
      ctx.lineTo(x, chartArea.bottom);
      ctx.stroke();
      ctx.fillStyle = theme.paper;
      ctx.lineWidth = 2;
      chart.data.datasets.forEach((_, i) => {
        const y = chart.getDatasetMeta(i).data[index]?.y;
        if (y === undefined) return;
        ctx.beginPath();
        ctx.arc(x, y, 3.5, 0, 2 * Math.PI);
        ctx.fill();
        ctx.stroke();
      });
      ctx.restore();
    },
  };
}
