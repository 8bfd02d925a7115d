/**
 * One pellet on one grid: steady reaction and diffusion of all fields, film included, by Newton's method with the exact Jacobian. Its
 * factors are kept as long as they contract well, from one solve to the next too; where Newton fails, the pellet is grown from nothing.
 *
 * Assumes constant diffusivities and conductivity within one pellet. Does not look for several steady states.
 */
import { factoriseInPlace, solveInPlace, solveTransposedInPlace } from '../numerics/dense-lu.js';
import type { DiffusionGrid } from '../numerics/diffusion/diffusion-grid.js';
import {
  averageGradientInto,
  jacobianInto,
  residualInto,
  weightedSum,
  type CollocationSystem,
} from './collocation-system.js';
import type { FieldBasis } from './field-basis.js';
import type { PelletBulk, PelletModelInput, PelletStatus, PelletWork } from './pellet-model.js';
import { PelletNodes } from './pellet-nodes.js';

const maximumIterations = 25;
/**
 * Part of the pellet's tolerance left to the iteration. Averages magnify errors of the concentrations, by about the inverse of the
 * effectiveness and more near equilibrium.
 */
const iterationShare = 1e-3;
/** A change this far below the tolerance ends the iteration whatever its contraction. */
const negligibleShare = 0.1;
/** Chord iterations that contract worse than this get new factors. */
const slowContraction = 0.2;
/** The change may grow this many times in a row before the attempt is given up. */
const patience = 4;
/** Smallest concentration that counts as a scale, relative to the largest in the bulk. */
const scaleFloor = 1e-4;
/** A temperature change of this fraction matters as much as a concentration's own size: typical Arrhenius numbers are 10 to 30. */
const temperatureScale = 0.05;
/** Concentrations below minus this fraction of the largest are neither rounding nor what the grid cannot resolve. */
const overdrawnFraction = 1e-4;
/** Shortest step in relative size when a pellet is grown. */
const smallestGrowthStep = 1e-4;
/** Iterations that growing may take: a pellet that exists at all is reached in some dozens. */
const mostGrowthIterations = 300;

export class CollocatedPellet {
  readonly grid: DiffusionGrid;
  /** mol/(m³ s), one per reaction; of the last solve. */
  readonly averageRates: Float64Array;
  /** `reactionCount × (speciesCount + 2)`; of the last differentiate. */
  readonly gradient: Float64Array;

  private readonly input: PelletModelInput;
  private readonly basis: FieldBasis;
  private readonly work: PelletWork;
  private readonly nodes: PelletNodes;
  private readonly system: CollocationSystem;
  /** φ by field, then <q> by field where there is a film. Survives between solves as the warm start. */
  private readonly unknowns: Float64Array;
  /** <q_k>, one per field. */
  private readonly averageSources: Float64Array;
  private readonly change: Float64Array;
  private readonly factors: Float64Array;
  private readonly pivots: Int32Array;
  /** J/mol, positive when exothermic, one per field. */
  private readonly fieldHeats: Float64Array;
  /** How far each field's φ, then each <q>, may move before it matters. */
  private readonly scales: Float64Array;
  private readonly temperatureShifts: Float64Array;
  private centreCoefficients: Float64Array | undefined;
  private readonly transfers = new Map<DiffusionGrid, readonly Float64Array[]>();
  private hasFactors = false;
  private hasSolution = false;

