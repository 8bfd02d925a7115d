/** Every chart of a run as a record: what it is called, when it makes sense, and how it follows from the result. Pure data out. */
import type { ChartConfiguration } from 'chart.js';
import type { ReactorSpecification } from '../../bed/reactor-specification.js';
import type { PelletProfile, RunResult } from '../../bed/run-result.js';
import { significant } from '../terminal-report.js';
import { lineChart, pointsOf, type Point, type Series } from './line-chart.js';

export interface ChartRecord {
  readonly fileName: string;
  readonly applies: (result: RunResult, specification: ReactorSpecification) => boolean;
  readonly configuration: (
    result: RunResult,
    specification: ReactorSpecification,
  ) => ChartConfiguration<'line', Point[]>;
}

const alongBed = 'Position along the bed / m';
/** A pellet hotter than the gas by less than this, relative to the temperature, would draw one line over another. */
const visibleDifference = 5e-4;
/** K; flatter pellets get no temperature chart. */
const visibleRise = 0.05;
/** Mole fractions below this are not worth a line. */
const smallestFraction = 1e-6;
/** Fractions that spread over more than this get a logarithmic axis. */
const widestLinearSpread = 30;

export const chartTable: readonly ChartRecord[] = [
  {
    fileName: 'temperature.png',
    applies: (_result, { heat }) => heat.mode !== 'isothermal',
    configuration: temperatureChart,
  },
  {
    fileName: 'conversion.png',
    applies: ({ conversions }) => conversions.length > 0,
    configuration: conversionChart,
  },
  { fileName: 'mole-fractions.png', applies: () => true, configuration: fractionChart },
  {
    fileName: 'pressure.png',
    applies: (_result, { bed }) => bed.pressureDrop.kind !== 'none',
    configuration: pressureChart,
  },
  {
    fileName: 'effectiveness.png',
    applies: (_result, { pellet }) => pellet.method.kind === 'full' || pellet.method.kind === 'thiele',
    configuration: effectivenessChart,
  },
  {
    fileName: 'pellet-interior.png',
    applies: ({ pellets }, { pellet }) => pellet.method.kind === 'full' && pellets.length > 0,
    configuration: interiorChart,
  },
  {
    fileName: 'pellet-temperature.png',
    applies: ({ pellets }, { pellet }) =>
      pellet.method.kind === 'full' &&
      pellets.some(
        ({ temperatures, bulkTemperature }) => Math.abs(temperatures[0]! - bulkTemperature) > visibleRise,
      ),
    configuration: interiorTemperatureChart,
  },
];

function temperatureChart(
  result: RunResult,
  { title, limits }: ReactorSpecification,
): ChartConfiguration<'line', Point[]> {
  const { positions, temperatures, centreTemperatures, coolantTemperatures } = result.profile;
  const isPelletHotter = centreTemperatures.some(
    (centre, k) => Math.abs(centre - temperatures[k]!) > visibleDifference * temperatures[k]!,
  );
  const { temperature, position } = result.peak;
  const isInside = position > 0 && position < positions.at(-1)!;
  const gas = pointsOf(positions, temperatures);
  // The peak lies between rows of the profile: drawn through it, the mark sits on the line.
  if (isInside)
    gas.splice(
      gas.findIndex(({ x }) => x > position),
      0,
      { x: position, y: temperature },
    );
  return lineChart({
    title: 'Temperature along the bed',
    subtitle: title,
    xTitle: alongBed,
    yTitle: 'Temperature / K',
    series: [
      { label: 'gas', points: gas, style: 0 },
      ...(isPelletHotter
        ? [{ label: 'pellet centre', points: pointsOf(positions, centreTemperatures), style: 1 }]
        : []),
      ...(coolantTemperatures
        ? [{ label: 'coolant', points: pointsOf(positions, coolantTemperatures), style: 2 }]
        : []),
    ],
    limits:
      limits.temperature === undefined
        ? []
        : [{ value: limits.temperature, label: `limit you set, ${significant(limits.temperature, 4)} K` }],
    marks: isInside
      ? [
          {
            x: position,
            y: temperature,
            label: `${temperature.toFixed(1)} K at ${significant(position, 3)} m`,
          },
        ]
      : [],
  });
}

