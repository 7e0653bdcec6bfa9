"""Twelve seeded scenario files, feasible by construction.

    python3 make_scenarios.py FOLDER [--seed N]

Each file starts from a reference path of weekly rates that keeps the mass balance. Bounds, ramps, heat targets and
ceilings, and pressure limits are then laid around that path, so the path keeps every one of them.
"""

import argparse
import json
import math
import os

import numpy as np

from field import Field
from forecast import forecast

DAY_S = 86400.0
ALL_CLOSED = {"west": "noFlow", "east": "noFlow", "south": "noFlow", "north": "noFlow"}


def sides(closed):
    return {side: "noFlow" if side[0] in closed else "fixedPressure" for side in ("west", "east", "south", "north")}


# cells and cell sizes (m), producers, injectors, weeks, look-ahead, closed sides, aσ (Pa), and what the case is about
CASES = [
    dict(name="closed-small", cells=(20, 20), cell=(150, 150), wells=(2, 1), weeks=(4, 0), closed="wesn", a_sigma=2e4),
    dict(name="non-square-leaky", cells=(20, 30), cell=(180, 110), wells=(2, 2), weeks=(6, 8), closed="", a_sigma=1e5,
         barriers=[0.05], history=True),
    dict(name="contrast", cells=(40, 25), cell=(120, 160), wells=(3, 2), weeks=(8, 26), closed="esn", a_sigma=5e4,
         regions=[(50.0, 1.0)], history=True, ceiling=True),
    dict(name="sealed-tight-ramps", cells=(30, 30), cell=(130, 130), wells=(3, 3), weeks=(8, 4), closed="wn", a_sigma=1.5e5,
         barriers=[0.0], history=True, tight_ramps=True, pressure=True),
    dict(name="pressure-skin", cells=(50, 50), cell=(100, 100), wells=(4, 4), weeks=(12, 0), closed="wes", a_sigma=8e4,
         pressure=True, skin=True, history=True),
    dict(name="outages-loss", cells=(60, 40), cell=(90, 120), wells=(5, 3), weeks=(10, 13), closed="n", a_sigma=2e5,
         outages=True, loss=0.06, ceiling=True, history=True, weekly_heat=True),
    dict(name="closed-large", cells=(64, 64), cell=(100, 100), wells=(6, 4), weeks=(12, 26), closed="wesn", a_sigma=3e5,
         history=True, pressure=True, regions=[(0.02, 0.5)], ceiling=True),
    dict(name="zones-new-wells", cells=(80, 50), cell=(70, 90), wells=(7, 5), weeks=(6, 26), closed="we", a_sigma=4e4,
         history=True, new_wells=True, overlap=True, elsewhere=0.0, weekly_heat=True),
    dict(name="everything", cells=(100, 100), cell=(60, 60), wells=(7, 5), weeks=(12, 26), closed="es", a_sigma=1.5e5,
         history=True, regions=[(0.02, 1.0), (3.0, 2.0)], barriers=[0.02, 0.0], outages=True, pressure=True, skin=True,
         overlap=True, ceiling=True, fixed=True),
    dict(name="long-thin", cells=(100, 60), cell=(80, 45), wells=(5, 4), weeks=(12, 4), closed="sn", a_sigma=2.5e5,
         history=True, loss=0.1, barriers=[0.1, 0.01], tight_ramps=True, weekly_heat=True, ceiling=True),
    dict(name="fixed-wells", cells=(45, 70), cell=(110, 75), wells=(4, 3), weeks=(5, 12), closed="w", a_sigma=6e4,
         fixed=True, history=True, pressure=True, skin=True, overlap=True),
    dict(name="low-a-sigma", cells=(100, 100), cell=(50, 70), wells=(3, 3), weeks=(4, 8), closed="wen", a_sigma=2e4,
         history=True, barriers=[0.0, 0.3], regions=[(50.0, 1.0)], pressure=True),
]


def polygon(random, width, height, share):
    """A convex polygon about a random centre; corners at odd places, so that no cell centre lies on an edge."""
    cx, cy = random.uniform(0.25, 0.75) * width, random.uniform(0.25, 0.75) * height
    angles = np.sort(random.uniform(0, 2 * math.pi) + np.linspace(0, 2 * math.pi, 7)[:-1] + random.uniform(-0.3, 0.3, 6))
    radius = share * random.uniform(0.8, 1.2, 6)
    return [
        [float(cx + r * width * math.cos(a)), float(cy + r * height * math.sin(a))] for r, a in zip(radius, angles)
    ]


def well_places(random, case, count):
    (nx, ny), (dx, dy) = case["cells"], case["cell"]
    chosen = []
    while len(chosen) < count:
        i, j = int(random.integers(2, nx - 2)), int(random.integers(2, ny - 2))
        if all(max(abs(i - a), abs(j - b)) >= 3 for a, b in chosen):
            chosen.append((i, j))
    return [
        (float((i + random.uniform(0.2, 0.8)) * dx), float((j + random.uniform(0.2, 0.8)) * dy)) for i, j in chosen
    ]