  constructor(grid: DiffusionGrid, input: PelletModelInput, basis: FieldBasis, work: PelletWork) {
    const { speciesCount } = input;
    const reactionCount = input.stoichiometry.length;
    const { fieldCount } = basis;
    const { shapeExponent, diffusionLength } = input.pellet.geometry;
    const size = fieldCount * (grid.unknownCount + (basis.hasFilm ? 1 : 0));
    this.grid = grid;
    this.input = input;
    this.basis = basis;
    this.work = work;
    this.nodes = new PelletNodes(grid, input, basis);
    this.system = {
      grid,
      basis,
      nodes: this.nodes,
      reactionCount,
      speciesCount,
      rateFactors: input.rateFactors,
      radiusSquared: ((shapeExponent + 1) * diffusionLength) ** 2,
      size,
    };
    this.averageRates = new Float64Array(reactionCount);
    this.gradient = new Float64Array(reactionCount * (speciesCount + 2));
    this.unknowns = new Float64Array(size);
    this.averageSources = new Float64Array(fieldCount);
    this.change = new Float64Array(size);
    this.factors = new Float64Array(size * size);
    this.pivots = new Int32Array(size);
    this.fieldHeats = new Float64Array(fieldCount);
    this.scales = new Float64Array(2 * fieldCount);
    this.temperatureShifts = new Float64Array(grid.nodeCount);
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
    const rows = this.transferFrom(other.grid);
    for (let n = 0; n < unknownCount; n++) {
      for (let k = 0; k < fieldCount; k++) {
        const value = weightedSum(rows[n]!, other.unknowns, k * other.grid.unknownCount);
        this.unknowns[k * unknownCount + n] = value;
      }
    }
    this.averageSources.set(other.averageSources);
    this.fieldHeats.set(other.fieldHeats);
    if (this.basis.hasFilm) this.unknowns.set(other.averageSources, fieldCount * unknownCount);
    this.hasFactors = false;
    this.hasSolution = true;
  }

  /** Solves from the last solution; where that fails, from bulk conditions throughout. */
  solve(bulk: PelletBulk): PelletStatus {
    this.begin(bulk);
    if (this.hasSolution && this.iterate(bulk, 1) === 'converged') return this.conclude(bulk);
    this.reset();
    if (!this.evaluateNodes(bulk, 1, false)) return 'rates_not_finite';
    if (this.iterate(bulk, 1) === 'converged') return this.conclude(bulk);
    this.reset();
    return 'no_state';
  }

  /** Solves by growing the pellet from one too small to matter, which reaches states that Newton's method alone does not. */
  solveByGrowth(bulk: PelletBulk): PelletStatus {
    this.begin(bulk);
    if (this.grow(bulk) === 'converged') return this.conclude(bulk);
    this.reset();
    return 'no_state';
  }

  /** Fills `gradient` at the last solution, which must have converged at the same bulk conditions; false when the Jacobian is singular. */
  differentiate(bulk: PelletBulk): boolean {
    if (!this.evaluateNodes(bulk, 1, true) || !this.factorise(1)) return false;
    this.temperatureShiftsInto(bulk);
    const columns = this.input.speciesCount + 2;
    const solveAdjoint = (vector: Float64Array): void =>
      solveTransposedInPlace(this.factors, this.system.size, this.pivots, vector);
    for (let j = 0; j < this.averageRates.length; j++) {
      averageGradientInto(
        this.system,
        j,
        solveAdjoint,
        this.temperatureShifts,
        this.change,
        this.gradient,
        j * columns,
      );
    }
    return true;
  }

  /** K, at the surface (film alone) and at the centre; of the last solution. */
  temperatureAt(bulk: PelletBulk, place: 'surface' | 'centre'): number {
    const { fieldCount, inverseConductivity, filmHeatResistance } = this.basis;
    this.centreCoefficients ??= this.grid.interpolationAt(0);
    let temperature = bulk.temperature;
    for (let k = 0; k < fieldCount; k++) {
      const potential =
        place === 'centre'
          ? weightedSum(this.centreCoefficients, this.unknowns, k * this.grid.unknownCount)
          : 0;
      temperature +=
        this.fieldHeats[k]! *
        (inverseConductivity * potential + filmHeatResistance * this.averageSources[k]!);
    }
    return temperature;
  }

  /** Concentrations and temperature at a relative radius, from the last solution. */
  stateAt(bulk: PelletBulk, relativeRadius: number): { concentrations: Float64Array; temperature: number } {
    const { speciesCount } = this.input;
    const { fieldCount, diffusionCoefficients, filmCoefficients, inverseConductivity, filmHeatResistance } =
      this.basis;
    const coefficients = this.grid.interpolationAt(relativeRadius);
    const concentrations = Float64Array.from(bulk.concentrations);
    let temperature = bulk.temperature;
    for (let k = 0; k < fieldCount; k++) {
      const potential = weightedSum(coefficients, this.unknowns, k * this.grid.unknownCount);
      const average = this.averageSources[k]!;
      for (let i = 0; i < speciesCount; i++) {
        const at = k * speciesCount + i;
        concentrations[i]! += diffusionCoefficients[at]! * potential + filmCoefficients[at]! * average;
      }
      temperature += this.fieldHeats[k]! * (inverseConductivity * potential + filmHeatResistance * average);
    }
    return { concentrations, temperature };
  }

