#!/usr/bin/env python3
"""An independent witness: the same mixtures solved with SciPy and formulas written separately.

For some thirty mixtures (symmetric Margules, NRTL, original UNIFAC, modified UNIFAC (Dortmund)) it
  - evaluates ln gamma by its own formulas, first checked against the published values in params/check_values.json,
  - reads vapour pressures and group tables straight from params/*.json, units converted here,
  - finds the roots of the azeotrope equations of every face from many starting points (scipy.optimize.root),
  - takes eigenvalues of d(x - y)/dx from difference quotients, and the tangent-plane minimum by its own iteration,
  - integrates the residue curve of the feed and the distillation boundaries (scipy.integrate.solve_ivp),
and compares with `stillshed chart CASE --json -` (`survey` from four components on). It shares no code and no formula
arrangement with the program. A root that the witness finds and the program lacks is a failure; a root that the
program has and no start of the witness met is solved again from the program's point and must satisfy the equations.

Usage: scripts/witness.py [--program build/release/reports/stillshed] [--only TEXT] [--formulas-only]
Prints a table and "N passed, N failed"; exit code 1 on any mismatch.
"""
import argparse
import copy
import itertools
import json
import math
import pathlib
import subprocess
import sys
import tempfile

import numpy as np
from scipy.integrate import solve_ivp
from scipy.optimize import brentq, root, root_scalar

ROOT = pathlib.Path(__file__).resolve().parent.parent
PARAMS = ROOT / "params"
TOLERANCE_X = 1e-6           # mole fraction
TOLERANCE_T = 1e-5           # K
TOLERANCE_TPD = 1e-7         # RT
TOLERANCE_EIGENVALUE = 1e-5  # difference quotients
TOLERANCE_CURVE = 2e-5       # mole fraction, distance of a printed point from the curve integrated here
PRESSURE_UNITS_PA = {"Pa": 1.0, "kPa": 1e3, "bar": 1e5}


# --- liquids: ln gamma(T, x) ------------------------------------------------------------------------------------------

def ideal(_temperature, x):
    return np.zeros_like(x)


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


# --- mixtures to compare ----------------------------------------------------------------------------------------------

def own(boiling_points, model, heats=None):
    ids = "ABCDE"[: len(boiling_points)]
    heats = heats or [4000.0] * len(ids)
    components = [{"id": i, "molar_mass_g_mol": 60, "vapour_pressure": {"form": "clausius-clapeyron", "boiling_point_K": t, "H_K": h}}
                  for i, t, h in zip(ids, boiling_points, heats)]
    return {"components": components, "stream": {i: f"{10 + 3 * k} mol" for k, i in enumerate(ids)}, "model": model}


def filed(model, *ids):
    return {"stream": {i: f"{10 + 3 * k} mol" for k, i in enumerate(ids)}, "model": model}


def pair_matrix(n, values):
    """Symmetric matrix from the upper triangle, row by row."""
    matrix = np.zeros((n, n))
    for (i, j), value in zip(itertools.combinations(range(n), 2), values):
        matrix[i, j] = matrix[j, i] = value
    return matrix.tolist()


def margules_case(boiling_points, values, heats=None):
    return own(boiling_points, {"kind": "margules", "A": pair_matrix(len(boiling_points), values)}, heats)


def nrtl_case(boiling_points, a, b, heats=None, alpha=0.3):
    n = len(boiling_points)
    flat = (np.full((n, n), alpha) - alpha * np.eye(n)).tolist()
    return own(boiling_points, {"kind": "nrtl", "a": a, "b_K": b, "alpha": flat}, heats)


