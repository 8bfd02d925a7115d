import { describe, expect, it } from 'vitest';
import { scaledBesselI, scaledBesselK } from '../../src/numerics/bessel.js';

/** x; e^(-x) I0, e^(-x) I1, e^x K0, e^x K1: Abramowitz & Stegun (1964), table 9.8, ten places; digits checked with scipy.special.ive and kve, SciPy 1.17. */
const table98 = [
  [0.1, 0.9071009258, 0.0452984468, 2.6823261023, 10.8901826831],
  [1, 0.4657596076, 0.2079104154, 1.1444630798, 1.6361534863],
  [5, 0.1835408126, 0.1639722669, 0.5478075643, 0.6002738588],
  [10, 0.1278333372, 0.1212626814, 0.3916319344, 0.4107665706],
] as const;

describe('scaled modified Bessel functions', () => {
  it.each(table98)('at %d: the printed table', (x, i0, i1, k0, k1) => {
    const obtained = [scaledBesselI(0, x), scaledBesselI(1, x), scaledBesselK(0, x), scaledBesselK(1, x)];
    [i0, i1, k0, k1].forEach((printed, k) => {
      // Ten places printed.
      expect(Math.abs(obtained[k]! - printed)).toBeLessThan(0.6e-10);
    });
  });

  it('I0 K1 + I1 K0 = 1/x (DLMF 10.28.2) from 1e-6 to 1e6, to rounding', () => {
    for (let exponent = -6; exponent <= 6; exponent += 0.01) {
      const x = 10 ** exponent;
      const sum = scaledBesselI(0, x) * scaledBesselK(1, x) + scaledBesselI(1, x) * scaledBesselK(0, x);
      expect(Math.abs(sum * x - 1), `x ${x}`).toBeLessThan(1e-14);
    }
  });

  it('meet their limits at 0 and pass NaN on', () => {
    expect(scaledBesselI(0, 0)).toBe(1);
    expect(scaledBesselI(1, 0)).toBe(0);
    expect(scaledBesselK(0, 0)).toBe(Infinity);
    expect(scaledBesselI(1, NaN)).toBeNaN();
    expect(scaledBesselK(1, NaN)).toBeNaN();
  });
});
