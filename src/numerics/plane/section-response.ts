/**
 * A plane figure's answer to the family of problems ∇²f = s f with f = 1 on all its edges, s ≥ 0, and what follows from it for prisms.
 *
 * Everything linear about diffusion into a straight body of that cross-section is in one function of s, the mean deficit
 * g(s) = (1 - <f>)/s: at s = 0 the mean of ψ with ∇²ψ = -1, ψ = 0 on the edges; at s = k/De the first-order effectiveness 1 - s g(s); and
 * for a prism of finite length, where the ends count, a sum over s.
 */
export interface SectionResponse {
  /** m² */
  readonly area: number;
  /** All edges, m. */
  readonly perimeter: number;
  /** g(s), m². @param s - 1/m², ≥ 0 */
  readonly meanDeficit: (s: number) => number;
}

/** Terms are summed until the plane problem's boundary layer is this many times thinner than area over perimeter … */
const layersAcross = 40;
/** … and at least this many; what is left out is below 1e-7 of the sum. */
const fewestTerms = 32;

/**
 * (1 - <c>)/s for ∇²c = s c with c = 1 on the surface of a prism, ends included; at s = 0 the mean of ψ, ∇²ψ = -1.
 *
 * The source is expanded in sines along the axis, λ_n = (2n+1)π/H, which leaves Σ 2/[(n+½)²π²] g(s + λ_n²). The part that does not feel the
 * edges sums to that of a slab between the ends, which leaves fast-falling terms.
 *
 * @param length - H, m, > 0
 * @param s - 1/m², ≥ 0
 * @returns m²
 * @source separation of variables, as in Aris (1957), Chem. Eng. Sci. 6, 262, and Gunn (1967), Chem. Eng. Sci. 22, 1439, for cylinders
 */
export function prismDeficit(section: SectionResponse, length: number, s: number): number {
  const { area, perimeter, meanDeficit } = section;
  const terms = Math.max(fewestTerms, Math.ceil((layersAcross * perimeter * length) / (2 * Math.PI * area)));
  let edges = 0;
  for (let n = terms - 1; n >= 0; n--) {
    const halfWave = (n + 0.5) * Math.PI;
    const shifted = s + ((2 * halfWave) / length) ** 2;
    edges += (2 / (halfWave * halfWave)) * (1 / shifted - meanDeficit(shifted));
  }
  return slabDeficit(length / 2, s) - edges;
}

/** [1 - tanh(x)/x]/s with x = half thickness times √s. */
export function slabDeficit(halfThickness: number, s: number): number {
  const square = halfThickness * halfThickness;
  const x = halfThickness * Math.sqrt(s);
  // The series' next term is 17/315 x⁴ relative; the formula loses digits as 1/x².
  if (x < 1e-3) return (square / 3) * (1 - 0.4 * x * x);
  return (1 - Math.tanh(x) / x) / s;
}
