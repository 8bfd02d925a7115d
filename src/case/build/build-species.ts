import type { Assumption } from '../../bed/reactor-specification.js';
import { didYouMean } from '../../diagnostics/nearest-name.js';
import { molarMassOf, parseChemicalFormula } from '../../properties/chemical-formula.js';
import type { SpeciesRecord } from '../../properties/species-record.js';
import { findLibrarySpecies, librarySpeciesIds } from '../../properties/species/library.js';
import { keyProblemAt, locate, plainValue, problemAt, reportAt, type CaseContext } from '../case-context.js';
import { readKeys } from '../read-section.js';
import { describeValue } from '../schema/leaves.js';
import { speciesRecordSchema } from '../schema/species-schema.js';
import { buildHeatCapacity, compareWithPolynomial } from './build-heat-capacity.js';

/** `source` of a record that the case itself gives. */
export const ownRecordSource = 'own record in the case';

const identifier = /^[A-Za-z][A-Za-z0-9_]*$/;
/** Given and computed molar masses may differ by this much before it is worth a word. */
const molarMassTolerance = 1e-3;

/** Pellet and bed are dense in the species; far fewer make a model that anyone can check. */
const mostSpecies = 200;

/** Species of a case; a record that could not be read leaves `undefined` in `records`, so that its id is still known. */
export interface SpeciesSection {
  readonly ids: readonly string[];
  readonly records: readonly (SpeciesRecord | undefined)[];
}

/** Whether a text can name a species, a reaction or a constant. */
export function isIdentifier(text: string): boolean {
  return identifier.test(text) && text.length <= 60;
}

/** Reads the section `species`; undefined where there is none or it is no map. */
export function buildSpecies(context: CaseContext, assumptions: Assumption[]): SpeciesSection | undefined {
  const { node, isExact } = locate(context.root, ['species']);
  if (!isExact) return undefined;
  if (node.kind !== 'map' || node.entries.size === 0) {
    problemAt(context, ['species'], {
      code: 'wrong_type',
      found: node.kind === 'map' ? 'no species' : 'no map',
      expected: 'species by id: `{CO: library, A: {formula: C8H10}}`',
    });
    return undefined;
  }
  const ids: string[] = [];
  const records: (SpeciesRecord | undefined)[] = [];
  if (node.entries.size > mostSpecies) {
    problemAt(context, ['species'], {
      code: 'out_of_range',
      found: `${node.entries.size} species`,
      expected: `at most ${mostSpecies}`,
    });
    return undefined;
  }
  for (const id of node.entries.keys()) {
    if (!isIdentifier(id)) {
      keyProblemAt(context, ['species', id], {
        code: 'bad_identifier',
        found: `\`${id}\` as the id of a species`,
        expected: 'a letter, then letters, digits and underscores',
      });
      continue;
    }
    ids.push(id);
    records.push(buildRecord(context, id, assumptions));
  }
  return { ids, records };
}

function buildRecord(context: CaseContext, id: string, assumptions: Assumption[]): SpeciesRecord | undefined {
  const path = ['species', id];
  const { node } = locate(context.root, path);
  if (node.kind === 'map') return ownRecord(context, id, assumptions);
  if (node.kind === 'scalar' && node.value === 'library') return libraryRecord(context, id, assumptions);
  problemAt(context, path, {
    code: 'wrong_value',
    found: describeValue(plainValue(node)),
    expected: '`library`, or a record such as `{formula: C8H10, molar_mass: 106.17 g/mol}`',
  });
  return undefined;
}

function libraryRecord(
  context: CaseContext,
  id: string,
  assumptions: Assumption[],
): SpeciesRecord | undefined {
  const record = findLibrarySpecies(id);
  if (record) {
    assumptions.push({
      about: `species.${id}`,
      statement: `data of ${id} from the species library`,
      source: record.source,
    });
    return record;
  }
  const mend = didYouMean(id, librarySpeciesIds());
  problemAt(context, ['species', id], {
    code: 'unknown_name',
    found: `\`${id}\`, which the species library does not hold`,
    expected: 'an id of the library, or an own record with `formula` or `molar_mass`',
    ...(mend !== undefined && { mend }),
  });
  return undefined;
}

function ownRecord(context: CaseContext, id: string, assumptions: Assumption[]): SpeciesRecord | undefined {
  const path = ['species', id];
  const reading = readKeys(context, path, speciesRecordSchema);
  if (!reading) return undefined;
  const { values, isGiven } = reading;
  const { formula, name, heat_of_formation, entropy, heat_capacity } = values;
  const elements =
    formula === undefined
      ? undefined
      : parseChemicalFormula(formula, reportAt(context, [...path, 'formula']));
  const molarMass = resolveMolarMass(
    context,
    id,
    { formula, elements, given: values.molar_mass },
    assumptions,
  );
  if (molarMass === undefined && !isGiven('molar_mass') && !isGiven('formula')) {
    problemAt(context, path, {
      code: 'missing_property',
      found: `no \`molar_mass\` and no \`formula\` of ${id}`,
      expected: 'one of them: the mass balance needs the molar mass',
    });
  }
  const heatCapacity = heat_capacity && buildHeatCapacity(context, path, heat_capacity);
  compareWithPolynomial(context, path, heatCapacity, { enthalpy: heat_of_formation, entropy });
  const isSound =
    reading.isSound && !(formula !== undefined && !elements) && !(heat_capacity && !heatCapacity);
  if (!isSound || molarMass === undefined) return undefined;
  return {
    id,
    molarMass,
    source: ownRecordSource,
    ...(name !== undefined && { name }),
    ...(elements && { elements }),
    ...(heat_of_formation !== undefined && { enthalpyOfFormation: heat_of_formation }),
    ...(entropy !== undefined && { standardEntropy: entropy }),
    ...(heatCapacity && { heatCapacity }),
  };
}

/** kg/mol; the given one where there is one, compared with that of the formula. */
function resolveMolarMass(
  context: CaseContext,
  id: string,
  known: {
    readonly formula: string | undefined;
    readonly elements: Readonly<Record<string, number>> | undefined;
    readonly given: number | undefined;
  },
  assumptions: Assumption[],
): number | undefined {
  const { formula, elements, given } = known;
  const computed = elements && molarMassOf(elements);
  if (computed === undefined) return given;
  const words = `${Number((computed * 1000).toPrecision(6))} g/mol`;
  if (given === undefined) {
    assumptions.push({
      about: `species.${id}.molar_mass`,
      statement: `molar mass of ${id} computed from its formula, ${words}`,
      source: 'IUPAC abridged standard atomic weights (2021)',
    });
    return computed;
  }
  if (Math.abs(given / computed - 1) > molarMassTolerance) {
    problemAt(context, ['species', id, 'molar_mass'], {
      code: 'inconsistent',
      severity: 'warning',
      found: `a molar mass that differs from that of \`${formula!}\` (${words})`,
      expected: 'the two to agree; the given one is used, and mass will not close',
    });
  }
  return given;
}
