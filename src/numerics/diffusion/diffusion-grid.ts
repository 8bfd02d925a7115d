/**
 * Discrete form of x^(-σ) d/dx (x^σ dψ/dx) = -q on 0 ≤ x ≤ 1, ψ(1) = 0, ψ even in x, by collocation in u = x².
 *
 * The operator is kept as its inverse: ψ at the nodes is `green · q at the nodes`. Any resolution then looks the same to whoever
 * solves ψ = green · q(ψ): a single polynomial for smooth profiles, elements graded towards the surface for thin zones.
 * σ (the shape exponent) is 0 for a slab, 1 for a long cylinder, 2 for a sphere, any real > -1 in between and beyond.
 *
 * @source Villadsen & Michelsen (1978), Solution of Differential Equation Models by Polynomial Approximation, ch. 3;
 *   de Boor & Swartz (1973), SIAM J. Numer. Anal. 10, 582 for collocation on elements at Gauss points
 */
import { Matrix, inverse, solve } from 'ml-matrix';
import { differentiationMatrix, lagrangeValues } from '../barycentric.js';
import { gaussJacobi } from '../quadrature.js';

export interface DiffusionGrid {
  readonly shapeExponent: number;
  /** Collocation nodes, unknowns per field; excludes the surface. */
  readonly unknownCount: number;
  /** Nodes at which the source is needed: the unknowns' nodes, and last the surface where the rule uses it. */
  readonly nodeCount: number;
  /** Relative radii x of the nodes, ascending, length `nodeCount`. */
  readonly positions: Float64Array;
  /** Row-major `unknownCount × unknownCount`: ψ = green · q. */
  readonly green: Float64Array;
  /** Volume averages: Σ weights · q, length `nodeCount`, sum 1. */
  readonly weights: Float64Array;
  /** Coefficients with which nodal ψ (length `unknownCount`) give ψ at relative radius x; not to be written to. */
  readonly interpolationAt: (x: number) => Float64Array;
}

/**
 * One even polynomial over the whole radius. The nodes (zeros of the Jacobi polynomial with weight 1-u) with the surface make a
 * Gauss–Radau rule, which gives averages to twice the order of the profile.
 *
 * @param nodeCount - interior nodes, 1 to about 40 (beyond, rounding in the operator grows above 1e-10)
 */
export function singlePolynomialGrid(shapeExponent: number, nodeCount: number): DiffusionGrid {
  const lowerExponent = (shapeExponent - 1) / 2;
  const interior = gaussJacobi(nodeCount, lowerExponent, 1).points;
  const nodes = Float64Array.from([...interior, 1]);
  const laplacian = laplacianMatrix(nodes, shapeExponent).subMatrix(0, nodeCount - 1, 0, nodeCount - 1);
  return {
    shapeExponent,
    unknownCount: nodeCount,
    nodeCount: nodeCount + 1,
    positions: nodes.map(Math.sqrt),
    green: flatten(inverse(Matrix.mul(laplacian, -1))),
    weights: interpolatoryWeights(nodes, lowerExponent),
    interpolationAt: remembered((x) => lagrangeValues(nodes, x * x).slice(0, nodeCount)),
  };
}

/**
 * Elements in u = x², each with `nodesPerElement` Gauss points, joined with continuous value and slope.
 *
 * @param breakpoints - inner element ends in u, ascending, strictly between 0 and 1
 */
