"""
Reference equilibria, isothermal and adiabatic, by minimising the Gibbs energy with a general-purpose optimiser.

Written apart from the program and by other means: unknowns are the mole numbers themselves under the balances of the elements (the program
works with logarithms and with what the reactions conserve); SciPy's SLSQP from a feasible start, its answer sharpened by MINPACK (fsolve) on
the conditions of Lagrange; the adiabatic temperature by Brent's method on the enthalpy around that.

    python3 equilibrium-composition.py > equilibrium-composition.json && npx prettier --write equilibrium-composition.json

Heat capacities, enthalpies and entropies: McBride, Zehe & Gordon, NASA/TP-2002-211556 (2002), ammonia shifted to -45 558 J/mol; ideal gases.
"""

import json

import numpy as np
import scipy
from scipy.optimize import brentq, fsolve, minimize

R = 8.314462618
P0 = 1e5
# lowest, highest, seven coefficients of Cp/R from T^-2, constants of enthalpy and entropy
NASA = json.loads("""{
  "N2": [[200, 1000, 22103.71497, -381.846182, 6.08273836, -0.00853091441, 1.384646189e-05, -9.62579362e-09, 2.519705809e-12, 710.846086, -10.76003744],
          [1000, 6000, 587712.406, -2239.249073, 6.06694922, -0.00061396855, 1.491806679e-07, -1.923105485e-11, 1.061954386e-15, 12832.10415, -15.86640027]],
  "H2": [[200, 1000, 40783.2321, -800.918604, 8.21470201, -0.01269714457, 1.753605076e-05, -1.20286027e-08, 3.36809349e-12, 2682.484665, -30.43788844],
          [1000, 6000, 560812.801, -837.150474, 2.975364532, 0.001252249124, -3.74071619e-07, 5.9366252e-11, -3.6069941e-15, 5339.82441, -2.202774769]],
  "NH3": [[200, 1000, -76812.2615, 1270.951578, -3.89322913, 0.02145988418, -2.183766703e-05, 1.317385706e-08, -3.33232206e-12, -12602.920352, 43.66014588],
          [1000, 6000, 2452389.535, -8040.89424, 12.71346201, -0.000398018658, 3.55250275e-08, 2.53092357e-12, -3.32270053e-16, 43907.863378, -64.62330602]],
  "CO": [[200, 1000, 14890.45326, -292.2285939, 5.72452717, -0.00817623503, 1.456903469e-05, -1.087746302e-08, 3.027941827e-12, -13031.31878, -7.85924135],
          [1000, 6000, 461919.725, -1944.704863, 5.91671418, -0.000566428283, 1.39881454e-07, -1.787680361e-11, 9.62093557e-16, -2466.261084, -13.87413108]],
  "CO2": [[200, 1000, 49436.5054, -626.411601, 5.30172524, 0.002503813816, -2.127308728e-07, -7.68998878e-10, 2.849677801e-13, -45281.9846, -7.04827944],
          [1000, 6000, 117696.2419, -1788.791477, 8.29152319, -9.22315678e-05, 4.86367688e-09, -1.891053312e-12, 6.33003659e-16, -39083.5059, -26.52669281]],
  "H2O": [[200, 1000, -39479.6083, 575.573102, 0.931782653, 0.00722271286, -7.34255737e-06, 4.95504349e-09, -1.336933246e-12, -33039.7431, 17.24205775],
          [1000, 6000, 1034972.096, -2412.698562, 4.64611078, 0.002291998307, -6.83683048e-07, 9.42646893e-11, -4.82238053e-15, -13842.86509, -7.97814851]],
  "CH4": [[200, 1000, -176685.0998, 2786.18102, -12.0257785, 0.0391761929, -3.61905443e-05, 2.026853043e-08, -4.97670549e-12, -23313.1436, 89.0432275],
          [1000, 6000, 3730042.76, -13835.01485, 20.49107091, -0.001961974759, 4.72731304e-07, -3.72881469e-11, 1.623737207e-15, 75320.6691, -121.9124889]],
  "SO2": [[298.15, 1000, -53108.4214, 909.031167, -2.356891244, 0.02204449885, -2.510781471e-05, 1.446300484e-08, -3.36907094e-12, -41137.5208, 40.45512519],
          [1000, 6000, -112764.0116, -825.226138, 7.61617863, -0.000199932761, 5.65563143e-08, -5.45431661e-12, 2.918294102e-16, -33513.0869, -16.55776085]],
  "O2": [[200, 1000, -34255.6342, 484.700097, 1.119010961, 0.00429388924, -6.83630052e-07, -2.0233727e-09, 1.039040018e-12, -3391.45487, 18.4969947],
          [1000, 6000, -1037939.022, 2344.830282, 1.819732036, 0.001267847582, -2.188067988e-07, 2.053719572e-11, -8.19346705e-16, -16890.10929, 17.38716506]],
  "SO3": [[298.15, 1000, -39528.5529, 620.857257, -1.437731716, 0.02764126467, -3.144958662e-05, 1.792798e-08, -4.12638666e-12, -51841.0617, 33.91331216],
          [1000, 6000, -216692.3781, -1301.022399, 10.96287985, -0.000383710002, 8.46688904e-08, -9.70539929e-12, 4.49839754e-16, -43982.8399, -36.55217314]]
}""")
ELEMENTS = {
    "N2": {"N": 2}, "H2": {"H": 2}, "NH3": {"N": 1, "H": 3}, "CO": {"C": 1, "O": 1}, "CO2": {"C": 1, "O": 2}, "H2O": {"H": 2, "O": 1},
    "CH4": {"C": 1, "H": 4}, "SO2": {"S": 1, "O": 2}, "O2": {"O": 2}, "SO3": {"S": 1, "O": 3},
}

