"""
Reference solution of a cooled tube with three reactions and a full non-isothermal pellet with film at every position.

Written apart from the program and by other means: all reacting species and the temperature are unknowns of the pellet (no
stoichiometric reduction), discretised by even Chebyshev collocation; the axial equations go through SciPy's LSODA and DOP853.
Both pellet resolution and axial method are varied; the differences are in the output under "agreement".

    python3 cooled-bed.py > cooled-bed.json && npx prettier --write cooled-bed.json

Pellet, sphere of radius R (constant diffusivities and conductivity):
    De_i  (1/r^2) d/dr(r^2 dc_i/dr) = -sum_j nu_ij r_j        De_i dc_i/dr = kc_i (c_i,bulk - c_i)     at r = R
    lam   (1/r^2) d/dr(r^2 dT/dr)   = -sum_j (-dH_j) r_j      lam dT/dr    = h (T_bulk - T)            at r = R
    r_j per pellet volume = density * k_j(T) * p_a * p_b,     p_i = c_i R T with the local T
Bed:
    dF_i/dz  = A (1-eps) sum_j nu_ij <r_j>
    m cp dT/dz = A (1-eps) sum_j (-dH_j) <r_j> - U pi D (T - Tc)
    -dP/dz = (150 mu (1-eps)^2/(d^2 eps^3) G + 1.75 (1-eps)/(d eps^3) G^2) / rho,   rho = P M/(R T)      Ergun (1952)
"""

import json
import sys

import numpy as np
import scipy
from scipy.integrate import solve_ivp

from even_chebyshev import EvenGrid

R_GAS = 8.314462618
BAR = 1e5

INPUTS = {
    "species": ["A", "P", "O2", "H2O", "CO2", "N2"],
    "formulas": ["C8H10", "C8H4O3", "O2", "H2O", "CO2", "N2"],
    "molar_mass_kg_mol": [0.106165, 0.148115, 0.031998, 0.018015, 0.044009, 0.028014],
    "reactions": ["selective", "burn", "overburn"],
    "equations": ["A + 3 O2 -> P + 3 H2O", "A + 10.5 O2 -> 8 CO2 + 5 H2O", "P + 7.5 O2 -> 8 CO2 + 2 H2O"],
    "stoichiometry": [[-1, 1, -3, 3, 0, 0], [-1, 0, -10.5, 5, 8, 0], [0, -1, -7.5, 2, 8, 0]],
    "heat_of_reaction_J_mol": [-1285e3, -4564e3, -3279e3],
    "rate_orders": "each law is k * p(fuel) * p(O2), pressures in bar, rate in mol/(kg s)",
    "rate_constants": [
        {"value_mol_kg_s_bar2": 0.085, "at_K": 640.0, "activation_energy_J_mol": 113e3},
        {"prefactor_mol_kg_s_bar2": 5.4e7, "activation_energy_J_mol": 119e3},
        {"prefactor_mol_kg_s_bar2": 6.0e7, "activation_energy_J_mol": 124e3},
    ],
    "feed_temperature_K": 625.0,
    "feed_pressure_Pa": 1.6e5,
    "mass_flux_kg_m2_s": 1.3,
    "feed_mole_fractions": {"A": 0.009, "O2": 0.208, "N2": 0.783},
    "viscosity_Pa_s": 3.1e-5,
    "heat_capacity_J_kg_K": 1060.0,
    "sphere_diameter_m": 0.004,
    "pellet_density_kg_m3": 1800.0,
    "pellet_conductivity_W_m_K": 0.35,
    "effective_diffusivity_m2_s": {"A": 1.3e-6, "P": 1.1e-6, "O2": 3.2e-6, "H2O": 4.2e-6, "CO2": 2.6e-6},
    "film_mass_transfer_m_s": {"A": 0.075, "P": 0.066, "O2": 0.15, "H2O": 0.18, "CO2": 0.125},
    "film_heat_transfer_W_m2_K": 190.0,
    "tube_diameter_m": 0.0254,
    "tubes": 1,
    "length_m": 3.0,
    "void_fraction": 0.42,
    "pressure_drop": "Ergun, 150 and 1.75, diameter 4 mm",
    "overall_coefficient_W_m2_K": 110.0,
    "coolant_temperature_K": 625.0,
    "gas_constant_J_mol_K": R_GAS,
}


