import type { Plugin } from 'chart.js';
import { fontFamily, ink, limitColour, paper } from './theme.js';

/** Name of a line, written at its right end. */
export interface LineLabel {
  readonly text: string;
  readonly colour: string;
  /** Value at the line's last point; null: the line has none and gets no label. */
  readonly y: number | null;
}

/** Words at a point: a marked one with a ring, or those of a limit on its line. */
export interface PointLabel {
  readonly x: number;
  readonly y: number;
  readonly label: string;
  readonly kind: 'mark' | 'limit';
}

const lineHeight = 17;
/** From a marked point to its words. */
const markOffset = { x: 42, y: 44 } as const;

/** Direct labels in place of a legend: at line ends, moved apart where they would overlap, and at marked points. */
export function labelsPlugin(lines: readonly LineLabel[], points: readonly PointLabel[]): Plugin<'line'> {
  return {
    id: 'directLabels',
    afterDatasetsDraw(chart) {
      const drawn = chart as unknown as DrawnChart;
      drawLineLabels(drawn, lines);
      points.forEach((point) => drawPointLabel(drawn, point));
    },
  };
}

/** The part of a canvas context that labels need; Chart.js's own type is the browser's, which is not among our libraries. */
interface DrawingContext {
  font: string;
  fillStyle: string;
  strokeStyle: string;
  lineWidth: number;
  globalAlpha: number;
  textAlign: 'left' | 'right';
  textBaseline: 'middle' | 'bottom';
  save: () => void;
  restore: () => void;
  beginPath: () => void;
  moveTo: (x: number, y: number) => void;
  lineTo: (x: number, y: number) => void;
  arc: (x: number, y: number, radius: number, start: number, end: number) => void;
  stroke: () => void;
  fillRect: (x: number, y: number, width: number, height: number) => void;
  fillText: (text: string, x: number, y: number) => void;
  measureText: (text: string) => { readonly width: number };
}

/** A chart as labels see it. */
interface DrawnChart {
  readonly ctx: DrawingContext;
  readonly chartArea: { readonly top: number; readonly bottom: number; readonly right: number };
  readonly scales: Readonly<Record<string, { getPixelForValue: (value: number) => number }>>;
}

function drawLineLabels(chart: DrawnChart, lines: readonly LineLabel[]): void {
  const { ctx, chartArea, scales } = chart;
  const placed = lines
    .flatMap(({ text, colour, y }) =>
      y === null ? [] : [{ text, colour, at: scales['y']!.getPixelForValue(y) }],
    )
    .sort((a, b) => a.at - b.at);
  const heights = spread(
    placed.map(({ at }) => Math.min(Math.max(at, chartArea.top), chartArea.bottom)),
    chartArea.top,
    chartArea.bottom,
  );
  ctx.save();
  ctx.font = `13px "${fontFamily}"`;
  ctx.textBaseline = 'middle';
  ctx.textAlign = 'left';
  placed.forEach(({ text, colour, at }, k) => {
    ctx.strokeStyle = colour;
    ctx.lineWidth = 1;
    ctx.beginPath();
    ctx.moveTo(chartArea.right + 1, at);
    ctx.lineTo(chartArea.right + 9, heights[k]!);
    ctx.stroke();
    ctx.fillStyle = colour;
    ctx.fillText(text, chartArea.right + 13, heights[k]!);
  });
  ctx.restore();
}

/** Heights at least a line apart, each as near to where it belongs as the others allow. */
export function spread(wanted: readonly number[], top: number, bottom: number): number[] {
  const heights = [...wanted];
  for (let k = 1; k < heights.length; k++) heights[k] = Math.max(heights[k]!, heights[k - 1]! + lineHeight);
  const excess = heights.length > 0 ? Math.max(0, heights.at(-1)! - bottom) : 0;
  if (excess > 0) {
    heights[heights.length - 1] = bottom;
    for (let k = heights.length - 2; k >= 0; k--)
      heights[k] = Math.min(heights[k]!, heights[k + 1]! - lineHeight);
  }
  return heights.map((height) => Math.max(height, top));
}

function drawPointLabel(chart: DrawnChart, { x, y, label, kind }: PointLabel): void {
  const { ctx, chartArea, scales } = chart;
  const [left, up] = [scales['x']!.getPixelForValue(x), scales['y']!.getPixelForValue(y)];
  ctx.save();
  ctx.font = `12.5px "${fontFamily}"`;
  ctx.fillStyle = kind === 'limit' ? limitColour : ink;
  if (kind === 'limit') {
    ctx.textAlign = 'right';
    ctx.textBaseline = 'bottom';
    ctx.fillText(label, chartArea.right - 6, up - 4);
  } else {
    ctx.strokeStyle = ink;
    ctx.lineWidth = 1.6;
    ctx.beginPath();
    ctx.arc(left, up, 5, 0, 2 * Math.PI);
    ctx.stroke();
    // The words stand clear of the lines, above and to the right where there is room, with a thin leader.
    const width = ctx.measureText(label).width;
    const side = left + markOffset.x + width < chartArea.right ? 1 : -1;
    const textUp = up - markOffset.y > chartArea.top + lineHeight / 2 ? up - markOffset.y : up + markOffset.y;
    const textLeft = left + side * markOffset.x;
    ctx.lineWidth = 0.8;
    ctx.beginPath();
    ctx.moveTo(left + side * 4, up + Math.sign(textUp - up) * 4);
    ctx.lineTo(textLeft - side * 3, textUp);
    ctx.stroke();
    ctx.textAlign = side > 0 ? 'left' : 'right';
    ctx.textBaseline = 'middle';
    ctx.fillStyle = paper;
    ctx.globalAlpha = 0.8;
    ctx.fillRect(side > 0 ? textLeft - 2 : textLeft - width - 2, textUp - 9, width + 4, 18);
    ctx.globalAlpha = 1;
    ctx.fillStyle = ink;
    ctx.fillText(label, textLeft, textUp);
  }
  ctx.restore();
}
