import { frictionCoefficients, pressureGradient } from '../../src/bed/friction.js';
import { solveReactor } from '../../src/bed/solve-reactor.js';
import { gasConstant } from '../../src/quantities/constants.js';
import { plainReactor } from './plain-reactor.js';
import type { PublishedRow } from './published-row.js';

interface InertBed {
  /** kg/(m² s) */
  readonly massFlux: number;
  readonly diameter: number;
  readonly length: number;
  readonly voidFraction: number;
  readonly pelletDiameter: number;
  readonly viscosity: number;
  /** kg/mol */
  readonly molarMass: number;
  readonly temperature: number;
  readonly pressure: number;
}

const ergun = (voidFraction: number, pelletDiameter: number): ReturnType<typeof frictionCoefficients> =>
  frictionCoefficients(150, 1.75, voidFraction, pelletDiameter);

/** Pa at the outlet of an isothermal bed in which nothing reacts. */
function outletPressure(bed: InertBed): number {
  const area = (Math.PI / 4) * bed.diameter ** 2;
  const result = solveReactor(
    plainReactor({
      species: [
        { id: 'X', molarMass: bed.molarMass, source: 'example' },
        { id: 'Y', molarMass: bed.molarMass, source: 'example' },
      ],
      reactions: [{ name: 'none', stoichiometry: [-1, 1], law: '0 mol/(kg s)' }],
      molarFlows: [(bed.massFlux * area) / bed.molarMass, 0],
      temperature: bed.temperature,
      pressure: bed.pressure,
      tubeDiameter: bed.diameter,
      length: bed.length,
      voidFraction: bed.voidFraction,
      pelletDensity: 1000,
      pelletDiameter: bed.pelletDiameter,
      heat: { mode: 'isothermal' },
      viscosity: bed.viscosity,
    }),
  );
  if (result.status !== 'complete') throw new Error(result.stop?.message);
  return result.outlet.pressure;
}

const [pound, foot, hour, atmosphere] = [0.45359237, 0.3048, 3600, 101325];
const poundForcePerCubicFoot = (pound * 9.80665) / foot ** 3;

const foglerBed: InertBed = {
  massFlux: (7383.3 * pound) / foot ** 2 / hour,
  diameter: Math.sqrt((4 / Math.PI) * 0.01414) * foot,
  length: 60 * foot,
  voidFraction: 0.45,
  pelletDiameter: 0.0208 * foot,
  viscosity: (0.0673 * pound) / foot / hour,
  // The molar mass and temperature only have to give the density at the inlet, 0.413 lb/ft3 at 10 atm.
  molarMass: (((0.413 * pound) / foot ** 3) * gasConstant * 533.15) / (10 * atmosphere),
  temperature: 533.15,
  pressure: 10 * atmosphere,
};
const fogler = 'Fogler, Elements of Chemical Reaction Engineering, Example 4-4 (3rd/4th ed.) = 5-4 (5th ed.)';
const foglerInputs =
  '104.4 lb/h through 0.01414 ft2, G 7383.3 lb/(ft2 h), mu 0.0673 lb/(ft h), rho0 0.413 lb/ft3, dp 0.0208 ft, void 0.45, 10 atm, 60 ft';

const geankoplisBed: InertBed = {
  massFlux: 0.358 / ((Math.PI / 4) * 0.61 ** 2),
  diameter: 0.61,
  length: 2.44,
  voidFraction: 0.38,
  pelletDiameter: 0.0127,
  viscosity: 1.9e-5,
  molarMass: 0.02897,
  temperature: 311,
  pressure: 1.1 * atmosphere,
};

/** Velocity at which friction carries the weight of the bed, m/s. */
function fluidisingVelocity(
  diameter: number,
  voidFraction: number,
  solidDensity: number,
  gasDensity: number,
  viscosity: number,
  gravity: number,
): number {
  const weight = (1 - voidFraction) * (solidDensity - gasDensity) * gravity;
  const coefficients = ergun(voidFraction, diameter);
  let [low, high] = [0, 10];
  for (let i = 0; i < 80; i++) {
    const velocity = (low + high) / 2;
    if (pressureGradient(coefficients, velocity * gasDensity, gasDensity, viscosity) < weight) low = velocity;
    else high = velocity;
  }
  return low;
}

