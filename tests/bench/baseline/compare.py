"""Product and reference on every scenario file of a folder.

    python3 compare.py FOLDER [--only TEXT] [--skip-plan] [--refine N]

Forecasts: largest relative difference of weekly counts, zones, pressures (relative to the well's or observer's largest
change in the forecast). Plans: the product's rates are run again by the reference and held against its own optimum, the
product's lower bound against that optimum, and every limit against the product's rates. Exit code 1 when a figure is out of
tolerance.
"""

import argparse
import glob
import json
import os
import subprocess
import sys
import time

import numpy as np

from field import Field, read_scenario
from forecast import forecast
from plan import Infeasible, Limits, Objective, Responses, cutting_planes, unsupported

ROOT = os.path.abspath(os.path.join(os.path.dirname(__file__), "..", "..", ".."))
COUNT_TOLERANCE = 2e-3  # asked of the product: weekly counts
PRESSURE_TOLERANCE = 1e-3  # and pressures
OPTIMUM_TOLERANCE = 1e-3
LIMIT_TOLERANCE = 1e-6


def product(command, path):
    started = time.perf_counter()
    done = subprocess.run(
        ["npm", "run", "-s", "scenario", "--", command, os.path.abspath(path)],
        cwd=ROOT, capture_output=True, text=True, timeout=900,
    )  # fmt: skip
    seconds = time.perf_counter() - started
    if done.returncode != 0:
        return None, seconds, f"exit {done.returncode}: {(done.stderr or done.stdout).strip()[:600]}"
    return json.loads(done.stdout), seconds, ""


def relative(got, expected, floor=0.0):
    return abs(got - expected) / max(abs(expected), floor, 1e-300)


def compare_forecasts(field, theirs, rows):
    """Largest differences, with the place of each."""
    worst = {key: (0.0, "") for key in ("events", "zones", "end", "extremes", "observers", "heat")}

    def note(key, value, place):
        if not value <= worst[key][0]:
            worst[key] = (value, place)

    initial = field.initial_pressure
    spread = [
        max(abs(row["wells"][i][key] - initial) for row in rows for key in ("bottomHoleMinPa", "bottomHoleMaxPa"))
        for i in range(len(field.wells))
    ]
    observed = [max(abs(row["observers"][i]["overpressurePa"]) for row in rows) for i in range(len(field.observers))]
    if len(theirs) != len(rows):
        note("events", float("inf"), f"{len(theirs)} weeks instead of {len(rows)}")
    for their, ours in zip(theirs, rows):
        week = f"week {ours['week']}"
        note("events", relative(their["expectedEvents"], ours["expectedEvents"]), week)
        note("events", relative(their["rateMultiple"], ours["rateMultiple"]), week + " rate multiple")
        note("heat", relative(their["heatJ"], ours["heatJ"], 1.0), week)
        for a, b in zip(their["zones"], ours["zones"], strict=True):
            assert a["name"] == b["name"]
            note("zones", relative(a["expectedEvents"], b["expectedEvents"], 1e-12), f"{week} {a['name']}")
            if b["rateMultiple"] is not None:
                note("zones", relative(a["rateMultiple"], b["rateMultiple"]), f"{week} {a['name']} rate multiple")
        for i, (a, b) in enumerate(zip(their["wells"], ours["wells"], strict=True)):
            assert a["name"] == b["name"]
            scale = max(spread[i], 1.0)
            note("end", abs(a["bottomHoleEndPa"] - b["bottomHoleEndPa"]) / scale, f"{week} {a['name']}")
            for key in ("bottomHoleMinPa", "bottomHoleMaxPa"):
                note("extremes", abs(a[key] - b[key]) / scale, f"{week} {a['name']} {key}")
        for i, (a, b) in enumerate(zip(their["observers"], ours["observers"], strict=True)):
            difference = abs(a["overpressurePa"] - b["overpressurePa"]) / max(observed[i], 1.0)
            note("observers", difference, f"{week} {a['name']}")
    return worst


