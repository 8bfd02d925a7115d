/** Diffusion and conduction inside the pellet. */
import { geometricMeanConductivity } from '../../pellet/effective-conductivity.js';
import { moleculeDiameter } from '../../pellet/pores/hindrance.js';
import { createPoreDiffusion } from '../../pellet/pores/pore-diffusion.js';
import type { ReactorSpecification } from '../reactor-specification.js';
import { givenSteps, type LocalStep, type LocalValues } from './local-step.js';

export function pelletSteps(
  { pellet, species, feed }: ReactorSpecification,
  values: LocalValues,
): LocalStep[] {
  const { effectiveDiffusivities, thermalConductivity, pores } = pellet.transport;
  const { transport } = values;
  const steps: LocalStep[] = [];
  const estimated: number[] = [];
  effectiveDiffusivities.forEach((property, i) => {
    if (property.kind === 'estimate') estimated.push(i);
    else steps.push(...givenSteps(property, feed, (value) => (transport.effectiveDiffusivities[i] = value)));
  });
  if (estimated.length > 0 && pores) {
    const { effectiveInto } = createPoreDiffusion(
      pores,
      species.map(({ molarMass }) => molarMass),
      species.map(moleculeDiameter),
    );
    const scratch = new Float64Array(species.length);
    steps.push(({ temperature }) => {
      effectiveInto(values.diffusivities, temperature, scratch);
      let isSound = true;
      for (let k = 0; k < estimated.length; k++) {
        const i = estimated[k]!;
        transport.effectiveDiffusivities[i] = scratch[i]!;
        isSound = isSound && scratch[i]! > 0;
      }
      return isSound;
    });
  }
  if (thermalConductivity.kind === 'phases') {
    const { porosity, solid } = thermalConductivity;
    steps.push(() => {
      transport.thermalConductivity = geometricMeanConductivity(porosity, solid, values.thermalConductivity);
      return true;
    });
  } else {
    steps.push(...givenSteps(thermalConductivity, feed, (value) => (transport.thermalConductivity = value)));
  }
  return steps;
}
