#!/usr/bin/env python3
"""Computed azeotropes against the measured table, per model, per tier, per class of system.

Runs `stillshed survey` on every pair and ternary of params/measured_azeotropes.json that a model covers and counts:
  found      the source reports an azeotrope of all its components and the model has one (of the same kind)
  missed     ... and the model has none
  zeotropic  the source states that there is none and the model agrees
  invented   ... and the model has one
  split      no such azeotrope of one liquid, but the model's liquid splits in this mixture: not judged until
             heteroazeotropes are searched
with mean and 90th percentile of |dT| (K) and |dx| (mol%) over the found ones. Nothing is tuned.

Usage: scripts/accuracy.py [--program build/release/reports/stillshed] [--out build/accuracy] [--limit N] [--jobs 2]
"""
import argparse
import concurrent.futures
import json
import pathlib
import subprocess
import sys

ROOT = pathlib.Path(__file__).resolve().parent.parent
MODELS = ["unifac-dortmund", "unifac"]
MAXIMA = {"maximum"}


def rows_of_table(components):
    """Measured records on file in SI and mole fractions; those without a pressure or a component on file are left out."""
    table = json.loads((ROOT / "params" / "measured_azeotropes.json").read_text())
    rows = []
    for record in table["records"]:
        if "pressure_kPa" not in record or any(c not in components for c in record["components"]):
            continue
        row = {"id": record["id"], "tier": record["tier"], "components": record["components"], "kind": record["kind"],
               "pressure_Pa": 1000.0 * record["pressure_kPa"], "temperature_K": None, "mole_fractions": None}
        if "temperature_degC" in record:
            row["temperature_K"] = record["temperature_degC"] + 273.15
        if "mole_fractions" in record:
            row["mole_fractions"] = record["mole_fractions"]
        elif "mass_fractions" in record:
            moles = [w / components[c]["molar_mass_g_mol"] for w, c in zip(record["mass_fractions"], record["components"])]
            row["mole_fractions"] = [m / sum(moles) for m in moles]
        rows.append(row)
    return rows


def components_by_id():
    data = json.loads((ROOT / "params" / "components.json").read_text())
    return {c["id"]: c for c in data["components"]}


def system_class(ids, components):
    """A coarse class: the first that applies."""
    formulas = {i: components[i]["formula"] for i in ids}
    if "water" in ids:
        return "with water"
    if any("acid" in i for i in ids):
        return "with an acid"
    if any(h in f for f in formulas.values() for h in ("Cl", "Br", "F")):
        return "halogenated"
    if all(set(f) <= set("CH0123456789") for f in formulas.values()):
        return "hydrocarbons"
    if any(i.endswith("ol") or i.endswith("alcohol") or i.endswith("glycol") for i in ids):
        return "with an alcohol"
    return "other organics"


def survey(program, ids, pressure_Pa, model):
    amounts = [f"{i}={100.0 / len(ids):.10g}" for i in ids]
    words = [program, "survey", *amounts, "--basis", "mol%", "--pressure", f"{pressure_Pa} Pa", "--model", model,
             "--json", "-"]
    run = subprocess.run(words, capture_output=True, text=True, timeout=300, check=False)
    if run.returncode not in (0, 3):
        return None, run.stderr.strip()
    return json.loads(run.stdout), ""


def judge(record, result):
    """(outcome, |dT| in K or None, largest |dx| in mole fraction or None)."""
    ids = set(record["components"])
    computed = [a for a in result.get("azeotropes") or [] if set(a["components"]) == ids]
    # Without a homogeneous azeotrope a mixture that splits somewhere may still have a heterogeneous one: not judged.
    reasons = " ".join(str(entry.get("why")) for entry in result["status"]["incomplete"])
    rejected = bool(result.get("rejected_roots")) or "phase-split-needed" in reasons
    if record["kind"] == "none":
        if computed:
            return "invented", None, None
        return ("split" if rejected else "zeotropic"), None, None
    if not computed:
        return ("split" if rejected else "missed"), None, None
    x = dict(zip(record["components"], record.get("mole_fractions") or []))

    def distance(azeotrope):
        return max((abs(azeotrope["mole_fractions"][i] - x[i]) for i in x), default=0.0)

    best = min(computed, key=distance)
    wants_maximum = record["kind"] in MAXIMA
    if wants_maximum != (best["boiling"] == "maximum") and record["kind"] != "saddle":
        return "missed", None, None
    t = record.get("temperature_K")
    return "found", abs(best["temperature_K"] - t) if t else None, distance(best) if x else None


