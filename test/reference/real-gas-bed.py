"""
Reference solution of an adiabatic ammonia bed with a real gas: Peng-Robinson volumes, fugacities and enthalpies, viscosity estimated
along the bed, intrinsic kinetics.

Written apart from the program and by other means: species flows, temperature and pressure are the unknowns (no stoichiometric reduction);
the temperature follows dH/dz = 0 written out as an ordinary differential equation whose coefficients are central differences of the molar
enthalpy; integrated by SciPy's DOP853 and Radau, whose difference is under "agreement".

    python3 real-gas-bed.py > real-gas-bed.json && npx prettier --write real-gas-bed.json

Peng & Robinson (1976), Ind. Eng. Chem. Fundam. 15, 59; viscosity of the gases after Chung et al. (1988), Ind. Eng. Chem. Res. 27, 671,
hydrogen by Chapman-Enskog with a Lennard-Jones pair, mixed after Wilke (1950), J. Chem. Phys. 18, 517, no correction for pressure;
friction after Ergun (1952). Heat capacities: McBride, Zehe & Gordon, NASA/TP-2002-211556 (ammonia shifted to -45 558 J/mol).
"""

import json

import numpy as np
import scipy
from scipy.integrate import solve_ivp

R = 8.314462618
IDS = ["N2", "H2", "NH3", "Ar"]
NU = np.array([-1.0, -3.0, 2.0, 0.0])
M = np.array([0.028014, 0.002016, 0.017031, 0.03995])
TC = np.array([126.192, 33.145, 405.56, 150.687])
PC = np.array([3395800.0, 1296400.0, 11363400.0, 4863000.0])
OMEGA = np.array([0.0372, -0.219, 0.256, -0.0022])
KIJ = np.zeros((4, 4))
KIJ[0, 1] = KIJ[1, 0] = 0.1
KIJ[0, 2] = KIJ[2, 0] = 0.22

NASA = {
    "N2": [22103.71497, -381.846182, 6.08273836, -0.00853091441, 1.384646189e-5, -9.62579362e-9, 2.519705809e-12, 710.846086, -10.76003744],
    "H2": [40783.2321, -800.918604, 8.21470201, -0.01269714457, 1.753605076e-5, -1.20286027e-8, 3.36809349e-12, 2682.484665, -30.43788844],
    "NH3": [-76812.2615, 1270.951578, -3.89322913, 0.02145988418, -2.183766703e-5, 1.317385706e-8, -3.33232206e-12, -12602.920352, 43.66014588],
    "Ar": [0.0, 0.0, 2.5, 0.0, 0.0, 0.0, 0.0, -745.375, 4.37967491],
}


def h_ideal(t):
    """J/mol, one per species; ranges to 1000 K."""
    out = []
    for s in IDS:
        a = NASA[s]
        out.append(R * t * (-a[0] / t**2 + a[1] * np.log(t) / t + a[2] + a[3] * t / 2 + a[4] * t**2 / 3 + a[5] * t**3 / 4 + a[6] * t**4 / 5 + a[7] / t))
    return np.array(out)


def g_over_rt(t):
    out = []
    for s, h in zip(IDS, h_ideal(t)):
        a = NASA[s]
        entropy = -a[0] / (2 * t**2) - a[1] / t + a[2] * np.log(t) + a[3] * t + a[4] * t**2 / 2 + a[5] * t**3 / 3 + a[6] * t**4 / 4 + a[8]
        out.append(h / (R * t) - entropy)
    return np.array(out)


def peng_robinson(y, t, p):
    """Compressibility factor (gas root), ln phi, residual enthalpy in J/mol."""
    s2 = np.sqrt(2.0)
    m = 0.37464 + 1.54226 * OMEGA - 0.26992 * OMEGA**2
    root = 1 + m * (1 - np.sqrt(t / TC))
    ai = 0.45723552892138219 * R**2 * TC**2 / PC * root**2
    bi = 0.07779607390388845 * R * TC / PC
    dai = 0.45723552892138219 * R**2 * TC**2 / PC * 2 * root * (-m / (2 * np.sqrt(t * TC)))
    aij = np.sqrt(np.outer(ai, ai)) * (1 - KIJ)
    # d sqrt(ai aj)/dT = (dai aj + ai daj) / (2 sqrt(ai aj))
    daij = (1 - KIJ) * (np.outer(dai, ai) + np.outer(ai, dai)) / (2 * np.sqrt(np.outer(ai, ai)))
    a, da, b = y @ aij @ y, y @ daij @ y, y @ bi
    A, B = a * p / (R * t) ** 2, b * p / (R * t)
    roots = np.roots([1.0, -(1 - B), A - 3 * B**2 - 2 * B, -(A * B - B**2 - B**3)])
    z = max(r.real for r in roots if abs(r.imag) < 1e-9)
    for _ in range(5):
        f = z**3 - (1 - B) * z**2 + (A - 3 * B**2 - 2 * B) * z - (A * B - B**2 - B**3)
        z -= f / (3 * z**2 - 2 * (1 - B) * z + A - 3 * B**2 - 2 * B)
    log = np.log((z + (1 + s2) * B) / (z + (1 - s2) * B))
    ln_phi = bi / b * (z - 1) - np.log(z - B) - A / (2 * s2 * B) * (2 * (aij @ y) / a - bi / b) * log
    h_residual = R * t * (z - 1) + (t * da - a) / (2 * s2 * b) * log
    return z, ln_phi, h_residual


def molar_enthalpy(y, t, p):
    return y @ h_ideal(t) + peng_robinson(y, t, p)[2]


def omega_viscosity(ts):
    return 1.16145 * ts**-0.14874 + 0.52487 * np.exp(-0.7732 * ts) + 2.16178 * np.exp(-2.43787 * ts)


