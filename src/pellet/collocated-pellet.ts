/**
 * One pellet on one grid: steady reaction and diffusion of all fields, film included.
 *
 * Unknowns per field: φ at the grid's interior nodes and, where there is a film, the average <q>. Equations:
 *   φ_n = R² Σ_m green_nm q_m        <q> = Σ_m weights_m q_m
 * with R the radius of the one-dimensional body. Newton with the exact Jacobian, its factors kept as long as they contract well;
 * the averages' derivatives by the adjoint of the same factors.
 *
 * Assumes constant diffusivities and conductivity within one pellet. Does not look for several steady states.
 */
import type { DiffusionGrid } from '../numerics/diffusion/diffusion-grid.js';
import { factoriseInPlace, solveInPlace, solveTransposedInPlace } from '../numerics/dense-lu.js';
import type { FieldBasis } from './field-basis.js';
import type { PelletBulk, PelletModelInput, PelletStatus, PelletWork } from './pellet-model.js';

const maximumIterations = 25;
/** Chord iterations that contract worse than this get new factors. */
const slowContraction = 0.2;
/** A step may grow this many times in a row before the attempt is given up. */
const patience = 4;
/** Smallest concentration that counts as a scale, relative to the largest in the pellet. */
const scaleFloor = 1e-4;
/** A temperature change of this fraction counts like a change of a concentration by itself: typical Arrhenius numbers are 10 to 30. */
const temperatureScale = 0.05;
/** Concentrations below minus this fraction of the largest are not rounding any more. */
const overdrawnFraction = 1e-4;

export class CollocatedPellet {
  readonly grid: DiffusionGrid;
  readonly averageRates: Float64Array;
  readonly gradient: Float64Array;
  /** φ by field (`fieldCount × unknownCount`), then <q> by field. Survives between solves as the warm start. */
  readonly unknowns: Float64Array;
  /** <q_k>, one per field, of the last solve. */
  readonly averageSources: Float64Array;

  private readonly input: PelletModelInput;
  private readonly basis: FieldBasis;
  private readonly work: PelletWork;
  private readonly size: number;
  private readonly radiusSquared: number;
  private readonly concentrations: Float64Array;
  private readonly temperatures: Float64Array;
  private readonly rates: Float64Array;
  private readonly nodeGradient: Float64Array;
  private readonly sources: Float64Array;
  private readonly residual: Float64Array;
  private readonly factors: Float64Array;
  private readonly pivots: Int32Array;
  private readonly fieldHeats: Float64Array;
  private readonly unknownScales: Float64Array;
  private readonly sensitivityDiffusion: Float64Array;
  private readonly sensitivityFilm: Float64Array;
  private hasFactors = false;
  private hasSolution = false;

  constructor(grid: DiffusionGrid, input: PelletModelInput, basis: FieldBasis, work: PelletWork) {
    const { speciesCount } = input;
    const reactionCount = input.stoichiometry.length;
    const { fieldCount } = basis;
    const { nodeCount, unknownCount } = grid;
    this.grid = grid;
    this.input = input;
    this.basis = basis;
    this.work = work;
    const { shapeExponent, diffusionLength } = input.pellet.geometry;
    this.radiusSquared = ((shapeExponent + 1) * diffusionLength) ** 2;
    this.size = fieldCount * unknownCount + (basis.hasFilm ? fieldCount : 0);
    this.averageRates = new Float64Array(reactionCount);
    this.gradient = new Float64Array(reactionCount * (speciesCount + 2));
    this.unknowns = new Float64Array(this.size);
    this.averageSources = new Float64Array(fieldCount);
    this.concentrations = new Float64Array(nodeCount * speciesCount);
    this.temperatures = new Float64Array(nodeCount);
    this.rates = new Float64Array(nodeCount * reactionCount);
    this.nodeGradient = new Float64Array(nodeCount * reactionCount * (speciesCount + 2));
    this.sources = new Float64Array(fieldCount * nodeCount);
    this.residual = new Float64Array(this.size);
    this.factors = new Float64Array(this.size * this.size);
    this.pivots = new Int32Array(this.size);
    this.fieldHeats = new Float64Array(fieldCount);
    this.unknownScales = new Float64Array(2 * fieldCount);
    this.sensitivityDiffusion = new Float64Array(nodeCount * fieldCount * reactionCount);
    this.sensitivityFilm = new Float64Array(nodeCount * fieldCount * reactionCount);
  }