ZERO3 = [[0, 0, 0]] * 3
CASES = {
    "margules 2, minimum": margules_case([350, 355], [1.1]),
    "margules 2, maximum": margules_case([350, 353], [-0.9]),
    "margules 2, next to a corner": margules_case([350, 379.4], [0.9]),
    "margules 2, splits": margules_case([350, 352], [2.6]),
    "margules 3, four minima": margules_case([350, 351, 352], [1.2, 1.1, 1.3]),
    "margules 3, saddle": margules_case([350, 352, 355], [1.0, -1.1, -0.7], [4000, 4300, 4100]),
    "margules 3, maximum": margules_case([350, 351, 353], [-1.0, -1.2, -0.9]),
    "margules 3, splits inside": margules_case([349.5, 348.1, 347.5], [2.86, 2.8, 2.84], [4000, 4200, 4400]),
    "margules 4": margules_case([350, 352, 354, 351], [1.2, 0.8, -0.4, 1.0, 0.9, 1.3]),
    "nrtl 2, constant": nrtl_case([350, 352], [[0, 1.2], [0.3, 0]], [[0, 0], [0, 0]]),
    "nrtl 2, with temperature": nrtl_case([340, 352], [[0, 0.2], [-0.4, 0]], [[0, 250], [410, 0]], [3900, 4800]),
    "nrtl 3, constant": nrtl_case([350, 351, 349], [[0, 0.9, 0.4], [0.5, 0, 1.1], [0.8, 0.2, 0]], ZERO3),
    "nrtl 3, with temperature": nrtl_case([329, 334, 338], [[0, 0.2, 0.1], [-0.5, 0, 0.3], [0.2, 0.6, 0]],
                                          [[0, 90, 60], [-120, 0, 150], [40, 210, 0]], [3600, 3700, 4500]),
    "nrtl 4": nrtl_case([350, 352, 347, 355], [[0, 0.5, 0.3, 0.2], [0.6, 0, -0.4, 0.5], [0.4, 0.2, 0, 0.9], [0.7, 0.1, 0.3, 0]],
                        [[0] * 4] * 4),
    **{f"{model}: {' '.join(ids)}": filed(model, *ids)
       for ids, models in [
           (("ethanol", "water"), ("unifac", "unifac-dortmund")),
           (("acetone", "chloroform"), ("unifac", "unifac-dortmund")),
           (("methanol", "acetone"), ("unifac-dortmund",)),
           (("ethyl-acetate", "ethanol"), ("unifac", "unifac-dortmund")),
           (("benzene", "ethanol", "water"), ("unifac", "unifac-dortmund")),
           (("acetone", "chloroform", "methanol"), ("unifac", "unifac-dortmund")),
           (("acetone", "methanol", "water"), ("unifac-dortmund",)),
           (("ethyl-acetate", "ethanol", "methanol"), ("unifac",)),
           (("n-hexane", "acetone", "methanol"), ("unifac-dortmund",)),
           (("benzene", "toluene", "ethanol"), ("unifac",)),
           (("acetone", "chloroform", "methanol", "ethanol"), ("unifac-dortmund",)),
       ] for model in models},
}


def run_program(program, case):
    n = len(case["stream"])
    with tempfile.TemporaryDirectory() as folder:
        file = pathlib.Path(folder) / "case.json"
        file.write_text(json.dumps({"stillshed_case": 1, "title": "witness", "pressure": "1 atm", **case}))
        words = [program, "chart" if n <= 3 else "survey", str(file), "--json", "-"]
        done = subprocess.run(words, capture_output=True, text=True, timeout=300, check=False)
    if done.returncode not in (0, 3):
        raise RuntimeError(f"exit {done.returncode}: {done.stderr.strip()[:300]}")
    return json.loads(done.stdout)


def liquid_model(case, ids, tables, groups):
    model = case["model"]
    if isinstance(model, str):
        key = {"unifac": "unifac", "unifac-dortmund": "dortmund"}[model]
        return tables[model].model([groups[i][key]["groups"] for i in ids])
    if model["kind"] == "margules":
        return margules(np.array(model["A"]))
    return nrtl(*(np.array(model[k], float) for k in ("a", "b_K", "alpha")))


def mixture_of(case, result, facts):
    """The mixture as the witness sees it; from the program only the choice of the vapour-pressure record."""
    ids = [c["id"] for c in result["components"]]
    if "components" in case:
        own_curves = {c["id"]: c["vapour_pressure"] for c in case["components"]}
        curves = [clausius_clapeyron(own_curves[i]["boiling_point_K"], own_curves[i]["H_K"]) for i in ids]
    else:
        curves = []
        for used in result["model"]["vapour_pressure"]:
            record = facts["sets"][used["record"]]
            curves.append(continued(ln_pressure_of_set(record), *record["range_K"]))
    return Mixture(ids, liquid_model(case, ids, facts["tables"], facts["groups"]), curves, result["pressure_Pa"])


