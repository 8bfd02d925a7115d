import type { CheckedFormula } from '../expressions/expression.js';
import type { FluidProperty } from './fluid-property.js';

/** One temperature range of a NASA polynomial. Seven coefficients plus two integration constants. */
export interface NasaRange {
  /** K */
  readonly lowest: number;
  /** K */
  readonly highest: number;
  /** Of Cp/R in powers of T named by `exponents` of the record; dimensionless apart from powers of K. */
  readonly coefficients: readonly number[];
  /** Integration constant of the enthalpy, K. */
  readonly enthalpyConstant: number;
  /** Integration constant of the entropy, dimensionless. */
  readonly entropyConstant: number;
}

/** Ideal-gas heat capacity of one species, J/(mol K), as data. */
export type HeatCapacityData =
  | { readonly kind: 'constant'; readonly value: number }
  | { readonly kind: 'formula'; readonly formula: CheckedFormula }
  | {
      readonly kind: 'nasa';
      /** Powers of T in Cp/R, as long as each range's `coefficients`: -2..4 (nine-constant form) or 0..4 (seven-constant form). */
      readonly exponents: readonly number[];
      readonly ranges: readonly NasaRange[];
    };

/**
 * What is known of one species: plain data, SI. Absent means unknown; nothing is guessed here.
 * `enthalpyOfFormation` J/mol and `standardEntropy` J/(mol K) are ideal gas, 298.15 K, 1 bar.
 * For NASA data both are already inside the polynomials and the two fields only repeat them.
 */
export interface SpeciesRecord {
  readonly id: string;
  readonly name?: string;
  /** kg/mol */
  readonly molarMass: number;
  /** Atoms per molecule by element symbol; absent when the case gives no formula. */
  readonly elements?: Readonly<Record<string, number>>;
  readonly heatCapacity?: HeatCapacityData;
  readonly enthalpyOfFormation?: number;
  readonly standardEntropy?: number;
  /** K */
  readonly criticalTemperature?: number;
  /** Pa */
  readonly criticalPressure?: number;
  /** m³/mol */
  readonly criticalVolume?: number;
  readonly acentricFactor?: number;
  /** C m */
  readonly dipoleMoment?: number;
  /** Of Chung et al. (1984) for hydrogen-bonding vapours, dimensionless; absent means 0. */
  readonly associationFactor?: number;
  readonly lennardJones?: {
    /** m */
    readonly collisionDiameter: number;
    /** Depth of the well over Boltzmann's constant, K. */
    readonly wellDepth: number;
  };
  /** Diffusion volume of Fuller, Schettler and Giddings, dimensionless. */
  readonly diffusionVolume?: number;
  /** Of the pure gas, Pa s; takes the place of an estimate. */
  readonly viscosity?: FluidProperty;
  /** Of the pure gas, W/(m K); takes the place of an estimate. */
  readonly thermalConductivity?: FluidProperty;
  /** Where the numbers come from: `own record in the case` or the library's sources, one line. */
  readonly source: string;
}
