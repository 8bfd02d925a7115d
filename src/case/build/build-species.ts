import type { Assumption } from '../../bed/reactor-specification.js';
import { didYouMean } from '../../diagnostics/nearest-name.js';
import { molarMassOf, parseChemicalFormula } from '../../properties/chemical-formula.js';
import type { HeatCapacityData, NasaRange, SpeciesRecord } from '../../properties/species-record.js';
import { findLibrarySpecies, librarySpeciesIds } from '../../properties/species/library.js';
import { keyProblemAt, locate, problemAt, reportAt, type CaseContext } from '../case-context.js';
import { readSection } from '../read-section.js';
import { speciesSchema, type HeatCapacityInput, type SpeciesInput } from '../schema/species-schema.js';

const identifier = /^[A-Za-z][A-Za-z0-9_]*$/;
/** Given and computed molar masses may differ by this much before it is worth a word. */
const molarMassTolerance = 1e-3;

/** Species of a case; a record that could not be read leaves `undefined` in `records`, so that its id is still known. */
export interface SpeciesSection {
  readonly ids: readonly string[];
  readonly records: readonly (SpeciesRecord | undefined)[];
}

export function isIdentifier(text: string): boolean {
  return identifier.test(text) && text.length <= 60;
}

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
    const input = readSection(context, ['species', id], speciesSchema);
    records.push(input === undefined ? undefined : toRecord(context, id, input, assumptions));
  }
  return { ids, records };
}

function toRecord(
  context: CaseContext,
  id: string,
  input: SpeciesInput,
  assumptions: Assumption[],
): SpeciesRecord | undefined {
  if (input === 'library') {
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
  const path = ['species', id];
  const elements =
    input.formula === undefined
      ? undefined
      : parseChemicalFormula(input.formula, reportAt(context, [...path, 'formula']));
  if (input.formula !== undefined && !elements) return undefined;
  const fromFormula = elements && molarMassOf(elements);
  const molarMass = input.molar_mass ?? fromFormula;
  if (molarMass === undefined) {
    problemAt(context, path, {
      code: 'missing_property',
      found: `no \`molar_mass\` and no \`formula\` of ${id}`,
      expected: 'one of them: the mass balance needs the molar mass',
    });
    return undefined;
  }
  if (fromFormula !== undefined && input.molar_mass === undefined) {
    assumptions.push({
      about: `species.${id}.molar_mass`,
      statement: `molar mass of ${id} computed from its formula, ${Number((fromFormula * 1000).toPrecision(6))} g/mol`,
      source: 'IUPAC abridged standard atomic weights (2021)',
    });
  } else if (fromFormula !== undefined && Math.abs(molarMass / fromFormula - 1) > molarMassTolerance) {
    problemAt(context, [...path, 'molar_mass'], {
      code: 'inconsistent',
      severity: 'warning',
      found: `a molar mass that differs from that of \`${input.formula!}\` (${Number((fromFormula * 1000).toPrecision(6))} g/mol)`,
      expected: 'the two to agree; the given one is used, and mass will not close',
    });
  }
  return {
    id,
    molarMass,
    source: 'own record in the case',
    ...(input.name !== undefined && { name: input.name }),
    ...(elements && { elements }),
    ...(input.heat_of_formation !== undefined && { enthalpyOfFormation: input.heat_of_formation }),
    ...(input.entropy !== undefined && { standardEntropy: input.entropy }),
    ...(input.heat_capacity && { heatCapacity: toHeatCapacity(input.heat_capacity) }),
  };
}

function toHeatCapacity(input: HeatCapacityInput): HeatCapacityData {
  if (input.kind === 'constant') return { kind: 'constant', value: input.value };
  if (input.kind === 'formula') return { kind: 'formula', formula: input.formula };
  const isNine = input.ranges[0]!.coefficients.length === 9;
  return {
    kind: 'nasa',
    exponents: isNine ? [-2, -1, 0, 1, 2, 3, 4] : [0, 1, 2, 3, 4],
    ranges: input.ranges.map(({ from, to, coefficients }): NasaRange => {
      const [enthalpyConstant, entropyConstant] = coefficients.slice(-2) as [number, number];
      return {
        lowest: from,
        highest: to,
        coefficients: coefficients.slice(0, -2),
        enthalpyConstant,
        entropyConstant,
      };
    }),
  };
}