# --- comparison -------------------------------------------------------------------------------------------------------

class Comparison:
    def __init__(self, mixture, result):
        self.mixture, self.result = mixture, result
        self.problems, self.worst, self.roots = [], {"x": 0.0, "T": 0.0, "ev": 0.0, "tpd": 0.0, "curve": 0.0}, 0

    def note(self, what, difference, limit, where):
        self.worst[what] = max(self.worst[what], difference)
        if not difference <= limit:
            self.problems.append(f"{where}: {what} differs by {difference:.3g} (allowed {limit:g})")

    def array(self, composition):
        return np.array([composition[i] for i in self.mixture.ids])

    def azeotropes(self):
        printed = [(a, True) for a in self.result["azeotropes"]] + [(r, False) for r in self.result["rejected_roots"]]
        for size in range(2, len(self.mixture.ids) + 1):
            for members in itertools.combinations(range(len(self.mixture.ids)), size):
                names = [self.mixture.ids[i] for i in members]
                here = [p for p in printed if sorted(p[0]["components"]) == sorted(names)]
                self.one_face(members, names, here)

    def one_face(self, members, names, printed):
        found = self.mixture.face(members)
        residual, spread = self.mixture.last
        for x, temperature in found:
            if not any(np.max(np.abs(self.array(p["mole_fractions"]) - x)) < 1e-4 for p, _ in printed):
                self.problems.append(f"{names}: the program lacks the root {x} at {temperature:.4f} K")
        for record, accepted in printed:
            x = self.array(record["mole_fractions"])
            start = np.append(x[list(members[:-1])], record["temperature_K"])
            solved = self.mixture.polish(residual, spread, start, members)
            if solved is None:
                self.problems.append(f"{names}: {x} does not satisfy the equations")
                continue
            self.roots += 1
            self.note("x", float(np.max(np.abs(solved[0] - x))), TOLERANCE_X, names)
            self.note("T", abs(solved[1] - record["temperature_K"]), TOLERANCE_T, names)
            self.stability(record, accepted, *solved, names)
            if accepted and not record["cluster"]:
                own_values = self.mixture.eigenvalues(members, *solved)
                differences = np.abs(np.array(own_values) - np.array(record["eigenvalues"]))
                self.note("ev", float(np.max(differences / (1.0 + np.abs(own_values)))), TOLERANCE_EIGENVALUE, names)
                self.node(record, own_values, names)

    def node(self, record, values, names):
        if record["node"] == "degenerate":
            return
        signs = {v > 0 for v in values}
        expected = "saddle" if len(signs) == 2 else "unstable-node" if signs == {True} else "stable-node"
        if record["node"] != expected:
            self.problems.append(f"{names}: node {record['node']}, by the witness {expected}")

    def stability(self, record, accepted, x, temperature, names):
        lowest = self.mixture.tangent_plane_minimum(x, temperature)
        if record["stability"] == "stable" and lowest < -1e-8:
            self.problems.append(f"{names}: called stable, but tpd falls to {lowest:.3g}")
        if record["stability"] == "unstable":
            self.note("tpd", abs(lowest - record["tpd_min"]), TOLERANCE_TPD, names)
        if accepted != (record["stability"] == "stable"):
            self.problems.append(f"{names}: {record['stability']} root in the wrong list")

    def curves(self):
        feed = self.result.get("feed")
        if feed:
            temperature, y = self.mixture.bubble(self.array(feed["mole_fractions"]))
            self.note("T", abs(temperature - feed["bubble_temperature_K"]), TOLERANCE_T, "feed")
            self.note("x", float(np.max(np.abs(y - self.array(feed["vapour"])))), TOLERANCE_X, "feed vapour")
            self.follow(feed["residue_curve"], feed["residue_curve"]["through"], (1, -1), "residue curve of the feed")
        for boundary in self.result.get("boundaries") or []:
            # From its middle toward the node, the direction in which neighbouring curves come together.
            middle = len(boundary["points"]) // 2
            self.follow(boundary, middle, (-1,) if boundary["confines"] == "bottoms" else (1,), f"boundary {boundary['id']}")

    def follow(self, printed, through, directions, where):
        points = np.array([self.array(p) for p in printed["points"]])
        for point, temperature in zip(points, printed["temperature_K"]):
            self.note("T", abs(self.mixture.bubble(point, temperature)[0] - temperature), TOLERANCE_T, where)
        for direction in directions:
            half = points[through:] if direction > 0 else points[: through + 1]
            dense = self.mixture.residue_curve(points[through], direction)
            end = half[-1] if direction > 0 else half[0]
            self.note("curve", max(distance_to_polyline(p, dense, end) for p in half), TOLERANCE_CURVE, where)


