"""Formulas of the witness (scripts/witness.py): liquids, vapour pressures, and one mixture solved with SciPy.

Written apart from the program: other arrangements of the published equations, difference quotients instead of derivatives,
parameters read straight from params/*.json with their units converted here.
"""
import copy
import itertools
import json
import math
import pathlib

import numpy as np
from scipy.integrate import solve_ivp
from scipy.optimize import brentq, root, root_scalar

PARAMS = pathlib.Path(__file__).resolve().parent.parent / "params"
PRESSURE_UNITS_PA = {"Pa": 1.0, "kPa": 1e3, "bar": 1e5}


# --- liquids: ln gamma(T, x) ------------------------------------------------------------------------------------------

def margules(matrix):
    """gE/RT = sum_{i<j} A_ij x_i x_j; ln gamma_k = d(n gE/RT)/dn_k written out pair by pair."""
    def ln_gamma(_temperature, x):
        excess = sum(matrix[i, j] * x[i] * x[j] for i, j in itertools.combinations(range(len(x)), 2))
        return np.array([sum(matrix[k, j] * x[j] for j in range(len(x)) if j != k) - excess for k in range(len(x))])
    return ln_gamma


def nrtl(a, b, alpha):
    """Renon and Prausnitz 1968, the two sums as printed."""
    def ln_gamma(temperature, x):
        tau = a + b / temperature
        g = np.exp(-alpha * tau)
        below = x @ g
        mean = (x @ (tau * g)) / below
        return mean + np.array([np.sum(x * g[i] / below * (tau[i] - mean)) for i in range(len(x))])
    return ln_gamma


class GroupTable:
    """One published group table, read from params."""

    def __init__(self, file):
        data = json.loads((PARAMS / file).read_text())
        self.power = data["combinatorial_exponent"]
        self.subgroups = {s["id"]: s for s in data["subgroups"]}
        self.pairs, self.superseded = {}, data.get("superseded", [])
        for pair in data["interactions"]:
            self.put(self.pairs, pair)

    @staticmethod
    def put(pairs, pair):
        pairs[pair["m"], pair["n"]] = pair["mn"]
        pairs[pair["n"], pair["m"]] = pair["nm"]

    def with_earlier_values(self, wanted):
        """The table as it stood before the revision of some pairs of main groups."""
        earlier = copy.copy(self)
        earlier.pairs = dict(self.pairs)
        for pair in self.superseded:
            if [pair["m"], pair["n"]] in wanted:
                self.put(earlier.pairs, pair)
        return earlier

    def psi(self, main_m, main_n, temperature):
        if main_m == main_n:
            return 1.0
        a, b, c = (list(self.pairs[main_m, main_n]) + [0.0, 0.0])[:3]
        return math.exp(-(a + b * temperature + c * temperature**2) / temperature)

    def model(self, components):
        """ln gamma by group activities, Fredenslund, Jones, Prausnitz 1975 (residual part group by group)."""
        groups = sorted({g for component in components for g, _ in component})
        count = np.array([[dict(map(tuple, component)).get(g, 0) for g in groups] for component in components], float)
        area = np.array([self.subgroups[g]["Q"] for g in groups])
        volume = np.array([self.subgroups[g]["R"] for g in groups])
        mains = [self.subgroups[g]["main_group"] for g in groups]
        r, q = count @ volume, count @ area

        def ln_group_activity(amounts, psi):
            theta = area * amounts / np.sum(area * amounts)
            seen = theta @ psi
            return area * (1.0 - np.log(seen) - psi @ (theta / seen))

        def ln_gamma(temperature, x):
            psi = np.array([[self.psi(m, n, temperature) for n in mains] for m in mains])
            modified = r**self.power / (x @ r**self.power)
            shape = (r / (x @ r)) / (q / (x @ q))
            combinatorial = 1.0 - modified + np.log(modified) - 5.0 * q * (1.0 - shape + np.log(shape))
            mixture = ln_group_activity(x @ count, psi)
            residual = [np.sum(count[i] * (mixture - ln_group_activity(count[i], psi))) for i in range(len(x))]
            return combinatorial + np.array(residual)
        return ln_gamma