VC = np.array([89.41, 64.48, 73.01, 74.59])  # cm3/mol
DIPOLE = np.array([0.0, 0.0, 1.47, 0.0])  # debye
LJ_H2 = (2.827, 59.7)


def viscosity(y, t):
    """Pa s"""
    mw = M * 1e3
    mur = 131.3 * DIPOLE / np.sqrt(VC * TC)
    fc = 1 - 0.2756 * OMEGA + 0.059035 * mur**4
    eta = 40.785 * fc * np.sqrt(mw * t) / (VC ** (2 / 3) * omega_viscosity(1.2593 * t / TC)) * 1e-7
    eta[1] = 26.69 * np.sqrt(mw[1] * t) / (LJ_H2[0] ** 2 * omega_viscosity(t / LJ_H2[1])) * 1e-7
    ratio = np.divide.outer(eta, eta)
    masses = np.divide.outer(mw, mw)
    phi = (1 + np.sqrt(ratio) * masses.T**0.25) ** 2 / np.sqrt(8 * (1 + masses))
    return float(np.sum(y * eta / (phi @ y)))


BAR, ATM, CAL = 1e5, 101325.0, 4.184
INPUTS = {
    "feed_temperature_K": 653.15,
    "feed_pressure_Pa": 150e5,
    "mass_flux_kg_m2_s": 4.0,
    "feed_mole_fractions": [0.225, 0.675, 0.03, 0.07],
    "prefactor": "0.9e15 kmol atm^0.5/(m^3 h), per bed volume",
    "activation_energy": "40765 cal/mol",
    "length_m": 0.5,
    "sphere_diameter_m": 0.004,
    "void_fraction": 0.42,
    "binary_interaction": {"N2-H2": 0.1, "N2-NH3": 0.22},
}
K0 = 0.9e15 * 1e3 * np.sqrt(ATM) / 3600  # mol Pa^0.5/(m3 s)
EA = 40765 * CAL


def rate(y, t, p):
    """mol/(m3 bed s), Temkin's law with exponent one half in fugacities."""
    _, ln_phi, _ = peng_robinson(y, t, p)
    f = np.exp(ln_phi) * y * p
    k_eq = np.exp(-(NU @ g_over_rt(t))) / BAR**2
    return K0 * np.exp(-EA / (R * t)) * (k_eq * f[0] * f[1] ** 1.5 / f[2] - f[2] / f[1] ** 1.5)


def solve(method, tol):
    y0 = np.array(INPUTS["feed_mole_fractions"])
    flux = INPUTS["mass_flux_kg_m2_s"]
    f0 = y0 * flux / (y0 @ M)  # mol/(m2 s)
    d, eps = INPUTS["sphere_diameter_m"], INPUTS["void_fraction"]
    a, b = 150 * (1 - eps) ** 2 / (d * d * eps**3), 1.75 * (1 - eps) / (d * eps**3)

    def slopes(_x, s):
        f, t, p = s[:4], s[4], s[5]
        total = f.sum()
        y = f / total
        r = rate(y, t, p)
        z = peng_robinson(y, t, p)[0]
        rho = (y @ M) * p / (z * R * t)
        dp = -(a * viscosity(y, t) * flux + b * flux**2) / rho
        df = NU * r

        def enthalpy_flow(flows, tt, pp):
            n = flows.sum()
            return n * molar_enthalpy(flows / n, tt, pp)

        # 0 = dH/dz = H_T dT/dz + H_P dP/dz + grad_F H . dF/dz
        ht = (enthalpy_flow(f, t + 0.05, p) - enthalpy_flow(f, t - 0.05, p)) / 0.1
        hp = (enthalpy_flow(f, t, p * (1 + 1e-5)) - enthalpy_flow(f, t, p * (1 - 1e-5))) / (2e-5 * p)
        step = 1e-4 * total
        hf = (enthalpy_flow(f + NU * step, t, p) - enthalpy_flow(f - NU * step, t, p)) / (2 * step) * r
        return np.concatenate([df, [-(hf + hp * dp) / ht, dp]])

    start = np.concatenate([f0, [INPUTS["feed_temperature_K"], INPUTS["feed_pressure_Pa"]]])
    answer = solve_ivp(slopes, (0, INPUTS["length_m"]), start, method=method, rtol=tol, atol=1e-12)
    end = answer.y[:, -1]
    y = end[:4] / end[:4].sum()
    h_in = f0.sum() * molar_enthalpy(f0 / f0.sum(), start[4], start[5])
    h_out = end[:4].sum() * molar_enthalpy(y, end[4], end[5])
    return end, (h_out - h_in) / (end[:4].sum() * 30)


def main():
    one, drift = solve("DOP853", 1e-11)
    other, _ = solve("Radau", 1e-9)
    y = one[:4] / one[:4].sum()
    z, ln_phi, _ = peng_robinson(y, one[4], one[5])
    print(
        json.dumps(
            {
                "about": "adiabatic ammonia bed, Peng-Robinson gas; see real-gas-bed.py",
                "versions": {"scipy": scipy.__version__, "numpy": np.__version__},
                "inputs": INPUTS,
                "agreement": {
                    "largest_relative_difference_of_methods": float(np.max(np.abs(one / other - 1))),
                    "enthalpy_drift_K": float(drift),
                },
                "values": {
                    "mole_fractions": y.tolist(),
                    "temperature_K": float(one[4]),
                    "pressure_drop_Pa": float(INPUTS["feed_pressure_Pa"] - one[5]),
                    "compressibility_factor": float(z),
                    "fugacity_coefficients": np.exp(ln_phi).tolist(),
                    "viscosity_Pa_s": viscosity(y, one[4]),
                },
            },
            indent=2,
        )
    )


if __name__ == "__main__":
    main()
