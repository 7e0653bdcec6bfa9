"""The reference solver against values from outside: closed forms and tables named beside each check."""

import math
import sys
import tempfile
import types

import numpy as np

from field import WEEK_S, YEAR_S, Field
from forecast import SeismicClock, forecast
from make_scenarios import CASES, make
from march import March, Step, source_of
from plan import Limits, Objective, Responses, plan

DAY_S = 86400.0
failures = []


def check(name, got, expected, relative=0.0, absolute=0.0):
    error = abs(got - expected)
    good = error <= max(relative * abs(expected), absolute)
    print(f"{'ok  ' if good else 'FAIL'} {name}: {got:.10g} expected {expected:.10g} (off {error / (abs(expected) or 1):.1e})")
    if not good:
        failures.append(name)


def well(name, x, y, kind="injector", **changes):
    return {
        "name": name, "kind": kind, "xM": x, "yM": y, "radiusM": 0.1, "skin": 0, "control": True, "minRateM3PerS": 0,
        "maxRateM3PerS": 1, "maxChangeM3PerSPerWeek": None, "minPressurePa": None, "maxPressurePa": None,
        "heatJPerM3": 4e8 if kind == "producer" else 0, "outages": [], **changes,
    }  # fmt: skip


def square(x, y, half=10.0):
    return [[x - half, y - half], [x + half, y - half], [x + half, y + half], [x - half, y + half]]


def reference_field(wells, cells=121, size=12100.0, observers=(), rates=(), history=(), weeks=1, barriers=(), zones=()):
    """k = 1e-13 m², h = 100 m, μ = 3e-4 Pa·s, φ c_t = 1e-10 1/Pa: D = 10/3 m²/s. Origin shifted to the middle."""
    middle = size / 2
    shift = lambda item: {**item, "xM": item["xM"] + middle, "yM": item["yM"] + middle}
    return {
        "format": "stillfield-scenario/1",
        "reservoir": {
            "widthM": size, "heightM": size, "cellsX": cells, "cellsY": cells, "thicknessM": 100,
            "permeabilityM2": 1e-13, "storagePerPa": 1e-10, "viscosityPaS": 3e-4, "initialPressurePa": 2e7,
            "densityKgPerM3": 950, "regions": [], "barriers": list(barriers),
            "boundary": {side: "fixedPressure" for side in ("west", "east", "south", "north")},
        },
        "seismicity": {
            "friction": 0.6, "aSigmaPa": 1e5, "stressingRatePaPerYear": 1e4, "backgroundEventsPerYear": 2,
            "completenessMagnitude": 0.5, "bValue": 1, "zones": list(zones), "elsewhereWeight": 0 if zones else 1,
        },
        "wells": [shift(item) for item in wells],
        "history": list(history),
        "rates": [{"well": name, "weeklyM3PerS": list(values)} for name, values in rates],
        "plan": {"weeks": weeks, "lookAheadWeeks": 0, "objective": "quietest", "lossFraction": 0,
                 "heatTargetJPerWeek": [0]},
        "observers": [shift({"name": f"{x},{y}", "xM": x, "yM": y}) for x, y in observers],
    }  # fmt: skip


def theis():
    # Theis (1935): Δp = Qμ/(4πkh) E1(r²/4Dt); 12 km box, cells of 100 m, points five and more cells away.
    scenario = reference_field(
        [well("W", 0, 0)], observers=[(500, 0), (0, 1000), (300, 400)], rates=[("W", [0.05])]
    )
    row = forecast(Field(scenario), np.array([[0.05]]), 0)[0]
    observed = [point["overpressurePa"] for point in row["observers"]]
    check("Theis, 500 m, 7 d", observed[0], 349414.940, relative=3e-3)
    check("Theis, 500 m on the diagonal, 7 d", observed[2], 349414.940, relative=3e-3)
    from scipy.special import exp1

    factor = 0.05 * 3e-4 / (4 * math.pi * 1e-13 * 100)
    check("Theis, 1000 m, 7 d", observed[1], factor * exp1(1e6 / (4 * 10 / 3 * WEEK_S)), relative=3e-3)
    bottom = row["wells"][0]["bottomHoleEndPa"] - 2e7
    # Theis at the well's radius; Peaceman (1978) links the cell to it. His 0.14 instead of the exact 0.14036
    # makes up 0.05 %.
    check("Theis at the well's radius, 7 d", bottom, 2379072.9, relative=5e-3)


