/**
 * Correlations of mass and heat transfer between a bed's fluid and its pellets. Each gives a Sherwood number; with the Prandtl number in place
 * of the Schmidt number it gives the Nusselt number (analogy of Chilton & Colburn).
 */
import type { FilmCorrelationName } from '../pellet-specification.js';

/** A bed as a correlation sees it. */
export interface FilmGeometry {
  readonly voidFraction: number;
  /** Surface of the sphere of equal volume over the pellet's own surface; 1 for a sphere. */
  readonly sphericity: number;
}

export type FilmDiameter = 'sauter' | 'volume' | 'surface';

export interface FilmCorrelation {
  readonly name: string;
  readonly source: string;
  /**
   * Which diameter stands in its numbers: 6 V/S, that of the sphere of equal volume, or of equal surface. All were measured with spheres for
   * the most part; what else they hold for is common practice.
   */
  readonly diameter: FilmDiameter;
  /** Of ρ u d/μ with the superficial velocity u. */
  readonly reynoldsRange: readonly [number, number];
  /** Where the source states its range in another number; `reynoldsRange` is then that of spheres at void fraction 0.4. */
  readonly ownReynolds?: {
    readonly range: readonly [number, number];
    readonly of: (reynolds: number, geometry: FilmGeometry) => number;
  };
  readonly voidRange: readonly [number, number];
  readonly scatter: string;
  /** @param reynolds - ρ u d/μ, superficial @param schmidt - or Prandtl number */
  readonly sherwood: (reynolds: number, schmidt: number, geometry: FilmGeometry) => number;
}

const always = [0, 1] as const;

/** Sh = j_D Re Sc^⅓ */
const fromFactor =
  (factor: (reynolds: number) => number) =>
  (reynolds: number, schmidt: number, { voidFraction }: FilmGeometry): number =>
    (factor(reynolds) / voidFraction) * reynolds * Math.cbrt(schmidt);

export const filmCorrelations: Readonly<Record<FilmCorrelationName, FilmCorrelation>> = {
  wakao_funazkri: {
    // The same formula twice; for heat the range is 15 to 8500.
    name: 'Wakao–Funazkri',
    source:
      'Wakao & Funazkri (1978), Chem. Eng. Sci. 33, 1375; for heat Wakao, Kaguei & Funazkri (1979), Chem. Eng. Sci. 34, 325',
    diameter: 'volume',
    reynoldsRange: [3, 1e4],
    voidRange: always,
    scatter: '25 %',
    sherwood: (reynolds, schmidt) => 2 + 1.1 * Math.cbrt(schmidt) * reynolds ** 0.6,
  },
  thoenes_kramers: {
    name: 'Thoenes–Kramers',
    source: 'Thoenes & Kramers (1958), Chem. Eng. Sci. 8, 271',
    diameter: 'volume',
    reynoldsRange: [24, 2400],
    ownReynolds: {
      range: [40, 4000],
      of: (reynolds, { voidFraction, sphericity }) => (reynolds * sphericity) / (1 - voidFraction),
    },
    voidRange: [0.25, 0.5],
    scatter: '10 %',
    sherwood(reynolds, schmidt, { voidFraction, sphericity }) {
      const crowding = (1 - voidFraction) / sphericity;
      return (Math.sqrt(reynolds / crowding) * Math.cbrt(schmidt) * crowding) / voidFraction;
    },
  },
  petrovic_thodos: {
    name: 'Petrovic–Thodos',
    source: 'Petrovic & Thodos (1968), Ind. Eng. Chem. Fundam. 7, 274',
    diameter: 'volume',
    reynoldsRange: [3, 2000],
    voidRange: always,
    scatter: '20 %',
    sherwood: fromFactor((reynolds) => 0.357 / reynolds ** 0.359),
  },
  dwivedi_upadhyay: {
    name: 'Dwivedi–Upadhyay',
    source: 'Dwivedi & Upadhyay (1977), Ind. Eng. Chem. Process Des. Dev. 16, 157',
    diameter: 'volume',
    reynoldsRange: [0.01, 15_000],
    voidRange: always,
    scatter: '18 %',
    sherwood: fromFactor((reynolds) => 0.765 / reynolds ** 0.82 + 0.365 / reynolds ** 0.386),
  },
  gnielinski: {
    name: 'Gnielinski',
    source: 'Gnielinski (1978), Verfahrenstechnik 12, 363; form factor 1 + 1.5 (1-ε) of spheres',
    diameter: 'surface',
    // Its lower bound is also stated as Re Pr/ε above 500.
    reynoldsRange: [40, 8000],
    ownReynolds: { range: [100, 20_000], of: (reynolds, { voidFraction }) => reynolds / voidFraction },
    voidRange: [0.26, 1],
    scatter: '20 %',
    sherwood(reynolds, schmidt, { voidFraction }) {
      const inner = reynolds / voidFraction;
      const laminar = 0.664 * Math.cbrt(schmidt) * Math.sqrt(inner);
      const turbulent =
        (0.037 * inner ** 0.8 * schmidt) / (1 + 2.443 * inner ** -0.1 * (Math.cbrt(schmidt) ** 2 - 1));
      return (1 + 1.5 * (1 - voidFraction)) * (2 + Math.sqrt(laminar * laminar + turbulent * turbulent));
    },
  },
};