class Pellet:
    """Even Chebyshev collocation on 0 < x <= 1, x = r/R; unknowns c of five species and T at every point, point 0 is the surface."""

    def __init__(self, inputs, points):
        ids = inputs["species"][:5]
        self.nu = np.array(inputs["stoichiometry"], float)[:, :5]
        self.fuel = [0, 0, 1]
        self.oxygen = 2
        self.heat = -np.array(inputs["heat_of_reaction_J_mol"])
        self.density = inputs["pellet_density_kg_m3"]
        self.radius = inputs["sphere_diameter_m"] / 2
        self.diffusion = np.array(
            [inputs["effective_diffusivity_m2_s"][i] for i in ids] + [inputs["pellet_conductivity_W_m_K"]]
        )
        self.film = np.array([inputs["film_mass_transfer_m_s"][i] for i in ids] + [inputs["film_heat_transfer_W_m2_K"]])
        self.energy = np.array([k["activation_energy_J_mol"] for k in inputs["rate_constants"]])
        self.prefactor = np.array(
            [
                k["prefactor_mol_kg_s_bar2"]
                if "prefactor_mol_kg_s_bar2" in k
                else k["value_mol_kg_s_bar2"] * np.exp(k["activation_energy_J_mol"] / (R_GAS * k["at_K"]))
                for k in inputs["rate_constants"]
            ]
        )
        n = self.points = points
        grid = self.grid = EvenGrid(points, 2)
        # Linear part, field by field; the first row of each block is the film condition.
        size = 6 * n
        self.linear = np.zeros((size, size))
        for f in range(6):
            block = self.diffusion[f] / self.radius**2 * grid.laplacian
            block[0] = self.diffusion[f] / self.radius * grid.first[0]
            block[0, 0] += self.film[f]
            self.linear[f * n : (f + 1) * n, f * n : (f + 1) * n] = block
        self.sources = np.vstack([self.nu.T, self.heat])  # 6 x 3
        self.state = None
        self.solves = 0

    def rates(self, c, temperature):
        """r_j in mol/(m3 s) and d/dc, d/dT; c is 5 x points."""
        k = self.prefactor[:, None] * np.exp(-self.energy[:, None] / (R_GAS * temperature[None, :])) * self.density
        to_bar2 = (R_GAS * temperature / BAR) ** 2
        fuel = c[self.fuel]
        oxygen = c[self.oxygen][None, :]
        r = k * fuel * oxygen * to_bar2
        by_fuel = k * oxygen * to_bar2
        by_oxygen = k * fuel * to_bar2
        by_temperature = r * (self.energy[:, None] / (R_GAS * temperature**2) + 2 / temperature)
        return r, by_fuel, by_oxygen, by_temperature

    def solve(self, bulk, temperature):
        """Averaged rates, mol/(m3 pellet s), for bulk concentrations (5) and temperature."""
        n = self.points
        outside = np.append(bulk, temperature)
        y = np.repeat(outside, n) if self.state is None else self.state.copy()
        scale = np.repeat(np.array([bulk[0], bulk[0], bulk[2], bulk[0], bulk[0], temperature]) + 1e-300, n)
        scale = np.maximum(scale, np.repeat([1e-6, 1e-6, 1e-6, 1e-6, 1e-6, 1.0], n))
        self.solves += 1
        previous = np.inf
        for _ in range(60):
            fields = y.reshape(6, n)
            r, by_fuel, by_oxygen, by_t = self.rates(fields[:5], fields[5])
            residual = (self.linear @ y).reshape(6, n)
            residual[:, 1:] += (self.sources @ r)[:, 1:]
            residual[:, 0] -= self.film * outside
            jacobian = self.linear.copy()
            inner = np.arange(1, n)
            for f in range(6):
                for j in range(3):
                    s = self.sources[f, j]
                    if s == 0:
                        continue
                    jacobian[f * n + inner, self.fuel[j] * n + inner] += s * by_fuel[j, inner]
                    jacobian[f * n + inner, self.oxygen * n + inner] += s * by_oxygen[j, inner]
                    jacobian[f * n + inner, 5 * n + inner] += s * by_t[j, inner]
            step = np.linalg.solve(jacobian, -residual.ravel())
            y = y + step
            size = np.max(np.abs(step) / scale)
            if size < 1e-11 or (size < 1e-9 and size > 0.3 * previous):
                break
            previous = size
        else:
            raise RuntimeError("pellet not converged")
        self.state = y
        fields = y.reshape(6, n)
        return self.rates(fields[:5], fields[5])[0] @ self.grid.average

    def bulk_rates(self, bulk, temperature):
        return self.rates(np.asarray(bulk)[:, None], np.array([temperature]))[0][:, 0]


