/** What properties of fluid, film and pellet come to at the ends of the bed: the numbers behind the estimates. */
import { moleculeDiameter } from '../pellet/pores/hindrance.js';
import { poreRegimes } from '../pellet/pores/pore-regimes.js';
import { gasConstant } from '../quantities/constants.js';
import type { Balances } from './balances.js';
import { activeSpecies } from './needed-properties.js';
import type { ReactorModel } from './reactor-model.js';
import type { TransportReport } from './run-result.js';

/** @returns nothing where the state has no conditions */
export function transportReport(
  label: TransportReport['label'],
  position: number,
  state: Float64Array,
  model: ReactorModel,
  balances: Balances,
): TransportReport[] {
  if (!balances.unpack(state)) return [];
  const { fluid, temperature, pressure, moleFractions } = balances.conditions;
  const { viscosity, thermalConductivity, diffusivities, transport } = model.localProperties;
  const molarMass = model.molarMasses.reduce((sum, mass, i) => sum + mass * moleFractions[i]!, 0);
  const { pores } = model.specification.pellet.transport;
  const regimes = pores
    ? poreRegimes(
        pores,
        model.molarMasses,
        model.specification.species.map(moleculeDiameter),
        diffusivities,
        temperature,
      )
    : [];
  const isActive = activeSpecies(model.specification);
  return [
    {
      label,
      position,
      density: molarMass / fluid.molarVolume,
      compressibilityFactor: (pressure * fluid.molarVolume) / (gasConstant * temperature),
      viscosity: known(viscosity),
      thermalConductivity: known(thermalConductivity),
      pelletConductivity: known(transport.thermalConductivity),
      filmHeatTransfer: known(transport.heatTransfer),
      species: isActive.flatMap((active, speciesIndex) =>
        active
          ? [
              {
                speciesIndex,
                diffusivity: known(diffusivities[speciesIndex]!),
                effectiveDiffusivity: known(transport.effectiveDiffusivities[speciesIndex]!),
                filmMassTransfer: known(transport.massTransfer[speciesIndex]!),
                fugacityCoefficient: Math.exp(fluid.logFugacityCoefficients[speciesIndex]!),
                pores: regimes.filter((regime) => regime.speciesIndex === speciesIndex),
              },
            ]
          : [],
      ),
    },
  ];
}

/** Neither what nothing needs (no number) nor the absence of a resistance (infinite). */
function known(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
