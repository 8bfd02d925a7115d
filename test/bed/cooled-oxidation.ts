import type { ReactorSpecification } from '../../src/bed/reactor-specification.js';
import { constantExpression } from '../../src/expressions/build-expression.js';
import { parseFormula } from '../../src/expressions/parse-formula.js';
import type { CheckedFormula, Expression } from '../../src/expressions/expression.js';
import { sphereGeometry } from '../../src/pellet/shapes.js';
import type { Dimension } from '../../src/quantities/dimension.js';
import { constant, givenTransport, idealGas } from '../pellet/given-transport.js';

/** mol/(kg s bar²) in SI: 1e-10 */
const perBarSquared = 1e-10;
const constantDimension: Dimension = [-3, 2, 3, 1, 0];
const speciesIds = ['A', 'P', 'O2', 'H2O', 'CO2', 'N2'];

function law(fuel: string, k: Expression): CheckedFormula {
  const formula = parseFormula(
    `k * p.${fuel} * p.O2`,
    {
      constants: new Map([['k', { expression: k, dimension: constantDimension }]]),
      speciesIds,
      allowsTemperature: true,
      allowsPressure: true,
    },
    (fault) => {
      throw new Error(fault.found);
    },
  );
  return formula!;
}

const molarMasses = [0.106165, 0.148115, 0.031998, 0.018015, 0.044009, 0.028014];
const feedFractions = [0.009, 0, 0.208, 0, 0, 0.783];
const massFlux = 1.3;
const tubeDiameter = 0.0254;

/** The cooled tube with three reactions whose independent solution stands in test/reference/cooled-bed.json. */
export function cooledOxidation(change: Partial<ReactorSpecification> = {}): ReactorSpecification {
  const meanMass = feedFractions.reduce((sum, y, i) => sum + y * molarMasses[i]!, 0);
  const totalFlow = (massFlux * Math.PI * tubeDiameter ** 2) / 4 / meanMass;
  const source = 'invented';
  const reaction = (
    name: string,
    equation: string,
    stoichiometry: readonly number[],
    fuel: string,
    k: Expression,
    heat: number,
  ): ReactorSpecification['reactions'][number] => ({
    name,
    equation,
    isReversible: false,
    stoichiometry,
    rate: law(fuel, k),
    basis: 'catalyst_mass',
    heat: { value: heat },
  });
  const arrhenius = (prefactor: number, energy: number): Expression =>
    constantExpression({
      kind: 'arrhenius',
      prefactor: prefactor * perBarSquared,
      energy,
      temperatureExponent: 0,
    });
  return {
    title: 'cooled tube with three reactions',
    notes: '',
    species: speciesIds.map((id, i) => ({ id, molarMass: molarMasses[i]!, source })),
    reactions: [
      reaction(
        'selective',
        'A + 3 O2 -> P + 3 H2O',
        [-1, 1, -3, 3, 0, 0],
        'A',
        constantExpression({ kind: 'referenced', value: 0.085 * perBarSquared, at: 640, energy: 113e3 }),
        -1285e3,
      ),
      reaction(
        'burn',
        'A + 10.5 O2 -> 8 CO2 + 5 H2O',
        [-1, 0, -10.5, 5, 8, 0],
        'A',
        arrhenius(5.4e7, 119e3),
        -4564e3,
      ),
      reaction(
        'overburn',
        'P + 7.5 O2 -> 8 CO2 + 2 H2O',
        [0, -1, -7.5, 2, 8, 0],
        'P',
        arrhenius(6e7, 124e3),
        -3279e3,
      ),
    ],
    feed: {
      temperature: 625,
      pressure: 1.6e5,
      molarFlows: feedFractions.map((y) => y * totalFlow),
    },
    fluid: idealGas(6, {
      viscosity: constant(3.1e-5),
      heatCapacity: { kind: 'given', per: 'mass', property: constant(1060) },
    }),
    pellet: {
      geometry: sphereGeometry(4e-3),
      method: { kind: 'full' },
      density: 1800,
      activity: 1,
      transport: givenTransport({
        diffusivities: [1.3e-6, 1.1e-6, 3.2e-6, 4.2e-6, 2.6e-6, Infinity],
        thermalConductivity: 0.35,
        massTransfer: [0.075, 0.066, 0.15, 0.18, 0.125, Infinity],
        heatTransfer: 190,
      }),
    },
    bed: {
      tubeDiameter,
      tubes: 1,
      length: 3,
      voidFraction: 0.42,
      pressureDrop: { kind: 'two_term', viscous: 150, inertial: 1.75, source: 'Ergun (1952)' },
    },
    heat: { mode: 'cooled', overallCoefficient: 110, coolantTemperature: 625 },
    limits: {},
    targets: [],
    output: { points: 101, pelletPositions: [], selectivities: [] },
    numerics: { tolerance: 1e-6 },
    assumptions: [],
    ...change,
  };
}