  /** Forgets the last solution: the next solve starts from bulk conditions throughout the pellet. */
  reset(): void {
    this.unknowns.fill(0);
    this.hasFactors = false;
    this.hasSolution = false;
  }

  /** Starts the next solve from another grid's solution of the same pellet. */
  adopt(other: CollocatedPellet): void {
    const { fieldCount } = this.basis;
    const { unknownCount } = this.grid;
    for (let n = 0; n < unknownCount; n++) {
      const coefficients = other.grid.interpolationAt(this.grid.positions[n]!);
      for (let k = 0; k < fieldCount; k++) {
        let value = 0;
        const start = k * other.grid.unknownCount;
        for (let m = 0; m < coefficients.length; m++) value += coefficients[m]! * other.unknowns[start + m]!;
        this.unknowns[k * unknownCount + n] = value;
      }
    }
    this.averageSources.set(other.averageSources);
    this.fieldHeats.set(other.fieldHeats);
    if (this.basis.hasFilm) this.unknowns.set(other.averageSources, fieldCount * unknownCount);
    this.hasFactors = false;
    this.hasSolution = true;
  }

  /**
   * Solves at the bulk conditions from the last solution, or from bulk conditions throughout, or where that fails by growing the pellet
   * from nothing to its size.
   */
  solve(bulk: PelletBulk): PelletStatus {
    this.work.solves++;
    this.work.largestNodeCount = Math.max(this.work.largestNodeCount, this.grid.nodeCount);
    this.prepare(bulk);
    let status: PelletStatus = 'no_state';
    if (this.hasSolution) status = this.iterate(bulk, 1);
    if (status !== 'converged') {
      this.reset();
      status = this.iterate(bulk, 1);
    }
    if (status !== 'converged' && status !== 'rates_not_finite') status = this.growPellet(bulk);
    if (status === 'converged') {
      this.hasSolution = true;
      this.takeAverages();
      if (this.isOverdrawn(bulk)) status = 'overdrawn';
    } else {
      this.reset();
    }
    return status;
  }

  /** Fills `gradient` at the solution of the last solve, which must have converged at the same bulk conditions. */
  differentiate(bulk: PelletBulk): boolean {
    this.evaluateNodes(bulk, 1, true);
    if (!this.factorise(1)) return false;
    const { speciesCount } = this.input;
    const { nodeCount, unknownCount, green, weights } = this.grid;
    const { fieldCount, combination, hasFilm } = this.basis;
    const reactionCount = this.averageRates.length;
    const columns = speciesCount + 2;
    const adjoint = this.residual;
    this.gradient.fill(0);
    for (let j = 0; j < reactionCount; j++) {
      // Right side: derivative of <r_j> with respect to the unknowns.
      adjoint.fill(0);
      for (let k = 0; k < fieldCount; k++) {
        for (let m = 0; m < nodeCount; m++) {
          const at = (m * fieldCount + k) * reactionCount + j;
          if (m < unknownCount) adjoint[k * unknownCount + m] = weights[m]! * this.sensitivityDiffusion[at]!;
          if (hasFilm) adjoint[fieldCount * unknownCount + k]! += weights[m]! * this.sensitivityFilm[at]!;
        }
      }
      solveTransposedInPlace(this.factors, this.size, this.pivots, adjoint);
      for (let m = 0; m < nodeCount; m++) {
        const temperatureShift = this.temperatureShift(bulk, m);
        for (let reaction = 0; reaction < reactionCount; reaction++) {
          let weight = reaction === j ? weights[m]! : 0;
          for (let k = 0; k < fieldCount; k++) {
            const part = combination[k * reactionCount + reaction]!;
            if (part === 0) continue;
            let influence = hasFilm ? adjoint[fieldCount * unknownCount + k]! * weights[m]! : 0;
            if (m < unknownCount) {
              let sum = 0;
              for (let n = 0; n < unknownCount; n++) {
                sum += adjoint[k * unknownCount + n]! * green[n * unknownCount + m]!;
              }
              influence += this.radiusSquared * sum;
            }
            weight += influence * part;
          }
          if (weight === 0) continue;
          weight *= this.input.rateFactors[reaction]!;
          const from = (m * reactionCount + reaction) * columns;
          for (let column = 0; column < columns; column++) {
            const shift = column === speciesCount ? temperatureShift : 1;
            this.gradient[j * columns + column]! += weight * shift * this.nodeGradient[from + column]!;
          }
        }
      }
    }
    return true;
  }

