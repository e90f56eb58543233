import type { Chart, ChartConfiguration, Plugin } from 'chart.js';
import { linearScale } from '#frontend/components/chart/chart-scale.ts';
import type { ChartTheme } from '#frontend/components/chart/chart-theme.ts';
import type { ChartPoints } from './what-if-charts.ts';

export type PointChart = Chart<'line', { x: number; y: number }[]>;

/** What a chart shows at present; its plugin looks here each time it draws. */
export interface PointContent {
  chart: ChartPoints;
  /** Index of the point that is read out, or null. */
  pointed: number | null;
}

/** A small chart of one line, with the present value marked. */
export function pointChartConfig(
  content: PointContent,
  theme: ChartTheme,
): ChartConfiguration<'line', { x: number; y: number }[]> {
  const { plan } = content.chart;
  return {
    type: 'line',
    data: {
      datasets: [
        {
          label: plan.title,
          data: pointsOf(content),
          borderColor: theme.tones.accent,
          borderWidth: 2,
          pointRadius: 0,
          tension: 0,
        },
      ],
    },
    options: {
      animation: false,
      responsive: true,
      maintainAspectRatio: false,
      events: [],
      font: theme.font,
      layout: { padding: { top: 6, right: 10 } },
      scales: {
        x: { ...linearScale(theme, plan.xTitle), min: 0, max: lastOf(content) },
        y: { ...linearScale(theme, plan.yTitle), min: 0 },
      },
    },
    plugins: [marks(content, theme)],
  };
}

/** Puts new content into a chart that is there already. */
export function refreshPointChart(chart: PointChart, content: PointContent): void {
  const { plan } = content.chart;
  const [dataset] = chart.data.datasets;
  if (dataset) dataset.data = pointsOf(content);
  const { x, y } = chart.options.scales ?? {};
  Object.assign(x ?? {}, { max: lastOf(content) });
  Object.assign(x?.title ?? {}, { text: plan.xTitle });
  Object.assign(y?.title ?? {}, { text: plan.yTitle });
  chart.update('none');
}

const pointsOf = ({ chart: { plan, points } }: PointContent): { x: number; y: number }[] =>
  points.map(({ x, y }) => ({ x: x * plan.xScale, y }));

const lastOf = ({ chart: { plan, points } }: PointContent): number => (points.at(-1)?.x ?? 1) * plan.xScale;

/** The present value as a filled dot on a dashed line, the one that is read out as a ring on a firm one. */
function marks(content: PointContent, theme: ChartTheme): Plugin<'line'> {
  return {
    id: 'marks',
    afterDatasetsDraw(chart) {
      const { ctx, chartArea } = chart;
      const at = (index: number) => chart.getDatasetMeta(0).data[index];
      const draw = (index: number, dash: number[], isFilled: boolean): void => {
        const point = at(index);
        if (!point) return;
        ctx.beginPath();
        ctx.setLineDash(dash);
        ctx.moveTo(point.x, chartArea.top);
        ctx.lineTo(point.x, chartArea.bottom);
        ctx.stroke();
        ctx.setLineDash([]);
        ctx.beginPath();
        ctx.arc(point.x, point.y, 4, 0, 2 * Math.PI);
        ctx.fillStyle = isFilled ? theme.tones.ink : theme.paper;
        ctx.fill();
        ctx.stroke();
      };
      ctx.save();
      ctx.strokeStyle = theme.tones.ink;
      ctx.lineWidth = 1;
      draw(content.chart.current, [3, 3], true);
      if (content.pointed !== null && content.pointed !== content.chart.current) draw(content.pointed, [], false);
      ctx.restore();
    },
  };
}
