import type { RunResult } from '../../src/bed/run-result.js';
import { solveReactor } from '../../src/bed/solve-reactor.js';
import { findLibrarySpecies } from '../../src/properties/species/library.js';
import type { SpeciesRecord } from '../../src/properties/species-record.js';
import { gasConstant } from '../../src/quantities/constants.js';
import { methanolLaws, methanolSpecies } from './kinetics.js';
import { plainReactor, type PlainReactor } from './plain-reactor.js';
import type { PublishedRow } from './published-row.js';

function run(plain: PlainReactor): RunResult {
  const result = solveReactor(plainReactor(plain));
  if (result.status !== 'complete') throw new Error(result.stop?.message);
  return result;
}

const library = (ids: readonly string[]): SpeciesRecord[] => ids.map((id) => findLibrarySpecies(id)!);

/** Nitrogen as the inert, which the paper does not name. */
function methanolBed(): RunResult {
  const species = library(methanolSpecies);
  const percent = [4, 3, 82, 0, 0, 11];
  const meanMass = percent.reduce((sum, value, i) => sum + (value / 100) * species[i]!.molarMass, 0);
  return run({
    species,
    reactions: [
      { name: 'CO2 + 3 H2 = CH3OH + H2O', stoichiometry: [0, -1, -3, 1, 1, 0], law: methanolLaws.synthesis },
      { name: 'CO2 + H2 = CO + H2O', stoichiometry: [1, -1, -1, 1, 0, 0], law: methanolLaws.reverseShift },
    ],
    molarFlows: percent.map((value) => ((value / 100) * 2.8e-5) / meanMass),
    temperature: 493.2,
    pressure: 50e5,
    tubeDiameter: 0.016,
    length: 0.15,
    // 34.8 g of catalyst of 1775 kg/m³ in the tube.
    voidFraction: 1 - 0.0348 / (1775 * 0.15 * (Math.PI / 4) * 0.016 ** 2),
    pelletDensity: 1775,
    heat: { mode: 'adiabatic' },
  });
}

const percentOf = (result: RunResult, id: string): number =>
  100 * result.outlet.moleFractions[result.speciesIds.indexOf(id)]!;

const methanolRows = (
  [
    [
      'temperature',
      550.4,
      'K',
      4,
      'the inert is not named: argon, nitrogen and methane give 553.1, 552.4 and 550.8 K',
      (r: RunResult) => r.outlet.temperature,
    ],
    [
      'CO',
      2.89,
      'mol percent',
      0.05 * 2.89,
      'equilibrium at an outlet temperature known to 3 K',
      (r: RunResult) => percentOf(r, 'CO'),
    ],
    [
      'methanol',
      2.33,
      'mol percent',
      0.05 * 2.33,
      'equilibrium at an outlet temperature known to 3 K',
      (r: RunResult) => percentOf(r, 'methanol'),
    ],
    [
      'CO2',
      2.07,
      'mol percent',
      0.02 * 2.07,
      'three printed digits, inert not named',
      (r: RunResult) => percentOf(r, 'CO2'),
    ],
    [
      'H2O',
      1.06,
      'mol percent',
      0.02 * 1.06,
      'three printed digits, inert not named',
      (r: RunResult) => percentOf(r, 'H2O'),
    ],
  ] as const
).map(([name, expected, unit, absolute, reason, read]): PublishedRow => ({
  id: `methanol-VBF-bed ${name}`,
  source: 'Vanden Bussche & Froment (1996), J. Catal. 161, 1, Table 3 and Fig. 5',
  status: 'checked',
  inputs:
    '34.8 g, tube 16 mm by 0.15 m, 493.2 K, 50 bar, 2.8e-5 kg/s of 4 CO, 3 CO2, 82 H2, 11 inert mol %, adiabatic',
  expected,
  unit,
  tolerance: { absolute, reason },
  obtain: () => read(methanolBed()),
}));

const styreneIds = ['EB', 'ST', 'BZ', 'TOL', 'C2H4', 'CH4', 'H2', 'H2O'] as const;
const styreneHeatCapacities = [299, 273, 201, 249, 90, 68, 30, 40];
const styreneMasses = [0.10617, 0.104152, 0.078114, 0.092141, 0.028054, 0.016043, 0.002016, 0.018015];