  /** Interpolation from another grid to this one's nodes, worked out once. */
  private transferFrom(grid: DiffusionGrid): readonly Float64Array[] {
    let rows = this.transfers.get(grid);
    if (!rows) {
      rows = Array.from({ length: this.grid.unknownCount }, (_, n) =>
        grid.interpolationAt(this.grid.positions[n]!),
      );
      this.transfers.set(grid, rows);
    }
    return rows;
  }

  private begin(bulk: PelletBulk): void {
    this.work.solves++;
    this.work.largestNodeCount = Math.max(this.work.largestNodeCount, this.grid.nodeCount);
    this.prepare(bulk);
  }

  private conclude(bulk: PelletBulk): PelletStatus {
    this.hasSolution = true;
    this.takeAverages();
    return this.isOverdrawn(bulk) ? 'overdrawn' : 'converged';
  }

  private prepare(bulk: PelletBulk): void {
    const { speciesCount } = this.input;
    const { fieldCount, independent, activeSpecies, diffusionCoefficients, filmCoefficients } = this.basis;
    let largest = 0;
    for (const i of activeSpecies) largest = Math.max(largest, bulk.concentrations[i]!);
    const temperature = temperatureScale * bulk.temperature;
    for (let k = 0; k < fieldCount; k++) {
      const heat = -bulk.reactionHeats[independent[k]!]!;
      this.fieldHeats[k] = heat;
      let potential = temperature / (Math.abs(heat) * this.basis.inverseConductivity);
      let average = temperature / (Math.abs(heat) * this.basis.filmHeatResistance);
      // NaN where the heat and the resistance both vanish: then temperature sets no scale.
      if (Number.isNaN(potential)) potential = Infinity;
      if (Number.isNaN(average)) average = Infinity;
      for (const i of activeSpecies) {
        const scale = Math.max(bulk.concentrations[i]!, scaleFloor * largest);
        const at = k * speciesCount + i;
        potential = Math.min(potential, scale / Math.abs(diffusionCoefficients[at]!));
        average = Math.min(average, scale / Math.abs(filmCoefficients[at]!));
      }
      this.scales[k] = potential;
      this.scales[fieldCount + k] = average;
    }
  }

  /** Newton from the present unknowns, for a pellet of `growth` times the true size. */
  private iterate(bulk: PelletBulk, growth: number): 'converged' | 'no_state' {
    const tolerance = this.input.tolerance * iterationShare;
    let previous = Infinity;
    let worsenings = 0;
    let needsFactors = !this.hasFactors;
    for (let iteration = 0; iteration < maximumIterations; iteration++) {
      this.work.iterations++;
      if (!this.evaluateNodes(bulk, growth, needsFactors)) return 'no_state';
      residualInto(this.system, this.unknowns, growth, this.change);
      if (needsFactors && !this.factorise(growth)) return 'no_state';
      solveInPlace(this.factors, this.system.size, this.pivots, this.change);
      for (let n = 0; n < this.system.size; n++) this.unknowns[n]! -= this.change[n]!;
      const change = this.scaledChange();
      if (!(change < Infinity)) return 'no_state';
      // The first iteration cannot tell how well it contracts.
      const contraction = iteration === 0 ? 1 : change / previous;
      const remaining = contraction < 1 ? (change * contraction) / (1 - contraction) : Infinity;
      if (change <= tolerance * negligibleShare || remaining <= tolerance) {
        // The averages are taken at the final unknowns.
        return this.evaluateNodes(bulk, growth, false) ? 'converged' : 'no_state';
      }
      worsenings = change > previous ? worsenings + 1 : 0;
      if (worsenings > patience) return 'no_state';
      needsFactors = iteration > 0 && contraction > slowContraction;
      previous = change;
    }
    return 'no_state';
  }