def solve_bed(inputs, points, method, rtol):
    pellet = Pellet(inputs, points)
    nu = np.array(inputs["stoichiometry"], float)
    heat = -np.array(inputs["heat_of_reaction_J_mol"])
    masses = np.array(inputs["molar_mass_kg_mol"])
    fractions = np.array([inputs["feed_mole_fractions"].get(i, 0.0) for i in inputs["species"]])
    diameter, eps, dp = inputs["tube_diameter_m"], inputs["void_fraction"], inputs["sphere_diameter_m"]
    area = np.pi / 4 * diameter**2
    flux = inputs["mass_flux_kg_m2_s"]
    feed = flux * area / (fractions @ masses) * fractions
    cp, mu = inputs["heat_capacity_J_kg_K"], inputs["viscosity_Pa_s"]
    t0, p0 = inputs["feed_temperature_K"], inputs["feed_pressure_Pa"]
    wall = inputs["overall_coefficient_W_m2_K"] * np.pi * diameter
    coolant = inputs["coolant_temperature_K"]
    viscous = 150 * mu * (1 - eps) ** 2 / (dp**2 * eps**3) * flux
    inertial = 1.75 * (1 - eps) / (dp * eps**3) * flux**2
    capacity = flux * area * cp
    # Unknowns in units of their own size: F/F_A0, T/T0, P/P0, extents/F_A0, heat removed/(capacity T0).
    unit = np.concatenate([np.full(6, feed[0]), [t0, p0], np.full(3, feed[0]), [capacity * t0]])

    def bulk_of(y):
        flows, temperature, pressure = y[:6], y[6], y[7]
        return flows[:5] / flows.sum() * pressure / (R_GAS * temperature), temperature

    def right_side(_, scaled):
        y = scaled * unit
        bulk, temperature = bulk_of(y)
        rates = area * (1 - eps) * pellet.solve(bulk, temperature)
        flows, pressure = y[:6], y[7]
        density = pressure * (flux * area / flows.sum()) / (R_GAS * temperature)
        removed = wall * (temperature - coolant)
        slope = np.concatenate(
            [
                nu.T @ rates,
                [(heat @ rates - removed) / capacity, -(viscous + inertial) / density],
                rates,
                [removed],
            ]
        )
        return slope / unit

    def warming(z, scaled):
        return right_side(z, scaled)[6]

    warming.direction = -1
    start = np.concatenate([feed, [t0, p0], np.zeros(4)]) / unit
    solution = solve_ivp(
        right_side,
        (0.0, inputs["length_m"]),
        start,
        method=method,
        rtol=rtol,
        atol=rtol * 1e-2,
        dense_output=True,
        events=warming,
    )
    if not solution.success:
        raise RuntimeError(solution.message)
    peak_z = float(solution.t_events[0][0])
    peak_state = solution.sol(peak_z) * unit
    out = solution.y[:, -1] * unit

    def effectiveness(y):
        bulk, temperature = bulk_of(y)
        average = pellet.solve(bulk, temperature)
        point = pellet.bulk_rates(bulk, temperature)
        return [float(a / b) if b > 0 else None for a, b in zip(average, point)]

    def surface_and_centre(y):
        bulk, temperature = bulk_of(y)
        pellet.solve(bulk, temperature)
        field = pellet.state.reshape(6, -1)[5]
        return float(field[0]), float(pellet.grid.centre @ field)

    atoms = {"C": [8, 8, 0, 0, 1, 0], "H": [10, 4, 0, 2, 0, 0], "O": [0, 3, 2, 1, 2, 0]}
    rows = []
    for z in np.linspace(0.0, inputs["length_m"], 13):
        y = solution.sol(z) * unit
        rows.append({"z_m": float(z), "T_K": float(y[6]), "P_Pa": float(y[7]), "F_mol_s": [float(v) for v in y[:6]]})
    surface, centre = surface_and_centre(peak_state)
    result = {
        "feed_flows_mol_s": [float(v) for v in feed],
        "exit_flows_mol_s": [float(v) for v in out[:6]],
        "exit_temperature_K": float(out[6]),
        "exit_pressure_Pa": float(out[7]),
        "peak_temperature_K": float(peak_state[6]),
        "peak_position_m": peak_z,
        "peak_pellet_surface_temperature_K": surface,
        "peak_pellet_centre_temperature_K": centre,
        "heat_removed_W": float(out[11]),
        "conversion_A": float(1 - out[0] / feed[0]),
        "selectivity_P": float(out[1] / (feed[0] - out[0])),
        "effectiveness_inlet": effectiveness(start * unit),
        "effectiveness_peak": effectiveness(peak_state),
        "effectiveness_outlet": effectiveness(out),
        "profile": rows,
    }
    closure = {name: float(abs(np.dot(n, out[:6] - feed) / np.dot(n, feed))) for name, n in atoms.items()}
    closure["mass"] = float(abs(masses @ (out[:6] - feed) / (masses @ feed)))
    released = heat @ out[8:11]
    closure["energy"] = float(abs(capacity * (out[6] - t0) + out[11] - released) / released)
    result["closure"] = closure
    result["work"] = {"pellet_solves": pellet.solves, "right_sides": int(solution.nfev)}
    return result


