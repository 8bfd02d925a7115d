import type { ReactorSpecification } from '../bed/reactor-specification.js';
import type { RunResult } from '../bed/run-result.js';
import { chartTable } from './charts/chart-table.js';
import { createChartRenderer } from './charts/render-chart.js';

/** PNG pictures of every chart that makes sense for a result, by file name. */
export function drawCharts(
  result: RunResult,
  specification: ReactorSpecification,
): { readonly name: string; readonly content: Uint8Array }[] {
  const render = createChartRenderer();
  return chartTable
    .filter(({ applies }) => applies(result, specification))
    .map(({ fileName, configuration }) => ({
      name: fileName,
      content: render(configuration(result, specification)),
    }));
}