export const pressureDropRows: readonly PublishedRow[] = [
  {
    id: 'ergun-fogler gradient',
    source: fogler,
    status: 'memory',
    inputs: foglerInputs,
    expected: 164.1,
    unit: 'lbf/ft3',
    tolerance: { relative: 5e-3, reason: 'intermediate results rounded to three digits in print' },
    obtain: () => {
      const { massFlux, voidFraction, pelletDiameter, viscosity } = foglerBed;
      const density = (0.413 * pound) / foot ** 3;
      return (
        pressureGradient(ergun(voidFraction, pelletDiameter), massFlux, density, viscosity) /
        poundForcePerCubicFoot
      );
    },
  },
  {
    id: 'ergun-fogler outlet',
    source: fogler,
    status: 'memory',
    inputs: foglerInputs,
    expected: 2.65,
    unit: 'atm',
    tolerance: {
      relative: 0.01,
      reason:
        'the outlet is the small difference of 1 and 0.93: a gradient rounded to 0.0775 atm/ft shifts it by 1 %',
    },
    obtain: () => outletPressure(foglerBed) / atmosphere,
  },
  {
    id: 'ergun-fogler outlet recomputed',
    source: `${fogler}; pellets of 1/4 in., of which 0.0208 ft is the rounding`,
    status: 'recomputed',
    inputs: foglerInputs,
    expected: 2.669,
    unit: 'atm',
    tolerance: { absolute: 1.7e-3, reason: 'inputs to five digits, which the outlet magnifies 6.5 times' },
    obtain: () => outletPressure({ ...foglerBed, pelletDiameter: foot / 48 }) / atmosphere,
  },
  {
    id: 'ergun-geankoplis',
    source: 'Geankoplis, Transport Processes and Unit Operations, 3rd ed., Example 3.1-4, p. 121',
    status: 'memory',
    inputs: 'air, 0.358 kg/s, bed 0.61 m by 2.44 m, spheres 12.7 mm, void 0.38, 311 K, 1.10 atm, 1.9e-5 Pa s',
    expected: 4970,
    unit: 'Pa',
    tolerance: { relative: 0.01, reason: 'solved by trial in print, three digits' },
    obtain: () => geankoplisBed.pressure - outletPressure(geankoplisBed),
  },
  {
    id: 'ergun-geankoplis recomputed',
    source: 'Geankoplis, 3rd ed., Example 3.1-4; isothermal ideal gas, closed form',
    status: 'recomputed',
    inputs: 'as above',
    expected: 4972.4,
    unit: 'Pa',
    tolerance: { absolute: 0.5, reason: 'five digits written down with G to six' },
    obtain: () => geankoplisBed.pressure - outletPressure(geankoplisBed),
  },
  ...(
    [
      [1, 694.782],
      [10, 81.8081],
      [100, 20.5107],
      [1000, 14.381],
    ] as const
  ).map(([reynolds, expected]): PublishedRow => ({
    id: `ergun friction group at Re ${reynolds}`,
    source:
      'Ergun (1952), Chem. Eng. Prog. 48, 89; beside Eisfeld & Schnitzlein (2001), Chem. Eng. Sci. 56, 4321',
    status: 'recomputed',
    inputs: 'psi = dP dp/(rho u^2 L), void 0.42',
    expected,
    unit: '1',
    tolerance: { relative: 1e-5, reason: 'six digits written down' },
    obtain: () => {
      const [diameter, density, velocity] = [2e-3, 1.7, 0.9];
      const viscosity = (density * velocity * diameter) / reynolds;
      return (
        (pressureGradient(ergun(0.42, diameter), density * velocity, density, viscosity) * diameter) /
        (density * velocity ** 2)
      );
    },
  })),
  {
    id: 'umf-geankoplis',
    source: 'Geankoplis, 3rd ed., Example 3.1-6, p. 125',
    status: 'checked',
    inputs: 'dp 0.12 mm, sphericity 0.88, void 0.42, 1000 kg/m3 in 2.374 kg/m3, 1.85e-5 Pa s',
    expected: 0.005015,
    unit: 'm/s',
    tolerance: { relative: 5e-3, reason: 'intermediate Reynolds number printed to three digits' },
    obtain: () => fluidisingVelocity(0.00012 * 0.88, 0.42, 1000, 2.374, 1.85e-5, 9.80665),
  },
  {
    id: 'umf-kunii',
    source: 'Kunii & Levenspiel, Fluidization Engineering, 2nd ed., Example 3.2, p. 76',
    status: 'checked',
    inputs:
      'dp 0.016 cm, sphericity 0.67, void 0.55, 2.6 g/cm3 in 0.0012 g/cm3, 0.00018 g/(cm s), g 980 cm/s2',
    expected: 4.01,
    unit: 'cm/s',
    tolerance: { relative: 0.01, reason: 'print leaves out the inertial term, 0.7 %' },
    obtain: () => 100 * fluidisingVelocity(0.00016 * 0.67, 0.55, 2600, 1.2, 1.8e-5, 9.8),
  },
];
