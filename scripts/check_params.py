#!/usr/bin/env python3
"""Second, independent reading of the parameter files: shares no code with the program, needs the standard library only.

Usage: scripts/check_params.py [FOLDER]
Prints every problem and exits 1 when there is one; otherwise prints what was counted and exits 0.
"""

import json
import math
import pathlib
import re
import sys

ATOMIC_WEIGHT = {  # IUPAC abridged standard atomic weights
    "H": 1.008, "C": 12.011, "N": 14.007, "O": 15.999, "F": 18.998, "Si": 28.085, "P": 30.974, "S": 32.06,
    "Cl": 35.45, "Br": 79.904, "I": 126.90,
}
FORMS = {
    "antoine-log10": ("A", "B", "C"),
    "wagner-25": ("a", "b", "c", "d", "Tc_K", "Pc_Pa"),
    "wagner-36": ("a", "b", "c", "d", "Tc_K", "Pc_Pa"),
    "wagner-water": ("a1", "a2", "a3", "a4", "a5", "a6", "Tc_K", "Pc_Pa"),
    "perry-101": ("C1", "C2", "C3", "C4", "C5"),
    "clausius-clapeyron": ("boiling_point_K", "H_K"),
}
WAGNER_POWERS = {
    "wagner-25": (1, 1.5, 2.5, 5), "wagner-36": (1, 1.5, 3, 6), "wagner-water": (1, 1.5, 3, 3.5, 4, 7.5),
}
PRESSURE_UNIT_PA = {"Pa": 1.0, "kPa": 1e3, "bar": 1e5, "mmHg": 133.322387415}
EXPECTED_COUNTS = {"components": 341, "unifac.json": 635, "unifac_dortmund.json": 758}

problems = []


def complain(where, text):
    problems.append(f"{where}: {text}")


def no_repeats(file):
    def pairs(items):
        keys = [key for key, _ in items]
        for key in {key for key in keys if keys.count(key) > 1}:
            complain(file, f"key {key!r} twice in one object")
        return dict(items)
    return pairs


def refuse_constant(name):
    raise ValueError(f"{name} is no JSON number")


def read(folder, file, format_key):
    try:
        text = (folder / file).read_text(encoding="utf-8")
        data = json.loads(text, object_pairs_hook=no_repeats(file), parse_constant=refuse_constant)
    except (OSError, ValueError) as error:
        complain(file, str(error))
        return {}
    if data.get(format_key) != 1:
        complain(file, f"{format_key} is {data.get(format_key)!r}, not 1")
    return data


def cas_is_right(cas):
    match = re.fullmatch(r"(\d{2,7})-(\d\d)-(\d)", cas)
    if not match:
        return False
    digits = (match[1] + match[2])[::-1]
    return sum(k * int(digit) for k, digit in enumerate(digits, 1)) % 10 == int(match[3])


def molar_mass(formula):
    parts = re.findall(r"([A-Z][a-z]?)(\d*)", formula)
    if "".join(symbol + count for symbol, count in parts) != formula:
        return None
    if any(symbol not in ATOMIC_WEIGHT for symbol, _ in parts):
        return None
    return sum(ATOMIC_WEIGHT[symbol] * int(count or 1) for symbol, count in parts)


def ln_pressure(item, T):
    """ln(P/Pa) from the constants as printed."""
    c = item["coefficients"]
    form = item["form"]
    if form == "antoine-log10":
        printed_T = T - 273.15 if item["units"]["temperature"] == "degC" else T
        return math.log(10) * (c["A"] - c["B"] / (printed_T + c["C"])) + math.log(
            PRESSURE_UNIT_PA[item["units"]["pressure"]])
    if form == "perry-101":
        return c["C1"] + c["C2"] / T + c["C3"] * math.log(T) + c["C4"] * T ** c["C5"]
    if form == "clausius-clapeyron":
        return math.log(101325) + c["H_K"] * (1 / c["boiling_point_K"] - 1 / T)
    t = max(0.0, 1 - T / c["Tc_K"])
    terms = [c[name] for name in FORMS[form][:-2]]
    return math.log(c["Pc_Pa"]) + c["Tc_K"] / T * sum(a * t ** p for a, p in zip(terms, WAGNER_POWERS[form]))


