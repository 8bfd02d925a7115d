import type { PelletModel } from '../pellet/pellet-model.js';
import { gasConstant } from '../quantities/constants.js';
import type { Balances } from './balances.js';
import type { ReactorModel } from './reactor-model.js';
import type { PelletProfile, Profile } from './run-result.js';

/** States of the bed at given positions: `states` is row-major `positions.length × state size`. */
export interface BedStates {
  readonly positions: Float64Array;
  readonly states: Float64Array;
}

/** Profile and the sums along it that need the rates at bulk conditions. */
export interface Tabulation {
  readonly profile: Profile;
  /** Rates at bulk conditions, mol/(m³ pellet s), one column per reaction. */
  readonly bulkRates: readonly Float64Array[];
  /** Averaged rates, same unit. */
  readonly averageRates: readonly Float64Array[];
  /** G d / (μ (1-ε)) with the Sauter diameter; NaN where no viscosity is needed. */
  readonly reynoldsNumbers: Float64Array;
}

/**
 * A net rate below this many tolerances of the one-way rates it is the difference of is not told from zero: near equilibrium an effectiveness
 * would be noise over noise.
 */
const noiseFactor = 100;

/** Σ |∂r/∂c_i| c_i: the size of the rates between which a net rate is the difference; a first-order rate itself. */
function grossRate(gradient: Float64Array, reaction: number, concentrations: Float64Array): number {
  const from = reaction * (concentrations.length + 2);
  return concentrations.reduce((sum, c, i) => sum + Math.abs(gradient[from + i]! * c), 0);
}

/** Works out every column of the profile from the states of the bed; flows are multiplied up to the whole reactor. */
export function tabulate(
  model: ReactorModel,
  balances: Balances,
  { positions, states }: BedStates,
): Tabulation {
  const { speciesCount, reactionCount, specification, rateFactors } = model;
  const { tubes } = specification.bed;
  const { density } = specification.pellet;
  const rowCount = positions.length;
  const size = balances.initialState.length;
  const column = (): Float64Array => new Float64Array(rowCount);
  const columns = (count: number): Float64Array[] => Array.from({ length: count }, column);
  const temperatures = column();
  const pressures = column();
  const densities = column();
  const compressibilityFactors = column();
  const viscosities = column();
  const surfaceTemperatures = column();
  const centreTemperatures = column();
  const molarFlows = columns(speciesCount);
  const moleFractions = columns(speciesCount);
  const rates = columns(reactionCount);
  const effectiveness = columns(reactionCount);
  const bulkRates = columns(reactionCount);
  const reynoldsNumbers = column();
  const reynoldsFlux = (model.massFlux * specification.pellet.geometry.sauterDiameter) / model.solidFraction;
  const averageRates = columns(reactionCount);
  const atBulk = new Float64Array(reactionCount);
  const gradient = new Float64Array(reactionCount * (speciesCount + 2));
  const noise = noiseFactor * specification.numerics.tolerance;
  const { conditions } = balances;

  for (let row = 0; row < rowCount; row++) {
    const isKnown = balances.unpack(states.subarray(row * size, (row + 1) * size));
    const isSolved = isKnown && model.pellet.solve(conditions) === 'converged';
    temperatures[row] = conditions.temperature;
    pressures[row] = conditions.pressure;
    const { molarVolume } = conditions.fluid;
    densities[row] = model.massFlow / (conditions.totalFlow * molarVolume);
    compressibilityFactors[row] =
      (conditions.pressure * molarVolume) / (gasConstant * conditions.temperature);
    viscosities[row] = model.localProperties.viscosity;
    reynoldsNumbers[row] = reynoldsFlux / model.localProperties.viscosity;
    surfaceTemperatures[row] = isSolved ? model.pellet.surfaceTemperature() : Number.NaN;
    centreTemperatures[row] = isSolved ? model.pellet.centreTemperature() : Number.NaN;
    for (let i = 0; i < speciesCount; i++) {
      molarFlows[i]![row] = conditions.flows[i]! * tubes;
      moleFractions[i]![row] = conditions.flows[i]! / conditions.totalFlow;
    }
    model.rates.evaluateWithGradient(
      conditions.concentrations,
      0,
      conditions.temperature,
      conditions.pressure,
      atBulk,
      0,
      gradient,
      0,
    );
    for (let j = 0; j < reactionCount; j++) {
      const bulk = atBulk[j]! * rateFactors[j]!;
      const average = isSolved ? model.pellet.averageRates[j]! : Number.NaN;
      bulkRates[j]![row] = bulk;
      averageRates[j]![row] = average;
      rates[j]![row] = average / density;
      const gross = grossRate(gradient, j, conditions.concentrations) * rateFactors[j]!;
      effectiveness[j]![row] = Math.abs(bulk) <= noise * gross ? Number.NaN : average / bulk;
    }
  }
  const { heat } = specification;
  return {
    profile: {
      positions,
      temperatures,
      pressures,
      ...(heat.mode === 'cooled' && { coolantTemperatures: column().fill(heat.coolantTemperature) }),
      densities,
      ...(!model.equationOfState.isIdealGas && { compressibilityFactors }),
      ...(viscosities.every(Number.isFinite) && { viscosities }),
      molarFlows,
      moleFractions,
      rates,
      effectiveness,
      surfaceTemperatures,
      centreTemperatures,
    },
    bulkRates,
    averageRates,
    reynoldsNumbers,
  };
}

/** Relative radii at which a pellet's inside is written out: denser towards the surface, where thin zones lie. */
const interiorRadii = Float64Array.from({ length: 51 }, (_, k) => Math.sin((Math.PI / 2) * (k / 50)));

/** The inside of the pellet at one state of the bed; undefined where no pellet state was found. */
export function pelletProfile(
  label: PelletProfile['label'],
  position: number,
  state: Float64Array,
  balances: Balances,
  pellet: PelletModel,
): PelletProfile | undefined {
  if (!balances.unpack(state) || pellet.solve(balances.conditions) !== 'converged') return undefined;
  const interior = pellet.interior(interiorRadii);
  return {
    label,
    position,
    relativeRadii: interior.relativeRadii,
    concentrations: interior.concentrations,
    temperatures: interior.temperatures,
    bulkConcentrations: [...balances.conditions.concentrations],
    bulkTemperature: balances.conditions.temperature,
  };
}
