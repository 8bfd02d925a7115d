import { elementGrid, singlePolynomialGrid, type DiffusionGrid } from './diffusion-grid.js';

/** How a grid of the ladder is made. */
type Rung =
  | { readonly kind: 'single'; readonly nodes: number }
  | {
      readonly kind: 'graded';
      readonly nodesPerElement: number;
      /** Inner ends at 1-u = ratio^-1, ratio^-2, …: this many of them. */
      readonly innerEnds: number;
    };

const gradingRatio = 5;

/**
 * Resolutions from coarse to fine. Single polynomials serve while the reaction zone is a fair part of the radius; then elements graded
 * geometrically to the surface, each rung of them reaching a zone five times thinner, down to about 1/20 000 of the radius. Each also has
 * more nodes per element, so that comparing two rungs shows errors anywhere in the pellet, not at the surface alone.
 */
const rungs: readonly Rung[] = [
  ...[3, 4, 5, 6, 8, 10, 13, 16, 20].map((nodes): Rung => ({ kind: 'single', nodes })),
  ...[2, 3, 4, 5, 6].map((innerEnds): Rung => ({
    kind: 'graded',
    nodesPerElement: 7 + innerEnds,
    innerEnds,
  })),
];

export const finestRung: number = rungs.length - 1;

/** Grids of one shape exponent by rung, made when first asked for. */
export interface ResolutionLadder {
  /** @param rung - 0 (coarsest) to `finestRung` */
  readonly grid: (rung: number) => DiffusionGrid;
}

/** Grids are immutable and follow from the exponent alone, so all ladders of one exponent share them; the last few exponents are kept. */
const sharedGrids = new Map<number, Map<number, DiffusionGrid>>();
const mostExponentsKept = 8;

export function createResolutionLadder(shapeExponent: number): ResolutionLadder {
  const made = gridsOf(shapeExponent);
  return {
    grid(rung) {
      const known = made.get(rung);
      if (known) return known;
      const recipe = rungs[rung];
      if (!recipe) throw new RangeError(`no resolution ${rung}`);
      const grid =
        recipe.kind === 'single'
          ? singlePolynomialGrid(shapeExponent, recipe.nodes)
          : elementGrid(
              shapeExponent,
              Array.from({ length: recipe.innerEnds }, (_, k) => 1 - gradingRatio ** -(k + 1)),
              recipe.nodesPerElement,
            );
      made.set(rung, grid);
      return grid;
    },
  };
}

function gridsOf(shapeExponent: number): Map<number, DiffusionGrid> {
  const known = sharedGrids.get(shapeExponent);
  if (known) return known;
  const oldest = sharedGrids.keys().next();
  if (sharedGrids.size >= mostExponentsKept && !oldest.done) sharedGrids.delete(oldest.value);
  const grids = new Map<number, DiffusionGrid>();
  sharedGrids.set(shapeExponent, grids);
  return grids;
}
