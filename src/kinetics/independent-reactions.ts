import { Matrix, solve } from 'ml-matrix';

/** A set of independent reactions, and every reaction as a combination of them. */
export interface ReactionBasis {
  /** Indices of the independent reactions, ascending; K of them. */
  readonly independent: readonly number[];
  /** Row-major `K × reactionCount`: reaction j = Σ_k combination[k][j] · independent reaction k, in atoms and in heat. */
  readonly combination: Float64Array;
}

/** A combination that meets the others to this fraction of their size counts as exact. */
const relativeTolerance = 1e-9;

/**
 * Finds which reactions are independent: those before it in the list cannot make up for it, neither in stoichiometry nor (where heats
 * are handed in) in heat. Two reactions that add up to a third in atoms but not in heat are three independent ones.
 *
 * @param stoichiometry - one row per reaction, one entry per species
 * @param heats - J/mol of reaction, one per reaction, all at the same temperature; undefined where heats play no part
 */
export function findReactionBasis(
  stoichiometry: readonly (readonly number[])[],
  heats: readonly number[] | undefined,
): ReactionBasis {
  const heatScale = Math.max(...(heats ?? []).map(Math.abs), Number.MIN_VALUE);
  const rows = stoichiometry.map((row, j) => [...row, heats ? heats[j]! / heatScale : 0]);
  const independent: number[] = [];
  const columns: number[][] = [];
  rows.forEach((row, j) => {
    const coefficients = combine(
      independent.map((index) => rows[index]!),
      row,
    );
    if (coefficients) columns.push(coefficients);
    else {
      columns.push([...independent.map(() => 0), 1]);
      independent.push(j);
    }
  });
  const combination = new Float64Array(independent.length * rows.length);
  columns.forEach((column, j) => {
    column.forEach((value, k) => (combination[k * rows.length + j] = value));
  });
  return { independent, combination };
}

/** Coefficients that make up `target` from `rows` by least squares; undefined when they leave a remainder. */
function combine(rows: readonly number[][], target: readonly number[]): number[] | undefined {
  const size = Math.hypot(...target);
  if (size === 0) return rows.map(() => 0);
  if (rows.length === 0) return undefined;
  const matrix = new Matrix(rows.map((row) => [...row])).transpose();
  const solution = solve(matrix, Matrix.columnVector([...target]), true).to1DArray();
  const remainder = target.map(
    (value, i) => value - rows.reduce((sum, row, k) => sum + row[i]! * solution[k]!, 0),
  );
  if (Math.hypot(...remainder) > relativeTolerance * size) return undefined;
  return solution.map((value) => (Math.abs(value - Math.round(value)) < 1e-11 ? Math.round(value) : value));
}
