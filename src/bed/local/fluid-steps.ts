/** Viscosity, thermal conductivity and diffusivities of the fluid. */
import type { LocalProperty } from '../../pellet/pellet-specification.js';
import type { SpeciesThermochemistry } from '../../properties/thermochemistry.js';
import { createGasTransport, type GasTransport } from '../../properties/transport/gas-transport.js';
import {
  blancRule,
  fluxRatioRule,
  wilkeRule,
  type MixingRule,
} from '../../properties/transport/mixture-diffusivity.js';
import type { NeededProperties } from '../needed-properties.js';
import type { ReactorSpecification } from '../reactor-specification.js';
import { givenSteps, type LocalStep, type LocalValues } from './local-step.js';

/** The estimates of a reactor's fluid; what nothing needs may lack its data. */
export function createFluidEstimates(
  specification: ReactorSpecification,
  thermochemistry: readonly SpeciesThermochemistry[],
  needed: NeededProperties,
): GasTransport {
  const { fluid, species } = specification;
  const isEstimated = (isNeeded: boolean, property: LocalProperty): boolean =>
    isNeeded && property.kind === 'estimate';
  return createGasTransport({
    records: species,
    heatCapacities: thermochemistry.map(({ heatCapacity }) => heatCapacity),
    mixing: mixingRule(specification),
    isCorrected: fluid.isCorrectedForPressure,
    wants: {
      viscosity: isEstimated(needed.viscosity, fluid.viscosity),
      conductivity: isEstimated(needed.thermalConductivity, fluid.thermalConductivity),
      diffusivity: fluid.diffusivities.some((property, i) => isEstimated(needed.diffusivities[i]!, property)),
    },
  });
}

function mixingRule({ fluid, reactions }: ReactorSpecification): MixingRule {
  switch (fluid.diffusivityMixing) {
    case 'wilke':
      return wilkeRule;
    case 'blanc':
      return blancRule;
    case 'flux_ratios':
      return fluxRatioRule(reactions[0]!.stoichiometry);
  }
}

export function fluidSteps(
  { fluid, feed }: ReactorSpecification,
  needed: NeededProperties,
  gas: GasTransport,
  values: LocalValues,
): LocalStep[] {
  const steps: LocalStep[] = [];
  if (needed.viscosity) {
    if (fluid.viscosity.kind === 'estimate') {
      steps.push(({ moleFractions, temperature, pressure }) => {
        values.viscosity = gas.viscosity(moleFractions, temperature, pressure);
        return values.viscosity > 0;
      });
    } else steps.push(...givenSteps(fluid.viscosity, feed, (value) => (values.viscosity = value)));
  }
  if (needed.thermalConductivity) {
    if (fluid.thermalConductivity.kind === 'estimate') {
      steps.push(({ moleFractions, temperature, pressure, fluid: { molarVolume } }) => {
        values.thermalConductivity = gas.conductivity(moleFractions, temperature, pressure, 1 / molarVolume);
        return values.thermalConductivity > 0;
      });
    } else {
      steps.push(
        ...givenSteps(fluid.thermalConductivity, feed, (value) => (values.thermalConductivity = value)),
      );
    }
  }
  return [...steps, ...diffusivitySteps(fluid, feed, needed, gas, values)];
}

function diffusivitySteps(
  fluid: ReactorSpecification['fluid'],
  feed: ReactorSpecification['feed'],
  needed: NeededProperties,
  gas: GasTransport,
  { diffusivities }: LocalValues,
): LocalStep[] {
  const given: LocalStep[] = [];
  const estimated: number[] = [];
  fluid.diffusivities.forEach((property, i) => {
    if (!needed.diffusivities[i]) return;
    if (property.kind === 'estimate') estimated.push(i);
    else given.push(...givenSteps(property, feed, (value) => (diffusivities[i] = value)));
  });
  if (estimated.length === 0) return given;
  const scratch = new Float64Array(diffusivities.length);
  const estimate: LocalStep = ({ moleFractions, temperature, pressure }) => {
    if (!gas.diffusivitiesInto(moleFractions, temperature, pressure, scratch)) return false;
    for (let k = 0; k < estimated.length; k++) diffusivities[estimated[k]!] = scratch[estimated[k]!]!;
    return true;
  };
  return [estimate, ...given];
}
