/** Species of the library as text, JSON and CSV. */
import Table from 'cli-table3';
import pc from 'picocolors';
import type { PropertyTable } from '../properties/property-table.js';
import type { SpeciesFacts } from '../properties/species/species-facts.js';
import { columnsToCsv } from './profile-csv.js';
import type { Json } from './summary.js';
import { bullet, significant, table, wrap } from './terminal-report.js';

const lineWidth = 100;

/** How a transport property of a pure gas is known, by the key of its method. */
const methodTexts = {
  given: 'given',
  chung:
    'estimate after Chung, Ajlan, Lee & Starling, Ind. Eng. Chem. Res. 27 (1988) 671; 1.5 % non-polar, a few per cent polar, from about 0.7 Tc',
  lennardJones: 'kinetic theory of Chapman and Enskog with the Lennard-Jones constants above',
  chungConductivity:
    'estimate after Chung, Lee & Starling, Ind. Eng. Chem. Fundam. 23 (1984) 8; a few per cent non-polar, 5 to 10 % and more polar',
} as const;

function viscosityOrigin({ viscositySource }: SpeciesFacts, { viscosityMethod }: PropertyTable): string {
  return viscositySource ?? (viscosityMethod ? methodTexts[viscosityMethod] : 'not known');
}

function conductivityOrigin(
  { conductivitySource }: SpeciesFacts,
  { conductivityMethod }: PropertyTable,
): string {
  return conductivitySource ?? (conductivityMethod ? methodTexts[conductivityMethod] : 'not known');
}

/** One line for each species. */
export function speciesList(species: readonly SpeciesFacts[], useColour: boolean): string {
  const colour = pc.createColors(useColour);
  const rows = species.map(({ id, name, formula, registryNumber, molarMass, temperatureRange }) => [
    id,
    name,
    formula,
    registryNumber,
    significant(molarMass * 1e3, 5),
    `${temperatureRange[0]}–${temperatureRange[1]}`,
  ]);
  return plainTable(
    ['id', 'name', 'formula', 'CAS number', 'g/mol', 'valid, K'].map((head) => colour.bold(head)),
    rows,
    ['left', 'left', 'left', 'left', 'right', 'right'],
  );
}

/** One species: its values with their sources, cautions, and its properties over temperature. */
export function speciesReport(species: SpeciesFacts, properties: PropertyTable, useColour: boolean): string {
  const colour = pc.createColors(useColour);
  const sources = [...new Set(species.facts.map(({ source }) => source))];
  const rows = species.facts.map(({ label, shown, unit, source, quality }): readonly [string, string] => [
    label,
    `${significant(shown, 7)}${unit === '' ? '' : ` ${unit}`}  [${sources.indexOf(source) + 1}]${quality ? ` ${quality}` : ''}`,
  ]);
  const [lowest, highest] = species.temperatureRange;
  return [
    colour.bold(`${species.id}: ${species.name}, ${species.formula}, CAS ${species.registryNumber}`),
    table(rows),
    ['Sources', ...sources.map((source, index) => bullet(`[${index + 1}] ${source}`))].join('\n'),
    wrap(
      `Heat capacity, enthalpy and entropy of the ideal gas from ${lowest} to ${highest} K: ${species.polynomialSource}.`,
      lineWidth,
    ),
    propertyText(properties, colour.bold),
    [
      'Viscosity and conductivity of the dilute gas',
      bullet(`viscosity: ${viscosityOrigin(species, properties)}`),
      bullet(`conductivity: ${conductivityOrigin(species, properties)}`),
    ].join('\n'),
    ...(species.cautions.length > 0
      ? [['Cautions', ...species.cautions.map((text) => colour.yellow(bullet(text)))].join('\n')]
      : []),
  ].join('\n\n');
}

