/** Geometry and constants of two-term packed-bed friction, fixed along a bed. */
export interface FrictionCoefficients {
  /** Multiplies μ G / ρ: 1/m² */
  readonly viscous: number;
  /** Multiplies G² / ρ: 1/m */
  readonly inertial: number;
}

/**
 * Coefficients of -dP/dz = (viscous · μ G + inertial · G²) / ρ with G the superficial mass flux, from
 * dP/L = (A/Rem + B) ρ u² (1-ε)/(d ε³), Rem = ρ u d / (μ (1-ε)).
 *
 * @param viscousConstant - A; 150 after Ergun
 * @param inertialConstant - B; 1.75 after Ergun
 * @param voidFraction - ε, between 0 and 1
 * @param sauterDiameter - d, m: six times pellet volume over surface
 * @source Ergun (1952), Chem. Eng. Prog. 48, 89
 * @range Rem about 1 to 2500, tube more than ten pellets wide
 */
export function frictionCoefficients(
  viscousConstant: number,
  inertialConstant: number,
  voidFraction: number,
  sauterDiameter: number,
): FrictionCoefficients {
  const eps = voidFraction;
  const d = sauterDiameter;
  return {
    viscous: (viscousConstant * (1 - eps) ** 2) / (d * d * eps ** 3),
    inertial: (inertialConstant * (1 - eps)) / (d * eps ** 3),
  };
}

/**
 * Pressure gradient -dP/dz, Pa/m, positive in the direction of flow.
 *
 * @param massFlux - superficial, kg/(m² s)
 * @param density - kg/m³
 * @param viscosity - Pa s
 */
export function pressureGradient(
  coefficients: FrictionCoefficients,
  massFlux: number,
  density: number,
  viscosity: number,
): number {
  return (
    (coefficients.viscous * viscosity * massFlux + coefficients.inertial * massFlux * massFlux) / density
  );
}
