/**
 * Properties of the fluid and transport in and around the pellet at one position of the bed: given numbers once, formulas and estimates anew
 * at each position. What nothing needs is not computed.
 */
import { createPropertyFunction } from '../../properties/fluid-property.js';
import type { SpeciesThermochemistry } from '../../properties/thermochemistry.js';
import type { BedConditions } from '../bed-conditions.js';
import { activeSpecies, neededProperties } from '../needed-properties.js';
import type { ReactorSpecification } from '../reactor-specification.js';
import { filmSteps, type TubeFlow } from './film-steps.js';
import { createFluidEstimates, fluidSteps } from './fluid-steps.js';
import type { LocalValues } from './local-step.js';
import { pelletSteps } from './pellet-steps.js';

export interface LocalProperties extends LocalValues {
  /** Whether the pellet's transport changes along the bed. */
  readonly transportVaries: boolean;
  /** Sets everything to a position's conditions; false where a property comes to no positive number. */
  readonly update: (conditions: BedConditions) => boolean;
  /** Pa s/K and Pa s/Pa at constant composition, into `target`. */
  readonly viscositySlopesInto: (conditions: BedConditions, target: ViscositySlopes) => void;
}

export interface ViscositySlopes {
  byTemperature: number;
  byPressure: number;
}

/** Relative change of temperature over which an estimated viscosity is differenced. */
const differenceStep = 1e-5;

export function createLocalProperties(
  specification: ReactorSpecification,
  thermochemistry: readonly SpeciesThermochemistry[],
  flow: TubeFlow,
): LocalProperties {
  const { fluid, species } = specification;
  const isActive = activeSpecies(specification);
  const needed = neededProperties({ ...specification, isActive });
  const gas = createFluidEstimates(specification, thermochemistry, needed);
  const values: LocalValues = {
    viscosity: Number.NaN,
    thermalConductivity: Number.NaN,
    diffusivities: new Float64Array(species.length).fill(Number.NaN),
    transport: {
      effectiveDiffusivities: new Float64Array(species.length).fill(Infinity),
      thermalConductivity: Infinity,
      massTransfer: new Float64Array(species.length).fill(Infinity),
      heatTransfer: Infinity,
    },
  };
  // Film and pellet follow from the fluid, so it comes first.
  const ofFluid = fluidSteps(specification, needed, gas, values);
  const ofPellet = [
    ...pelletSteps(specification, values),
    ...filmSteps(specification, isActive, flow, values),
  ];
  const steps = [...ofFluid, ...ofPellet];
  const given = fluid.viscosity.kind === 'estimate' ? undefined : createPropertyFunction(fluid.viscosity);
  return Object.assign(values, {
    transportVaries: ofPellet.length > 0,
    update(conditions: BedConditions): boolean {
      for (let k = 0; k < steps.length; k++) if (!steps[k]!(conditions)) return false;
      return true;
    },
    viscositySlopesInto(
      { moleFractions, temperature, pressure }: BedConditions,
      target: ViscositySlopes,
    ): void {
      if (given) {
        target.byTemperature = given.temperatureDerivative(temperature, pressure);
        target.byPressure = given.pressureDerivative(temperature, pressure);
        return;
      }
      // Of the estimates only the change with temperature is worth following.
      const warmer = temperature * (1 + differenceStep);
      const change = gas.viscosity(moleFractions, warmer, pressure) - values.viscosity;
      target.byTemperature = change / (warmer - temperature);
      target.byPressure = 0;
    },
  });
}