def reference_path(random, case, kinds, outages):
    """Weekly magnitudes (wells × weeks): smooth, and balanced in every week."""
    weeks, producers = case["weeks"][0], [i for i, kind in enumerate(kinds) if kind == "producer"]
    injectors = [i for i, kind in enumerate(kinds) if kind == "injector"]
    jump = 0.001 if case.get("tight_ramps") else 0.003
    path = np.zeros((len(kinds), weeks))
    path[producers] = random.uniform(0.025, 0.05, (len(producers), 1)) + np.cumsum(
        random.uniform(-jump, jump, (len(producers), weeks)), axis=1
    )
    path = np.maximum(path, 0)
    shares = random.uniform(0.5, 1.5, len(injectors))
    open_now = ~outages
    path *= open_now
    for week in range(weeks):
        open_shares = shares * open_now[injectors, week]
        path[injectors, week] = open_shares / open_shares.sum() * (1 - case.get("loss", 0)) * path[producers, week].sum()
    return path


def history_steps(random, kind_path, spread):
    """Irregular steps over some years; the last one near the path's first rate."""
    count = int(random.integers(3, 9))
    days = np.sort(random.uniform(20, 1500, count))[::-1]
    days[-1] = random.uniform(5, 30)
    rates = np.clip(kind_path[0] * random.uniform(0.6, 1.3, count), 0.002, None)
    rates[-1] = max(0.002, kind_path[0] + random.uniform(-spread, spread))
    return [
        {"fromS": -float(round(day * DAY_S)), "rateM3PerS": float(rate)} for day, rate in zip(days, rates)
    ]


def ramp_free(outages, i, week):
    return outages[i, week] or (week > 0 and outages[i, week - 1])


def make(case, seed):
    random = np.random.default_rng(seed)
    (nx, ny), (dx, dy) = case["cells"], case["cell"]
    width, height = float(nx * dx), float(ny * dy)
    weeks, look_ahead = case["weeks"]
    count = sum(case["wells"])
    kinds = ["producer"] * case["wells"][0] + ["injector"] * case["wells"][1]
    places = well_places(random, case, count)
    outages = np.zeros((count, weeks), dtype=bool)
    if case.get("outages"):
        outages[1, 2:4] = True
        outages[case["wells"][0] + 1, 5:6] = True
        outages[2, weeks - 1] = True
    fixed = {0, case["wells"][0]} if case.get("fixed") else set()
    # A new well has no history: its last rate is nothing, and its ramp lets it start.
    new = {1, count - 1} if case.get("new_wells") else set()
    has_history = bool(case.get("history"))
    path = reference_path(random, case, kinds, outages)
    wells, history, rates = [], [], []
    for i in range(count):
        name = f"{'P' if kinds[i] == 'producer' else 'I'}-{i + 1}"
        steps = history_steps(random, path[i], 0.0008 if case.get("tight_ramps") else 0.003)
        last = 0.0
        if has_history and i not in new:
            history.append({"well": name, "steps": steps})
            last = steps[-1]["rateM3PerS"]
        changes = [
            abs(path[i, w] - (path[i, w - 1] if w else last)) for w in range(weeks) if not ramp_free(outages, i, w)
        ]
        in_use = path[i][~outages[i]]
        wells.append(
            {
                "name": name,
                "kind": kinds[i],
                "xM": places[i][0],
                "yM": places[i][1],
                "radiusM": float(random.choice([0.08, 0.108, 0.122])),
                "skin": float(random.uniform(-1.5, 5)) if case.get("skin") else 0.0,
                "control": i not in fixed,
                "minRateM3PerS": float(in_use.min() * random.uniform(0.2, 0.7)),
                "maxRateM3PerS": float(in_use.max() * random.uniform(1.2, 1.7)),
                "maxChangeM3PerSPerWeek": float(max(changes) * (1.05 if case.get("tight_ramps") else random.uniform(1.3, 2.5))),
                "minPressurePa": None,
                "maxPressurePa": None,
                "heatJPerM3": float(random.uniform(3.5e8, 5.5e8)) if kinds[i] == "producer" else 0.0,
                "outages": spans(outages[i]),
            }
        )
        rates.append({"well": name, "weeklyM3PerS": [float(v) for v in path[i]]})
    zones = [{"name": "first strand", "polygonM": polygon(random, width, height, 0.22), "weight": 5.0}]
    if case.get("overlap"):
        # Its corners lie about the first one's, so the two overlap and the later one wins.
        zones.append(
            {
                "name": "second strand",
                "polygonM": [[x + 0.1 * width, y + 0.07 * height] for x, y in zones[0]["polygonM"]],
                "weight": 2.0,
            }
        )
        zones.append({"name": "corner", "polygonM": polygon(random, width, height, 0.12), "weight": 8.0})
    scenario = {
        "format": "stillfield-scenario/1",
        "reservoir": {
            "widthM": width,
            "heightM": height,
            "cellsX": nx,
            "cellsY": ny,
            "thicknessM": float(random.uniform(150, 350)),
            "permeabilityM2": float(np.exp(random.uniform(np.log(1.5e-14), np.log(8e-14)))),
            "storagePerPa": float(np.exp(random.uniform(np.log(6e-11), np.log(3e-10)))),
            "viscosityPaS": float(random.uniform(1.6e-4, 3e-4)),
            "initialPressurePa": 2.0e7,
            "densityKgPerM3": 930,
            "boundary": sides(case["closed"]),
            "regions": [
                {
                    "name": f"region {n + 1}",
                    "polygonM": polygon(random, width, height, 0.3 if n == 0 else 0.15),
                    "permeabilityFactor": factor,
                    "storageFactor": storage,
                }
                for n, (factor, storage) in enumerate(case.get("regions", []))
            ],
            "barriers": [
                {
                    "name": f"fault {n + 1}",
                    "lineM": [
                        [float(width * random.uniform(0.1, 0.3)), float(height * random.uniform(0.1, 0.9))],
                        [float(width * random.uniform(0.4, 0.6)), float(height * random.uniform(0.1, 0.9))],
                        [float(width * random.uniform(0.7, 0.9)), float(height * random.uniform(0.1, 0.9))],
                    ],
                    "transmissibilityFactor": factor,
                }
                for n, factor in enumerate(case.get("barriers", []))
            ],
        },
        "seismicity": {
            "friction": float(random.uniform(0.5, 0.7)),
            "aSigmaPa": case["a_sigma"],
            "stressingRatePaPerYear": float(random.uniform(2000, 9000)),
            "backgroundEventsPerYear": float(random.uniform(8, 60)),
            "completenessMagnitude": 0.5,
            "bValue": 1.0,
            "zones": zones,
            "elsewhereWeight": case.get("elsewhere", 0.3),
        },
        "wells": wells,
        "history": history,
        "rates": rates,
        "plan": {
            "weeks": weeks,
            "lookAheadWeeks": look_ahead,
            "objective": "quietest",
            "heatTargetJPerWeek": [],
            "lossFraction": case.get("loss", 0),
            "setPointStepM3PerS": None,
            "polishTolerance": 0,
        },
        "observers": [
            {"name": f"OB-{n + 1}", "xM": float(random.uniform(0.05, 0.95) * width), "yM": float(random.uniform(0.05, 0.95) * height)}
            for n in range(2)
        ],
    }
    lay_heat(scenario, case, path)
    if case.get("pressure"):
        lay_pressure_limits(scenario, path)
    # Some files leave a well's rates out on purpose: a forecast then holds its last history rate.
    if has_history and not fixed and int(random.integers(2)):
        scenario["rates"] = [entry for entry in rates if entry["well"] != wells[-1]["name"]]
    return scenario


