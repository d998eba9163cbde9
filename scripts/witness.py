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
import itertools
import json
import pathlib
import subprocess
import sys
import tempfile

import numpy as np

from witness_models import PARAMS, GroupTable, Mixture, clausius_clapeyron, continued, ln_pressure_of_set, margules, nrtl

ROOT = pathlib.Path(__file__).resolve().parent.parent
TOLERANCE_X = 1e-6           # mole fraction
TOLERANCE_T = 1e-5           # K
TOLERANCE_TPD = 1e-7         # RT
TOLERANCE_EIGENVALUE = 1e-5  # difference quotients
TOLERANCE_CURVE = 2e-5       # mole fraction, distance of a printed point from the curve integrated here


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
        self.note("T", max(abs(self.mixture.bubble(point, temperature)[0] - temperature)
                           for point, temperature in zip(points, printed["temperature_K"])), TOLERANCE_T, where)
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
        except (RuntimeError, KeyError, TypeError, OSError, subprocess.TimeoutExpired) as error:
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
