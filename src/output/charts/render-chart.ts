/** Chart.js configurations to PNG. The canvas comes with its own font, so that text shows on a machine that has none. */
import { createRequire } from 'node:module';
import { GlobalFonts } from 'canvas';
import type { ChartConfiguration } from 'chart.js';
import { ChartJSNodeCanvas } from 'chartjs-node-canvas';
import type { Point } from './line-chart.js';
import { chartSize, fontFamily, paper, pixelRatio } from './theme.js';

export type ChartRenderer = (configuration: ChartConfiguration<'line', Point[]>) => Uint8Array;

/**
 * A renderer for any number of charts of the house's size.
 *
 * @throws Error when the font cannot be registered
 */
export function createChartRenderer(): ChartRenderer {
  const fonts = createRequire(import.meta.url).resolve('dejavu-fonts-ttf/ttf/DejaVuSans.ttf');
  for (const file of [fonts, fonts.replace('DejaVuSans.ttf', 'DejaVuSans-Bold.ttf')]) {
    if (!GlobalFonts.registerFromPath(file, fontFamily))
      throw new Error(`the font ${file} cannot be registered`);
  }
  const canvas = new ChartJSNodeCanvas({ ...chartSize, backgroundColour: paper });
  return (configuration) =>
    canvas.renderToBufferSync({
      ...configuration,
      options: { ...configuration.options, devicePixelRatio: pixelRatio },
    });
}