def spans(flags):
    weeks = np.flatnonzero(flags) + 1
    out = []
    for week in weeks:
        if out and out[-1]["toWeek"] == week - 1:
            out[-1]["toWeek"] = int(week)
        else:
            out.append({"fromWeek": int(week), "toWeek": int(week)})
    return out


def lay_heat(scenario, case, path):
    heat = np.array([well["heatJPerM3"] for well in scenario["wells"]]) @ path * 604800.0
    target, ceiling = heat * 0.995, heat * 1.01
    if not case.get("weekly_heat") and not case.get("outages"):
        target, ceiling = [heat.min() * 0.995], [heat.max() * 1.01]
    scenario["plan"]["heatTargetJPerWeek"] = [float(value) for value in target]
    if case.get("ceiling"):
        scenario["plan"]["heatCeilingJPerWeek"] = [float(value) for value in ceiling]


def lay_pressure_limits(scenario, path):
    """Limits a little beyond the extremes of the reference path, in the plan's weeks."""
    field = Field(scenario)
    rows = forecast(field, path * field.well_signs[:, None], 0)
    initial = scenario["reservoir"]["initialPressurePa"]
    for i, well in enumerate(scenario["wells"]):
        if well["kind"] == "producer":
            low = min(row["wells"][i]["bottomHoleMinPa"] for row in rows)
            well["minPressurePa"] = low - 0.01 * abs(low - initial)
        else:
            high = max(row["wells"][i]["bottomHoleMaxPa"] for row in rows)
            well["maxPressurePa"] = high + 0.01 * abs(high - initial)


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("folder")
    parser.add_argument("--seed", type=int, default=20260)
    arguments = parser.parse_args()
    os.makedirs(arguments.folder, exist_ok=True)
    for number, case in enumerate(CASES, start=1):
        scenario = make(case, arguments.seed + number)
        path = os.path.join(arguments.folder, f"{number:02d}-{case['name']}.json")
        with open(path, "w", encoding="utf-8") as file:
            json.dump(scenario, file, indent=1)
        print(path)


if __name__ == "__main__":
    main()
