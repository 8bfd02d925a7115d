"""
Reference dew temperatures by the Peng-Robinson and Soave-Redlich-Kwong equations.

Written apart from the program and by other means: the equal-fugacity conditions of gas and incipient liquid,
    ln y_i + ln phi_i(y, gas root) = ln x_i + ln phi_i(x, liquid root),   sum x = 1,
are solved for the liquid and the temperature together by scipy.optimize.fsolve, from the ideal dew point (Antoine-like K-values, brentq).
Roots of the cubic from numpy.roots, polished; fugacities from the residual Helmholtz energy differenced in complex arithmetic (no formula for
ln phi is coded). "residual" is the largest residual of the conditions. Where two liquids may form, both are tried; the higher dew
temperature stands.

    python3 cubic-dew.py > cubic-dew.json && npx prettier --write cubic-dew.json

Peng & Robinson (1976), Ind. Eng. Chem. Fundam. 15, 59; Soave (1972), Chem. Eng. Sci. 27, 1197.
"""

import json
import sys

import numpy as np
import scipy
from scipy.optimize import brentq, fsolve

R = 8.314462618
DATA = {  # K, Pa, acentric factor
    "H2": (33.14, 1.296e6, -0.219),
    "N2": (126.19, 3.396e6, 0.0372),
    "CO": (132.86, 3.494e6, 0.0497),
    "CO2": (304.13, 7.377e6, 0.224),
    "H2O": (647.1, 22.064e6, 0.344),
    "methanol": (512.5, 8.084e6, 0.566),
    "benzene": (562.02, 4.906e6, 0.211),
    "cyclohexane": (553.6, 4.08e6, 0.209),
    "n_C6H14": (507.8, 3.034e6, 0.3),
}
ETA = 1 / (1 + np.cbrt(4 - np.sqrt(8)) + np.cbrt(4 + np.sqrt(8)))
FORMS = {
    "peng_robinson": ((8 + 40 * ETA) / (49 - 37 * ETA), ETA / (ETA + 3), (0.37464, 1.54226, -0.26992), (2, -1)),
    "soave_redlich_kwong": (1 / (9 * (np.cbrt(2) - 1)), (np.cbrt(2) - 1) / 3, (0.48, 1.574, -0.176), (1, 0)),
}


class Fluid:
    def __init__(self, equation, ids, kij):
        self.oa, self.ob, self.m, (self.u, self.w) = FORMS[equation]
        self.tc, self.pc, self.omega = np.array([DATA[i] for i in ids]).T
        self.k = np.array(kij)

    def mix(self, n, t):
        """a n^2 and b n."""
        slope = self.m[0] + self.m[1] * self.omega + self.m[2] * self.omega**2
        root = np.sqrt(self.oa / self.pc) * R * self.tc * (1 + slope * (1 - np.sqrt(t / self.tc)))
        weighted = n * root
        return weighted @ (1 - self.k) @ weighted, n @ (self.ob * R * self.tc / self.pc)

    def pressure(self, x, v, t):
        a, b = self.mix(x, t)
        return R * t / (v - b) - a / (v * v + self.u * b * v + self.w * b * b)

    def volume(self, x, t, p, phase):
        a, b = self.mix(x, t)
        A, B = a * p / (R * t) ** 2, b * p / (R * t)
        u, w = self.u, self.w
        roots = np.roots([1, u * B - B - 1, A + w * B * B - u * B - u * B * B, -(A * B + w * B * B + w * B**3)])
        real = roots[abs(roots.imag) < 1e-7 * abs(roots)].real
        real = real[real > B]
        z = max(real) if phase == "gas" else min(real)
        v = z * R * t / p
        for _ in range(3):  # Newton, slope by complex step
            slope = self.pressure(x, v + 1e-30j, t).imag / 1e-30
            v -= (self.pressure(x, v, t) - p) / slope
        return v

    def helmholtz(self, n, volume, t):
        """Residual, over R T, at given volume."""
        total = n.sum()
        a, b = self.mix(n, t)
        u, w = self.u, self.w
        d = np.sqrt(u * u - 4 * w)
        attraction = np.log((2 * volume + b * (u + d)) / (2 * volume + b * (u - d))) / (b * d)
        return -total * np.log(1 - b / volume) - a / (R * t) * attraction

    def log_phi(self, x, t, p, phase):
        v = self.volume(x, t, p, phase)
        out = []
        for i in range(len(x)):
            n = x.astype(complex)
            n[i] += 1e-30j
            out.append(self.helmholtz(n, v, t).imag / 1e-30)
        return np.array(out) - np.log(p * v / (R * t))

    def wilson(self, t, p):
        return self.pc / p * np.exp(5.373 * (1 + self.omega) * (1 - self.tc / t))

    def dew(self, y, p, x_start=None):
        y = np.array(y)
        highest = max(self.tc)
        # Of a nearly pure liquid only the main species counts for the first temperature.
        counts = np.ones(len(y)) if x_start is None else np.array(x_start) > 0.5
        t0 = brentq(lambda t: (counts * y / self.wilson(t, p)).sum() - 1, 0.3 * highest, 1.2 * highest)
        t0 = min(t0, 0.97 * highest)
        x0 = np.array(x_start) if x_start is not None else y / self.wilson(t0, p) / (y / self.wilson(t0, p)).sum()
        # A few substitutions bring the liquid near before the equations are solved together.
        for _ in range(30 if x_start is None else 2):
            g = np.log(y) + self.log_phi(y, t0, p, "gas") - self.log_phi(x0, t0, p, "liquid")
            x0 = np.exp(g) / np.exp(g).sum()

        def conditions(unknowns):
            t, x = unknowns[-1] * 100, np.exp(unknowns[:-1])
            equal = np.log(y) + self.log_phi(y, t, p, "gas") - unknowns[:-1] - self.log_phi(x / x.sum(), t, p, "liquid")
            return np.append(equal, x.sum() - 1)

        solution, _, flag, message = fsolve(conditions, np.append(np.log(x0), t0 / 100), xtol=1e-13, full_output=True)
        residual = max(abs(conditions(solution)))
        x = np.exp(solution[:-1])
        y_volume, x_volume = self.volume(y, solution[-1] * 100, p, "gas"), self.volume(x / x.sum(), solution[-1] * 100, p, "liquid")
        if residual > 1e-9 or x_volume > 0.8 * y_volume:
            raise RuntimeError(f"{message} {residual} {x} {solution[-1] * 100}")
        return solution[-1] * 100, x, residual


