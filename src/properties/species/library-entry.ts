import type { LibrarySourceKey } from './library-sources.js';

/** How far to trust a value whose source was not read in print: quoted from memory, calculated, or estimated without measurement. */
export type LibraryQuality = 'from memory' | 'computed' | 'estimated';

/** A number, where it comes from, and a caution where it is not a measured value read in its source. */
export type LibraryValue = readonly [value: number, source: LibrarySourceKey, quality?: LibraryQuality];

/** A property as a formula in T, and where it comes from. */
export type LibraryFormula = readonly [text: string, source: LibrarySourceKey];

/** One temperature range of a nine-constant polynomial; it begins where the one before ends. */
export interface LibraryRange {
  /** K */
  readonly highest: number;
  /** Of Cp/R, dimensionless, in T^-2 to T^4 with T in K. */
  readonly coefficients: readonly number[];
  /** K */
  readonly enthalpyConstant: number;
  readonly entropyConstant: number;
}

/** One species as tabulated. SI units except where named; ideal gas, 298.15 K, 1 bar. */
export interface LibraryEntry {
  readonly id: string;
  readonly name: string;
  readonly formula: string;
  /** Of the Chemical Abstracts Service. */
  readonly registryNumber: string;
  /** Atoms per molecule. */
  readonly elements: Readonly<Record<string, number>>;
  /** kg/mol */
  readonly molarMass: LibraryValue;
  readonly thermochemistry: {
    readonly source: LibrarySourceKey;
    readonly quality?: LibraryQuality;
    /** K, below which the underlying data are not to be trusted. */
    readonly lowest: number;
    readonly ranges: readonly LibraryRange[];
  };
  /** J/mol; the polynomials are anchored to it. */
  readonly enthalpyOfFormation: LibraryValue;
  /** J/(mol K) */
  readonly standardEntropy: LibraryValue;
  /** J/(mol K) */
  readonly standardHeatCapacity: LibraryValue;
  /** J/mol, H(298.15 K) - H(0 K). */
  readonly enthalpyAboveZeroKelvin: LibraryValue;
  /** K */
  readonly criticalTemperature: LibraryValue;
  /** Pa */
  readonly criticalPressure: LibraryValue;
  /** m³/mol */
  readonly criticalVolume: LibraryValue;
  readonly acentricFactor: LibraryValue;
  /** K, at one atmosphere. */
  readonly boilingTemperature: LibraryValue;
  /** debye */
  readonly dipoleMoment: LibraryValue;
  /** Diffusion volume of Fuller, Schettler and Giddings, dimensionless. */
  readonly diffusionVolume: LibraryValue;
  /** Of Chung et al. for hydrogen-bonding vapours; absent means 0. */
  readonly associationFactor?: LibraryValue;
  /** Lennard-Jones parameters: diameter in angstrom, well depth over Boltzmann's constant in K. */
  readonly lennardJones?: {
    readonly source: LibrarySourceKey;
    readonly collisionDiameter: number;
    readonly wellDepth: number;
  };
  /** Of the dilute gas as formulas in T, where corresponding states do badly; in the notation of case files. */
  readonly viscosity?: LibraryFormula;
  readonly thermalConductivity?: LibraryFormula;
  readonly cautions?: readonly string[];
}