def flatten(value, path=""):
    if isinstance(value, dict):
        for key, item in value.items():
            if key not in ("closure", "work"):
                yield from flatten(item, f"{path}.{key}")
    elif isinstance(value, list):
        for index, item in enumerate(value):
            yield from flatten(item, f"{path}[{index}]")
    elif value is not None:
        yield path, value


def worst_difference(a, b):
    """Largest relative difference; flows count relative to the feed of A where they are smaller."""
    small = a["feed_flows_mol_s"][0]
    worst, where = 0.0, ""
    for (path, x), (_, y) in zip(flatten(a), flatten(b)):
        size = max(abs(x), small if "flows" in path or "F_mol_s" in path else 1e-12)
        if abs(x - y) / size > worst:
            worst, where = abs(x - y) / size, path
    return {"relative": worst, "at": where}


if __name__ == "__main__":
    if "--quick" in sys.argv:
        quick = solve_bed(INPUTS, 12, "LSODA", 1e-7)
        quick.pop("profile")
        print(json.dumps(quick, indent=1))
        sys.exit()
    fine = solve_bed(INPUTS, 24, "DOP853", 1e-11)
    coarse = solve_bed(INPUTS, 16, "DOP853", 1e-11)
    other = solve_bed(INPUTS, 24, "LSODA", 1e-10)
    print(
        json.dumps(
            {
                "library": "scipy",
                "version": scipy.__version__,
                "numpy": np.__version__,
                "method": "even Chebyshev collocation, 24 points, full species unknowns; axial DOP853 at rtol 1e-11",
                "inputs": INPUTS,
                "values": fine,
                "agreement": {
                    "16_points_against_24": worst_difference(fine, coarse),
                    "LSODA_against_DOP853": worst_difference(fine, other),
                },
            },
            indent=1,
        )
    )