def superposition():
    # Superposition of Theis (1935), three wells with steps on days 0, 7, 10 and 14; plan start on day 14. The parts
    # of some 400 kPa nearly cancel, and the 100 m cells leave 0.3 % of each.
    wells = [well("W1", 0, 0), well("W2", 800, 0, "producer"), well("W3", 400, 600)]
    history = [
        {"well": "W1", "steps": [{"fromS": -14 * DAY_S, "rateM3PerS": 0.04}, {"fromS": -7 * DAY_S, "rateM3PerS": 0.06}]},
        {"well": "W2", "steps": [{"fromS": -14 * DAY_S, "rateM3PerS": 0.05}]},
        {"well": "W3", "steps": [{"fromS": -4 * DAY_S, "rateM3PerS": 0.02}]},
    ]
    scenario = reference_field(
        wells, observers=[(400, 200), (0, 500)], history=history, rates=[("W1", [0, 0])], weeks=2
    )
    field = Field(scenario)
    rows = forecast(field, field.given_rates(2), 0)
    for week, expected in ((0, (-186860.6489, -15414.46466)), (1, (-248761.5941, -76158.19863))):
        for point, value in zip(rows[week]["observers"], expected):
            check(f"three wells, day {21 + 7 * week}, at {point['name']}", point["overpressurePa"], value, absolute=1500)


def peaceman():
    # Peaceman (1978) with 0.14 √(Δx² + Δy²), 0.05 m³/s, r_w = 0.1 m.
    for cell, skin, expected in ((50, 0, 1096991.9), (50, 5, 2290654.0), (50, -2, 619527.0), (25, 0, 931515.2)):
        scenario = reference_field([well("W", 0, 0, skin=skin)], cells=5, size=5.0 * cell)
        check(f"well in {cell} m cells, skin {skin}", 0.05 * Field(scenario).well_resistance[0], expected, relative=1e-7)


def modes():
    # Exact decay of the mode (2, 1) on 32 × 24 cells of 4000 × 3000 m, D = 0.5 m²/s, closed sides, 30 d.
    scenario = reference_field([well("W", 0, 0)])
    scenario["reservoir"].update(
        widthM=4000, heightM=3000, cellsX=32, cellsY=24, storagePerPa=1e-10, permeabilityM2=1.5e-14,
        boundary={side: "noFlow" for side in ("west", "east", "south", "north")},
    )  # fmt: skip
    scenario["wells"][0].update(xM=100, yM=100)
    field = Field(scenario)
    mode = (np.cos(2 * math.pi * field.x / 4000) * np.cos(math.pi * field.y / 3000)).ravel()
    eigenvalue = 0.5 * (
        4 / 125**2 * math.sin(2 * math.pi * 125 / 8000) ** 2 + 4 / 125**2 * math.sin(math.pi * 125 / 6000) ** 2
    )
    check("decay in space alone", math.exp(-eigenvalue * 30 * DAY_S), 0.009984850937, relative=1e-9)
    errors = []
    for refine in (2, 4):
        pressure = mode
        for step in March(field, refine, max_step=2 * DAY_S).run(mode, np.zeros(field.count), 0.0, 30 * DAY_S):
            pressure = step.p1
        errors.append(abs(pressure[0] / mode[0] / 0.009984850937 - 1))
    check("decay of the mode in time, half-day steps", 1 + errors[1], 1, absolute=1e-4)
    check("order of the steps", math.log2(errors[0] / errors[1]), 3, absolute=0.35)
    # Mass balance in the closed box: mean rise Q t / (φ c_t h A).
    pressure = np.zeros(field.count)
    for step in March(field).run(pressure, source_of(field, np.array([0.05])), 0.0, WEEK_S):
        pressure = step.p1
    check("mean rise in a closed box", pressure.mean(), 0.05 * WEEK_S / (1e-10 * 100 * 4000 * 3000), relative=1e-10)


def one_cell(rate_multiple=1.0):
    stub = types.SimpleNamespace(
        count=1, loading_time=10 * YEAR_S, stress_per_pressure=0.6 / 1e5, background=np.array([1 / YEAR_S])
    )
    return stub, SeismicClock(stub, np.zeros(1), 0.0, np.full(1, math.log(rate_multiple)))


def ramp(clock, start, duration, stress_from, stress_to, pieces=400):
    """Adds Coulomb stress that changes linearly, on top of the background's; returns the pressure at the end."""
    p0, p1 = stress_from / 0.6, stress_to / 0.6
    slope = np.full(1, (p1 - p0) / duration)
    edges = np.linspace(0, 1, pieces + 1)
    for a, b in zip(edges[:-1], edges[1:]):
        at = lambda s: np.full(1, p0 + (p1 - p0) * s)
        clock.add(Step(start + a * duration, (b - a) * duration, at(a), slope, at(b), slope))
    return np.full(1, p1)