def boiling_point(item):
    low, high = item["range_K"]
    target = math.log(101325)
    if not ln_pressure(item, low) <= target <= ln_pressure(item, high):
        return None
    for _ in range(60):
        middle = (low + high) / 2
        if ln_pressure(item, middle) < target:
            low = middle
        else:
            high = middle
    return (low + high) / 2


def check_sources(data):
    keys = [item.get("key") for item in data.get("sources", [])]
    for item in data.get("sources", []):
        if not item.get("key") or not item.get("citation"):
            complain("sources.json", f"incomplete entry {item}")
    for key in {key for key in keys if keys.count(key) > 1}:
        complain("sources.json", f"key {key!r} twice")
    return set(keys)


def links(value, used):
    """Every source key named anywhere below a value."""
    if isinstance(value, dict):
        for key, inner in value.items():
            if key == "source" and isinstance(inner, str):
                used.add(inner)
            elif key == "sources" and isinstance(inner, list):
                used.update(entry for entry in inner if isinstance(entry, str))
            else:
                links(inner, used)
    elif isinstance(value, list):
        for inner in value:
            links(inner, used)


def check_group_table(file, data, width):
    mains = {group["id"]: group["name"] for group in data.get("main_groups", [])}
    subs = {}
    for group in data.get("subgroups", []):
        where = f"{file} subgroup {group['id']}"
        if group["id"] in subs:
            complain(where, "twice")
        if group["main_group"] not in mains:
            complain(where, f"unknown main group {group['main_group']}")
        if not (group["R"] > 0 and group["Q"] >= 0):
            complain(where, f"R = {group['R']}, Q = {group['Q']}")
        subs[group["id"]] = group["main_group"]
    for main in set(mains) - set(subs.values()):
        complain(file, f"main group {main} has no subgroup")
    seen = set()
    for row in data.get("interactions", []):
        pair = (row["m"], row["n"])
        where = f"{file} pair {pair[0]}-{pair[1]}"
        if not (pair[0] in mains and pair[1] in mains and pair[0] < pair[1]):
            complain(where, "not two known main groups in rising order")
        if pair in seen:
            complain(where, "twice")
        seen.add(pair)
        for key in ("mn", "nm"):
            values = row.get(key)
            if not isinstance(values, list) or len(values) != width or not all(
                    isinstance(v, (int, float)) and math.isfinite(v) for v in values):
                complain(where, f"{key} is {values}")
        if str(row.get("class")) not in data.get("classes", {}):
            complain(where, f"unknown class {row.get('class')}")
    if len(seen) != EXPECTED_COUNTS[file]:
        complain(file, f"{len(seen)} pairs, not {EXPECTED_COUNTS[file]}")
    return subs


def plain(name):
    return re.sub(r"[\s\-_,.'\"()\[\]{}]", "", name).lower()


def check_components(data, tables):
    components = {}
    names = {}
    numbers = {}
    for item in data.get("components", []):
        where = f"components.json {item.get('id')}"
        if item["id"] in components:
            complain(where, "twice")
        components[item["id"]] = item
        if not cas_is_right(item["cas"]):
            complain(where, f"CAS number {item['cas']} has a wrong check digit")
        if numbers.setdefault(item["cas"], item["id"]) != item["id"]:
            complain(where, f"CAS number {item['cas']} belongs to {numbers[item['cas']]}")
        mass = molar_mass(item["formula"])
        if mass is None:
            complain(where, f"formula {item['formula']} cannot be read")
        elif abs(mass - item["molar_mass_g_mol"]) > 0.02:
            complain(where, f"molar mass {item['molar_mass_g_mol']}, {item['formula']} gives {mass:.3f}")
        for name in {plain(text) for text in (item["id"], item["name"], *item["synonyms"])}:
            if names.setdefault(name, item["id"]) != item["id"]:
                complain(where, f"name {name!r} belongs to {names[name]}")
        for key, subs in tables.items():
            assignment = item.get(key, {})
            for rows in (assignment.get("groups", []), *assignment.get("alternatives", [])):
                for sub, count in rows:
                    if sub not in subs or count < 1:
                        complain(where, f"{key} groups: {[sub, count]}")
        check_order(where, item)
    if len(components) != EXPECTED_COUNTS["components"]:
        complain("components.json", f"{len(components)} components, not {EXPECTED_COUNTS['components']}")
    return components, names


