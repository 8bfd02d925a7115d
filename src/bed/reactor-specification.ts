import type { ReactionRecord } from '../kinetics/reaction-record.js';
import type { LocalProperty, PelletSpecification } from '../pellet/pellet-specification.js';
import type { EquationOfStateSpecification } from '../properties/equation-of-state/create-equation-of-state.js';
import type { FluidProperty } from '../properties/fluid-property.js';
import type { SpeciesRecord } from '../properties/species-record.js';

export type { FluidProperty };

/** Heat capacity of the mixture: from the species (mole-weighted), or given per mass J/(kg K) or per amount J/(mol K). */
export type MixtureHeatCapacity =
  | { readonly kind: 'species' }
  | { readonly kind: 'given'; readonly per: 'mass' | 'amount'; readonly property: FluidProperty };

/**
 * - `wilke`: each species through a mixture that stands still
 * - `blanc`: each species as a trace
 * - `flux_ratios`: fluxes in the ratio of one reaction's stoichiometry
 */
export type DiffusivityMixing = 'wilke' | 'blanc' | 'flux_ratios';

export type PressureDropSpecification =
  | { readonly kind: 'none' }
  | {
      /** Two-term friction: f = viscous/Rem + inertial, after Ergun (1952): 150 and 1.75. */
      readonly kind: 'two_term';
      readonly viscous: number;
      readonly inertial: number;
      readonly source: string;
    };

export type HeatSpecification =
  | { readonly mode: 'isothermal' }
  | { readonly mode: 'adiabatic' }
  | {
      readonly mode: 'cooled';
      /** W/(m² K) on the inner wall area. */
      readonly overallCoefficient: number;
      /** K */
      readonly coolantTemperature: number;
    };

/** What the run took for granted: every default, estimate and simplification, in words, with its source. */
export interface Assumption {
  /** Case path it belongs to, or a topic such as `model`. */
  readonly about: string;
  readonly statement: string;
  readonly source: string;
}

/** A wished-for state whose first position along the bed is reported. */
export interface ConversionTarget {
  readonly speciesIndex: number;
  readonly conversion: number;
}

/** Selectivity and yield of a product from a reactant, asked for by the user; indices in case order. */
export interface SelectivityRequest {
  readonly productIndex: number;
  readonly reactantIndex: number;
  /** Moles of product that one mole of reactant can make at best, from the stoichiometry. */
  readonly productPerReactant: number;
}

/** A whole reactor, SI, plain data: what `case` makes and `bed` solves. */
export interface ReactorSpecification {
  readonly title: string;
  readonly notes: string;
  readonly species: readonly SpeciesRecord[];
  readonly reactions: readonly ReactionRecord[];
  readonly feed: {
    /** K */
    readonly temperature: number;
    /** Pa, absolute */
    readonly pressure: number;
    /** mol/s per species, whole reactor (all tubes). */
    readonly molarFlows: readonly number[];
  };
  readonly fluid: {
    readonly phase: 'gas';
    readonly equationOfState: EquationOfStateSpecification;
    /** Pa s */
    readonly viscosity: LocalProperty;
    /** W/(m K) */
    readonly thermalConductivity: LocalProperty;
    /** m²/s, of each species in the mixture. */
    readonly diffusivities: readonly LocalProperty[];
    /** How diffusivities to be estimated follow from those of the pairs. */
    readonly diffusivityMixing: DiffusivityMixing;
    /** Whether estimated transport properties are corrected for pressure. */
    readonly isCorrectedForPressure: boolean;
    readonly heatCapacity: MixtureHeatCapacity;
  };
  readonly pellet: PelletSpecification;
  readonly bed: {
    /** m, inner */
    readonly tubeDiameter: number;
    readonly tubes: number;
    /** m */
    readonly length: number;
    readonly voidFraction: number;
    readonly pressureDrop: PressureDropSpecification;
  };
  readonly heat: HeatSpecification;
  readonly limits: {
    /** K */
    readonly temperature?: number;
    /** Pa */
    readonly pressureDrop?: number;
  };
  readonly targets: readonly ConversionTarget[];
  readonly output: {
    /** Number of rows of the profile, inlet and outlet included. */
    readonly points: number;
    /** m, positions whose pellet is written out besides inlet, hottest position and outlet. */
    readonly pelletPositions: readonly number[];
    readonly selectivities: readonly SelectivityRequest[];
  };
  readonly numerics: {
    /** Relative tolerance asked of the results. */
    readonly tolerance: number;
  };
  readonly assumptions: readonly Assumption[];
}
