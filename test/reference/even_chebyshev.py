"""Even Chebyshev collocation on 0 < x <= 1 for bodies of one dimension (slab, long cylinder, sphere); point 0 is the surface."""

import numpy as np


def differentiation_matrix(count):
    """Chebyshev-Lobatto points x_j = cos(j pi/n) on [-1, 1] and the differentiation matrix (Trefethen 2000, ch. 6)."""
    n = count - 1
    x = np.cos(np.pi * np.arange(count) / n)
    c = np.ones(count)
    c[[0, -1]] = 2.0
    c *= (-1.0) ** np.arange(count)
    dx = x[:, None] - x[None, :]
    d = np.outer(c, 1 / c) / (dx + np.eye(count))
    d -= np.diag(d.sum(axis=1))
    return x, d


class EvenGrid:
    """points; first derivative; Laplacian x^-s d/dx(x^s d/dx); weights of the volume average; values at the centre."""

    def __init__(self, points, exponent):
        x, d = differentiation_matrix(2 * points)
        fold = lambda m: m[:points, :points] + m[:points, points:][:, ::-1]
        self.x = x[:points]
        self.first = fold(d)
        self.laplacian = fold(d @ d) + (exponent / self.x)[:, None] * self.first
        # Interpolatory in the even Chebyshev polynomials, with moments by a Gauss rule that is exact for them.
        k = np.arange(points)
        basis = np.cos(2 * k[:, None] * np.arccos(self.x)[None, :])
        xq, wq = np.polynomial.legendre.leggauss(2 * points + 4)
        xq, wq = (xq + 1) / 2, wq / 2
        moments = np.cos(2 * k[:, None] * np.arccos(xq)[None, :]) @ (wq * (exponent + 1) * xq**exponent)
        self.average = np.linalg.solve(basis, moments)
        self.centre = np.linalg.solve(basis, np.cos(np.pi * k))