# --- vapour pressures -------------------------------------------------------------------------------------------------

def named(coefficients, *names):
    return [coefficients[name] for name in names]


def ln_pressure_of_set(record):
    """ln(P/Pa) of one published set, inside its range."""
    form, c = record["form"], record["coefficients"]
    if form == "antoine-log10":
        units = record["units"]
        a, b, offset = named(c, "A", "B", "C")
        zero = 273.15 if units["temperature"] == "degC" else 0.0
        scale = math.log(PRESSURE_UNITS_PA[units["pressure"]])
        return lambda t: math.log(10.0) * (a - b / (t - zero + offset)) + scale
    if form in ("wagner-25", "wagner-36", "wagner-water"):
        powers = {"wagner-25": [1, 1.5, 2.5, 5], "wagner-36": [1, 1.5, 3, 6], "wagner-water": [1, 1.5, 3, 3.5, 4, 7.5]}[form]
        names = ["a1", "a2", "a3", "a4", "a5", "a6"] if form == "wagner-water" else ["a", "b", "c", "d"]
        t_c, p_c = named(c, "Tc_K", "Pc_Pa")
        return lambda t: math.log(p_c) + t_c / t * sum(
            k * (1 - t / t_c)**power for k, power in zip(named(c, *names), powers))
    if form == "perry-101":
        c1, c2, c3, c4, c5 = named(c, "C1", "C2", "C3", "C4", "C5")
        return lambda t: c1 + c2 / t + c3 * math.log(t) + c4 * t**c5
    raise ValueError(f"unknown vapour-pressure form {form}")


def continued(curve, low, high):
    """Beyond the published range: ln P straight in 1/T with the slope at the end of the range."""
    def slope(t):
        step = 1e-4 * t
        return (curve(t + step) - curve(t - step)) / (2 * step) * t * t

    ends = {low: slope(low + 2e-4 * low), high: slope(high - 2e-4 * high)}

    def ln_pressure(t):
        if low <= t <= high:
            return curve(t)
        end = low if t < low else high
        return curve(end) + ends[end] * (1 / end - 1 / t)
    return ln_pressure


def clausius_clapeyron(boiling_point_K, H_K):
    return lambda t: math.log(101325.0) + H_K * (1 / boiling_point_K - 1 / t)


# --- a mixture at one pressure ----------------------------------------------------------------------------------------