SYSTEMS = [
    {"name": "water-gas shift of a reformer gas", "species": ["CO", "H2O", "CO2", "H2", "N2"], "feed": [10.0, 38.0, 6.0, 34.0, 12.0],
     "temperature_K": 620.0, "pressure_Pa": 26e5, "inert": ["N2"]},
    {"name": "ammonia synthesis", "species": ["N2", "H2", "NH3"], "feed": [24.0, 72.0, 4.0], "temperature_K": 680.0, "pressure_Pa": 150e5, "inert": []},
    {"name": "steam reforming of methane with shift", "species": ["CH4", "H2O", "CO", "H2", "CO2"], "feed": [1.0, 3.0, 0.0, 0.02, 0.0],
     "temperature_K": 1050.0, "pressure_Pa": 20e5, "inert": []},
    {"name": "oxidation of sulfur dioxide", "species": ["SO2", "O2", "SO3", "N2"], "feed": [9.0, 11.0, 0.0, 80.0], "temperature_K": 690.0,
     "pressure_Pa": 1.3e5, "inert": ["N2"]},
]


def nasa(species, t):
    for row in NASA[species]:
        if t <= row[1]:
            break
    a, b0, b1 = row[2:9], row[9], row[10]
    h = -a[0] / t**2 + a[1] * np.log(t) / t + a[2] + a[3] * t / 2 + a[4] * t**2 / 3 + a[5] * t**3 / 4 + a[6] * t**4 / 5 + b0 / t
    s = -a[0] / (2 * t**2) - a[1] / t + a[2] * np.log(t) + a[3] * t + a[4] * t**2 / 2 + a[5] * t**3 / 3 + a[6] * t**4 / 4 + b1
    return h, s


def equilibrium(system, t):
    ids = system["species"]
    feed = np.array(system["feed"]) / sum(system["feed"])
    names = sorted({e for i in ids for e in ELEMENTS[i]})
    rows = [[ELEMENTS[i].get(e, 0) for i in ids] for e in names]
    # What is inert keeps its amount: its elements alone would not say so.
    rows += [[1.0 if i == inert else 0.0 for i in ids] for inert in system["inert"]]
    a = np.array(rows, float)
    # Independent rows only.
    keep = []
    for r in range(len(a)):
        if np.linalg.matrix_rank(a[keep + [r]]) > len(keep):
            keep.append(r)
    a = a[keep]
    b = a @ feed
    g = np.array([h - s for h, s in (nasa(i, t) for i in ids)]) + np.log(system["pressure_Pa"] / P0)

    def gibbs(n):
        n = np.maximum(n, 1e-300)
        return float(n @ (g + np.log(n / n.sum())))

    def slope(n):
        n = np.maximum(n, 1e-300)
        return g + np.log(n / n.sum())

    start = 0.7 * feed + 0.3 * np.clip(np.linalg.lstsq(a, b, rcond=None)[0], 1e-3, None)
    best = minimize(gibbs, start, jac=slope, method="SLSQP", bounds=[(1e-12, None)] * len(ids),
                    constraints={"type": "eq", "fun": lambda n: a @ n - b, "jac": lambda n: a}, options={"ftol": 1e-16, "maxiter": 2000})
    n = np.maximum(best.x, 1e-12)
    multipliers = np.linalg.lstsq(a.T, -slope(n), rcond=None)[0]

    def conditions(z):
        x, lam = z[: len(ids)], z[len(ids):]
        amounts = np.exp(x)
        return np.concatenate([g + x - np.log(amounts.sum()) + a.T @ lam, a @ amounts - b])

    z, info, ok, _ = fsolve(conditions, np.concatenate([np.log(n), multipliers]), xtol=1e-14, full_output=True)
    polished = np.exp(z[: len(ids)])
    assert ok == 1 or np.max(np.abs(info["fvec"])) < 1e-10, (system["name"], info["fvec"])
    return polished, float(np.max(np.abs(polished / polished.sum() - n / n.sum())))


def main():
    out = []
    for system in SYSTEMS:
        ids = system["species"]
        feed = np.array(system["feed"]) / sum(system["feed"])
        t, p = system["temperature_K"], system["pressure_Pa"]
        n, moved = equilibrium(system, t)
        h_in = sum(f * nasa(i, t)[0] * R * t for f, i in zip(feed, ids))

        def excess(x):
            amounts, _ = equilibrium(system, x)
            return sum(m * nasa(i, x)[0] * R * x for m, i in zip(amounts, ids)) - h_in

        adiabatic = brentq(excess, 400.0, 2000.0, xtol=1e-10, rtol=1e-14)
        m, _ = equilibrium(system, adiabatic)
        out.append({
            "name": system["name"], "species": ids, "feed": system["feed"], "temperature_K": t, "pressure_Pa": p,
            "mole_fractions": (n / n.sum()).tolist(), "moved_by_polishing": moved,
            "adiabatic_temperature_K": adiabatic, "adiabatic_mole_fractions": (m / m.sum()).tolist(),
        })
    print(json.dumps({"about": "equilibria by minimisation; see equilibrium-composition.py",
                      "versions": {"scipy": scipy.__version__, "numpy": np.__version__}, "systems": out}, indent=2))


if __name__ == "__main__":
    main()
