/** Charts of one species over temperature. */
import type { PropertyTable } from '../../properties/property-table.js';
import type { SpeciesFacts } from '../../properties/species/species-facts.js';
import { lineChart, pointsOf } from './line-chart.js';
import { createChartRenderer } from './render-chart.js';

interface SpeciesChart {
  readonly name: string;
  readonly configuration: ReturnType<typeof lineChart>;
}

/** Heat capacity, viscosity and conductivity over temperature, as data; what is not known has no chart. */
export function speciesCharts(species: SpeciesFacts, properties: PropertyTable): SpeciesChart[] {
  const subtitle = `${species.name}, ${species.formula}; dilute gas`;
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
      configuration: lineChart({
        title,
        subtitle,
        xTitle: 'Temperature / K',
        yTitle,
        series: [{ label: species.id, points: pointsOf(properties.temperatures, values, factor) }],
      }),
    }));
}

/** The same as PNG pictures, by file name. */
export function drawSpeciesCharts(
  species: SpeciesFacts,
  properties: PropertyTable,
): { readonly name: string; readonly content: Uint8Array }[] {
  const render = createChartRenderer();
  return speciesCharts(species, properties).map(({ name, configuration }) => ({
    name,
    content: render(configuration),
  }));
}