function propertyText(properties: PropertyTable, emphasise: (text: string) => string): string {
  const { temperatures } = properties;
  const cells = (values: Float64Array, factor: number, digits: number): string[] =>
    Array.from(values, (value) => (Number.isFinite(value) ? (value * factor).toFixed(digits) : '–'));
  const columns: readonly (readonly [head: string, cells: readonly string[]])[] = [
    ['T, K', cells(temperatures, 1, temperatures.every(Number.isInteger) ? 0 : 2)],
    ['Cp, J/(mol K)', cells(properties.heatCapacities, 1, 2)],
    ['H-H298, kJ/mol', cells(properties.enthalpies, 1e-3, 3)],
    ['S, J/(mol K)', cells(properties.entropies, 1, 2)],
    ['G, kJ/mol', cells(properties.gibbsEnergies, 1e-3, 2)],
    ['viscosity, µPa s', cells(properties.viscosities, 1e6, 2)],
    ['conductivity, mW/(m K)', cells(properties.thermalConductivities, 1e3, 1)],
  ];
  return plainTable(
    columns.map(([head]) => emphasise(head)),
    Array.from(temperatures, (_t, row) => columns.map(([, values]) => values[row]!)),
    columns.map(() => 'right'),
  );
}

/** Columns with heads and no rules. */
function plainTable(
  head: readonly string[],
  rows: readonly (readonly string[])[],
  alignments: readonly ('left' | 'right')[],
): string {
  const none = '';
  const output = new Table({
    head: [...head],
    colAligns: [...alignments],
    chars: {
      top: none,
      'top-mid': none,
      'top-left': none,
      'top-right': none,
      bottom: none,
      'bottom-mid': none,
      'bottom-left': none,
      'bottom-right': none,
      left: none,
      'left-mid': none,
      mid: none,
      'mid-mid': none,
      right: none,
      'right-mid': none,
      middle: '  ',
    },
    style: { 'padding-left': 0, 'padding-right': 0, head: [], border: [] },
  });
  output.push(...rows.map((row) => [...row]));
  return output
    .toString()
    .split('\n')
    .map((line) => `  ${line.trimEnd()}`)
    .join('\n');
}

/** For machines; units stand in the keys. */
export function speciesJson(species: SpeciesFacts, properties?: PropertyTable): Record<string, Json> {
  const numbers = (values: Float64Array): Json =>
    Array.from(values, (value) => (Number.isFinite(value) ? value : null));
  return {
    id: species.id,
    name: species.name,
    formula: species.formula,
    cas_number: species.registryNumber,
    temperature_range_K: [...species.temperatureRange],
    polynomial_source: species.polynomialSource,
    values: Object.fromEntries(
      species.facts.map(({ key, value, source, quality }) => [
        key,
        { value, source, quality: quality ?? null },
      ]),
    ),
    cautions: [...species.cautions],
    ...(properties && {
      viscosity_source: viscosityOrigin(species, properties),
      thermal_conductivity_source: conductivityOrigin(species, properties),
      properties: Object.fromEntries(
        propertyColumns(properties).map(({ header, values }) => [header, numbers(values)]),
      ),
    }),
  };
}

/** `properties.csv`: a row per temperature. */
export function propertyCsv(properties: PropertyTable): string {
  return columnsToCsv(propertyColumns(properties));
}

function propertyColumns(
  properties: PropertyTable,
): { readonly header: string; readonly values: Float64Array }[] {
  return [
    { header: 'T_K', values: properties.temperatures },
    { header: 'heat_capacity_J_mol_K', values: properties.heatCapacities },
    { header: 'enthalpy_above_298_K_J_mol', values: properties.enthalpies },
    { header: 'entropy_J_mol_K', values: properties.entropies },
    { header: 'gibbs_energy_J_mol', values: properties.gibbsEnergies },
    { header: 'viscosity_Pa_s', values: properties.viscosities },
    { header: 'thermal_conductivity_W_m_K', values: properties.thermalConductivities },
  ];
}
