/**
 * Viscosity of the fluid and transport in and around the pellet at one position of the bed: given numbers once, formulas and estimates anew
 * at each position. What nothing needs is not computed.
 */
import type { PelletTransport } from '../pellet/pellet-specification.js';
import { createPropertyFunction, type FluidProperty } from '../properties/fluid-property.js';
import type { BedConditions } from './bed-conditions.js';
import type { ReactorSpecification } from './reactor-specification.js';

export interface LocalProperties {
  /** Pa s; NaN where nothing needs it, like the next two. */
  viscosity: number;
  /** W/(m K) */
  thermalConductivity: number;
  /** m²/s, of each species in the mixture. */
  readonly diffusivities: Float64Array;
  /** Pa s/K and Pa s/Pa at constant composition, set by `differentiateViscosity`. */
  viscosityByTemperature: number;
  viscosityByPressure: number;
  readonly transport: PelletTransport;
  /** Whether the pellet's transport changes along the bed. */
  readonly transportVaries: boolean;
  /** Sets everything to a position's conditions; false where a property comes to no positive number. */
  readonly update: (conditions: BedConditions) => boolean;
  readonly differentiateViscosity: (conditions: BedConditions) => void;
}

/** Sets one property from the conditions; false where it comes to no positive number. */
type Step = (conditions: BedConditions) => boolean;

export function createLocalProperties(specification: ReactorSpecification): LocalProperties {
  const { fluid, pellet, species, feed } = specification;
  const { effectiveDiffusivities, thermalConductivity, film } = pellet.transport;
  const transport: PelletTransport = {
    effectiveDiffusivities: new Float64Array(species.length).fill(Infinity),
    thermalConductivity: Infinity,
    massTransfer: new Float64Array(species.length).fill(Infinity),
    heatTransfer: Infinity,
  };
  const steps: Step[] = [];
  /** Writes a given property now, and again at each position where it is a formula. */
  const follow = (property: FluidProperty, write: (value: number) => void): void => {
    const { isConstant, value } = createPropertyFunction(property);
    write(value(feed.temperature, feed.pressure));
    if (isConstant) return;
    steps.push(({ temperature, pressure }) => {
      const local = value(temperature, pressure);
      write(local);
      return local > 0;
    });
  };
  effectiveDiffusivities.forEach((property, i) => {
    if (property.kind === 'estimate') return;
    follow(property, (value) => (transport.effectiveDiffusivities[i] = value));
  });
  if (thermalConductivity.kind !== 'phases') {
    follow(thermalConductivity, (value) => (transport.thermalConductivity = value));
  }
  if (film.kind === 'given') {
    film.massTransfer.forEach((property, i) => {
      follow(property, (value) => (transport.massTransfer[i] = value));
    });
    follow(film.heatTransfer, (value) => (transport.heatTransfer = value));
  }
  const transportVaries = steps.length > 0;

  const properties: LocalProperties = {
    viscosity: Number.NaN,
    thermalConductivity: Number.NaN,
    diffusivities: new Float64Array(species.length).fill(Number.NaN),
    viscosityByTemperature: 0,
    viscosityByPressure: 0,
    transport,
    transportVaries,
    update(conditions) {
      for (let k = 0; k < steps.length; k++) if (!steps[k]!(conditions)) return false;
      return true;
    },
    differentiateViscosity: () => undefined,
  };
  const { viscosity } = fluid;
  if (viscosity && viscosity.kind !== 'estimate') {
    const given = createPropertyFunction(viscosity);
    follow(viscosity, (value) => (properties.viscosity = value));
    if (given.isConstant) return properties;
    return Object.assign(properties, {
      differentiateViscosity({ temperature, pressure }: BedConditions) {
        properties.viscosityByTemperature = given.temperatureDerivative(temperature, pressure);
        properties.viscosityByPressure = given.pressureDerivative(temperature, pressure);
      },
    });
  }
  return properties;
}
