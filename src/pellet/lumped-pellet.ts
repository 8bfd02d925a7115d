/**
 * A pellet known by its surface alone: a law gives averaged rates from the conditions at the surface, and a film, where there is one,
 * joins the surface to the bulk. Serves the methods `intrinsic`, `fixed` and `thiele`.
 *
 * With a film the unknowns are the averaged sources <q_k> of the independent reactions, found by Newton's method.
 */
import { factoriseInPlace, solveInPlace } from '../numerics/dense-lu.js';
import { createFieldBasis, refreshFieldBasis, type FieldBasis } from './field-basis.js';
import {
  createPelletWork,
  type PelletBulk,
  type PelletInterior,
  type PelletModel,
  type PelletModelInput,
  type PelletStatus,
  type PelletWork,
} from './pellet-model.js';

/**
 * Averaged rates, mol/(m³ pellet s), from the conditions at the surface; with `gradient` also their derivatives,
 * row-major `reactionCount × (speciesCount + 2)`, every entry written.
 */
export type SurfaceLaw = (
  concentrations: Float64Array,
  temperature: number,
  pressure: number,
  averageRates: Float64Array,
  gradient: Float64Array | undefined,
) => void;

const maximumIterations = 50;
const smallestGrowthStep = 1e-4;

export class LumpedPellet implements PelletModel {
  readonly averageRates: Float64Array;
  readonly gradient: Float64Array;
  readonly work: PelletWork = createPelletWork();

  private readonly input: PelletModelInput;
  private readonly law: SurfaceLaw;
  private readonly basis: FieldBasis;
  private readonly hasFilm: boolean;
  private readonly surfaceGradient: Float64Array;
  private readonly surfaceConcentrations: Float64Array;
  private readonly sources: Float64Array;
  private readonly residual: Float64Array;
  private readonly jacobian: Float64Array;
  private readonly pivots: Int32Array;
  private temperatureAtSurface = Number.NaN;

  constructor(input: PelletModelInput, law: SurfaceLaw, usesFilm: boolean) {
    this.input = input;
    this.law = law;
    this.basis = createFieldBasis(input);
    this.hasFilm = usesFilm && this.basis.hasFilm;
    const reactionCount = input.stoichiometry.length;
    const columns = input.speciesCount + 2;
    const { fieldCount } = this.basis;
    this.averageRates = new Float64Array(reactionCount);
    this.gradient = new Float64Array(reactionCount * columns);
    this.surfaceGradient = new Float64Array(reactionCount * columns);
    this.surfaceConcentrations = new Float64Array(input.speciesCount);
    this.sources = new Float64Array(fieldCount);
    this.residual = new Float64Array(fieldCount);
    this.jacobian = new Float64Array(fieldCount * fieldCount);
    this.pivots = new Int32Array(fieldCount);
    this.work.largestNodeCount = 1;
  }

  solve(bulk: PelletBulk): PelletStatus {
    this.work.solves++;
    if (this.input.transportVaries) refreshFieldBasis(this.basis, this.input);
    let status = this.iterate(bulk, 1);
    if (status !== 'converged' && this.hasFilm) {
      this.sources.fill(0);
      status = this.iterate(bulk, 1);
      if (status === 'no_state') status = this.growFilm(bulk);
    }
    if (status !== 'converged') this.sources.fill(0);
    return status;
  }

  differentiate(bulk: PelletBulk): PelletStatus {
    const status = this.solve(bulk);
    if (status !== 'converged') return status;
    this.placeSurface(bulk, 1);
    this.evaluate(bulk, true);
    this.gradient.set(this.surfaceGradient);
    const { speciesCount } = this.input;
    const { fieldCount, combination } = this.basis;
    const reactionCount = this.averageRates.length;
    const columns = speciesCount + 2;
    const shift = this.temperatureShift(bulk);
    for (let j = 0; j < reactionCount; j++) this.gradient[j * columns + speciesCount]! *= shift;
    if (!this.hasFilm) return 'converged';
    if (!this.factoriseFilm()) return 'no_state';
    const direct = this.gradient.slice();
    for (let column = 0; column < columns; column++) {
      this.residual.fill(0);
      for (let k = 0; k < fieldCount; k++) {
        for (let j = 0; j < reactionCount; j++) {
          this.residual[k]! += combination[k * reactionCount + j]! * direct[j * columns + column]!;
        }
      }
      solveInPlace(this.jacobian, fieldCount, this.pivots, this.residual);
      for (let j = 0; j < reactionCount; j++) {
        for (let k = 0; k < fieldCount; k++) {
          this.gradient[j * columns + column]! += this.filmSensitivity(j, k) * this.residual[k]!;
        }
      }
    }
    return 'converged';
  }

  surfaceTemperature(): number {
    return this.temperatureAtSurface;
  }

  /** The lumped methods know no inside: the centre is taken to be like the surface. */
  centreTemperature(): number {
    return this.temperatureAtSurface;
  }

  interior(relativeRadii: Float64Array): PelletInterior {
    return {
      relativeRadii,
      concentrations: Array.from(this.surfaceConcentrations, (value) =>
        new Float64Array(relativeRadii.length).fill(value),
      ),
      temperatures: new Float64Array(relativeRadii.length).fill(this.temperatureAtSurface),
    };
  }