  /** Concentration of a species and temperature at a relative radius, from the last solution. */
  stateAt(bulk: PelletBulk, relativeRadius: number): { concentrations: Float64Array; temperature: number } {
    const { speciesCount } = this.input;
    const { fieldCount, diffusionCoefficients, filmCoefficients, inverseConductivity, filmHeatResistance } =
      this.basis;
    const { unknownCount } = this.grid;
    const coefficients = this.grid.interpolationAt(relativeRadius);
    const concentrations = Float64Array.from(bulk.concentrations);
    let temperature = bulk.temperature;
    for (let k = 0; k < fieldCount; k++) {
      let potential = 0;
      for (let n = 0; n < unknownCount; n++) {
        potential += coefficients[n]! * this.unknowns[k * unknownCount + n]!;
      }
      const source = this.averageSources[k]!;
      for (let i = 0; i < speciesCount; i++) {
        const at = k * speciesCount + i;
        concentrations[i]! += diffusionCoefficients[at]! * potential + filmCoefficients[at]! * source;
      }
      temperature += this.fieldHeats[k]! * (inverseConductivity * potential + filmHeatResistance * source);
    }
    return { concentrations, temperature };
  }

  /** Heats of the fields (positive when exothermic) and how far each unknown may move before it matters. */
  private prepare(bulk: PelletBulk): void {
    const { speciesCount } = this.input;
    const { fieldCount, independent, activeSpecies, diffusionCoefficients, filmCoefficients } = this.basis;
    let largest = 0;
    for (const i of activeSpecies) largest = Math.max(largest, bulk.concentrations[i]!);
    for (let k = 0; k < fieldCount; k++) {
      const heat = -bulk.reactionHeats[independent[k]!]!;
      this.fieldHeats[k] = heat;
      const temperature = temperatureScale * bulk.temperature;
      let potential = temperature / (Math.abs(heat) * this.basis.inverseConductivity);
      let source = temperature / (Math.abs(heat) * this.basis.filmHeatResistance);
      for (const i of activeSpecies) {
        const scale = Math.max(bulk.concentrations[i]!, scaleFloor * largest);
        const at = k * speciesCount + i;
        potential = Math.min(potential, scale / Math.abs(diffusionCoefficients[at]!));
        source = Math.min(source, scale / Math.abs(filmCoefficients[at]!));
      }
      this.unknownScales[k] = potential;
      this.unknownScales[fieldCount + k] = source;
    }
  }

  /** Newton from the present unknowns, for a pellet of `growth` times the true size. */
  private iterate(bulk: PelletBulk, growth: number): PelletStatus {
    const { tolerance } = this.input;
    let previous = Infinity;
    let growing = 0;
    let refresh = !this.hasFactors;
    for (let iteration = 0; iteration < maximumIterations; iteration++) {
      this.work.iterations++;
      if (!this.evaluateNodes(bulk, growth, refresh)) {
        return iteration === 0 && !this.hasSolution && growth === 1 ? 'rates_not_finite' : 'no_state';
      }
      this.evaluateResidual(growth);
      if (refresh) {
        if (!this.factorise(growth)) return 'no_state';
        refresh = false;
      }
      solveInPlace(this.factors, this.size, this.pivots, this.residual);
      for (let n = 0; n < this.size; n++) this.unknowns[n]! -= this.residual[n]!;
      const change = this.scaledChange();
      if (!(change < Infinity)) return 'no_state';
      const contraction = change / previous;
      const remaining = contraction < 1 ? (change * contraction) / (1 - contraction) : Infinity;
      if (change <= tolerance * 1e-3 || remaining <= tolerance) {
        // The averages are taken at the final unknowns.
        return this.evaluateNodes(bulk, growth, false) ? 'converged' : 'no_state';
      }
      growing = change > previous ? growing + 1 : 0;
      if (growing > patience) return 'no_state';
      refresh = contraction > slowContraction;
      previous = change;
    }
    return 'no_state';
  }

  /** Continuation in the pellet's size, from a pellet too small to matter. */
  private growPellet(bulk: PelletBulk): PelletStatus {
    const smallestStep = 1e-4;
    let growth = 0;
    let step = 0.1;
    this.reset();
    const kept = this.unknowns.slice();
    while (growth < 1) {
      const next = Math.min(1, growth + step);
      this.hasFactors = false;
      if (this.iterate(bulk, next) === 'converged') {
        kept.set(this.unknowns);
        growth = next;
        step *= 1.5;
      } else {
        this.unknowns.set(kept);
        step /= 2;
        if (step < smallestStep) return 'no_state';
      }
    }
    return 'converged';
  }

