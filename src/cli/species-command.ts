import { didYouMean } from '../diagnostics/nearest-name.js';
import { visibleText } from '../diagnostics/format-problem.js';
import { propertyCsv, speciesJson, speciesList, speciesReport } from '../output/species-report.js';
import { propertyTable } from '../properties/property-table.js';
import { findLibrarySpecies, librarySpeciesIds } from '../properties/species/library.js';
import {
  allSpeciesFacts,
  searchLibrary,
  speciesFacts,
  type SpeciesFacts,
} from '../properties/species/species-facts.js';
import { parseQuantity } from '../quantities/parse-quantity.js';
import { quantityKinds } from '../quantities/quantity-kinds.js';
import type { ExitStatus } from './exit-status.js';
import { checkTarget, writeResultFolder, type ResultFile } from './result-folder.js';
import { UsageError, type Streams } from './streams.js';
import { uninterrupted } from './uninterrupted.js';

export interface SpeciesOptions {
  /** Id, name, formula or registry number; absent: the whole library. */
  readonly query: string | undefined;
  readonly from: string | undefined;
  readonly to: string | undefined;
  readonly step: string | undefined;
  readonly out: string | undefined;
  readonly json: boolean;
}

const mostRows = 2000;
const drawnPoints = 121;
/** K, where nothing is asked for; cut to what the species' data cover. */
const usualRange = { from: 300, to: 1000, step: 100 } as const;

/** Lists the library, searches it, or shows one species with its properties over temperature. */
export async function speciesCommand(options: SpeciesOptions, streams: Streams): Promise<ExitStatus> {
  const { query } = options;
  const one = query === undefined ? undefined : speciesFacts(query);
  const found = query === undefined ? allSpeciesFacts() : one ? [one] : searchLibrary(query);
  if (found.length === 0) {
    const hint = didYouMean(query!, [...librarySpeciesIds(), ...allSpeciesFacts().map(({ name }) => name)]);
    throw new UsageError(
      `The species library holds nothing called ${query!}${hint === undefined ? '.' : `; ${hint}`}`,
    );
  }
  if (found.length === 1 && query !== undefined) return show(found[0]!, options, streams);
  if (options.out !== undefined) throw new UsageError('--out needs one species; name it by its id.');
  if (options.json) {
    streams.out(
      `${JSON.stringify(
        found.map((species) => speciesJson(species)),
        null,
        2,
      )}\n`,
    );
  } else {
    streams.out(`${speciesList(found, streams.useColour)}\n\n${found.length} species\n`);
  }
  return 0;
}

async function show(species: SpeciesFacts, options: SpeciesOptions, streams: Streams): Promise<ExitStatus> {
  const { out } = options;
  if (out !== undefined) checkTarget(out);
  const record = findLibrarySpecies(species.id)!;
  const properties = propertyTable(record, temperaturesOf(species, options));
  const json = speciesJson(species, properties);
  if (options.json) streams.out(`${JSON.stringify(json, null, 2)}\n`);
  else streams.out(`${speciesReport(species, properties, streams.useColour)}\n`);
  if (out === undefined) return 0;
  const { drawSpeciesCharts } = await import('../output/charts/species-charts.js');
  const files: ResultFile[] = [
    { name: 'properties.csv', content: propertyCsv(properties) },
    ...drawSpeciesCharts(species, propertyTable(record, drawnTemperatures(properties.temperatures))),
  ];
  const names = [...files.map(({ name }) => name), 'summary.json'];
  const summary = { ...json, provenance: { tool: 'bedwright', files: names } };
  files.push({ name: 'summary.json', content: `${JSON.stringify(summary, null, 2)}\n` });
  await uninterrupted(() => writeResultFolder(out, files));
  if (!options.json) streams.out(`\nTable and charts are in ${visibleText(out)}\n`);
  return 0;
}

function temperaturesOf(species: SpeciesFacts, options: SpeciesOptions): number[] {
  const [lowest, highest] = species.temperatureRange;
  const from = options.from === undefined ? Math.max(usualRange.from, lowest) : kelvin('from', options.from);
  const to = options.to === undefined ? Math.min(usualRange.to, highest) : kelvin('to', options.to);
  const step =
    options.step === undefined ? usualRange.step : kelvin('step', options.step, 'temperatureDifference');
  for (const [name, value] of [
    ['from', from],
    ['to', to],
  ] as const) {
    if (value >= lowest && value <= highest) continue;
    throw new UsageError(
      `--${name} ${value} K lies outside the data of ${species.id}, ${lowest} to ${highest} K.`,
    );
  }
  if (!(step > 0) || from > to) throw new UsageError('--from, --to and --step must make a rising range.');
  const count = Math.floor((to - from) / step + 1e-9) + 1;
  if (count > mostRows) throw new UsageError(`The table would have ${count} rows; at most ${mostRows}.`);
  return Array.from({ length: count }, (_, k) => from + k * step);
}

/** From end to end of the table in steps too small to see. */
function drawnTemperatures(table: Float64Array): number[] {
  const [from, to] = [table[0]!, table.at(-1)!];
  return Array.from({ length: drawnPoints }, (_, k) => from + ((to - from) * k) / (drawnPoints - 1));
}

/** A temperature or a difference of temperatures with its unit, in K. */
function kelvin(
  name: string,
  text: string,
  kind: 'temperature' | 'temperatureDifference' = 'temperature',
): number {
  const read = parseQuantity(text, [quantityKinds[kind]], ({ found, expected }) => {
    throw new UsageError(`--${name}: found ${found}; expected ${expected}.`);
  });
  if (!read) throw new Error('a quantity came to nothing without a reported fault');
  return read.value;
}
