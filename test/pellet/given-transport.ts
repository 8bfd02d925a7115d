import type { ReactorSpecification } from '../../src/bed/reactor-specification.js';
import type { PelletTransport, PelletTransportSpecification } from '../../src/pellet/pellet-specification.js';
import type { FluidProperty } from '../../src/properties/fluid-property.js';

export const constant = (value: number): FluidProperty => ({ kind: 'constant', value });

interface GivenTransport {
  readonly diffusivities: readonly number[];
  readonly thermalConductivity?: number;
  readonly massTransfer?: readonly number[];
  readonly heatTransfer?: number;
}

/** Transport of a pellet, all of it given; what is left out offers no resistance. */
export function givenTransport(given: GivenTransport): PelletTransportSpecification {
  const { diffusivities, thermalConductivity, massTransfer, heatTransfer } = given;
  return {
    effectiveDiffusivities: diffusivities.map(constant),
    thermalConductivity: constant(thermalConductivity ?? Infinity),
    film: {
      kind: 'given',
      massTransfer: (massTransfer ?? diffusivities.map(() => Infinity)).map(constant),
      heatTransfer: constant(heatTransfer ?? Infinity),
    },
  };
}

/** The same as the pellet models read it. */
export function transportNumbers(given: GivenTransport): PelletTransport {
  return {
    effectiveDiffusivities: Float64Array.from(given.diffusivities),
    thermalConductivity: given.thermalConductivity ?? Infinity,
    massTransfer: Float64Array.from(given.massTransfer ?? given.diffusivities.map(() => Infinity)),
    heatTransfer: given.heatTransfer ?? Infinity,
  };
}

/** An ideal gas whose transport properties are estimated where anything needs them. */
export function idealGas(
  speciesCount: number,
  change: Partial<ReactorSpecification['fluid']> = {},
): ReactorSpecification['fluid'] {
  return {
    phase: 'gas',
    equationOfState: { kind: 'ideal' },
    viscosity: { kind: 'estimate' },
    thermalConductivity: { kind: 'estimate' },
    diffusivities: Array.from({ length: speciesCount }, () => ({ kind: 'estimate' })),
    diffusivityMixing: 'wilke',
    isCorrectedForPressure: false,
    heatCapacity: { kind: 'species' },
    ...change,
  };
}
