import type { FluidProperty } from '../properties/fluid-property.js';
import type { PoreStructure } from './pores/pore-structure.js';

/**
 * Size and form of a pellet as the one-dimensional problem sees it.
 * `diffusionLength` is volume over external surface, m. `shapeExponent` is 0 for a slab, 1 for a long cylinder,
 * 2 for a sphere; the radius of the equivalent one-dimensional body is (shapeExponent + 1) * diffusionLength.
 */
export interface PelletGeometry {
  readonly diffusionLength: number;
  readonly shapeExponent: number;
  /** 6 V/S, m: diameter of the sphere with the same surface per volume; for friction. */
  readonly sauterDiameter: number;
  /** As the user would say it: `sphere, diameter 4 mm`. */
  readonly description: string;
}

/** How the effect of diffusion is worked out at each position of the bed. */
export type PelletMethod =
  | { readonly kind: 'full' }
  | { readonly kind: 'thiele' }
  | { readonly kind: 'fixed'; /** One per reaction, > 0. */ readonly effectiveness: readonly number[] }
  | { readonly kind: 'intrinsic' };

/** A property that is given (a number or a formula in T and P) or worked out at each position of the bed. */
export type LocalProperty = FluidProperty | { readonly kind: 'estimate' };

/** Correlations of particle-to-fluid transfer, by their names in the case file. */
export type FilmCorrelationName =
  'wakao_funazkri' | 'thoenes_kramers' | 'petrovic_thodos' | 'dwivedi_upadhyay' | 'gnielinski';

/** The film around the pellet: none, coefficients given (m/s, one per species; W/(m² K)), or a correlation by its name. */
export type FilmSpecification =
  | { readonly kind: 'none' }
  | {
      readonly kind: 'given';
      readonly massTransfer: readonly FluidProperty[];
      readonly heatTransfer: FluidProperty;
    }
  | { readonly kind: 'correlation'; readonly name: FilmCorrelationName };

/** How diffusion, conduction and film of the pellet are known; SI, plain data. */
export interface PelletTransportSpecification {
  /** m²/s, one per species; species that take part in no reaction carry Infinity. */
  readonly effectiveDiffusivities: readonly LocalProperty[];
  /** From which the diffusivities to be estimated follow; present where there are any. */
  readonly pores?: PoreStructure;
  /** W/(m K): `Infinity` for a pellet without inner temperature differences, or from the conductivities of its solid and its gas. */
  readonly thermalConductivity:
    FluidProperty | { readonly kind: 'phases'; readonly solid: number; readonly porosity: number };
  readonly film: FilmSpecification;
}

/**
 * Transport in and around a pellet at one position of the bed, as numbers. The arrays have one entry per species; `Infinity` stands for
 * no resistance.
 */
export interface PelletTransport {
  /** m²/s */
  readonly effectiveDiffusivities: Float64Array;
  /** W/(m K) */
  thermalConductivity: number;
  /** m/s */
  readonly massTransfer: Float64Array;
  /** W/(m² K) */
  heatTransfer: number;
}

/** Everything the pellet sub-model needs to know, SI, plain data. */
export interface PelletSpecification {
  readonly geometry: PelletGeometry;
  readonly method: PelletMethod;
  /** kg of catalyst per m³ of pellet, pores included. */
  readonly density: number;
  /** Multiplies every rate; 1 for fresh catalyst. */
  readonly activity: number;
  readonly transport: PelletTransportSpecification;
}