  /** Concentrations, temperatures, rates and sources at the nodes; with `withGradient` also the rates' derivatives. False: not finite. */
  private evaluateNodes(bulk: PelletBulk, growth: number, withGradient: boolean): boolean {
    const { speciesCount, rates: laws, rateFactors } = this.input;
    const { basis, concentrations, temperatures, unknowns, rates } = this;
    const { nodeCount, unknownCount } = this.grid;
    const { fieldCount, combination, activeSpecies, hasFilm } = basis;
    const reactionCount = this.averageRates.length;
    const columns = speciesCount + 2;
    this.work.rateEvaluations += nodeCount;
    for (let m = 0; m < nodeCount; m++) {
      const row = m * speciesCount;
      for (let i = 0; i < speciesCount; i++) concentrations[row + i] = bulk.concentrations[i]!;
      let temperature = bulk.temperature;
      for (let k = 0; k < fieldCount; k++) {
        const potential = m < unknownCount ? unknowns[k * unknownCount + m]! : 0;
        const source = hasFilm ? growth * unknowns[fieldCount * unknownCount + k]! : 0;
        const start = k * speciesCount;
        for (const i of activeSpecies) {
          concentrations[row + i]! +=
            basis.diffusionCoefficients[start + i]! * potential + basis.filmCoefficients[start + i]! * source;
        }
        temperature +=
          this.fieldHeats[k]! * (basis.inverseConductivity * potential + basis.filmHeatResistance * source);
      }
      temperatures[m] = temperature;
      const rateRow = m * reactionCount;
      if (withGradient) {
        laws.evaluateWithGradient(
          concentrations,
          row,
          temperature,
          bulk.pressure,
          rates,
          rateRow,
          this.nodeGradient,
          rateRow * columns,
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
        this.sources[k * nodeCount + m] = source;
      }
    }
    return true;
  }

  private evaluateResidual(growth: number): void {
    const { unknownCount, nodeCount, green, weights } = this.grid;
    const { fieldCount, hasFilm } = this.basis;
    const scale = growth * growth * this.radiusSquared;
    for (let k = 0; k < fieldCount; k++) {
      const source = k * nodeCount;
      for (let n = 0; n < unknownCount; n++) {
        let sum = 0;
        const row = n * unknownCount;
        for (let m = 0; m < unknownCount; m++) sum += green[row + m]! * this.sources[source + m]!;
        this.residual[k * unknownCount + n] = this.unknowns[k * unknownCount + n]! - scale * sum;
      }
      if (hasFilm) {
        let average = 0;
        for (let m = 0; m < nodeCount; m++) average += weights[m]! * this.sources[source + m]!;
        const at = fieldCount * unknownCount + k;
        this.residual[at] = this.unknowns[at]! - average;
      }
    }
  }

  /** Derivatives of the rates at each node with respect to the fields there and to the averages (through the film). */
  private evaluateSensitivities(growth: number): void {
    const { speciesCount, rateFactors } = this.input;
    const { basis, nodeGradient } = this;
    const { nodeCount } = this.grid;
    const { fieldCount, activeSpecies } = basis;
    const reactionCount = this.averageRates.length;
    const columns = speciesCount + 2;
    for (let m = 0; m < nodeCount; m++) {
      for (let j = 0; j < reactionCount; j++) {
        const from = (m * reactionCount + j) * columns;
        const byTemperature = nodeGradient[from + speciesCount]!;
        for (let k = 0; k < fieldCount; k++) {
          const heat = this.fieldHeats[k]! * byTemperature;
          let diffusion = heat * basis.inverseConductivity;
          let film = heat * basis.filmHeatResistance;
          const start = k * speciesCount;
          for (const i of activeSpecies) {
            const byConcentration = nodeGradient[from + i]!;
            diffusion += byConcentration * basis.diffusionCoefficients[start + i]!;
            film += byConcentration * basis.filmCoefficients[start + i]!;
          }
          const at = (m * fieldCount + k) * reactionCount + j;
          this.sensitivityDiffusion[at] = rateFactors[j]! * diffusion;
          this.sensitivityFilm[at] = growth * rateFactors[j]! * film;
        }
      }
    }
  }

  /** Assembles and factorises the Jacobian of the residual at the nodes' present gradient. */
  private factorise(growth: number): boolean {
    this.evaluateSensitivities(growth);
    this.work.factorisations++;
    const { factors, size } = this;
    const { unknownCount, nodeCount, green, weights } = this.grid;
    const { fieldCount, combination, hasFilm } = this.basis;
    const reactionCount = this.averageRates.length;
    const scale = growth * growth * this.radiusSquared;
    const filmStart = fieldCount * unknownCount;
    factors.fill(0);
    for (let m = 0; m < nodeCount; m++) {
      for (let l = 0; l < fieldCount; l++) {
        const at = (m * fieldCount + l) * reactionCount;
        for (let k = 0; k < fieldCount; k++) {
          let diffusion = 0;
          let film = 0;
          for (let j = 0; j < reactionCount; j++) {
            const part = combination[k * reactionCount + j]!;
            diffusion += part * this.sensitivityDiffusion[at + j]!;
            film += part * this.sensitivityFilm[at + j]!;
          }
          if (m < unknownCount) {
            for (let n = 0; n < unknownCount; n++) {
              const row = (k * unknownCount + n) * size;
              const entry = scale * green[n * unknownCount + m]!;
              factors[row + l * unknownCount + m]! -= entry * diffusion;
              if (hasFilm) factors[row + filmStart + l]! -= entry * film;
            }
          }
          if (hasFilm) {
            const row = (filmStart + k) * size;
            if (m < unknownCount) factors[row + l * unknownCount + m]! -= weights[m]! * diffusion;
            factors[row + filmStart + l]! -= weights[m]! * film;
          }
        }
      }
    }
    for (let n = 0; n < size; n++) factors[n * size + n]! += 1;
    this.hasFactors = factoriseInPlace(factors, size, this.pivots);
    return this.hasFactors;
  }

  /** Largest change of the last iteration, each unknown in units of its scale. */
  private scaledChange(): number {
    const { unknownCount } = this.grid;
    const { fieldCount, hasFilm } = this.basis;
    let largest = 0;
    for (let k = 0; k < fieldCount; k++) {
      const potential = this.unknownScales[k]!;
      for (let n = 0; n < unknownCount; n++) {
        largest = Math.max(largest, Math.abs(this.residual[k * unknownCount + n]!) / potential);
      }
      if (hasFilm) {
        const change = Math.abs(this.residual[fieldCount * unknownCount + k]!);
        largest = Math.max(largest, change / this.unknownScales[fieldCount + k]!);
      }
    }
    return largest;
  }

  private takeAverages(): void {
    const { nodeCount, weights } = this.grid;
    const { fieldCount } = this.basis;
    const reactionCount = this.averageRates.length;
    for (let j = 0; j < reactionCount; j++) {
      let sum = 0;
      for (let m = 0; m < nodeCount; m++) sum += weights[m]! * this.rates[m * reactionCount + j]!;
      this.averageRates[j] = this.input.rateFactors[j]! * sum;
    }
    for (let k = 0; k < fieldCount; k++) {
      let sum = 0;
      for (let m = 0; m < nodeCount; m++) sum += weights[m]! * this.sources[k * nodeCount + m]!;
      this.averageSources[k] = sum;
    }
  }

  /** dT_node/dT_bulk: one, and the change of the reaction heats with temperature. */
  private temperatureShift(bulk: PelletBulk, node: number): number {
    const { fieldCount, independent, inverseConductivity, filmHeatResistance } = this.basis;
    const { unknownCount } = this.grid;
    let shift = 1;
    for (let k = 0; k < fieldCount; k++) {
      const slope = -bulk.reactionHeatSlopes[independent[k]!]!;
      const potential = node < unknownCount ? this.unknowns[k * unknownCount + node]! : 0;
      shift += slope * (inverseConductivity * potential + filmHeatResistance * this.averageSources[k]!);
    }
    return shift;
  }

  private isOverdrawn(bulk: PelletBulk): boolean {
    const { speciesCount } = this.input;
    let largest = 0;
    for (let i = 0; i < speciesCount; i++) largest = Math.max(largest, bulk.concentrations[i]!);
    const lowest = -overdrawnFraction * largest;
    return this.concentrations.some((value) => value < lowest);
  }
}
