/** The library as something to look at: every value with its unit, its source and how far to trust it. */
import { libraryEntries } from './library-data.js';
import type { LibraryEntry, LibraryValue } from './library-entry.js';
import { librarySources } from './library-sources.js';

/** One value of a species. */
export interface SpeciesFact {
  /** Machine-readable, the unit in it: `critical_pressure_Pa`. */
  readonly key: string;
  readonly label: string;
  readonly value: number;
  /** As printed beside `shown`. */
  readonly unit: string;
  /** Value in the unit printed. */
  readonly shown: number;
  readonly source: string;
  /** `from memory`, `computed` or `estimated`; absent for a value read in its source. */
  readonly quality?: string;
}

export interface SpeciesFacts {
  readonly id: string;
  readonly name: string;
  readonly formula: string;
  /** Of the Chemical Abstracts Service. */
  readonly registryNumber: string;
  /** kg/mol */
  readonly molarMass: number;
  /** K, between which the polynomials hold. */
  readonly temperatureRange: readonly [number, number];
  readonly polynomialSource: string;
  readonly facts: readonly SpeciesFact[];
  /** Of the formulas for the dilute gas; undefined where the library has none and they are estimated. */
  readonly viscositySource: string | undefined;
  readonly conductivitySource: string | undefined;
  readonly cautions: readonly string[];
}

type ValueField = {
  [Field in keyof LibraryEntry]-?: NonNullable<LibraryEntry[Field]> extends LibraryValue ? Field : never;
}[keyof LibraryEntry];

/** Field, key, label, unit shown and what a value in SI is multiplied with for it. */
const rows: readonly (readonly [ValueField, string, string, string, number])[] = [
  ['molarMass', 'molar_mass_kg_mol', 'molar mass', 'g/mol', 1e3],
  ['enthalpyOfFormation', 'heat_of_formation_J_mol', 'heat of formation, 298.15 K', 'kJ/mol', 1e-3],
  ['standardEntropy', 'entropy_J_mol_K', 'entropy, 298.15 K, 1 bar', 'J/(mol K)', 1],
  ['standardHeatCapacity', 'heat_capacity_J_mol_K', 'heat capacity, 298.15 K', 'J/(mol K)', 1],
  ['enthalpyAboveZeroKelvin', 'enthalpy_above_0_K_J_mol', 'enthalpy above 0 K, 298.15 K', 'kJ/mol', 1e-3],
  ['criticalTemperature', 'critical_temperature_K', 'critical temperature', 'K', 1],
  ['criticalPressure', 'critical_pressure_Pa', 'critical pressure', 'bar', 1e-5],
  ['criticalVolume', 'critical_volume_m3_mol', 'critical volume', 'cm³/mol', 1e6],
  ['acentricFactor', 'acentric_factor', 'acentric factor', '', 1],
  ['boilingTemperature', 'boiling_temperature_K', 'normal boiling point', 'K', 1],
  ['dipoleMoment', 'dipole_moment_debye', 'dipole moment', 'debye', 1],
  ['diffusionVolume', 'diffusion_volume', 'diffusion volume', '', 1],
  ['associationFactor', 'association_factor', 'association factor', '', 1],
];

/** Every species of the library, in the order of its table. */
export function allSpeciesFacts(): SpeciesFacts[] {
  return libraryEntries.map(toFacts);
}

/** @param id - exact; undefined for every other text */
export function speciesFacts(id: string): SpeciesFacts | undefined {
  const entry = libraryEntries.find((candidate) => candidate.id === id);
  return entry && toFacts(entry);
}

/**
 * Species that a text may mean: those whose id, formula or registry number it is, whatever the case of its letters; where there are none,
 * those whose name or id holds it.
 */
export function searchLibrary(text: string): SpeciesFacts[] {
  const wanted = text.trim().toLowerCase();
  if (wanted === '') return [];
  const exact = libraryEntries.filter(({ id, formula, registryNumber, name }) =>
    [id, formula, registryNumber, name].some((value) => value.toLowerCase() === wanted),
  );
  const matches =
    exact.length > 0
      ? exact
      : libraryEntries.filter(({ id, name }) =>
          [id, name].some((value) => value.toLowerCase().includes(wanted)),
        );
  return matches.map(toFacts);
}

function toFacts(entry: LibraryEntry): SpeciesFacts {
  const { thermochemistry, lennardJones } = entry;
  const facts = rows.flatMap(([field, key, label, unit, factor]): SpeciesFact[] => {
    const stated = entry[field];
    if (!stated) return [];
    const [value, source, quality] = stated;
    return [
      {
        key,
        label,
        value,
        unit,
        shown: value * factor,
        source: librarySources[source],
        ...(quality && { quality }),
      },
    ];
  });
  if (lennardJones) {
    const source = librarySources[lennardJones.source];
    const { collisionDiameter, wellDepth } = lennardJones;
    facts.push(
      {
        key: 'collision_diameter_angstrom',
        label: 'Lennard-Jones diameter',
        value: collisionDiameter,
        unit: 'Å',
        shown: collisionDiameter,
        source,
      },
      {
        key: 'well_depth_K',
        label: 'Lennard-Jones well depth over k',
        value: wellDepth,
        unit: 'K',
        shown: wellDepth,
        source,
      },
    );
  }
  const quality = thermochemistry.quality ? ` (${thermochemistry.quality})` : '';
  return {
    id: entry.id,
    name: entry.name,
    formula: entry.formula,
    registryNumber: entry.registryNumber,
    molarMass: entry.molarMass[0],
    temperatureRange: [thermochemistry.lowest, thermochemistry.ranges.at(-1)!.highest],
    polynomialSource: `${librarySources[thermochemistry.source]}${quality}`,
    facts,
    viscositySource: entry.viscosity && librarySources[entry.viscosity[1]],
    conductivitySource: entry.thermalConductivity && librarySources[entry.thermalConductivity[1]],
    cautions: entry.cautions ?? [],
  };
}
