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

/** Film around the pellet; `Infinity` where the user says that there is no resistance. */
export interface FilmCoefficients {
  /** m/s, one per species. */
  readonly massTransfer: readonly number[];
  /** W/(m² K) */
  readonly heatTransfer: number;
}

/** Everything the pellet sub-model needs to know, SI, plain data. */
export interface PelletSpecification {
  readonly geometry: PelletGeometry;
  readonly method: PelletMethod;
  /** kg of catalyst per m³ of pellet, pores included. */
  readonly density: number;
  /** Multiplies every rate; 1 for fresh catalyst. */
  readonly activity: number;
  /** m²/s, one per species; NaN never: species that take no part in a reaction carry Infinity. */
  readonly effectiveDiffusivities: readonly number[];
  /** W/(m K); `Infinity` for a pellet without inner temperature differences. */
  readonly thermalConductivity: number;
  readonly film: FilmCoefficients;
}
