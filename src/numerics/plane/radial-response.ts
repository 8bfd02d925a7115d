import { scaledBesselI, scaledBesselK } from '../bessel.js';
import type { SectionResponse } from './section-response.js';

/** Full circle. @param radius - m, > 0  @source 1 - 2 I1(x)/(x I0(x)), x = radius √s: Thiele (1939), Aris (1957) */
export function discResponse(radius: number): SectionResponse {
  const square = radius * radius;
  return {
    area: Math.PI * square,
    perimeter: 2 * Math.PI * radius,
    meanDeficit: (s) => {
      const x = radius * Math.sqrt(s);
      // The series 1/8 - x²/48 + 11 x⁴/3072 where the formula loses digits.
      if (x < 3e-3) return square * (1 / 8 - (x * x) / 48);
      return (1 - (2 * scaledBesselI(1, x)) / (x * scaledBesselI(0, x))) / s;
    },
  };
}

/**
 * Circle with a round hole in its centre, both edges held: f = α I0(r√s) + β K0(r√s).
 *
 * @param innerRadius - m, > 0 and below `outerRadius`
 */
export function annulusResponse(innerRadius: number, outerRadius: number): SectionResponse {
  const difference = outerRadius ** 2 - innerRadius ** 2;
  const wall = outerRadius - innerRadius;
  const atZero = annulusMean(innerRadius, outerRadius);
  return {
    area: Math.PI * difference,
    perimeter: 2 * Math.PI * (innerRadius + outerRadius),
    meanDeficit: (s) => {
      const root = Math.sqrt(s);
      // Where the formula loses digits: the slab's second term is the annulus's within a tenth; both ways are good to 5e-8 where they meet.
      if (root * wall < 1e-3) return atZero * (1 - 1.2 * s * atZero);
      const inner = innerRadius * root;
      const outer = outerRadius * root;
      // α and β carry the scaling: α = a e^(-outer), β = b e^(inner); what comes from the far edge fades with e^(-(outer - inner)).
      const fade = Math.exp(inner - outer);
      const [innerI, innerK] = [scaledBesselI(0, inner), scaledBesselK(0, inner)];
      const [outerI, outerK] = [scaledBesselI(0, outer), scaledBesselK(0, outer)];
      const determinant = innerK * outerI - fade * fade * innerI * outerK;
      const a = (innerK - fade * outerK) / determinant;
      const b = (outerI - fade * innerI) / determinant;
      const growing = outerRadius * scaledBesselI(1, outer) - fade * innerRadius * scaledBesselI(1, inner);
      const decaying = innerRadius * scaledBesselK(1, inner) - fade * outerRadius * scaledBesselK(1, outer);
      const mean = (2 * (a * growing + b * decaying)) / (difference * root);
      return (1 - mean) / s;
    },
  };
}

/** Mean of ψ with ∇²ψ = -1 in the annulus, ψ = 0 on both edges, m²: [a² + b² - (b² - a²)/ln(b/a)]/8. */
function annulusMean(inner: number, outer: number): number {
  const wall = outer - inner;
  const ratio = wall / inner;
  // The logarithm cancels for thin walls, whose mean is the slab's to second order in the ratio.
  if (ratio < 1e-4) return (wall * wall) / 12;
  return (inner ** 2 + outer ** 2 - (wall * (inner + outer)) / Math.log1p(ratio)) / 8;
}