  reviewResolution(): 'adequate' {
    return 'adequate';
  }

  private iterate(bulk: PelletBulk, growth: number): PelletStatus {
    const { fieldCount, combination } = this.basis;
    const reactionCount = this.averageRates.length;
    let previous = Infinity;
    for (let iteration = 0; iteration < maximumIterations; iteration++) {
      this.work.iterations++;
      this.placeSurface(bulk, growth);
      this.evaluate(bulk, this.hasFilm);
      if (!this.averageRates.every((rate) => Number.isFinite(rate))) {
        return this.hasFilm && iteration > 0 ? 'no_state' : 'rates_not_finite';
      }
      if (!this.hasFilm) return 'converged';
      let scale = 0;
      for (let k = 0; k < fieldCount; k++) {
        let source = 0;
        for (let j = 0; j < reactionCount; j++) {
          source += combination[k * reactionCount + j]! * this.averageRates[j]!;
        }
        this.residual[k] = source - this.sources[k]!;
        scale = Math.max(scale, Math.abs(source));
      }
      if (!this.factoriseFilm(growth)) return 'no_state';
      solveInPlace(this.jacobian, fieldCount, this.pivots, this.residual);
      let change = 0;
      for (let k = 0; k < fieldCount; k++) {
        this.sources[k]! += this.residual[k]!;
        change = Math.max(change, Math.abs(this.residual[k]!) / (scale || 1));
      }
      if (!Number.isFinite(change)) return 'no_state';
      // Quadratic convergence: the next change would be about the square of this one.
      if (change * change <= this.input.tolerance * 1e-2 && change <= previous) {
        this.placeSurface(bulk, growth);
        this.evaluate(bulk, false);
        return this.surfaceConcentrations.some((c) => c < 0) ? 'overdrawn' : 'converged';
      }
      previous = change;
    }
    return 'no_state';
  }

  /** Continuation in the film's thickness, from none. */
  private growFilm(bulk: PelletBulk): PelletStatus {
    this.sources.fill(0);
    const kept = this.sources.slice();
    let growth = 0;
    let step = 0.1;
    while (growth < 1) {
      const next = Math.min(1, growth + step);
      if (this.iterate(bulk, next) === 'converged') {
        kept.set(this.sources);
        growth = next;
        step *= 1.5;
      } else {
        this.sources.set(kept);
        step /= 2;
        if (step < smallestGrowthStep) return 'no_state';
      }
    }
    return 'converged';
  }

  private placeSurface(bulk: PelletBulk, growth: number): void {
    const { speciesCount } = this.input;
    const { fieldCount, filmCoefficients, filmHeatResistance, independent } = this.basis;
    this.surfaceConcentrations.set(bulk.concentrations);
    this.temperatureAtSurface = bulk.temperature;
    this.heats = independent.map((reaction) => -bulk.reactionHeats[reaction]!);
    if (!this.hasFilm) return;
    for (let k = 0; k < fieldCount; k++) {
      const source = growth * this.sources[k]!;
      for (let i = 0; i < speciesCount; i++) {
        this.surfaceConcentrations[i]! += filmCoefficients[k * speciesCount + i]! * source;
      }
      this.temperatureAtSurface += this.heats[k]! * filmHeatResistance * source;
    }
  }

  private heats: number[] = [];

  private evaluate(bulk: PelletBulk, withGradient: boolean): void {
    this.work.rateEvaluations++;
    this.law(
      this.surfaceConcentrations,
      this.temperatureAtSurface,
      bulk.pressure,
      this.averageRates,
      withGradient ? this.surfaceGradient : undefined,
    );
  }

  /** d<r_j>/d<q_k> through the film. */
  private filmSensitivity(j: number, k: number): number {
    const { speciesCount } = this.input;
    const { filmCoefficients, filmHeatResistance } = this.basis;
    const row = j * (speciesCount + 2);
    let sum = this.surfaceGradient[row + speciesCount]! * this.heats[k]! * filmHeatResistance;
    for (let i = 0; i < speciesCount; i++) {
      sum += this.surfaceGradient[row + i]! * filmCoefficients[k * speciesCount + i]!;
    }
    return sum;
  }

  private factoriseFilm(growth = 1): boolean {
    const { fieldCount, combination } = this.basis;
    const reactionCount = this.averageRates.length;
    this.work.factorisations++;
    for (let k = 0; k < fieldCount; k++) {
      for (let l = 0; l < fieldCount; l++) {
        let sum = k === l ? 1 : 0;
        for (let j = 0; j < reactionCount; j++) {
          sum -= growth * combination[k * reactionCount + j]! * this.filmSensitivity(j, l);
        }
        this.jacobian[k * fieldCount + l] = sum;
      }
    }
    return factoriseInPlace(this.jacobian, fieldCount, this.pivots);
  }

  /** dT_surface/dT_bulk at fixed sources: one, and the change of the reaction heats with temperature. */
  private temperatureShift(bulk: PelletBulk): number {
    if (!this.hasFilm) return 1;
    const { independent, filmHeatResistance } = this.basis;
    return independent.reduce(
      (sum, reaction, k) => sum - bulk.reactionHeatSlopes[reaction]! * filmHeatResistance * this.sources[k]!,
      1,
    );
  }
}
