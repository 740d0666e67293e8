/**
 * The curves of one lane, drawn by Chart.js on a canvas that is exactly the plot: scales hidden, nothing animated, no points.
 *
 * Ticks, limits, letters and the playhead lie in layers of their own above and below, so that this is drawn once a result
 * and not once a frame.
 */
import { Chart, LinearScale, LineController, LineElement, PointElement, type ChartDataset } from 'chart.js';

Chart.register(LineController, LineElement, PointElement, LinearScale);

export interface CurveLine {
  /** Cycle time (s) and value, already thinned to what the pixels can show. */
  time: readonly number[];
  value: readonly number[];
  colour: string;
  dash: readonly number[];
  width: number;
}

export interface CurvePicture {
  /** Size of the plot, CSS pixels. */
  width: number;
  height: number;
  /** Window of the time axis (s), and values at the lower and upper edge. */
  from: number;
  to: number;
  low: number;
  high: number;
  lines: readonly CurveLine[];
}

export interface CurveChart {
  draw(picture: CurvePicture): void;
  destroy(): void;
}

type Dataset = ChartDataset<'line', { x: number; y: number }[]>;

/** Room beyond the plot in which a line at its very edge keeps its full width, px. */
const CLIP = 2;
/** Least pixels of the canvas a pixel of the page: a saved picture is drawn at this size. */
const SHARP = 2;

export function createCurveChart(canvas: HTMLCanvasElement): CurveChart {
  const chart = new Chart<'line', { x: number; y: number }[]>(canvas, {
    type: 'line',
    data: { datasets: [] },
    options: {
      responsive: false,
      maintainAspectRatio: false,
      animation: false,
      events: [],
      parsing: false,
      normalized: true,
      clip: CLIP,
      layout: { padding: 0, autoPadding: false },
      datasets: { line: { pointRadius: 0, pointHitRadius: 0, borderJoinStyle: 'round', spanGaps: false } },
      scales: { x: { type: 'linear', display: false }, y: { type: 'linear', display: false } },
    },
  });
  return {
    draw({ width, height, from, to, low, high, lines }) {
      chart.data.datasets = lines.map(dataset);
      Object.assign(chart.options.scales?.x ?? {}, { min: from, max: to });
      Object.assign(chart.options.scales?.y ?? {}, { min: low, max: high });
      chart.options.devicePixelRatio = Math.max(SHARP, window.devicePixelRatio);
      chart.resize(width, height);
      chart.update('none');
    },
    destroy: () => chart.destroy(),
  };
}

const dataset = ({ time, value, colour, dash, width }: CurveLine): Dataset => ({
  data: time.map((x, i) => ({ x, y: value[i] })),
  borderColor: colour,
  borderDash: [...dash],
  borderWidth: width,
});