def broken_limits(field, limits, rates, rows):
    """Largest violation of each kind, relative to the limit (pressures: to the change the limit allows)."""
    x = limits.x_of(rates)
    worst = {}

    def note(kind, value, place):
        if value > worst.get(kind, (0.0, ""))[0]:
            worst[kind] = (float(value), place)

    for i, position in ((i, limits.control.index(i)) for i in limits.control):
        name = field.well_names[i]
        for week in range(limits.weeks):
            low, high = limits.bounds[position * limits.weeks + week]
            value = x[position * limits.weeks + week]
            scale = max(field.wells[i]["maxRateM3PerS"] * 1e3, 1e-9)
            note("bounds", max(low - value, value - high) / scale, f"{name} week {week + 1}")
    for i in range(len(field.wells)):
        if i not in limits.control:
            note("fixed", np.abs(rates[i] - limits.fixed[i]).max() / max(np.abs(limits.fixed[i]).max(), 1e-9), field.well_names[i])
    excess = limits.a_ub @ x - limits.b_ub
    for value, name, limit in zip(excess, limits.names_ub, limits.b_ub):
        kind = name.split()[0]
        if kind == "pressure":
            continue  # from the finely stepped forecast below
        scale = max(abs(limit), 1e-9)
        if kind == "ramp":
            scale = field.wells[field.well_names.index(name.split()[1])]["maxChangeM3PerSPerWeek"] * 1e3
        note("heat" if kind.startswith("heat") else kind, value / scale, name)
    produced = np.abs(rates[field.well_signs < 0]).sum(axis=0) * 1e3
    residual = np.abs(limits.a_eq @ x - limits.b_eq)
    for week, value in enumerate(residual):
        note("balance", value / max(produced[week], 1e-9), f"week {week + 1}")
    for row in rows[: limits.weeks]:
        for i, well in enumerate(field.wells):
            here = row["wells"][i]
            if well["kind"] == "injector" and well.get("maxPressurePa") is not None:
                allowed = max(abs(well["maxPressurePa"] - field.initial_pressure), 1.0)
                note("pressure", (here["bottomHoleMaxPa"] - well["maxPressurePa"]) / allowed, f"{well['name']} week {row['week']}")
            if well["kind"] == "producer" and well.get("minPressurePa") is not None:
                allowed = max(abs(well["minPressurePa"] - field.initial_pressure), 1.0)
                note("pressure", (well["minPressurePa"] - here["bottomHoleMinPa"]) / allowed, f"{well['name']} week {row['week']}")
    return worst


