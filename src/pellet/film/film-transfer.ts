/** Coefficients of mass and heat transfer around a pellet from a correlation, one position of the bed at a time. */
import type { FilmCorrelation, FilmDiameter } from './film-correlations.js';

/** Sizes of a pellet, m; all equal for a sphere, whose sphericity is 1. */
export interface FilmSizes {
  /** Of the sphere of equal volume. */
  readonly volumeDiameter: number;
  /** 6 V/S */
  readonly sauterDiameter: number;
  /** Of the sphere of equal surface. */
  readonly surfaceDiameter: number;
  /** Sauter over volume diameter, at most 1. */
  readonly sphericity: number;
}

export interface FilmFlow {
  /** kg/(m² s), superficial */
  readonly massFlux: number;
  /** kg/m³ */
  readonly density: number;
  /** Pa s */
  readonly viscosity: number;
}

export interface FilmTransfer {
  /** ρ u d/μ with superficial velocity and the correlation's diameter. */
  readonly reynolds: (flow: FilmFlow) => number;
  /** Whether Reynolds number and void fraction lie where the correlation was measured. */
  readonly isInRange: (flow: FilmFlow) => boolean;
  /**
   * k = Sh D/d. Without correction for drift: multiply by the log-mean factor where the number of moles changes and the species is not dilute.
   *
   * @param diffusivities - in the mixture, m²/s, one per species; where one is NaN, which nothing needs, `target` keeps its value
   * @param target - m/s, one per species
   */
  readonly coefficientsInto: (flow: FilmFlow, diffusivities: Float64Array, target: Float64Array) => void;
  /** h = Nu λ/d, W/(m² K). @param conductivity - of the fluid, W/(m K) @param heatCapacity - of the fluid, J/(kg K) */
  readonly heatTransfer: (flow: FilmFlow, conductivity: number, heatCapacity: number) => number;
}

/** @param voidFraction - of the bed, between 0 and 1 */
export function createFilmTransfer(
  correlation: FilmCorrelation,
  sizes: FilmSizes,
  voidFraction: number,
): FilmTransfer {
  const { sherwood, reynoldsRange, voidRange, ownReynolds } = correlation;
  const diameter = sizes[diameterKeys[correlation.diameter]];
  const geometry = { voidFraction, sphericity: sizes.sphericity };
  const [lowest, highest] = ownReynolds?.range ?? reynoldsRange;
  const isVoidInRange = voidFraction >= voidRange[0] && voidFraction <= voidRange[1];
  const reynolds = ({ massFlux, viscosity }: FilmFlow): number => (massFlux * diameter) / viscosity;
  return {
    reynolds,
    isInRange(flow) {
      const value = ownReynolds ? ownReynolds.of(reynolds(flow), geometry) : reynolds(flow);
      return isVoidInRange && value >= lowest && value <= highest;
    },
    coefficientsInto(flow, diffusivities, target) {
      const value = reynolds(flow);
      const kinematicViscosity = flow.viscosity / flow.density;
      for (let i = 0; i < diffusivities.length; i++) {
        const diffusivity = diffusivities[i]!;
        if (Number.isNaN(diffusivity)) continue;
        target[i] = (sherwood(value, kinematicViscosity / diffusivity, geometry) * diffusivity) / diameter;
      }
    },
    heatTransfer(flow, conductivity, heatCapacity) {
      const prandtl = (flow.viscosity * heatCapacity) / conductivity;
      return (sherwood(reynolds(flow), prandtl, geometry) * conductivity) / diameter;
    },
  };
}

const diameterKeys = {
  sauter: 'sauterDiameter',
  volume: 'volumeDiameter',
  surface: 'surfaceDiameter',
} as const satisfies Record<FilmDiameter, keyof FilmSizes>;