CASES = [
    ("wet flue gas", {"H2O": 0.12, "N2": 0.75, "CO2": 0.13}, [1.01325e5, 5e5, 30e5], {}),
    ("wet flue gas, interaction", {"H2O": 0.12, "N2": 0.75, "CO2": 0.13}, [30e5], {("H2O", "N2"): 0.3, ("H2O", "CO2"): 0.12, ("N2", "CO2"): -0.02}),
    ("methanol synthesis gas", {"H2": 0.62, "CO": 0.08, "CO2": 0.15, "methanol": 0.10, "H2O": 0.05}, [50e5, 80e5], {}),
    ("methanol synthesis gas, interaction", {"H2": 0.62, "CO": 0.08, "CO2": 0.15, "methanol": 0.10, "H2O": 0.05}, [50e5, 80e5], {("methanol", "H2O"): -0.08, ("CO2", "methanol"): 0.05, ("CO2", "H2O"): 0.12}),
    ("benzene and hydrogen", {"benzene": 0.2, "H2": 0.8}, [10e5, 30e5], {}),
    ("benzene hydrogenation", {"benzene": 0.1, "cyclohexane": 0.15, "H2": 0.75}, [30e5], {}),
    ("steam", {"H2O": 1.0}, [1e5, 10e5, 100e5], {}),
]
# Water and oil: two liquids, each tried.
TWO_LIQUIDS = {
    "oil first": {"H2O": 0.2, "n_C6H14": 0.8},
    "water first": {"H2O": 0.7, "n_C6H14": 0.3},
}

rows = []
for equation in FORMS:
    def add(name, mix, p, pairs, starts):
        ids = list(mix)
        kij = np.zeros((len(ids), len(ids)))
        for (one, other), k in pairs.items():
            i, j = ids.index(one), ids.index(other)
            kij[i, j] = kij[j, i] = k
        fluid = Fluid(equation, ids, kij)
        found = [fluid.dew(list(mix.values()), p, s) for s in starts]
        t, x, residual = max(found, key=lambda one: one[0])
        rows.append(
            {
                "name": name,
                "equation": equation,
                "species": ids,
                "moleFractions": list(mix.values()),
                "pressure": p,
                "binaryInteraction": kij.tolist(),
                "dewTemperature": t,
                "liquid": x.tolist(),
                "residual": residual,
            }
        )
        print(equation, name, p, t, x.round(4), residual, [f[0] for f in found], file=sys.stderr)

    for name, mix, pressures, pairs in CASES:
        for p in pressures:
            add(name, mix, p, pairs, [None])
    for name, mix in TWO_LIQUIDS.items():
        add(name, mix, 5e5, {("H2O", "n_C6H14"): 0.5}, [[0.999, 0.001], [0.001, 0.999]])

json.dump(
    {
        "made_with": {"python": sys.version.split()[0], "scipy": scipy.__version__, "numpy": np.__version__},
        "species": [
            {"id": i, "criticalTemperature": d[0], "criticalPressure": d[1], "acentricFactor": d[2]} for i, d in DATA.items()
        ],
        "dewPoints": rows,
    },
    sys.stdout,
    indent=1,
)