def distance_to_polyline(point, line, end):
    """The integrated curve stops just before a fixed point: a straight piece to the printed end closes the gap."""
    nodes = np.vstack([line, end])
    start, step = nodes[:-1], np.diff(nodes, axis=0)
    length2 = np.maximum(np.sum(step**2, axis=1), 1e-300)
    share = np.clip(np.sum((point - start) * step, axis=1) / length2, 0.0, 1.0)
    return float(np.min(np.linalg.norm(start + share[:, None] * step - point, axis=1)))


# --- published values, main -------------------------------------------------------------------------------------------

def check_formulas(tables):
    """How many published activity values are on file, and which of them these formulas do not reproduce."""
    checks = [c for c in json.loads((PARAMS / "check_values.json").read_text())["checks"] if c["kind"] == "activity"]
    failures = []
    for check in checks:
        if check["model"] == "nrtl":
            tau = np.array(check["tau"])
            model = nrtl(tau, np.zeros_like(tau), np.array(check["alpha"]))
        else:
            table = tables[check["model"]].with_earlier_values(check.get("superseded_pairs", []))
            model = table.model([c["groups"] for c in check["components"]])
        gamma = np.exp(model(check["temperature_K"], np.array(check["mole_fractions"])))
        if np.max(np.abs(gamma / np.array(check["expected"]) - 1.0)) > check["relative_tolerance"]:
            failures.append(check["id"])
    return len(checks), failures


def read_facts():
    components = json.loads((PARAMS / "components.json").read_text())["components"]
    sets = json.loads((PARAMS / "vapour_pressure.json").read_text())["sets"]
    return {"tables": {"unifac": GroupTable("unifac.json"), "unifac-dortmund": GroupTable("unifac_dortmund.json")},
            "groups": {c["id"]: c for c in components}, "sets": {s["id"]: s for s in sets}}


def compare(program, case, facts):
    result = run_program(program, case)
    comparison = Comparison(mixture_of(case, result, facts), result)
    comparison.azeotropes()
    comparison.curves()
    return comparison


def main():
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("--program", default=str(ROOT / "build/release/reports/stillshed"))
    parser.add_argument("--only", default="", help="only cases whose name contains this text")
    parser.add_argument("--formulas-only", action="store_true", help="stop after the published activity values")
    options = parser.parse_args()
    facts = read_facts()
    count, failures = check_formulas(facts["tables"])
    print(f"witness formulas: {count - len(failures)} of {count} published activity values reproduced" +
          (f"; not {', '.join(failures)}" if failures else ""))
    if options.formulas_only:
        return 1 if failures else 0
    passed, failed = 0, len(failures)
    print(f"{'mixture':58} {'roots':>5} {'dx':>8} {'dT/K':>8} {'d ev':>8} {'d tpd':>8} {'d curve':>8}")
    for name, case in CASES.items():
        if options.only not in name:
            continue
        try:
            comparison = compare(options.program, case, facts)
            worst, problems = comparison.worst, comparison.problems
            print(f"{name:58} {comparison.roots:5d} " + " ".join(f"{worst[k]:8.1e}" for k in ("x", "T", "ev", "tpd", "curve")))
        except (RuntimeError, KeyError, OSError, subprocess.TimeoutExpired) as error:
            problems = [f"{type(error).__name__}: {error}"]
            print(name)
        for problem in problems:
            print(f"    {problem}")
        passed += not problems
        failed += bool(problems)
    print(f"{passed} passed, {failed} failed")
    return 1 if failed else 0


if __name__ == "__main__":
    sys.exit(main())