function conversionChart(
  result: RunResult,
  { title, targets }: ReactorSpecification,
): ChartConfiguration<'line', Point[]> {
  const { positions, molarFlows } = result.profile;
  const series = result.conversions.map(({ speciesIndex }): Series => {
    const flows = molarFlows[speciesIndex]!;
    return {
      label: result.speciesIds[speciesIndex]!,
      points: pointsOf(positions, flows, -100 / flows[0]!, 100),
    };
  });
  const equilibrium = (result.equilibrium?.conversions ?? []).flatMap(
    ({ speciesIndex, values }): Series[] => {
      const style = result.conversions.findIndex((entry) => entry.speciesIndex === speciesIndex);
      return style < 0
        ? []
        : [
            {
              label: `${result.speciesIds[speciesIndex]!} at equilibrium`,
              points: pointsOf(positions, values, 100),
              style,
              isReference: true,
            },
          ];
    },
  );
  return lineChart({
    title: 'Conversion along the bed',
    subtitle: title,
    xTitle: alongBed,
    yTitle: 'Conversion / %',
    yRange: { lowest: 0 },
    series: [...series, ...equilibrium],
    limits: targets.map(({ speciesIndex, conversion }) => ({
      value: 100 * conversion,
      label: `target for ${result.speciesIds[speciesIndex]!}, ${significant(100 * conversion, 4)} %`,
    })),
  });
}

function fractionChart(
  result: RunResult,
  { title, reactions }: ReactorSpecification,
): ChartConfiguration<'line', Point[]> {
  const { positions, moleFractions } = result.profile;
  const isActive = (i: number): boolean => reactions.some(({ stoichiometry }) => stoichiometry[i] !== 0);
  const shown = result.speciesIds.flatMap((id, i) => {
    const largest = Math.max(...moleFractions[i]!);
    return isActive(i) && largest > smallestFraction ? [{ id, i, largest }] : [];
  });
  const inert = result.speciesIds.filter((_id, i) => !isActive(i));
  const spread =
    Math.max(...shown.map(({ largest }) => largest)) / Math.min(...shown.map(({ largest }) => largest));
  const isLogarithmic = spread > widestLinearSpread;
  const floor = Math.min(...shown.map(({ largest }) => largest)) * 0.03;
  const note = inert.length > 0 ? `Without inert ${inert.join(', ')}. ` : '';
  return lineChart({
    title: 'Mole fractions along the bed',
    subtitle: `${note}${title}`,
    xTitle: alongBed,
    yTitle: 'Mole fraction',
    isLogarithmic,
    yRange: isLogarithmic ? { lowest: floor } : { lowest: 0 },
    series: shown.map(({ id, i }) => ({
      label: id,
      points: pointsOf(positions, moleFractions[i]!).map(({ x, y }) => ({
        x,
        y: isLogarithmic && y !== null && y < floor ? null : y,
      })),
    })),
  });
}

function pressureChart(
  result: RunResult,
  { title, limits, feed }: ReactorSpecification,
): ChartConfiguration<'line', Point[]> {
  const limit = limits.pressureDrop;
  const lowest = limit === undefined ? undefined : (feed.pressure - limit) / 1e5;
  const { positions, pressures } = result.profile;
  const outlet = pressures.at(-1)! / 1e5;
  // A limit far below the profile would flatten it.
  const isNear = lowest !== undefined && lowest > outlet - 2 * (feed.pressure / 1e5 - outlet) - 1e-9;
  return lineChart({
    title: 'Pressure along the bed',
    subtitle: title,
    xTitle: alongBed,
    yTitle: 'Pressure / bar',
    series: [{ label: 'gas', points: pointsOf(positions, pressures, 1e-5) }],
    limits: isNear
      ? [{ value: lowest, label: `limit you set, drop of ${significant(limit! / 1e5, 3)} bar` }]
      : [],
  });
}

