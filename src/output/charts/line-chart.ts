/** From series of points to a Chart.js configuration in the house's look: the one place that knows how our charts are laid out. */
import type { ChartConfiguration, ScaleOptionsByType } from 'chart.js';
import { visibleText } from '../../diagnostics/format-problem.js';
import { labelsPlugin, type LineLabel, type PointLabel } from './labels-plugin.js';
import { faintInk, fontFamily, gridColour, ink, limitColour, lineStyle } from './theme.js';

export interface Point {
  readonly x: number;
  /** null: no value there, the line has a gap. */
  readonly y: number | null;
}

export interface Series {
  readonly label: string;
  readonly points: readonly Point[];
  /** Index of the line style; the order of the series where absent. */
  readonly style?: number;
  /** Drawn thin and dashed: what a line is compared with. */
  readonly isReference?: boolean;
}

export interface LineChart {
  readonly title: string;
  readonly subtitle: string;
  readonly xTitle: string;
  readonly yTitle: string;
  readonly series: readonly Series[];
  readonly isLogarithmic?: boolean;
  readonly yRange?: { readonly lowest?: number; readonly highest?: number };
  /** Horizontal lines that the user set, with their words. */
  readonly limits?: readonly { readonly value: number; readonly label: string }[];
  readonly marks?: readonly { readonly x: number; readonly y: number; readonly label: string }[];
}

const longestSubtitle = 100;

export function lineChart(chart: LineChart): ChartConfiguration<'line', Point[]> {
  const xs = chart.series.flatMap(({ points }) => points.map(({ x }) => x));
  const [lowestX, highestX] = [Math.min(...xs), Math.max(...xs)];
  const limits = chart.limits ?? [];
  const lineLabels: LineLabel[] = chart.series.map(({ label, points, style }, index) => {
    const last = points.findLast(({ y }) => y !== null);
    return { text: label, colour: lineStyle(style ?? index).colour, y: last?.y ?? null };
  });
  const pointLabels: PointLabel[] = [
    ...(chart.marks ?? []).map((mark) => ({ ...mark, kind: 'mark' as const })),
    ...limits.map(({ value, label }) => ({ x: lowestX, y: value, label, kind: 'limit' as const })),
  ];
  return {
    type: 'line',
    data: {
      datasets: [
        ...chart.series.map(({ label, points, style, isReference }, index) => ({
          label,
          data: [...points],
          borderColor: lineStyle(style ?? index).colour,
          borderDash: isReference ? [5, 4] : [...lineStyle(style ?? index).dash],
          borderWidth: isReference ? 1.2 : 2.2,
          pointRadius: 0,
          tension: 0,
          spanGaps: false,
        })),
        ...limits.map(({ value, label }) => ({
          label,
          data: [
            { x: lowestX, y: value },
            { x: highestX, y: value },
          ],
          borderColor: limitColour,
          borderDash: [2, 3],
          borderWidth: 1.4,
          pointRadius: 0,
        })),
      ],
    },
    options: {
      animation: false,
      responsive: false,
      parsing: false,
      normalized: true,
      layout: { padding: { top: 14, right: labelRoom(lineLabels), bottom: 10, left: 10 } },
      scales: {
        x: { type: 'linear', min: lowestX, max: highestX, ...axis(chart.xTitle) },
        y: {
          type: chart.isLogarithmic ? 'logarithmic' : 'linear',
          ...(chart.yRange?.lowest !== undefined && { min: chart.yRange.lowest }),
          ...(chart.yRange?.highest !== undefined && { max: chart.yRange.highest }),
          ...(chart.isLogarithmic && { afterBuildTicks: keepDecades }),
          grace: chart.isLogarithmic || chart.yRange?.highest !== undefined ? 0 : '6%',
          ...axis(chart.yTitle, chart.isLogarithmic),
        },
      },
      plugins: {
        legend: { display: false },
        tooltip: { enabled: false },
        title: {
          display: true,
          text: chart.title,
          align: 'start',
          color: ink,
          font: { family: fontFamily, size: 17, weight: 'bold' },
          padding: { top: 0, bottom: 4 },
        },
        subtitle: {
          display: true,
          text: clip(visibleText(chart.subtitle), longestSubtitle),
          align: 'start',
          color: faintInk,
          font: { family: fontFamily, size: 12.5 },
          padding: { top: 0, bottom: 14 },
        },
      },
    },
    plugins: [labelsPlugin(lineLabels, pointLabels)],
  };
}

/** Points of a column against positions; NaN becomes a gap. */
export function pointsOf(
  positions: ArrayLike<number>,
  values: ArrayLike<number>,
  scale = 1,
  offset = 0,
): Point[] {
  return Array.from(positions, (x, k) => {
    const y = values[k]! * scale + offset;
    return { x, y: Number.isFinite(y) ? y : null };
  });
}

export function clip(text: string, longest: number): string {
  return text.length > longest ? `${text.slice(0, longest - 1)}…` : text;
}

function axis(title: string, isLogarithmic = false): Partial<ScaleOptionsByType<'linear'>> {
  const ticks = {
    color: ink,
    font: { family: fontFamily, size: 12.5 },
    maxTicksLimit: 9,
    // Plain decimals, and powers of ten alone on a logarithmic axis.
    callback: (value: number | string) => tickText(Number(value), isLogarithmic),
  };
  return {
    title: {
      display: true,
      text: title,
      color: ink,
      font: { family: fontFamily, size: 13.5 },
      padding: 8,
    },
    grid: { color: gridColour, lineWidth: 1 },
    border: { color: faintInk },
    ticks,
  } as unknown as Partial<ScaleOptionsByType<'linear'>>;
}

/** Ticks at powers of ten alone. */
function keepDecades(scale: { min: number; max: number; ticks: { value: number }[] }): void {
  const [first, last] = [Math.ceil(Math.log10(scale.min) - 1e-9), Math.floor(Math.log10(scale.max) + 1e-9)];
  scale.ticks = Array.from({ length: Math.max(0, last - first + 1) }, (_, k) => ({
    value: 10 ** (first + k),
  }));
}

function tickText(value: number, isLogarithmic: boolean): string {
  if (isLogarithmic) {
    const exponent = Math.log10(value);
    if (Math.abs(exponent - Math.round(exponent)) > 1e-9) return '';
    return value >= 1e-3 && value < 1e4 ? String(Number(value.toPrecision(3))) : `1e${Math.round(exponent)}`;
  }
  if (value === 0) return '0';
  const magnitude = Math.abs(value);
  if (magnitude >= 1e5 || magnitude < 1e-4) return value.toExponential(1);
  return String(Number(value.toPrecision(6)));
}

/** Width that the longest label at a line's end needs. */
function labelRoom(labels: readonly LineLabel[]): number {
  const longest = Math.max(0, ...labels.map(({ text }) => text.length));
  return Math.min(230, 22 + 7.6 * longest);
}