def rate_and_state():
    # Dieterich (1994), closed form for any R0 (Heimisson & Segall 2018): aσ = 0.1 MPa, τ̇0 = 0.01 MPa/yr.
    background = 1e4 / YEAR_S
    for years, rate, events in ((7 / 365.25, 1.017381172, 0.01933108552), (1, 2.319693167, 1.585650787),
                                (3, 6.905678577, 10.67655945)):  # fmt: skip
        _, clock = one_cell()
        end = ramp(clock, 0, years * YEAR_S, 0, 9 * background * years * YEAR_S)
        check(f"stressing 10 ×, {years:.4f} yr, rate", math.exp(clock.log_rate(end, years * YEAR_S)[0]), rate, 1e-8)
        check(f"stressing 10 ×, {years:.4f} yr, events", clock.events()[0], events, 1e-8)
    for stress, years, rate, events in ((3e5, 7 / 365.25, 19.37744032, 0.3780697619), (3e5, 10, 1.53742981, 35.69887932),
                                        (-3e5, 10, 0.1246699883, 0.8208512655)):  # fmt: skip
        _, clock = one_cell()
        end = ramp(clock, 0, years * YEAR_S, stress, stress)
        check(f"step {stress:g} Pa, {years:.4f} yr, rate", math.exp(clock.log_rate(end, years * YEAR_S)[0]), rate, 1e-8)
        check(f"step {stress:g} Pa, {years:.4f} yr, events", clock.events()[0], events, 1e-8)
    for stress, rate, events in ((2e4, 3.64799582, 0.06350857835), (-2e4, 2.448134936, 0.05202300268)):
        _, clock = one_cell(3.0)
        end = ramp(clock, 0, WEEK_S, 0, stress)
        got = math.exp(clock.log_rate(end, WEEK_S)[0])
        check(f"R0 = 3, {stress:g} Pa in a week, rate", got, rate, 1e-8)
        check(f"R0 = 3, {stress:g} Pa in a week, events", clock.events()[0], events, 1e-8)
    _, clock = one_cell()
    stress, before = 0.0, 0.0
    expected = (0.0191649555, 0.0195179293, 0.019950593, 0.0198160215, 0.0195881108)
    for week, (n, events) in enumerate(zip((1, 20, 5, -10, 0), expected)):
        after = stress + (n - 1) * background * WEEK_S
        ramp(clock, week * WEEK_S, WEEK_S, stress, after)
        check(f"week {week + 1} of five, events", clock.events()[0] - before, events, 1e-8)
        stress, before = after, clock.events()[0]


def symmetric_split():
    # Two injectors 1000 m apart, a cell 800 m north of each, 0.06 m³/s in total, 28 d, infinite aquifer (Theis and
    # the closed form above). A producer in a sealed corner balances the water and touches nothing.
    zones = [{"name": name, "polygonM": square(x + 6050, 800 + 6050), "weight": 1} for name, x in (("w", -500), ("e", 500))]
    wells = [well("A", -500, 0), well("B", 500, 0), well("P", -5900, -5900, "producer", control=False)]
    barrier = {"name": "seal", "lineM": [[410, 0], [410, 410], [0, 410]], "transmissibilityFactor": 0}
    scenario = reference_field(
        wells, weeks=4, zones=zones, barriers=[barrier], rates=[("P", [0.06])]
    )  # fmt: skip
    scenario["reservoir"]["boundary"] = {side: "noFlow" for side in ("west", "east", "south", "north")}
    field = Field(scenario)
    for a, b, expected in ((0.03, 0.03, 1.01755128), (0.04, 0.02, 1.02502929), (0.06, 0, 1.08528206)):
        rates = np.array([[a] * 4, [b] * 4, [-0.06] * 4])
        total = sum(row["expectedEvents"] for row in forecast(field, rates, 0))
        check(f"split {a}/{b}, events of two cells", total, expected, relative=5e-3)
    answer = plan(field, tolerance=1e-7)
    check("optimum of the split, events", answer["expectedEvents"], 1.01755128, relative=5e-3)
    check("optimum of the split, gap", answer["gap"], 0, absolute=1e-6)
    for week in range(4):
        check(f"optimum of the split, week {week + 1}", answer["rates"][0]["weeklyM3PerS"][week], 0.03, relative=0.02)


def gradients_and_routes():
    # The discretised count's gradient against central differences; response route against direct stepping.
    scenario = make(CASES[1], 20262)
    field = Field(scenario)
    weeks, look_ahead = scenario["plan"]["weeks"], scenario["plan"]["lookAheadWeeks"]
    responses = Responses(field, weeks, look_ahead)
    objective = Objective(responses)
    random = np.random.default_rng(5)
    rates = field.well_signs[:, None] * random.uniform(0.01, 0.04, (len(field.wells), weeks))
    values, gradients = objective(rates)
    direction = random.normal(size=rates.shape) * 1e-5
    up, down = objective(rates + direction)[0].sum(), objective(rates - direction)[0].sum()
    check("gradient", (gradients.sum(axis=0) * direction).sum(), (up - down) / 2, relative=1e-6)
    total = sum(row["expectedEvents"] for row in forecast(field, rates, look_ahead))
    check("responses and direct stepping", values.sum(), total, relative=2e-4)
    fine = sum(row["expectedEvents"] for row in forecast(field, rates, look_ahead, refine=4))
    check("steps four times shorter", total, fine, relative=2e-5)
    limits = Limits(field, responses)
    check("rates to variables and back", np.abs(limits.rates_of(limits.x_of(rates)) - rates)[limits.control].max() + 1, 1, 1e-12)


if __name__ == "__main__":
    for part in (theis, superposition, peaceman, modes, rate_and_state, symmetric_split, gradients_and_routes):
        part()
    print(f"{len(failures)} failed" if failures else "all hold")
    sys.exit(1 if failures else 0)