def one_file(path, arguments):
    name = os.path.basename(path).removesuffix(".json")
    scenario = read_scenario(path)
    field = Field(scenario)
    weeks, look_ahead = scenario["plan"]["weeks"], scenario["plan"].get("lookAheadWeeks", 26)
    found, row = [], {"file": name, "cells": field.count, "wells": len(field.wells), "weeks": f"{weeks}+{look_ahead}"}

    answer, row["fcProductS"], error = product("forecast", path)
    started = time.perf_counter()
    rows = forecast(field, field.given_rates(weeks), look_ahead, arguments.refine)
    row["fcReferenceS"] = time.perf_counter() - started
    if error:
        found.append(f"forecast {error}")
    else:
        worst = compare_forecasts(field, answer["weeks"], rows)
        row.update({key: value for key, (value, _) in worst.items()})
        for key, (value, place) in worst.items():
            limit = COUNT_TOLERANCE if key in ("events", "zones") else LIMIT_TOLERANCE if key == "heat" else PRESSURE_TOLERANCE
            if not value <= limit:
                found.append(f"forecast {key}: off by {value:.2e} at {place}")
    if arguments.skip_plan or unsupported(scenario):
        return row, found

    answer, row["planProductS"], error = product("plan", path)
    started = time.perf_counter()
    try:
        responses = Responses(field, weeks, look_ahead)
        limits = Limits(field, responses)
        x, value, bound, row["rounds"] = cutting_planes(Objective(responses), limits, 1e-5)
    except Infeasible as reason:
        row["planReferenceS"] = time.perf_counter() - started
        found.append(f"plan: reference finds none ({reason}); product: {error or 'a plan'}")
        return row, found
    row["planReferenceS"] = time.perf_counter() - started
    if error:
        found.append(f"plan {error}; reference: {value:.6g} events")
        return row, found
    best_rows = forecast(field, limits.rates_of(x), look_ahead)
    best = sum(week["expectedEvents"] for week in best_rows)
    rates = np.zeros((len(field.wells), weeks))
    for entry in answer["rates"]:
        i = field.well_names.index(entry["well"])
        rates[i] = field.well_signs[i] * np.array(entry["weeklyM3PerS"])
    their_rows = forecast(field, rates, look_ahead)
    theirs = sum(week["expectedEvents"] for week in their_rows)
    row.update(
        {
            "product": answer["expectedEvents"], "productByReference": theirs, "optimum": best,
            "referenceGap": (value - bound) / value, "excess": theirs / best - 1,
            "boundBelow": 1 - answer["lowerBound"] / best, "gap": answer["gap"],
            "selfCheck": answer["check"]["relativeDifference"], "productRounds": answer.get("rounds"),
        }
    )  # fmt: skip
    if relative(answer["expectedEvents"], theirs) > COUNT_TOLERANCE:
        found.append(f"plan's own count {answer['expectedEvents']:.7g}, by the reference {theirs:.7g}")
    if row["excess"] > OPTIMUM_TOLERANCE:
        found.append(f"plan: {theirs:.7g} events where {best:.7g} can be reached ({row['excess']:.2e} above)")
    if answer["lowerBound"] > best * (1 + 2e-4):
        found.append(f"plan: lower bound {answer['lowerBound']:.7g} above a plan found with {best:.7g}")
    worst = compare_forecasts(field, answer["weeks"], their_rows)
    for key, (difference, place) in worst.items():
        limit = COUNT_TOLERANCE if key in ("events", "zones") else LIMIT_TOLERANCE if key == "heat" else PRESSURE_TOLERANCE
        if not difference <= limit:
            found.append(f"plan's forecast {key}: off by {difference:.2e} at {place}")
    broken = broken_limits(field, limits, rates, their_rows)
    row["broken"] = max((v for v, _ in broken.values()), default=0.0)
    ours = broken_limits(field, limits, limits.rates_of(x), best_rows)
    for kind, (value, place) in broken.items():
        if value > LIMIT_TOLERANCE:
            reference = ours.get(kind, (0.0, ""))[0]
            found.append(f"plan breaks {kind} by {value:.2e} at {place} (reference's own plan: {reference:.1e})")
    return row, found


COLUMNS = [
    ("file", "file", "{}"), ("cells", "cells", "{}"), ("wells", "wells", "{}"), ("weeks", "weeks", "{}"),
    ("events", "Δ weekly events", "{:.1e}"), ("zones", "Δ zones", "{:.1e}"), ("end", "Δ p end", "{:.1e}"),
    ("extremes", "Δ p min/max", "{:.1e}"), ("observers", "Δ observers", "{:.1e}"),
    ("product", "plan, product", "{:.5f}"), ("productByReference", "same rates, reference", "{:.5f}"),
    ("optimum", "optimum", "{:.5f}"), ("excess", "excess", "{:+.1e}"), ("gap", "gap told", "{:.1e}"),
    ("boundBelow", "optimum above bound", "{:+.1e}"), ("referenceGap", "reference's gap", "{:.1e}"), ("broken", "limits broken", "{:.1e}"),
    ("fcProductS", "forecast s", "{:.1f}"), ("fcReferenceS", "reference s", "{:.1f}"),
    ("planProductS", "plan s", "{:.1f}"), ("planReferenceS", "reference s", "{:.1f}"),
]  # fmt: skip


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("folder")
    parser.add_argument("--only", default="")
    parser.add_argument("--skip-plan", action="store_true")
    parser.add_argument("--refine", type=int, default=1)
    arguments = parser.parse_args()
    paths = [path for path in sorted(glob.glob(os.path.join(arguments.folder, "*.json"))) if arguments.only in path]
    if not paths:
        parser.error("no scenario files there")
    findings = []
    print("| " + " | ".join(title for _, title, _ in COLUMNS) + " |")
    print("|" + "---|" * len(COLUMNS), flush=True)
    for path in paths:
        row, found = one_file(path, arguments)
        cells = [pattern.format(row[key]) if row.get(key) is not None else "" for key, _, pattern in COLUMNS]
        print("| " + " | ".join(cells) + " |", flush=True)
        findings += [f"{row['file']}: {text}" for text in found]
    print()
    for text in findings:
        print("-", text)
    print(f"{len(findings)} findings in {len(paths)} files")
    return 1 if findings else 0


if __name__ == "__main__":
    sys.exit(main())
