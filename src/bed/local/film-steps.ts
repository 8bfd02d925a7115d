/** Mass and heat transfer between fluid and pellet. */
import { filmCorrelations } from '../../pellet/film/film-correlations.js';
import type { ReactorSpecification } from '../reactor-specification.js';
import { givenSteps, type LocalStep, type LocalValues } from './local-step.js';

/** Flow through one tube. */
export interface TubeFlow {
  /** kg/s */
  readonly massFlow: number;
  /** kg/(m² s), superficial */
  readonly massFlux: number;
}

export function filmSteps(
  { pellet, bed, heat, feed }: ReactorSpecification,
  isActive: readonly boolean[],
  { massFlow, massFlux }: TubeFlow,
  values: LocalValues,
): LocalStep[] {
  const { film } = pellet.transport;
  const { transport } = values;
  const { massTransfer } = transport;
  if (film.kind === 'none') return [];
  if (film.kind === 'given') {
    return [
      ...film.massTransfer.flatMap((property, i) =>
        givenSteps(property, feed, (value) => (massTransfer[i] = value)),
      ),
      ...givenSteps(film.heatTransfer, feed, (value) => (transport.heatTransfer = value)),
    ];
  }
  const { sherwood } = filmCorrelations[film.name];
  const diameter = pellet.geometry.sauterDiameter;
  const geometry = { voidFraction: bed.voidFraction, sphericity: 1 };
  const active = isActive.flatMap((value, i) => (value ? [i] : []));
  const hasHeat = heat.mode !== 'isothermal';
  return [
    ({ totalFlow, capacityFlow, fluid: { molarVolume } }) => {
      const { viscosity, thermalConductivity, diffusivities } = values;
      const reynolds = (massFlux * diameter) / viscosity;
      const kinematicViscosity = (viscosity * totalFlow * molarVolume) / massFlow;
      for (let k = 0; k < active.length; k++) {
        const i = active[k]!;
        const schmidt = kinematicViscosity / diffusivities[i]!;
        massTransfer[i] = (sherwood(reynolds, schmidt, geometry) * diffusivities[i]!) / diameter;
      }
      if (hasHeat) {
        const prandtl = (viscosity * capacityFlow) / (massFlow * thermalConductivity);
        transport.heatTransfer = (sherwood(reynolds, prandtl, geometry) * thermalConductivity) / diameter;
      }
      return true;
    },
  ];
}