function styreneBed(temperature: number): RunResult {
  const t = '(T/1 K)';
  const constant = `(exp(-17.34 - 1.302e4/${t} + 5.051*log(${t}) + ((-2.314e-10*${t} + 1.302e-6)*${t} - 4.931e-3)*${t})*1 atm)`;
  return run({
    species: styreneIds.map((id, i) => ({
      id,
      molarMass: styreneMasses[i]!,
      heatCapacity: { kind: 'constant', value: styreneHeatCapacities[i]! },
      source: 'example',
    })),
    reactions: [
      {
        name: 'EB = ST + H2',
        stoichiometry: [-1, 1, 0, 0, 0, 0, 1, 0],
        law: `1 kmol/(kg s atm)*exp(-0.08539 - 10925 K/T)*(p.EB - p.ST*p.H2/${constant})`,
        heat: 118000,
      },
      {
        name: 'EB -> BZ + C2H4',
        stoichiometry: [-1, 0, 1, 0, 1, 0, 0, 0],
        law: '1 kmol/(kg s atm)*exp(13.2392 - 25000 K/T)*p.EB',
        heat: 105200,
      },
      {
        name: 'EB + H2 -> TOL + CH4',
        stoichiometry: [-1, 0, 0, 1, 0, 1, -1, 0],
        law: '1 kmol/(kg s atm^2)*exp(0.2961 - 11000 K/T)*p.EB*p.H2',
        heat: -53900,
      },
    ],
    molarFlows: [3.44, 0, 0, 0, 0, 0, 0, 14.5 * 3.44],
    temperature,
    pressure: 2.4 * 101325,
    tubeDiameter: Math.sqrt(4 / Math.PI),
    length: 10,
    voidFraction: 0.4,
    pelletDensity: 2137,
    heat: { mode: 'adiabatic' },
  });
}

const styreneRow = (
  name: string,
  temperature: number,
  expected: number,
  unit: string,
  tolerance: PublishedRow['tolerance'],
  status: PublishedRow['status'],
  read: (result: RunResult) => number,
): PublishedRow => ({
  id: `eb-fogler ${temperature} K ${name}`,
  source: 'Fogler, problem P8-26 (3rd/4th ed.), rate laws after Elnashaie & Elshishini',
  status,
  inputs:
    '10 m3, void 0.4, 2137 kg/m3, 0.00344 kmol/s ethylbenzene, steam 14.5 : 1, 2.4 atm, adiabatic, constant heats',
  expected,
  unit,
  tolerance,
  obtain: () => read(styreneBed(temperature)),
});

const flowOf =
  (index: number) =>
  (result: RunResult): number =>
    result.outlet.molarFlows[index]! / 1000;
// Heats are constant in the example; here they follow the heat capacities given for the species, 0.1 % of them over the 35 K of the bed.
const kirchhoff = {
  relative: 2e-3,
  reason: 'heats constant in the example, here carried along with its heat capacities',
} as const;

const styreneRows: readonly PublishedRow[] = [
  styreneRow(
    'styrene as published',
    800,
    8.974e-4,
    'kmol/s',
    { relative: 5e-3, reason: 'old integration, four digits' },
    'memory',
    flowOf(1),
  ),
  styreneRow('styrene', 800, 8.975e-4, 'kmol/s', kirchhoff, 'recomputed', flowOf(1)),
  styreneRow('toluene', 800, 3.5886e-5, 'kmol/s', kirchhoff, 'recomputed', flowOf(3)),
  styreneRow(
    'outlet temperature',
    800,
    765.26,
    'K',
    { absolute: 0.1, reason: kirchhoff.reason },
    'recomputed',
    (r) => r.outlet.temperature,
  ),
  styreneRow('styrene', 930, 1.93663e-3, 'kmol/s', kirchhoff, 'recomputed', flowOf(1)),
  styreneRow(
    'outlet temperature',
    930,
    850.58,
    'K',
    { absolute: 0.3, reason: kirchhoff.reason },
    'recomputed',
    (r) => r.outlet.temperature,
  ),
];

