import { filmCorrelations, type FilmCorrelation } from '../pellet/film/film-correlations.js';
import type { Balances } from './balances.js';
import type { ReactorModel } from './reactor-model.js';
import type { RunResult } from './run-result.js';
import type { Tabulation } from './tabulate.js';

/** Balances that close worse than this deserve a word; rounding leaves about 1e-15. */
const closureAlarm = 1e-9;
/** Molar masses typed to five digits leave this much; more means that one of them is wrong. */
const massAlarm = 1e-5;
/** Range of the friction law in Rem; below 1 the inertial term is negligible and the law stays right. @source Ergun (1952) */
const frictionRange = { lowest: 1, highest: 2500 };
/** Tube over pellet diameter below which the wall disturbs flow. @source common practice */
const narrowTube = 10;

/** What the run shows that its reader should know, in sentences; the gravest first. */
export function bedWarnings(
  model: ReactorModel,
  balances: Balances,
  { profile, reynoldsNumbers }: Tabulation,
  closure: RunResult['balances'],
  peakTemperature: number,
): string[] {
  const { specification } = model;
  const { bed, limits, feed, pellet } = specification;
  const warnings: string[] = [];
  if (limits.temperature !== undefined && peakTemperature > limits.temperature) {
    warnings.push(
      `The temperature reaches ${peakTemperature.toFixed(1)} K, above the limit you set (${limits.temperature.toFixed(1)} K).`,
    );
  }
  const pressureDrop = feed.pressure - profile.pressures.at(-1)!;
  if (limits.pressureDrop !== undefined && pressureDrop > limits.pressureDrop) {
    warnings.push(
      `The pressure drop is ${bar(pressureDrop)}, above the limit you set (${bar(limits.pressureDrop)}).`,
    );
  }
  if (closure.mass > massAlarm) {
    warnings.push(
      `Mass closes only to ${closure.mass.toExponential(1)}: molar masses and stoichiometry do not quite agree; check the species records.`,
    );
  }
  for (const [element, off] of Object.entries(closure.elements)) {
    if (off > closureAlarm) warnings.push(`Element ${element} closes only to ${off.toExponential(1)}.`);
  }
  if (closure.energy > closureAlarm) {
    warnings.push(`Energy closes only to ${closure.energy.toExponential(1)}.`);
  }
  const hottest = largestNumber(profile.centreTemperatures);
  if (hottest > model.dataRange.highest) {
    warnings.push(
      `Pellets reach ${hottest.toFixed(1)} K inside, above the ${model.dataRange.highest} K up to which the data of ${model.dataRange.highestSpecies!} hold.`,
    );
  }
  const ratio = bed.tubeDiameter / pellet.geometry.sauterDiameter;
  if (ratio < narrowTube) {
    warnings.push(
      `The tube is ${ratio.toFixed(1)} pellet diameters wide; below about ${narrowTube} gas passes along the wall and the friction law and plug flow are less sure (common practice).`,
    );
  }
  if (balances.pressureIndex >= 0) {
    const outside = reynoldsOutside(reynoldsNumbers);
    if (outside) warnings.push(outside);
  }
  const { film } = pellet.transport;
  if (film.kind === 'correlation') {
    const outside = filmOutside(filmCorrelations[film.name], reynoldsNumbers, model.solidFraction);
    if (outside) warnings.push(outside);
  }
  return warnings;
}

function reynoldsOutside(numbers: Float64Array): string | undefined {
  const lowest = Math.min(...numbers);
  const highest = Math.max(...numbers);
  if (lowest >= frictionRange.lowest && highest <= frictionRange.highest) return undefined;
  return `The packed-bed Reynolds number runs from ${lowest.toPrecision(3)} to ${highest.toPrecision(3)}; the friction law was fitted for ${frictionRange.lowest} to ${frictionRange.highest} (Ergun 1952).`;
}

function filmOutside(
  { name, reynoldsRange, source }: FilmCorrelation,
  reynoldsNumbers: Float64Array,
  solidFraction: number,
): string | undefined {
  const lowest = Math.min(...reynoldsNumbers) * solidFraction;
  const highest = Math.max(...reynoldsNumbers) * solidFraction;
  if (lowest >= reynoldsRange[0] && highest <= reynoldsRange[1]) return undefined;
  const slow =
    lowest < 10
      ? '; at low Reynolds numbers dispersion and uneven flow make real films slower than any such correlation says'
      : '';
  return `The Reynolds number of the pellets runs from ${lowest.toPrecision(3)} to ${highest.toPrecision(3)}; the film correlation of ${name} was fitted for ${reynoldsRange[0]} to ${reynoldsRange[1]} (${source})${slow}.`;
}

/** Leaves out what is no number: pellets without a state. */
function largestNumber(values: Float64Array): number {
  return values.reduce((largest, value) => (value > largest ? value : largest), -Infinity);
}

function bar(pressure: number): string {
  return `${Number((pressure / 1e5).toPrecision(3))} bar`;
}
