import {
  createResolutionLadder,
  finestRung,
  type ResolutionLadder,
} from '../numerics/diffusion/resolution-ladder.js';
import { CollocatedPellet } from './collocated-pellet.js';
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

/** Rung of the first solution: enough at moduli up to about 1, and the first review raises it where it is not. */
const firstRung = 2;
/** Errors below this fraction of the tolerance allow one rung less. */
const generousFraction = 1e-4;
/** Rungs on which a pellet is grown when all else fails: a moderate single polynomial, then graded elements. */
const growthRungs = [6, 10] as const;
/** Rungs above the one in use for showing the inside. */
const interiorRungs = 2;
/**
 * Rates below this fraction of the largest met so far need not be resolved to the relative tolerance: they add that much less to any extent,
 * and near equilibrium, where a net rate vanishes between two large ones, its relative error says nothing.
 */
const smallRateFraction = 0.03;

/**
 * The full reaction–diffusion problem, solved on the coarsest grid of the ladder that meets the tolerance: the averages are compared with
 * those on the next finer grid whenever {@link FullPellet.reviewResolution} is called.
 */
export class FullPellet implements PelletModel {
  readonly work: PelletWork = createPelletWork();
  private readonly input: PelletModelInput;
  private readonly basis: FieldBasis;
  private readonly ladder: ResolutionLadder;
  private readonly made = new Map<number, CollocatedPellet>();
  private rung = firstRung;
  private largestRate = 0;
  private current: CollocatedPellet;
  private lastBulk: PelletBulk | undefined;

  constructor(input: PelletModelInput) {
    this.input = input;
    this.basis = createFieldBasis(input);
    this.ladder = createResolutionLadder(input.pellet.geometry.shapeExponent);
    this.current = this.onRung(firstRung);
  }

  get averageRates(): Float64Array {
    return this.current.averageRates;
  }

  get gradient(): Float64Array {
    return this.current.gradient;
  }

  /**
   * Solves on the present grid; where that fails, on finer ones, since a grid too coarse for a thin zone can overshoot below zero; where that
   * fails too, by growing the pellet, on two grids at most.
   */
  solve(bulk: PelletBulk): PelletStatus {
    this.lastBulk = bulk;
    if (this.input.transportVaries) refreshFieldBasis(this.basis, this.input);
    const status = this.current.solve(bulk);
    if (status === 'converged' || status === 'rates_not_finite') return status;
    return this.rescue(bulk, status);
  }

  differentiate(bulk: PelletBulk): PelletStatus {
    const status = this.solve(bulk);
    if (status !== 'converged') return status;
    return this.current.differentiate(bulk) ? 'converged' : 'no_state';
  }

  surfaceTemperature(): number {
    return this.current.temperatureAt(this.solvedBulk(), 'surface');
  }

  centreTemperature(): number {
    return this.current.temperatureAt(this.solvedBulk(), 'centre');
  }

  /** From a finer grid than the averages need: an average forgives ripples that a profile would show. */
  interior(relativeRadii: Float64Array): PelletInterior {
    const bulk = this.solvedBulk();
    const finer = this.onRung(Math.min(this.rung + interiorRungs, finestRung));
    let shown = this.current;
    if (finer !== this.current) {
      finer.adopt(this.current);
      if (finer.solve(bulk) === 'converged') shown = finer;
    }
    const states = Array.from(relativeRadii, (radius) => shown.stateAt(bulk, radius));
    return {
      relativeRadii,
      concentrations: Array.from({ length: this.input.speciesCount }, (_, i) =>
        Float64Array.from(states, ({ concentrations }) => concentrations[i]!),
      ),
      temperatures: Float64Array.from(states, ({ temperature }) => temperature),
    };
  }

  reviewResolution(bulk: PelletBulk): 'adequate' | 'raised' {
    const startRung = this.rung;
    if (this.solve(bulk) !== 'converged') return this.rung > startRung ? 'raised' : 'adequate';
    for (const rate of this.averageRates) this.largestRate = Math.max(this.largestRate, Math.abs(rate));
    while (this.rung < finestRung) {
      const coarse = this.current;
      const fine = this.onRung(this.rung + 1);
      fine.adopt(coarse);
      const error =
        fine.solve(bulk) === 'converged'
          ? largestDifference(coarse.averageRates, fine.averageRates, this.largestRate)
          : Infinity;
      if (error > this.input.tolerance) {
        this.use(this.rung + 1);
        if (this.solve(bulk) !== 'converged') break;
        continue;
      }
      if (this.rung === startRung && this.rung > 0 && error < generousFraction * this.input.tolerance) {
        const coarser = this.onRung(this.rung - 1);
        coarser.adopt(coarse);
        if (coarser.solve(bulk) === 'converged') this.use(this.rung - 1);
      }
      break;
    }
    return this.rung > startRung ? 'raised' : 'adequate';
  }

  private rescue(bulk: PelletBulk, first: PelletStatus): PelletStatus {
    // An overdrawn state on the finest grid is worth more to the user than none.
    let status = first;
    const finerRungs = Array.from({ length: finestRung - this.rung }, (_, k) => this.rung + 1 + k);
    const attempts: readonly (readonly [rung: number, way: 'solve' | 'solveByGrowth'])[] = [
      ...finerRungs.filter((rung) => (rung - this.rung) % 2 === 1).map((rung) => [rung, 'solve'] as const),
      ...growthRungs.map((rung) => [Math.max(rung, this.rung), 'solveByGrowth'] as const),
    ];
    for (const [rung, way] of attempts) {
      const pellet = this.onRung(rung);
      pellet.reset();
      const outcome = pellet[way](bulk);
      if (outcome === 'converged') {
        this.use(rung);
        return outcome;
      }
      if (outcome === 'overdrawn') status = outcome;
    }
    return status;
  }

  private solvedBulk(): PelletBulk {
    if (!this.lastBulk) throw new Error('a pellet has no state before its first solution');
    return this.lastBulk;
  }

  private onRung(rung: number): CollocatedPellet {
    let pellet = this.made.get(rung);
    if (!pellet) {
      pellet = new CollocatedPellet(this.ladder.grid(rung), this.input, this.basis, this.work);
      this.made.set(rung, pellet);
    }
    return pellet;
  }

  private use(rung: number): void {
    this.rung = rung;
    this.current = this.onRung(rung);
  }
}

/** Largest difference, each rate measured by itself or, where it is small, by the largest rate met so far. */
function largestDifference(coarse: Float64Array, fine: Float64Array, largest: number): number {
  if (largest === 0) return 0;
  return fine.reduce((worst, rate, j) => {
    const scale = Math.max(Math.abs(rate), smallRateFraction * largest);
    return Math.max(worst, Math.abs(coarse[j]! - rate) / scale);
  }, 0);
}
