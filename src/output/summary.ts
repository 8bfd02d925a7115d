import type { ReactorSpecification } from '../bed/reactor-specification.js';
import type { RunResult, TransportReport } from '../bed/run-result.js';
import { caution } from './caution.js';

/** Where a result comes from. */
export interface Provenance {
  readonly tool: 'bedwright';
  readonly version: string;
  /** File name of the case, without folders. */
  readonly caseFile: string;
  /** SHA-256 of the case file's bytes, hexadecimal. */
  readonly caseHash: string;
  /** Species files that the case names, with their SHA-256. */
  readonly speciesFiles: readonly { readonly name: string; readonly hash: string }[];
  /** Names of all files of the result; a folder that holds others is not overwritten. */
  readonly files: readonly string[];
}

/** What JSON can hold. */
export type Json = string | number | boolean | null | readonly Json[] | { readonly [key: string]: Json };

const finite = (value: number | null | undefined): number | null =>
  value !== null && value !== undefined && Number.isFinite(value) ? value : null;

const byKey = <Entry>(
  entries: readonly Entry[],
  key: (entry: Entry, index: number) => string,
  value: (entry: Entry, index: number) => Json,
): Record<string, Json> =>
  Object.fromEntries(entries.map((entry, index) => [key(entry, index), value(entry, index)]));

/** At the outlet, and where the feed would come to without exchange of heat; null where nothing is reversible. */
function equilibriumOf({ equilibrium, speciesIds, reactionNames }: RunResult): Json {
  if (!equilibrium) return null;
  const { approaches, conversions, adiabatic } = equilibrium;
  return {
    outlet: byKey(
      approaches,
      ({ reactionIndex }) => reactionNames[reactionIndex]!,
      ({ quotientRatios, temperatureApproaches }) => ({
        quotient_over_K: finite(quotientRatios.at(-1)),
        temperature_approach_K: finite(temperatureApproaches.at(-1)),
      }),
    ),
    conversion_at_outlet_conditions: byKey(
      conversions,
      ({ speciesIndex }) => speciesIds[speciesIndex]!,
      ({ values }) => finite(values.at(-1)),
    ),
    adiabatic: adiabatic
      ? {
          temperature_K: finite(adiabatic.temperature),
          mole_fraction: byKey(adiabatic.moleFractions, (_value, i) => speciesIds[i]!, finite),
          conversion: byKey(
            adiabatic.conversions,
            ({ speciesIndex }) => speciesIds[speciesIndex]!,
            ({ value }) => finite(value),
          ),
        }
      : null,
  };
}

function transportOf(place: TransportReport, speciesIds: readonly string[]): Json {
  return {
    place: place.label,
    position_m: place.position,
    density_kg_m3: finite(place.density),
    compressibility_factor: finite(place.compressibilityFactor),
    viscosity_Pa_s: place.viscosity,
    thermal_conductivity_W_m_K: place.thermalConductivity,
    pellet_conductivity_W_m_K: place.pelletConductivity,
    film_heat_transfer_W_m2_K: place.filmHeatTransfer,
    species: byKey(
      place.species,
      ({ speciesIndex }) => speciesIds[speciesIndex]!,
      (entry) => ({
        diffusivity_m2_s: entry.diffusivity,
        effective_diffusivity_m2_s: entry.effectiveDiffusivity,
        film_mass_transfer_m_s: entry.filmMassTransfer,
        fugacity_coefficient: finite(entry.fugacityCoefficient),
        pores: entry.pores.map((pore) => ({
          radius_m: pore.radius,
          mechanism: pore.mechanism,
          knudsen_diffusivity_m2_s: pore.knudsenDiffusivity,
          knudsen_number: finite(pore.knudsenNumber),
          mean_free_path_m: finite(pore.meanFreePath),
          molecule_over_pore_diameter: pore.sizeRatio,
        })),
      }),
    ),
  };
}

/**
 * `summary.json`: units stand in the key names; numbers are never NaN or infinite, what is unknown is null.
 *
 * @param seconds - time of computing, null to leave it out
 */
export function summarise(
  result: RunResult,
  specification: ReactorSpecification,
  provenance: Provenance,
  seconds: number | null,
): Record<string, Json> {
  const { speciesIds, reactionNames, outlet } = result;
  const ofSpecies = (values: readonly number[]): Record<string, Json> =>
    byKey(values, (_value, i) => speciesIds[i]!, finite);
  return {
    title: specification.title,
    status: result.status,
    stop: result.stop
      ? { reason: result.stop.reason, position_m: result.stop.position, message: result.stop.message }
      : null,
    outlet: {
      position_m: outlet.position,
      temperature_K: finite(outlet.temperature),
      pressure_Pa: finite(outlet.pressure),
      molar_flow_mol_s: ofSpecies(outlet.molarFlows),
      mole_fraction: ofSpecies(outlet.moleFractions),
    },
    conversion: byKey(
      result.conversions,
      ({ speciesIndex }) => speciesIds[speciesIndex]!,
      ({ value }) => finite(value),
    ),
    selectivity: byKey(
      result.selectivities,
      ({ productIndex, reactantIndex }) => `${speciesIds[productIndex]!}_from_${speciesIds[reactantIndex]!}`,
      ({ selectivity }) => finite(selectivity),
    ),
    yield: byKey(
      result.selectivities,
      ({ productIndex, reactantIndex }) => `${speciesIds[productIndex]!}_from_${speciesIds[reactantIndex]!}`,
      (entry) => finite(entry.yield),
    ),
    peak: { temperature_K: finite(result.peak.temperature), position_m: finite(result.peak.position) },
    pressure_drop_Pa: finite(result.pressureDrop),
    heat_removed_W: finite(result.heatRemoved),
    catalyst_mass_kg: finite(result.catalystMass),
    equilibrium: equilibriumOf(result),
    effectiveness: byKey(
      result.effectiveness,
      (_entry, j) => reactionNames[j]!,
      ({ inlet, outlet: out, mean }) => ({ inlet: finite(inlet), outlet: finite(out), mean: finite(mean) }),
    ),
    balances: {
      mass: finite(result.balances.mass),
      elements: Object.fromEntries(
        Object.entries(result.balances.elements).map(([element, value]) => [element, finite(value)]),
      ),
      energy: finite(result.balances.energy),
    },
    criteria: result.groups.map(({ name, of, value, unit, definition, source }) => ({
      name,
      of: of ?? null,
      place: 'inlet',
      value: finite(value),
      unit,
      definition,
      source,
    })),
    transport: result.transport.map((place) => transportOf(place, speciesIds)),
    events: result.events.map(({ kind, position, message }) => ({ kind, position_m: position, message })),
    warnings: [...result.warnings],
    assumptions: result.assumptions.map(({ about, statement, source }) => ({ about, statement, source })),
    work: { ...result.work, seconds: finite(seconds) },
    provenance: {
      tool: provenance.tool,
      version: provenance.version,
      case_file: provenance.caseFile,
      case_sha256: provenance.caseHash,
      species_files: byKey(
        provenance.speciesFiles,
        ({ name }) => name,
        ({ hash }) => hash,
      ),
      files: [...provenance.files],
    },
    caution,
  };
}