export function elementGrid(
  shapeExponent: number,
  breakpoints: readonly number[],
  nodesPerElement: number,
): DiffusionGrid {
  const ends = [0, ...breakpoints, 1];
  const elementCount = ends.length - 1;
  const lowerExponent = (shapeExponent - 1) / 2;
  const elements = Array.from({ length: elementCount }, (_, e) => {
    const lower = ends[e]!;
    const width = ends[e + 1]! - lower;
    const rule = gaussJacobi(nodesPerElement, e === 0 ? lowerExponent : 0, 0);
    const interior = rule.points.map((point) => lower + width * point);
    // The centre is a regular singular point: an even polynomial needs no condition, hence no node, there.
    const nodes = Float64Array.from(e === 0 ? [...interior, ends[1]!] : [lower, ...interior, ends[e + 1]!]);
    const weights = interior.map((u, k) =>
      e === 0
        ? rule.weights[k]! * width ** (lowerExponent + 1)
        : rule.weights[k]! * width * (lowerExponent + 1) * u ** lowerExponent,
    );
    return { lower, upper: ends[e + 1]!, interior, nodes, weights, isFirst: e === 0 };
  });

  // Unknown order: all interior nodes, then the values at the inner breakpoints; the surface value is zero and left out.
  const unknownCount = elementCount * nodesPerElement;
  const joinCount = elementCount - 1;
  const columnsOf = (e: number): number[] => {
    const inner = Array.from({ length: nodesPerElement }, (_, k) => e * nodesPerElement + k);
    const left = unknownCount + e - 1;
    const right = e < joinCount ? unknownCount + e : -1;
    return e === 0 ? [...inner, right] : [left, ...inner, right];
  };
  const system = Matrix.zeros(unknownCount + joinCount, unknownCount + joinCount);
  elements.forEach((element, e) => {
    const columns = columnsOf(e);
    const laplacian = laplacianMatrix(element.nodes, shapeExponent);
    const slope = differentiationMatrix(element.nodes);
    const size = element.nodes.length;
    const firstInterior = element.isFirst ? 0 : 1;
    columns.forEach((column, j) => {
      if (column < 0) return;
      for (let k = 0; k < nodesPerElement; k++) {
        system.set(e * nodesPerElement + k, column, -laplacian.get(firstInterior + k, j));
      }
      const add = (join: number, value: number): void => {
        const row = unknownCount + join;
        system.set(row, column, system.get(row, column) + value);
      };
      if (e < joinCount) add(e, slope[(size - 1) * size + j]!);
      if (e > 0) add(e - 1, -slope[j]!);
    });
  });
  const sources = Matrix.zeros(unknownCount + joinCount, unknownCount);
  for (let k = 0; k < unknownCount; k++) sources.set(k, k, 1);
  const solution = solve(system, sources);
  const joins = solution.subMatrix(unknownCount, unknownCount + joinCount - 1, 0, unknownCount - 1);
  const green = solution.subMatrix(0, unknownCount - 1, 0, unknownCount - 1);
  // A value at a join follows from the sources; expressed through ψ at the nodes so that profiles need only ψ.
  const joinFromValues = joins.mmul(inverse(green));

  return {
    shapeExponent,
    unknownCount,
    nodeCount: unknownCount,
    positions: Float64Array.from(elements.flatMap(({ interior }) => [...interior.map(Math.sqrt)])),
    green: flatten(green),
    weights: normalised(Float64Array.from(elements.flatMap(({ weights }) => [...weights]))),
    interpolationAt: remembered((x) => {
      const u = x * x;
      const e = Math.max(
        0,
        elements.findIndex(({ upper }) => u <= upper),
      );
      const values = lagrangeValues(elements[e]!.nodes, u);
      const coefficients = new Float64Array(unknownCount);
      columnsOf(e).forEach((column, j) => {
        if (column < 0) return;
        if (column < unknownCount) coefficients[column]! += values[j]!;
        else {
          for (let k = 0; k < unknownCount; k++) {
            coefficients[k]! += values[j]! * joinFromValues.get(column - unknownCount, k);
          }
        }
      });
      return coefficients;
    }),
  };
}

/** Positions asked for are few and come again: nodes of the neighbouring grids, radii of the output. */
const mostRemembered = 400;

function remembered(compute: (x: number) => Float64Array): (x: number) => Float64Array {
  const known = new Map<number, Float64Array>();
  return (x) => {
    const there = known.get(x);
    if (there) return there;
    const made = compute(x);
    if (known.size < mostRemembered) known.set(x, made);
    return made;
  };
}

/** 4u d²/du² + 2(σ+1) d/du on the nodes: the radial Laplacian in u = x². */
function laplacianMatrix(nodes: Float64Array, shapeExponent: number): Matrix {
  const size = nodes.length;
  const first = new Matrix(size, size);
  differentiationMatrix(nodes).forEach((value, index) =>
    first.set(Math.floor(index / size), index % size, value),
  );
  const second = first.mmul(first);
  const laplacian = Matrix.zeros(size, size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      laplacian.set(i, j, 4 * nodes[i]! * second.get(i, j) + 2 * (shapeExponent + 1) * first.get(i, j));
    }
  }
  return laplacian;
}

/** Weights that integrate the interpolating polynomial of the nodes exactly, for the weight u^lowerExponent, normalised to sum 1. */
function interpolatoryWeights(nodes: Float64Array, lowerExponent: number): Float64Array {
  const rule = gaussJacobi(nodes.length, lowerExponent, 0);
  const weights = new Float64Array(nodes.length);
  rule.points.forEach((point, k) => {
    lagrangeValues(nodes, point).forEach((value, i) => (weights[i]! += rule.weights[k]! * value));
  });
  return normalised(weights);
}

function normalised(weights: Float64Array): Float64Array {
  const sum = weights.reduce((total, weight) => total + weight, 0);
  return weights.map((weight) => weight / sum);
}

function flatten(matrix: Matrix): Float64Array {
  return Float64Array.from(matrix.to1DArray());
}
