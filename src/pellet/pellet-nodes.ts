import type { DiffusionGrid } from '../numerics/diffusion/diffusion-grid.js';
import type { FieldBasis } from './field-basis.js';
import type { PelletBulk, PelletModelInput } from './pellet-model.js';

/**
 * What stands at the nodes of one grid: concentrations, temperatures, rates, field sources, and their derivatives. All of it is scratch that
 * each evaluation writes anew from the unknowns (φ by field, `fieldCount × unknownCount`, then the averages <q> where there is a film).
 */
export class PelletNodes {
  /** `nodeCount × speciesCount`, mol/m³ */
  readonly concentrations: Float64Array;
  /** K, one per node */
  readonly temperatures: Float64Array;
  /** `nodeCount × reactionCount`, in the laws' own bases */
  readonly rates: Float64Array;
  /** `nodeCount × reactionCount × (speciesCount + 2)`, derivatives of `rates` */
  readonly rateGradient: Float64Array;
  /** `fieldCount × nodeCount`, mol/(m³ s) */
  readonly sources: Float64Array;
  /** `nodeCount × fieldCount × reactionCount`: derivatives of the rates (per pellet volume) with respect to the field at the node … */
  readonly byPotential: Float64Array;
  /** … and to the field's average, through the film. */
  readonly byAverage: Float64Array;

  private readonly grid: DiffusionGrid;
  private readonly input: PelletModelInput;
  private readonly basis: FieldBasis;

  constructor(grid: DiffusionGrid, input: PelletModelInput, basis: FieldBasis) {
    const { nodeCount } = grid;
    const { speciesCount } = input;
    const reactionCount = input.stoichiometry.length;
    this.grid = grid;
    this.input = input;
    this.basis = basis;
    this.concentrations = new Float64Array(nodeCount * speciesCount);
    this.temperatures = new Float64Array(nodeCount);
    this.rates = new Float64Array(nodeCount * reactionCount);
    this.rateGradient = new Float64Array(nodeCount * reactionCount * (speciesCount + 2));
    this.sources = new Float64Array(basis.fieldCount * nodeCount);
    this.byPotential = new Float64Array(nodeCount * basis.fieldCount * reactionCount);
    this.byAverage = new Float64Array(nodeCount * basis.fieldCount * reactionCount);
  }

  /**
   * Everything but the derivatives with respect to the fields; `withGradient` adds `rateGradient`.
   *
   * @param fieldHeats - J/mol, positive when exothermic, one per field
   * @param growth - size of the pellet relative to the true one; the film's resistance grows with it
   * @returns false when a source is not finite
   */
  evaluate(
    bulk: PelletBulk,
    fieldHeats: Float64Array,
    unknowns: Float64Array,
    growth: number,
    withGradient: boolean,
  ): boolean {
    const { concentrations, temperatures, rates, basis, input, sources, rateGradient } = this;
    const { speciesCount, rateFactors } = input;
    const { nodeCount, unknownCount } = this.grid;
    const { fieldCount, combination, activeSpecies, hasFilm } = basis;
    const { diffusionCoefficients, filmCoefficients, inverseConductivity, filmHeatResistance } = basis;
    const activeCount = activeSpecies.length;
    const reactionCount = rateFactors.length;
    const bulkConcentrations = bulk.concentrations;
    const laws = input.rates;
    for (let m = 0; m < nodeCount; m++) {
      const row = m * speciesCount;
      for (let i = 0; i < speciesCount; i++) concentrations[row + i] = bulkConcentrations[i]!;
      let temperature = bulk.temperature;
      for (let k = 0; k < fieldCount; k++) {
        const potential = m < unknownCount ? unknowns[k * unknownCount + m]! : 0;
        const average = hasFilm ? growth * unknowns[fieldCount * unknownCount + k]! : 0;
        const start = k * speciesCount;
        for (let a = 0; a < activeCount; a++) {
          const i = activeSpecies[a]!;
          concentrations[row + i]! +=
            diffusionCoefficients[start + i]! * potential + filmCoefficients[start + i]! * average;
        }
        temperature += fieldHeats[k]! * (inverseConductivity * potential + filmHeatResistance * average);
      }
      temperatures[m] = temperature;
      const rateRow = m * reactionCount;
      if (withGradient) {
        const gradientRow = rateRow * (speciesCount + 2);
        laws.evaluateWithGradient(
          concentrations,
          row,
          temperature,
          bulk.pressure,
          rates,
          rateRow,
          rateGradient,
          gradientRow,
        );
      } else {
        laws.evaluate(concentrations, row, temperature, bulk.pressure, rates, rateRow);
      }
      for (let k = 0; k < fieldCount; k++) {
        let source = 0;
        for (let j = 0; j < reactionCount; j++) {
          source += combination[k * reactionCount + j]! * rateFactors[j]! * rates[rateRow + j]!;
        }
        if (!(Math.abs(source) < Infinity)) return false;
        sources[k * nodeCount + m] = source;
      }
    }
    return true;
  }

  /** `byPotential` and `byAverage` from the `rateGradient` of the last evaluation. */
  differentiate(fieldHeats: Float64Array, growth: number): void {
    const { basis, rateGradient } = this;
    const { speciesCount, rateFactors } = this.input;
    const { fieldCount, activeSpecies } = basis;
    const activeCount = activeSpecies.length;
    const reactionCount = rateFactors.length;
    const columns = speciesCount + 2;
    for (let m = 0; m < this.grid.nodeCount; m++) {
      for (let j = 0; j < reactionCount; j++) {
        const from = (m * reactionCount + j) * columns;
        const byTemperature = rateGradient[from + speciesCount]!;
        for (let k = 0; k < fieldCount; k++) {
          const heat = fieldHeats[k]! * byTemperature;
          let potential = heat * basis.inverseConductivity;
          let average = heat * basis.filmHeatResistance;
          const start = k * speciesCount;
          for (let a = 0; a < activeCount; a++) {
            const i = activeSpecies[a]!;
            const byConcentration = rateGradient[from + i]!;
            potential += byConcentration * basis.diffusionCoefficients[start + i]!;
            average += byConcentration * basis.filmCoefficients[start + i]!;
          }
          const at = (m * fieldCount + k) * reactionCount + j;
          this.byPotential[at] = rateFactors[j]! * potential;
          this.byAverage[at] = growth * rateFactors[j]! * average;
        }
      }
    }
  }
}