def check_order(where, item):
    """Melting below boiling below critical; density and heat of vaporization of a plausible size."""
    def value(key):
        return item.get(key, {}).get("value")
    melting, boiling, critical = map(value, ("melting_point_K", "normal_boiling_point_K", "critical_temperature_K"))
    if melting and boiling and melting >= boiling:
        complain(where, f"melts at {melting} K, boils at {boiling} K")
    if boiling and critical and not 0.5 < boiling / critical < 0.85:
        complain(where, f"boils at {boiling} K, critical temperature {critical} K")
    heat = value("heat_of_vaporization_J_mol")
    if heat and boiling and not 50 < heat / boiling < 160:
        complain(where, f"entropy of vaporization {heat / boiling:.0f} J/(mol K)")
    density = value("liquid_density_kg_m3")
    if density and not 500 < density < 3500:
        complain(where, f"liquid density {density} kg/m3")


def check_pressure_sets(data, components):
    owners = set()
    ids = set()
    for item in data.get("sets", []):
        where = f"vapour_pressure.json {item.get('id')}"
        if item["id"] in ids:
            complain(where, "twice")
        ids.add(item["id"])
        component = components.get(item["component"])
        if component is None:
            complain(where, f"unknown component {item['component']}")
            continue
        owners.add(item["component"])
        if item["form"] not in FORMS or set(item["coefficients"]) != set(FORMS[item["form"]]):
            complain(where, f"form {item['form']} with {sorted(item['coefficients'])}")
            continue
        low, high = item["range_K"]
        points = [ln_pressure(item, low + (high - low) * k / 300) for k in range(301)]
        if not all(a < b for a, b in zip(points, points[1:])):
            complain(where, "vapour pressure does not rise over its range")
        check_boiling_point(where, item, component["normal_boiling_point_K"]["value"])
    for name, item in components.items():
        if (item["pressure_grade"] == "-") == (name in owners):
            complain(f"components.json {name}", f"grade {item['pressure_grade']} does not fit its pressure sets")
    return len(ids)


def check_boiling_point(where, item, listed):
    found = boiling_point(item)
    low, high = item["range_K"]
    if found is None:
        if low + 1 < listed < high - 1:
            complain(where, f"no boiling point in range, listed {listed} K")
        return
    miss = found - listed
    stated = item.get("misses_boiling_point_by_K")
    if stated is None and abs(miss) > 1:
        complain(where, f"boils at {found:.2f} K, listed {listed} K")
    if stated is not None and abs(miss - stated) > 0.02:
        complain(where, f"misses the boiling point by {miss:.2f} K, stated {stated}")


def check_measured(data, components):
    known = {name: item["molar_mass_g_mol"] for name, item in components.items()}
    for item in data.get("others", []):
        if not cas_is_right(item["cas"]):
            complain(f"measured_azeotropes.json {item['id']}", f"CAS number {item['cas']}")
        if item["id"] in known:
            complain(f"measured_azeotropes.json {item['id']}", "is a component")
        known[item["id"]] = item["molar_mass_g_mol"]
    ids = set()
    for item in data.get("records", []):
        where = f"measured_azeotropes.json {item['id']}"
        if item["id"] in ids:
            complain(where, "twice")
        ids.add(item["id"])
        if item["tier"] not in "ABCD" or item["record"] not in ("read in print", "from memory"):
            complain(where, f"tier {item['tier']}, record {item['record']}")
        if (item["tier"] == "A") > (item["record"] == "read in print"):
            complain(where, "tier A from memory")
        for name in item["components"]:
            if name not in known:
                complain(where, f"unknown component {name}")
        fractions = item.get("mass_fractions", item.get("mole_fractions"))
        if fractions is not None and (
                len(fractions) != len(item["components"]) or abs(sum(fractions) - 1) > 2e-4 or min(fractions) < 0):
            complain(where, f"fractions {fractions}")
    return len(ids)