/** Catalyst, kg, at which A -> 4 R has come to a conversion; first order, isothermal, pure A. */
function massForConversion(conversion: number): number {
  const temperature = 390;
  const [density, voidFraction, diameter, length] = [1500, 0.4, 0.5, 2];
  const result = run({
    species: [
      { id: 'A', molarMass: 0.08, source: 'example' },
      { id: 'R', molarMass: 0.02, source: 'example' },
    ],
    reactions: [{ name: 'A -> 4 R', stoichiometry: [-1, 4], law: '96 L/(kg h)*c.A' }],
    molarFlows: [2000 / 3600, 0],
    temperature,
    pressure: 100 * gasConstant * temperature,
    tubeDiameter: diameter,
    length,
    voidFraction,
    pelletDensity: density,
    heat: { mode: 'isothermal' },
    targets: [{ speciesIndex: 0, conversion }],
  });
  const event = result.events.find(({ kind }) => kind === 'target_conversion_reached');
  return event ? (event.position * result.catalystMass) / length : NaN;
}

const massRows: readonly PublishedRow[] = [
  {
    id: 'levenspiel-18-4 packed bed',
    source: 'Levenspiel, Chemical Reaction Engineering, 3rd ed., Example 18.6, p. 416',
    status: 'checked',
    inputs: 'A -> 4 R, k 96 L/(kg h), CA0 0.1 mol/L, FA0 2000 mol/h, conversion 35 %',
    expected: 140,
    unit: 'kg',
    tolerance: { relative: 5e-3, reason: 'printed to the kilogram' },
    obtain: () => massForConversion(0.35),
  },
  {
    id: 'levenspiel-18-4 packed bed, closed form',
    source: 'Levenspiel, 3rd ed., eq. 5.21: k tau = (1 + eps) ln(1/(1-X)) - eps X',
    status: 'recomputed',
    inputs: 'as above',
    expected: 140.24,
    unit: 'kg',
    tolerance: { absolute: 0.005, reason: 'five digits written down' },
    obtain: () => massForConversion(0.35),
  },
];

/** Hot spot, K, of the tube with pseudo first-order oxidation at an inlet partial pressure in atm. */
function hotSpot(inlet: number, massFluxPerHour: number): number {
  const [molarMass, diameter, bulkDensity, voidFraction] = [0.02948, 0.0254, 1300, 0.4];
  const totalFlow = ((massFluxPerHour / 3600) * (Math.PI / 4) * diameter ** 2) / molarMass;
  const result = run({
    species: ['A', 'B', 'X'].map((id) => ({ id, molarMass, source: 'example' })),
    reactions: [
      {
        name: 'A -> B',
        stoichiometry: [-1, 1, 0],
        law: '1 kmol/(kg h atm^2)*exp(19.837 - 13636 K/T)*0.211 atm*p.A',
        heat: -1285409,
      },
    ],
    molarFlows: [inlet * totalFlow, 0, (1 - inlet) * totalFlow],
    temperature: 625,
    pressure: 101325,
    tubeDiameter: diameter,
    length: 3,
    voidFraction,
    pelletDensity: bulkDensity / (1 - voidFraction),
    heat: { mode: 'cooled', overallCoefficient: 96, coolantTemperature: 625 },
    heatCapacity: { kind: 'given', per: 'mass', property: { kind: 'constant', value: 992 } },
  });
  return result.peak.temperature;
}

const hotSpotRows = (
  [
    [0.011, 638.7],
    [0.013, 643.5],
    [0.015, 650.9],
    [0.016, 657.1],
    [0.017, 669.6],
  ] as const
).flatMap(([inlet, expected]): PublishedRow[] =>
  ([4684, 6000] as const).map((massFlux): PublishedRow => ({
    id: `o-xylene-1d hot spot at ${inlet} atm, G ${massFlux}`,
    source:
      'model and constants of van Welsenaere & Froment (1970), Chem. Eng. Sci. 25, 1503; integrated separately',
    status: 'recomputed',
    inputs: `k = exp(19.837 - 13636/T) kmol/(kg h atm2), pO2 0.211 atm, U 96 W/(m2 K), dt 25.4 mm, 625 K, ${massFlux} kg/(m2 h)`,
    expected,
    unit: 'K',
    tolerance: { absolute: 0.06, reason: 'one decimal written down; the mass flux only stretches the axis' },
    obtain: () => hotSpot(inlet, massFlux),
  })),
);

export const reactorRows: readonly PublishedRow[] = [
  ...methanolRows,
  ...styreneRows,
  ...massRows,
  ...hotSpotRows,
];
