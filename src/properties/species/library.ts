import { parseFormula } from '../../expressions/parse-formula.js';
import type { FluidProperty } from '../fluid-property.js';
import type { SpeciesRecord } from '../species-record.js';
import { libraryEntries } from './library-data.js';
import type { LibraryEntry, LibraryFormula } from './library-entry.js';
import { librarySources } from './library-sources.js';

/** Powers of T in the nine-constant form. @source McBride, Zehe & Gordon, NASA/TP-2002-211556 (2002), eq. 1 */
const nineConstantExponents = [-2, -1, 0, 1, 2, 3, 4] as const;

/** One debye, C m. @source 1e-18 esu cm; 1e-21/c C m with the SI speed of light, rounded */
const debye = 3.33564e-30;

/** m, by definition. */
const angstrom = 1e-10;

const entries: ReadonlyMap<string, LibraryEntry> = new Map(libraryEntries.map((entry) => [entry.id, entry]));

/** Ids of all species in the library, in the order of its table. */
export function librarySpeciesIds(): readonly string[] {
  return libraryEntries.map((entry) => entry.id);
}

/**
 * One species of the library, in SI.
 *
 * @param id - exact, case counts: `CO`, `o_xylene`
 * @returns undefined for every other text
 */
export function findLibrarySpecies(id: string): SpeciesRecord | undefined {
  const entry = entries.get(id);
  return entry && toSpeciesRecord(entry);
}

function toSpeciesRecord(entry: LibraryEntry): SpeciesRecord {
  const { thermochemistry } = entry;
  const lowests = [
    thermochemistry.lowest,
    ...thermochemistry.ranges.slice(0, -1).map((range) => range.highest),
  ];
  return {
    id: entry.id,
    name: entry.name,
    molarMass: entry.molarMass[0],
    elements: entry.elements,
    heatCapacity: {
      kind: 'nasa',
      exponents: nineConstantExponents,
      ranges: thermochemistry.ranges.map((range, index) => ({ ...range, lowest: lowests[index]! })),
    },
    enthalpyOfFormation: entry.enthalpyOfFormation[0],
    standardEntropy: entry.standardEntropy[0],
    criticalTemperature: entry.criticalTemperature[0],
    criticalPressure: entry.criticalPressure[0],
    criticalVolume: entry.criticalVolume[0],
    acentricFactor: entry.acentricFactor[0],
    dipoleMoment: entry.dipoleMoment[0] * debye,
    diffusionVolume: entry.diffusionVolume[0],
    ...(entry.associationFactor && { associationFactor: entry.associationFactor[0] }),
    ...(entry.lennardJones && {
      lennardJones: {
        collisionDiameter: entry.lennardJones.collisionDiameter * angstrom,
        wellDepth: entry.lennardJones.wellDepth,
      },
    }),
    ...(entry.viscosity && { viscosity: toFormula(entry.viscosity) }),
    ...(entry.thermalConductivity && { thermalConductivity: toFormula(entry.thermalConductivity) }),
    source: describeSource(entry),
  };
}

function toFormula([text]: LibraryFormula): FluidProperty {
  const formula = parseFormula(
    text,
    { constants: new Map(), speciesIds: [], allowsTemperature: true, allowsPressure: false },
    ({ found }) => {
      throw new Error(`the species library has a formula at fault: ${found}`);
    },
  );
  return { kind: 'formula', formula: formula! };
}

/** One line: the polynomials' source, and the heat of formation's where it is another. */
function describeSource({ thermochemistry, enthalpyOfFormation }: LibraryEntry): string {
  const quality = thermochemistry.quality ? ` (${thermochemistry.quality})` : '';
  const polynomials = `${librarySources[thermochemistry.source]}${quality}`;
  const [, source, formationQuality] = enthalpyOfFormation;
  if (source === thermochemistry.source) return polynomials;
  const formation = `${librarySources[source]}${formationQuality ? ` (${formationQuality})` : ''}`;
  return `${polynomials}; heat of formation: ${formation}`;
}
