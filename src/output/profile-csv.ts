import { stringify } from 'csv-stringify/sync';
import type { RunResult } from '../bed/run-result.js';

/** A CSV column: header with its unit, and its values. NaN becomes an empty cell. */
interface Column {
  readonly header: string;
  readonly values: Float64Array;
}

/** Columns as CSV after RFC 4180: comma, CRLF, a dot for decimals, numbers to full precision. */
export function columnsToCsv(columns: readonly Column[]): string {
  const rowCount = columns[0]?.values.length ?? 0;
  const rows = Array.from({ length: rowCount }, (_, row) => columns.map(({ values }) => cell(values[row]!)));
  return stringify([columns.map(({ header }) => header), ...rows], { record_delimiter: 'windows' });
}

function cell(value: number): string {
  return Number.isFinite(value) ? String(value) : '';
}

/**
 * `profile.csv`: a row per output position. Units stand in the headers; flows are of the whole reactor, rates are averaged over the pellet per
 * catalyst mass, `eta` is the averaged rate over the rate at bulk conditions (empty where the latter vanishes).
 */
export function profileCsv({ profile, equilibrium, speciesIds, reactionNames }: RunResult): string {
  return columnsToCsv([
    { header: 'z_m', values: profile.positions },
    { header: 'T_K', values: profile.temperatures },
    { header: 'P_Pa', values: profile.pressures },
    ...(profile.coolantTemperatures ? [{ header: 'coolant_T_K', values: profile.coolantTemperatures }] : []),
    ...speciesIds.map((id, i) => ({ header: `F_${id}_mol_s`, values: profile.molarFlows[i]! })),
    ...speciesIds.map((id, i) => ({ header: `y_${id}`, values: profile.moleFractions[i]! })),
    ...reactionNames.map((name, j) => ({ header: `rate_${name}_mol_kg_s`, values: profile.rates[j]! })),
    ...reactionNames.map((name, j) => ({ header: `eta_${name}`, values: profile.effectiveness[j]! })),
    { header: 'pellet_T_surface_K', values: profile.surfaceTemperatures },
    { header: 'pellet_T_center_K', values: profile.centreTemperatures },
    { header: 'density_kg_m3', values: profile.densities },
    ...(profile.compressibilityFactors
      ? [{ header: 'compressibility_factor', values: profile.compressibilityFactors }]
      : []),
    ...(profile.viscosities ? [{ header: 'viscosity_Pa_s', values: profile.viscosities }] : []),
    ...(equilibrium?.approaches ?? []).flatMap(({ reactionIndex, quotientRatios, temperatureApproaches }) => [
      { header: `quotient_over_K_${reactionNames[reactionIndex]!}`, values: quotientRatios },
      { header: `approach_${reactionNames[reactionIndex]!}_K`, values: temperatureApproaches },
    ]),
    ...(equilibrium?.conversions ?? []).map(({ speciesIndex, values }) => ({
      header: `equilibrium_conversion_${speciesIds[speciesIndex]!}`,
      values,
    })),
  ]);
}

/** `pellet.csv`: the inside of the pellets written out, one block of rows each, from the centre to the surface. */
export function pelletCsv({ pellets, speciesIds }: RunResult): string {
  const header = ['place', 'z_m', 'relative_radius', ...speciesIds.map((id) => `c_${id}_mol_m3`), 'T_K'];
  const rows = pellets.flatMap((pellet) =>
    Array.from(pellet.relativeRadii, (radius, n) => [
      pellet.label,
      cell(pellet.position),
      cell(radius),
      ...pellet.concentrations.map((values) => cell(values[n]!)),
      cell(pellet.temperatures[n]!),
    ]),
  );
  return stringify([header, ...rows], { record_delimiter: 'windows' });
}