def covered(result):
    """False where the program itself says that its numbers do not hold (acids, missing pairs, critical range)."""
    if result.get("azeotropes") is None or (result.get("proof") or {}).get("status") == "not-run":
        return False
    reasons = " ".join(str(entry.get("why")) for entry in result["status"]["incomplete"])
    return not any(reason in reasons for reason in ("acid-vapour", "missing-pair", "above-critical"))


def mean_and_p90(values):
    if not values:
        return "-"
    ordered = sorted(values)
    p90 = ordered[min(len(ordered) - 1, int(0.9 * len(ordered)))]
    return f"{sum(ordered) / len(ordered):.2f} / {p90:.2f}"


def table(results, key):
    lines = ["| " + key + " | model | records | found | missed | zeotropic kept | invented | split | abs dT K, mean / 90 % | abs dx mol%, mean / 90 % |",
             "|---|---|---|---|---|---|---|---|---|---|"]
    groups = sorted({(r[key], r["model"]) for r in results})
    for group, model in groups:
        rows = [r for r in results if r[key] == group and r["model"] == model]
        count = {o: sum(r["outcome"] == o for r in rows) for o in ("found", "missed", "zeotropic", "invented", "split")}
        d_t = mean_and_p90([r["dT"] for r in rows if r["dT"] is not None])
        d_x = mean_and_p90([100.0 * r["dx"] for r in rows if r["dx"] is not None])
        lines.append(f"| {group} | {model} | {len(rows)} | {count['found']} | {count['missed']} | {count['zeotropic']} | "
                     f"{count['invented']} | {count['split']} | {d_t} | {d_x} |")
    return "\n".join(lines)


def main():
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("--program", default=str(ROOT / "build/release/reports/stillshed"))
    parser.add_argument("--out", default=str(ROOT / "build/accuracy"))
    parser.add_argument("--limit", type=int, default=0, help="only the first N records")
    parser.add_argument("--jobs", type=int, default=2)
    options = parser.parse_args()
    components = components_by_id()
    records = [r for r in rows_of_table(components) if r["tier"] != "D"]
    if options.limit:
        records = records[: options.limit]
    keys = sorted({(tuple(sorted(r["components"])), r["pressure_Pa"], m) for r in records for m in MODELS})
    with concurrent.futures.ThreadPoolExecutor(options.jobs) as pool:
        answers = dict(zip(keys, pool.map(lambda k: survey(options.program, *k), keys)))
    results, not_covered, failed = [], {m: 0 for m in MODELS}, []
    for record in records:
        for model in MODELS:
            result, error = answers[(tuple(sorted(record["components"])), record["pressure_Pa"], model)]
            if result is None and "no vapour pressure" not in error:
                failed.append((record["id"], model, error))
                continue
            if result is None or not covered(result):
                not_covered[model] += 1
                continue
            outcome, d_t, d_x = judge(record, result)
            results.append({"id": record["id"], "tier": "tier " + record["tier"], "model": model, "outcome": outcome,
                            "dT": d_t, "dx": d_x, "class": system_class(record["components"], components),
                            "size": f"{len(record['components'])} components", "components": record["components"]})
    out = pathlib.Path(options.out)
    out.parent.mkdir(parents=True, exist_ok=True)
    text = "\n\n".join(table(results, key) for key in ("tier", "size", "class"))
    text += "\n\nNot covered (missing group pairs, acids, outside limits): " + ", ".join(f"{m} {n}" for m, n in not_covered.items()) + "\n"
    out.with_suffix(".md").write_text(text)
    out.with_suffix(".json").write_text(json.dumps(results, indent=1))
    print(text)
    worst = sorted((r for r in results if r["dT"] is not None), key=lambda r: -r["dT"])[:12]
    print("Largest |dT|:")
    for r in worst:
        print(f"  {r['dT']:.2f} K  {'-'.join(r['components'])}  {r['model']}  {r['tier']}")
    for record, model, error in failed[:10]:
        print(f"failed: record {record}, {model}: {error}", file=sys.stderr)
    return 1 if failed else 0


if __name__ == "__main__":
    sys.exit(main())