function effectivenessChart(
  result: RunResult,
  { title }: ReactorSpecification,
): ChartConfiguration<'line', Point[]> {
  const { positions, effectiveness } = result.profile;
  return lineChart({
    title: 'Effectiveness along the bed: averaged rate over rate at bulk conditions',
    subtitle: title,
    xTitle: alongBed,
    yTitle: 'Effectiveness',
    yRange: { lowest: 0, highest: effectivenessCeiling(effectiveness) },
    series: result.reactionNames.map((label, j) => ({
      label,
      points: pointsOf(positions, effectiveness[j]!),
    })),
  });
}

/**
 * Top of the axis. A product that burns inside the pellet before it reaches the bulk has an effectiveness without bound near the inlet: the axis
 * ends at what most of the bed shows.
 */
function effectivenessCeiling(columns: readonly Float64Array[]): number {
  const values = columns
    .flatMap((column) => [...column].filter((value) => Number.isFinite(value)))
    .sort((a, b) => a - b);
  const usual = values[Math.floor(0.9 * (values.length - 1))] ?? 1;
  return Math.max(1, Math.ceil(usual * 5) / 5);
}

function interiorChart(
  result: RunResult,
  { title, reactions }: ReactorSpecification,
): ChartConfiguration<'line', Point[]> {
  const key = keySpecies(result, reactions);
  const id = result.speciesIds[key]!;
  return lineChart({
    title: `Inside the pellet: ${id} over its bulk concentration`,
    subtitle: title,
    xTitle: radiusTitle,
    yTitle: `Concentration of ${id} / bulk concentration`,
    yRange: { lowest: 0 },
    series: shownPellets(result).map((pellet, style) => ({
      label: pelletLabel(pellet),
      points: pointsOf(
        pellet.relativeRadii,
        pellet.concentrations[key]!,
        1 / pellet.bulkConcentrations[key]!,
      ),
      style,
    })),
  });
}

function interiorTemperatureChart(
  result: RunResult,
  { title }: ReactorSpecification,
): ChartConfiguration<'line', Point[]> {
  return lineChart({
    title: 'Inside the pellet: temperature above that of the gas',
    subtitle: title,
    xTitle: radiusTitle,
    yTitle: 'Temperature difference to the gas / K',
    series: shownPellets(result).map((pellet, style) => ({
      label: pelletLabel(pellet),
      points: pointsOf(pellet.relativeRadii, pellet.temperatures, 1, -pellet.bulkTemperature),
      style,
    })),
  });
}

const radiusTitle = 'Relative radius, centre to surface';

function shownPellets({ pellets }: RunResult): readonly PelletProfile[] {
  return pellets.filter(({ label }) => label !== 'requested');
}

function pelletLabel({ label, position }: PelletProfile): string {
  return `${placeWords[label]}, ${significant(position, 3)} m`;
}

const placeWords: Readonly<Record<PelletProfile['label'], string>> = {
  inlet: 'inlet',
  hottest: 'hottest',
  outlet: 'outlet',
  requested: 'at',
};

/** The fed reactant that falls most on its way into the pellet at the inlet. */
function keySpecies(result: RunResult, reactions: ReactorSpecification['reactions']): number {
  const inlet = result.pellets[0]!;
  let key = 0;
  let deepest = Infinity;
  result.speciesIds.forEach((_id, i) => {
    const bulk = inlet.bulkConcentrations[i]!;
    if (!(bulk > 0) || !reactions.some(({ stoichiometry }) => stoichiometry[i]! < 0)) return;
    const left = inlet.concentrations[i]![0]! / bulk;
    if (left < deepest) {
      deepest = left;
      key = i;
    }
  });
  return key;
}
