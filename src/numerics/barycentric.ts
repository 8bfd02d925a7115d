/**
 * Polynomial interpolation and differentiation on arbitrary distinct nodes by the barycentric form.
 *
 * @source Berrut & Trefethen (2004), SIAM Review 46, 501
 */

/** Barycentric weights of the nodes, scaled to a largest magnitude of 1. */
export function barycentricWeights(nodes: Float64Array): Float64Array {
  const logs = nodes.map((node, i) => {
    let sum = 0;
    nodes.forEach((other, j) => {
      if (i !== j) sum -= Math.log(Math.abs(node - other));
    });
    return sum;
  });
  const largest = Math.max(...logs);
  return nodes.map((node, i) => {
    let sign = 1;
    nodes.forEach((other, j) => {
      if (i !== j && node < other) sign = -sign;
    });
    return sign * Math.exp(logs[i]! - largest);
  });
}

/** Derivative matrix D with f'(nodes) = D f(nodes), row-major; rows sum to zero exactly (negative-sum trick). */
export function differentiationMatrix(nodes: Float64Array): Float64Array {
  const count = nodes.length;
  const weights = barycentricWeights(nodes);
  const matrix = new Float64Array(count * count);
  for (let i = 0; i < count; i++) {
    let diagonal = 0;
    for (let j = 0; j < count; j++) {
      if (i === j) continue;
      const entry = weights[j]! / weights[i]! / (nodes[i]! - nodes[j]!);
      matrix[i * count + j] = entry;
      diagonal -= entry;
    }
    matrix[i * count + i] = diagonal;
  }
  return matrix;
}

/** Values at `target` of the Lagrange polynomials of the nodes, length of `nodes`. */
export function lagrangeValues(nodes: Float64Array, target: number): Float64Array {
  const hit = nodes.indexOf(target);
  const values = new Float64Array(nodes.length);
  if (hit >= 0) {
    values[hit] = 1;
    return values;
  }
  const weights = barycentricWeights(nodes);
  let sum = 0;
  nodes.forEach((node, i) => {
    values[i] = weights[i]! / (target - node);
    sum += values[i];
  });
  return values.map((value) => value / sum);
}
