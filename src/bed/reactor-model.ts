/**
 * Turns a reactor's plain data into what the balances work with: per-tube flows, compiled rate laws, heat content, friction, pellet model.
 */
import { compileRates } from '../kinetics/compile-rates.js';
import type { RateBasis } from '../kinetics/reaction-record.js';
import { createPelletModel } from '../pellet/create-pellet-model.js';
import type { PelletModel } from '../pellet/pellet-model.js';
import type { RateEvaluator } from '../kinetics/rate-evaluator.js';
import { createEquationOfState } from '../properties/equation-of-state/create-equation-of-state.js';
import type { EquationOfState } from '../properties/equation-of-state/equation-of-state.js';
import { createPropertyFunction } from '../properties/fluid-property.js';
import { createEquilibriumConstant } from '../properties/reaction-equilibrium.js';
import { createSpeciesThermochemistry, type SpeciesThermochemistry } from '../properties/thermochemistry.js';
import { createCondensationWatch, type CondensationWatch } from './condensation.js';
import { dataRange, type DataRange } from './data-range.js';
import { frictionCoefficients, type FrictionCoefficients } from './friction.js';
import { givenHeatContent, speciesHeatContent, type HeatContent } from './heat-content.js';
import { createLocalProperties, type LocalProperties } from './local/local-properties.js';
import type { ReactorSpecification } from './reactor-specification.js';

export interface ReactorModel {
  readonly specification: ReactorSpecification;
  readonly speciesCount: number;
  readonly reactionCount: number;
  readonly stoichiometry: readonly (readonly number[])[];
  /** Change of moles per mole of reaction. */
  readonly moleChanges: readonly number[];
  /** kg/mol */
  readonly molarMasses: readonly number[];
  /** mol/s per tube */
  readonly feedFlows: Float64Array;
  /** kg/s per tube */
  readonly massFlow: number;
  /** m², open cross-section of the empty tube */
  readonly crossSection: number;
  /** kg/(m² s), superficial */
  readonly massFlux: number;
  /** Pellet volume per bed volume. */
  readonly solidFraction: number;
  readonly friction: FrictionCoefficients | undefined;
  readonly equationOfState: EquationOfState;
  /** Whether the energy balance counts the real fluid's departure from the ideal gas; not where the mixture's heat capacity is given. */
  readonly countsResidualEnthalpy: boolean;
  /** Compressibility factor, then each species' fugacity coefficient, at the present position: read by the rate laws; absent in an ideal gas. */
  readonly lawFactors: Float64Array | undefined;
  readonly localProperties: LocalProperties;
  /** Undefined where neither heats nor heat capacities are known, which only an isothermal bed may be. */
  readonly heatContent: HeatContent | undefined;
  readonly thermochemistry: readonly SpeciesThermochemistry[];
  readonly rates: RateEvaluator;
  /** Each law's own basis into mol/(m³ pellet s); activity included. */
  readonly rateFactors: readonly number[];
  readonly pellet: PelletModel;
  readonly dataRange: DataRange;
  readonly condensation: CondensationWatch;
}

/** Part of the run's tolerance that the pellet may use up: its error acts on the axial solution as a small error of the rates. */
const pelletToleranceShare = 0.1;