class Mixture:
    def __init__(self, ids, ln_gamma, ln_pressures, pressure_Pa):
        self.ids, self.ln_gamma, self.ln_pressures, self.pressure = ids, ln_gamma, ln_pressures, pressure_Pa

    def ln_k(self, temperature, x):
        return self.ln_gamma(temperature, x) + np.array([p(temperature) for p in self.ln_pressures]) - math.log(self.pressure)

    def bubble(self, x, guess=None):
        """(T, y) of a liquid."""
        def excess(temperature):
            return math.log(float(np.sum(x * np.exp(self.ln_k(temperature, x)))))
        temperature = None
        if guess:
            secant = root_scalar(excess, method="secant", x0=guess, x1=guess + 0.05, xtol=1e-11, maxiter=12)
            temperature = secant.root if secant.converged and abs(secant.root - guess) < 20.0 else None
        if temperature is None:
            low = high = guess or 350.0
            while excess(low) > 0:
                low -= 15.0
            while excess(high) < 0:
                high += 15.0
            temperature = brentq(excess, low, high, xtol=1e-11, rtol=1e-14)
        y = x * np.exp(self.ln_k(temperature, x))
        return temperature, y / np.sum(y)

    def face(self, members):
        """Roots of ln K_i = 0, i in members, met from many starting points: list of (x, T)."""
        m = len(members)
        whole = np.zeros(len(self.ids))

        def spread(z):
            x = whole.copy()
            x[list(members[:-1])] = z[:-1]
            x[members[-1]] = 1.0 - np.sum(z[:-1])
            return x

        def residual(z):
            x = spread(z)
            if np.min(x) < -0.5 or not 100.0 < z[-1] < 900.0:
                return np.full(m, 50.0)
            with np.errstate(all="ignore"):
                return np.nan_to_num(self.ln_k(z[-1], x)[list(members)], nan=50.0, posinf=50.0, neginf=-50.0)

        random = np.random.default_rng(len(members))
        starts = [np.array(s) for s in ([[0.001], [0.03], [0.5], [0.97], [0.999]] if m == 2 else [])]
        starts = [np.append(s, 1.0 - s) for s in starts]
        starts += list(random.dirichlet(np.full(m, 0.7), {2: 15, 3: 50, 4: 120, 5: 200}[m]))
        roots = []
        for start in starts:
            x = whole.copy()
            x[list(members)] = start
            solved = self.polish(residual, spread, np.append(start[:-1], self.bubble(x)[0]), members)
            if solved and not any(np.max(np.abs(solved[0] - r[0])) < 1e-6 for r in roots):
                roots.append(solved)
        self.last = (residual, spread)
        return roots

    @staticmethod
    def polish(residual, spread, start, members):
        found = root(residual, start, method="hybr", options={"xtol": 1e-13})
        x = spread(found.x)
        if np.max(np.abs(residual(found.x))) > 1e-9 or np.min(x[list(members)]) < 1e-9:
            return None
        return x, found.x[-1]

    def eigenvalues(self, members, x, temperature):
        """Of d(x - y)/dx: inside the face by central differences, then 1 - K of absent components."""
        values = []
        m = len(members)
        if m > 1:
            jacobian = np.empty((m - 1, m - 1))
            for b in range(m - 1):
                step = 1e-5 * min(x[members[b]], x[members[-1]])
                ends = []
                for sign in (1, -1):
                    moved = x.copy()
                    moved[members[b]] += sign * step
                    moved[members[-1]] -= sign * step
                    ends.append((moved - self.bubble(moved, temperature)[1])[list(members[:-1])])
                jacobian[:, b] = (ends[0] - ends[1]) / (2 * step)
            values += sorted(np.real(np.linalg.eigvals(jacobian)))
        k = np.exp(self.ln_k(temperature, x))
        return values + [1.0 - k[i] for i in range(len(x)) if i not in members]

    def tangent_plane_minimum(self, x, temperature):
        """Smallest tpd over the components present, by successive substitution from many starts (0 counts)."""
        members = [i for i in range(len(x)) if x[i] > 0]
        d = np.log(x[members]) + self.ln_gamma(temperature, x)[members]
        random = np.random.default_rng(7)
        starts = [np.eye(len(members))[k] * 0.999 + 0.001 / len(members) for k in range(len(members))]
        starts += list(random.dirichlet(np.full(len(members), 0.6), 12))
        lowest = 0.0
        for w in starts:
            for _ in range(4000):
                full = np.zeros(len(x))
                full[members] = w
                ln_w = d - self.ln_gamma(temperature, full)[members]
                new = np.exp(ln_w)
                total = np.sum(new)
                new /= total
                if np.max(np.abs(new - w)) < 1e-13:
                    break
                w = new
            lowest = min(lowest, -math.log(total))
        return lowest

    def residue_curve(self, x, direction):
        """Points of dx/dxi = direction * (x - y), dense enough for straight pieces between them, until x and y agree."""
        guess = [self.bubble(x)[0]]

        def field(_xi, reduced):
            point = np.maximum(np.append(reduced, 1.0 - np.sum(reduced)), 0.0)  # a trial step may leave the simplex
            point /= np.sum(point)
            guess[0], y = self.bubble(point, guess[0])
            return direction * (point - y)[:-1]

        def arrived(xi, reduced):
            return np.max(np.abs(field(xi, reduced))) - 1e-6

        arrived.terminal = True
        solved = solve_ivp(field, (0.0, 2000.0), x[:-1], method="DOP853", rtol=1e-9, atol=1e-12, max_step=1.0,
                           dense_output=True, events=arrived)
        times = np.unique(np.concatenate([np.linspace(a, b, 40) for a, b in zip(solved.t[:-1], solved.t[1:])]))
        reduced = solved.sol(times).T
        return np.column_stack([reduced, 1.0 - reduced.sum(axis=1)])