def check_texts(folder, components, names):
    ambiguous = set()
    for item in read(folder, "names.json", "stillshed_names").get("ambiguous", []):
        for name in map(plain, item["names"]):
            if name in ambiguous:
                complain("names.json", f"{name!r} twice")
            ambiguous.add(name)
            if name in names:
                complain("names.json", f"{name!r} names {names[name]}")
        for choice in item["choices"]:
            if choice not in components:
                complain("names.json", f"unknown component {choice}")
    cautions = read(folder, "cautions.json", "stillshed_cautions").get("cautions", [])
    for number in range(1, 25):
        if not any(item["code"] == f"C{number}" for item in cautions):
            complain("cautions.json", f"no C{number}")
    for item in cautions:
        for name in item.get("substances", []) + item.get("with", []):
            if name not in components:
                complain("cautions.json", f"{item['code']}: unknown component {name}")
    for item in read(folder, "ich_q3c.json", "stillshed_ich_q3c").get("limits", []):
        where = f"ich_q3c.json {item['name']}"
        if "cas" in item and not cas_is_right(item["cas"]):
            complain(where, f"CAS number {item['cas']}")
        if "component" in item and components.get(item["component"], {}).get("cas") != item.get("cas"):
            complain(where, f"component {item['component']} has another CAS number")
        # Option 1 of the guideline: ppm = 1000 x mg per day / 10 g per day.
        if "pde_mg_per_day" in item and "limit_ppm" in item and abs(item["pde_mg_per_day"] * 100 - item["limit_ppm"]) > 1:
            complain(where, f"{item['limit_ppm']} ppm does not follow from {item['pde_mg_per_day']} mg a day")
    return len(ambiguous)


def guarded(what, check, *arguments):
    """Runs one check; an entry that lacks what the check needs is a problem, not the end of the run."""
    try:
        return check(*arguments)
    except (KeyError, TypeError, ValueError, IndexError, AttributeError, OverflowError) as error:
        complain(what, f"entry of an unexpected shape ({type(error).__name__}: {error})")
        return {}


def main():
    folder = pathlib.Path(sys.argv[1]) if len(sys.argv) > 1 else pathlib.Path(__file__).resolve().parent.parent / "params"
    sources = guarded("sources.json", check_sources, read(folder, "sources.json", "stillshed_sources")) or set()
    tables = {}
    for key, file, width in (("unifac", "unifac.json", 1), ("dortmund", "unifac_dortmund.json", 3)):
        tables[key] = guarded(file, check_group_table, file, read(folder, file, "stillshed_groups"), width)
    components, names = guarded("components.json", check_components,
                                read(folder, "components.json", "stillshed_components"), tables) or ({}, {})
    sets = guarded("vapour_pressure.json", check_pressure_sets,
                   read(folder, "vapour_pressure.json", "stillshed_vapour_pressure"), components)
    measured = guarded("measured_azeotropes.json", check_measured,
                       read(folder, "measured_azeotropes.json", "stillshed_measured_azeotropes"), components)
    ambiguous = guarded("names.json, cautions.json, ich_q3c.json", check_texts, folder, components, names)
    used = set()
    for path in sorted(folder.glob("*.json")):
        if path.name != "sources.json":
            try:
                links(json.loads(path.read_text(encoding="utf-8")), used)
            except ValueError:
                pass  # reported where the file was read
    for key in sorted(used - sources):
        complain("sources.json", f"no entry for {key!r}")
    for key in sorted(sources - used):
        complain("sources.json", f"{key!r} is used nowhere")
    for text in problems:
        print(text)
    if problems:
        print(f"{len(problems)} problems")
        return 1
    print(f"{len(components)} components, {sets} vapour-pressure sets, {measured} measured azeotropes, "
          f"{ambiguous} ambiguous names, {len(sources)} sources: no problems")
    return 0


if __name__ == "__main__":
    sys.exit(main())