  /** Continuation in the pellet's size, from one too small to matter. */
  private grow(bulk: PelletBulk): 'converged' | 'no_state' {
    this.reset();
    const kept = this.unknowns.slice();
    let growth = 0;
    let step = 0.1;
    const lastIteration = this.work.iterations + mostGrowthIterations;
    while (growth < 1) {
      if (this.work.iterations > lastIteration) return 'no_state';
      const next = Math.min(1, growth + step);
      this.hasFactors = false;
      if (this.iterate(bulk, next) === 'converged') {
        kept.set(this.unknowns);
        growth = next;
        step *= 1.5;
      } else {
        this.unknowns.set(kept);
        step /= 2;
        if (step < smallestGrowthStep) return 'no_state';
      }
    }
    return 'converged';
  }

  private evaluateNodes(bulk: PelletBulk, growth: number, withGradient: boolean): boolean {
    this.work.rateEvaluations += this.grid.nodeCount;
    return this.nodes.evaluate(bulk, this.fieldHeats, this.unknowns, growth, withGradient);
  }

  /** New factors at the nodes' present gradient. */
  private factorise(growth: number): boolean {
    this.work.factorisations++;
    this.nodes.differentiate(this.fieldHeats, growth);
    jacobianInto(this.system, growth, this.factors);
    this.hasFactors = factoriseInPlace(this.factors, this.system.size, this.pivots);
    return this.hasFactors;
  }

  /** Largest change of the last iteration, each unknown in units of its scale. */
  private scaledChange(): number {
    const { unknownCount } = this.grid;
    const { fieldCount, hasFilm } = this.basis;
    let largest = 0;
    for (let k = 0; k < fieldCount; k++) {
      for (let n = 0; n < unknownCount; n++) {
        const change = Math.abs(this.change[k * unknownCount + n]!) / this.scales[k]!;
        // Written so that NaN is kept.
        if (!(change <= largest)) largest = change;
      }
      if (!hasFilm) continue;
      const change = Math.abs(this.change[fieldCount * unknownCount + k]!) / this.scales[fieldCount + k]!;
      if (!(change <= largest)) largest = change;
    }
    return largest;
  }

  private takeAverages(): void {
    const { nodeCount, weights } = this.grid;
    const reactionCount = this.averageRates.length;
    for (let j = 0; j < reactionCount; j++) {
      let sum = 0;
      for (let m = 0; m < nodeCount; m++) sum += weights[m]! * this.nodes.rates[m * reactionCount + j]!;
      this.averageRates[j] = this.input.rateFactors[j]! * sum;
    }
    for (let k = 0; k < this.basis.fieldCount; k++) {
      this.averageSources[k] = weightedSum(weights, this.nodes.sources, k * nodeCount);
    }
  }

  /** dT_node/dT_bulk at fixed unknowns: one, and the change of the reaction heats with temperature. */
  private temperatureShiftsInto(bulk: PelletBulk): void {
    const { fieldCount, independent, inverseConductivity, filmHeatResistance } = this.basis;
    const { unknownCount, nodeCount } = this.grid;
    this.temperatureShifts.fill(1);
    for (let k = 0; k < fieldCount; k++) {
      const slope = -bulk.reactionHeatSlopes[independent[k]!]!;
      if (slope === 0) continue;
      for (let m = 0; m < nodeCount; m++) {
        const potential = m < unknownCount ? this.unknowns[k * unknownCount + m]! : 0;
        this.temperatureShifts[m]! +=
          slope * (inverseConductivity * potential + filmHeatResistance * this.averageSources[k]!);
      }
    }
  }

  private isOverdrawn(bulk: PelletBulk): boolean {
    const { concentrations } = this.nodes;
    let largest = 0;
    for (let i = 0; i < bulk.concentrations.length; i++) largest = Math.max(largest, bulk.concentrations[i]!);
    const lowest = -overdrawnFraction * largest;
    for (let n = 0; n < concentrations.length; n++) if (concentrations[n]! < lowest) return true;
    return false;
  }
}
