import type { ReactorSpecification } from '../../src/bed/reactor-specification.js';
import type { RunResult } from '../../src/bed/run-result.js';
import { readCase } from '../../src/case/read-case.js';

/** Numbers invented for the layout of results: awkward ones, and no physics in them. */
export const inventedResult: RunResult = {
  status: 'complete',
  speciesIds: ['A', 'B_2'],
  reactionNames: ['first', 'second'],
  profile: {
    positions: Float64Array.of(0, 0.1 + 0.2, 1),
    temperatures: Float64Array.of(600, 612.3456789012345, 601),
    pressures: Float64Array.of(2e5, 1.9e5, 123456.78901234567),
    coolantTemperatures: Float64Array.of(590, 590, 590),
    molarFlows: [Float64Array.of(1, 5e-324, -1e-17), Float64Array.of(0, 1e21, 1.7976931348623157e308)],
    moleFractions: [Float64Array.of(1, 2 / 3, 1 / 3), Float64Array.of(0, 1 / 3, 2 / 3)],
    rates: [Float64Array.of(1e-7, 1e-6, 123e-9), Float64Array.of(0, -4.2e-5, 0)],
    effectiveness: [Float64Array.of(0.5, 0.4, 0.6), Float64Array.of(NaN, 1.25, Infinity)],
    densities: Float64Array.of(0.9, 0.85, NaN),
    surfaceTemperatures: Float64Array.of(601, 613, 602),
    centreTemperatures: Float64Array.of(602, 614, 603),
    compressibilityFactors: Float64Array.of(0.97, 0.98, 0.99),
    viscosities: Float64Array.of(3e-5, 3.1e-5, 3.05e-5),
  },
  pellets: [
    {
      label: 'inlet',
      position: 0,
      relativeRadii: Float64Array.of(0, 1),
      concentrations: [Float64Array.of(10, 20), Float64Array.of(0, NaN)],
      temperatures: Float64Array.of(602, 601),
      bulkConcentrations: [21, 0],
      bulkTemperature: 600,
    },
    {
      label: 'outlet',
      position: 1,
      relativeRadii: Float64Array.of(0, 1),
      concentrations: [Float64Array.of(1, 2), Float64Array.of(3, 4)],
      temperatures: Float64Array.of(603, 602),
      bulkConcentrations: [2, 5],
      bulkTemperature: 601,
    },
  ],
  transport: [],
  equilibrium: {
    approaches: [
      {
        reactionIndex: 1,
        quotientRatios: Float64Array.of(0, 0.12, 0.98),
        temperatureApproaches: Float64Array.of(NaN, -80, -2),
      },
    ],
    conversions: [{ speciesIndex: 0, values: Float64Array.of(0.91, 0.87, 0.9) }],
    adiabatic: {
      temperature: 633.25,
      moleFractions: [0.2, 0.8],
      conversions: [{ speciesIndex: 0, value: 0.8 }],
    },
  },
  outlet: {
    position: 1,
    temperature: 601,
    pressure: 123456.78901234567,
    molarFlows: [0.25, NaN],
    moleFractions: [1 / 3, 2 / 3],
  },
  conversions: [{ speciesIndex: 0, value: 0.75 }],
  selectivities: [
    { productIndex: 1, reactantIndex: 0, selectivity: 0.9, yield: 0.675 },
    { productIndex: 0, reactantIndex: 1, selectivity: null, yield: 0 },
  ],
  peak: { temperature: 612.3456789012345, position: 0.3 },
  pressureDrop: 76543.21098765433,
  heatRemoved: 1234.5,
  catalystMass: 0.0123456,
  effectiveness: [
    { inlet: 0.5, outlet: 0.6, mean: 0.45 },
    { inlet: null, outlet: NaN, mean: 1.25 },
  ],
  balances: { mass: 1e-16, elements: { C: 0, H: 3e-15 }, energy: 2e-12 },
  groups: [
    { name: 'Thiele modulus', of: 'first', value: 1.5, unit: '1', definition: 'd', source: 's' },
    { name: 'some temperature', value: NaN, unit: 'K', definition: 'd', source: 's' },
  ],
  events: [{ kind: 'peak_temperature', position: 0.3, message: 'temperature peaks at 612.3 K' }],
  warnings: ['The first warning, with an escape \u001b[31m in it.'],
  assumptions: [{ about: 'model', statement: 'plug flow', source: 'common practice' }],
  work: {
    steps: 12,
    rejectedSteps: 1,
    rightHandSides: 40,
    jacobians: 3,
    pelletSolves: 99,
    pelletIterations: 200,
    pelletFactorisations: 50,
    rateEvaluations: 4000,
    largestPelletPoints: 9,
  },
};

const { specification } = readCase(
  `bedwright: 1
title: "Layout \\e[5mcheck"
species: { A: { formula: C2H4O2 }, B: { formula: C2H4O2 } }
reactions: [{ name: first, equation: A -> B, rate: k * c.A, per: pellet_volume, constants: { k: 2 1/s } }]
feed: { temperature: 500 K, pressure: 2 bar, velocity: 1 m/s, mole_fractions: { A: 1 } }
pellet: { shape: { sphere: { diameter: 3 mm } }, density: 1500 kg/m^3, effective_diffusivity: 5e-7 m^2/s, film: none }
bed: { tube_diameter: 40 mm, length: 1 m, void_fraction: 0.4, pressure_drop: none }
heat: { mode: isothermal }
`,
  'layout.yaml',
);
export const isothermalBed: ReactorSpecification = specification;
export const cooledBed: ReactorSpecification = {
  ...specification,
  heat: { mode: 'cooled', overallCoefficient: 100, coolantTemperature: 590 },
};
