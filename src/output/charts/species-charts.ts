/** Charts of one species over temperature. */
import type { PropertyTable } from '../../properties/property-table.js';
import type { SpeciesFacts } from '../../properties/species/species-facts.js';
import { lineChart, pointsOf } from './line-chart.js';
import { createChartRenderer } from './render-chart.js';

const overTemperature = 'Temperature / K';

/** PNG pictures by file name. */
export function drawSpeciesCharts(
  species: SpeciesFacts,
  properties: PropertyTable,
): { readonly name: string; readonly content: Uint8Array }[] {
  const { temperatures } = properties;
  const subtitle = `${species.name}, ${species.formula}; dilute gas`;
  const render = createChartRenderer();
  const charts = [
    {
      name: 'heat-capacity.png',
      values: properties.heatCapacities,
      factor: 1,
      title: `Heat capacity of ${species.id}`,
      yTitle: 'Heat capacity / J/(mol K)',
    },
    {
      name: 'viscosity.png',
      values: properties.viscosities,
      factor: 1e6,
      title: `Viscosity of ${species.id}`,
      yTitle: 'Viscosity / µPa s',
    },
    {
      name: 'thermal-conductivity.png',
      values: properties.thermalConductivities,
      factor: 1e3,
      title: `Thermal conductivity of ${species.id}`,
      yTitle: 'Thermal conductivity / mW/(m K)',
    },
  ];
  return charts
    .filter(({ values }) => values.some(Number.isFinite))
    .map(({ name, values, factor, title, yTitle }) => ({
      name,
      content: render(
        lineChart({
          title,
          subtitle,
          xTitle: overTemperature,
          yTitle,
          series: [{ label: species.id, points: pointsOf(temperatures, values, factor) }],
        }),
      ),
    }));
}