export function createReactorModel(specification: ReactorSpecification): ReactorModel {
  const { species, reactions, feed, bed, pellet, fluid, heat } = specification;
  const stoichiometry = reactions.map((reaction) => reaction.stoichiometry);
  const molarMasses = species.map((record) => record.molarMass);
  const feedFlows = Float64Array.from(feed.molarFlows, (flow) => flow / bed.tubes);
  const massFlow = feedFlows.reduce((sum, flow, i) => sum + flow * molarMasses[i]!, 0);
  const crossSection = (Math.PI / 4) * bed.tubeDiameter ** 2;
  const solidFraction = 1 - bed.voidFraction;
  const thermochemistry = species.map(createSpeciesThermochemistry);
  const heatContent = createHeatContent(specification, thermochemistry);
  const perPelletVolume: Record<RateBasis, number> = {
    catalyst_mass: pellet.density,
    pellet_volume: 1,
    bed_volume: 1 / solidFraction,
  };
  const rateFactors = reactions.map(({ basis }) => pellet.activity * perPelletVolume[basis]);
  const equationOfState = createEquationOfState(fluid.equationOfState, species);
  const lawFactors = equationOfState.isIdealGas ? undefined : new Float64Array(species.length + 1).fill(1);
  const localProperties = createLocalProperties(specification, thermochemistry, {
    massFlow,
    massFlux: massFlow / crossSection,
  });
  const equilibriumConstants = (reaction: number): ReturnType<typeof createEquilibriumConstant> =>
    createEquilibriumConstant(stoichiometry[reaction]!, thermochemistry);
  const rates = compileRates(
    reactions.map(({ rate }) => rate.expression),
    species.length,
    equilibriumConstants,
    lawFactors,
  );
  const isIsothermal = heat.mode === 'isothermal';
  return {
    specification,
    speciesCount: species.length,
    reactionCount: reactions.length,
    stoichiometry,
    moleChanges: stoichiometry.map((row) => row.reduce((sum, coefficient) => sum + coefficient, 0)),
    molarMasses,
    feedFlows,
    massFlow,
    crossSection,
    massFlux: massFlow / crossSection,
    solidFraction,
    friction:
      bed.pressureDrop.kind === 'none'
        ? undefined
        : frictionCoefficients(
            bed.pressureDrop.viscous,
            bed.pressureDrop.inertial,
            bed.voidFraction,
            pellet.geometry.sauterDiameter,
          ),
    equationOfState,
    countsResidualEnthalpy:
      !equationOfState.isIdealGas && !isIsothermal && fluid.heatCapacity.kind === 'species',
    lawFactors,
    localProperties,
    heatContent,
    thermochemistry,
    rates,
    rateFactors,
    pellet: createPelletModel({
      pellet,
      transport: localProperties.transport,
      transportVaries: localProperties.transportVaries,
      speciesCount: species.length,
      stoichiometry,
      rates,
      rateFactors,
      referenceHeats: isIsothermal ? undefined : heatContent?.referenceHeats,
      tolerance: specification.numerics.tolerance * pelletToleranceShare,
    }),
    condensation: createCondensationWatch(specification),
    dataRange: dataRange(specification, thermochemistry),
  };
}

function createHeatContent(
  specification: ReactorSpecification,
  thermochemistry: readonly SpeciesThermochemistry[],
): HeatContent | undefined {
  const { reactions, feed, fluid, species } = specification;
  const stoichiometry = reactions.map((reaction) => reaction.stoichiometry);
  const referenceTemperature = feed.temperature;
  const heats: number[] = [];
  for (const reaction of reactions) {
    const heat = heatAt(
      reaction,
      referenceTemperature,
      fluid.heatCapacity.kind === 'species',
      thermochemistry,
    );
    if (heat === undefined) return undefined;
    heats.push(heat);
  }
  if (fluid.heatCapacity.kind === 'given') {
    return givenHeatContent(
      createPropertyFunction(fluid.heatCapacity.property),
      fluid.heatCapacity.per,
      species.map((record) => record.molarMass),
      stoichiometry,
      heats,
      referenceTemperature,
      feed.pressure,
    );
  }
  const isComplete = thermochemistry.every(
    (entry, i) =>
      entry.hasHeatCapacity || (feed.molarFlows[i] === 0 && stoichiometry.every((row) => row[i] === 0)),
  );
  return isComplete
    ? speciesHeatContent(thermochemistry, stoichiometry, heats, referenceTemperature)
    : undefined;
}

/** Heat of a reaction at a temperature: given (carried there with the species' heat capacities where these are in use) or from enthalpies. */
function heatAt(
  reaction: ReactorSpecification['reactions'][number],
  temperature: number,
  usesSpecies: boolean,
  thermochemistry: readonly SpeciesThermochemistry[],
): number | undefined {
  const involved = reaction.stoichiometry.flatMap((coefficient, i) =>
    coefficient === 0 ? [] : [{ coefficient, species: thermochemistry[i]! }],
  );
  const change = (at: number): number =>
    involved.reduce((sum, { coefficient, species }) => sum + coefficient * species.enthalpy(at), 0);
  if (reaction.heat) {
    const { value, temperature: given } = reaction.heat;
    const isShifted =
      given !== undefined && usesSpecies && involved.every(({ species }) => species.hasHeatCapacity);
    return isShifted ? value + change(temperature) - change(given) : value;
  }
  return involved.every(({ species }) => species.hasEnthalpyOfFormation && species.hasHeatCapacity)
    ? change(temperature)
    : undefined;
}
