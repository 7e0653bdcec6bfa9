"""Forecast of given rates: direct time stepping, no superposition.

Seismicity: the closed solution of Dieterich's (1994) rate-and-state law for R, the rate over the background
rate (Heimisson & Segall 2018): N(t) = r0 ta ln(1 + (R0/ta) ∫ e^g ds), in the log domain, with the integral by three-point
Gauss quadrature on the cubic pressure of every step.
"""

import numpy as np

from field import WEEK_S
from march import March, source_of

GAUSS_X = np.array([0.5 - np.sqrt(0.15), 0.5, 0.5 + np.sqrt(0.15)])
GAUSS_W = np.array([5.0, 8.0, 5.0]) / 18.0


class SeismicClock:
    """Running log of ∫ e^g ds per cell, g measured from the moment the clock was started."""

    def __init__(self, field, pressure, start, log_rate_multiple):
        self.field, self.start = field, start
        self.pressure = pressure
        self.log_rate_multiple = log_rate_multiple
        self.log_integral = np.full(field.count, -np.inf)

    def exponent(self, pressure, time):
        return (time - self.start) / self.field.loading_time + self.field.stress_per_pressure * (pressure - self.pressure)

    def add(self, step):
        parts = [
            self.exponent(step.at(x), step.start + x * step.length) + np.log(w * step.length)
            for x, w in zip(GAUSS_X, GAUSS_W)
        ]
        top = np.maximum(np.maximum(parts[0], parts[1]), parts[2])
        log_part = top + np.log(sum(np.exp(part - top) for part in parts))
        self.log_integral = np.logaddexp(self.log_integral, log_part)

    def log_growth(self):
        """ln F, F = 1 + (R0/ta) ∫ e^g ds."""
        return np.logaddexp(0.0, self.log_rate_multiple - np.log(self.field.loading_time) + self.log_integral)

    def events(self):
        return self.field.background * self.field.loading_time * self.log_growth()

    def log_rate(self, pressure, time):
        return self.log_rate_multiple + self.exponent(pressure, time) - self.log_growth()


def run_history(field, march, on_step=None):
    """Pressure, ln R and the time since the last change of rates at the plan's start."""
    steps, last = field.history_steps()
    pressure = np.zeros(field.count)
    steps = [step for step in steps if step[0] < 0] or []
    if not steps:
        return pressure, np.zeros(field.count), np.zeros(len(field.wells)), 0.0
    first = steps[0][0]
    clock = SeismicClock(field, pressure, first, np.zeros(field.count))
    rates = np.zeros(len(field.wells))
    times = sorted({step[0] for step in steps}) + [0.0]
    elapsed = 0.0
    for begin, end in zip(times[:-1], times[1:]):
        before = rates.copy()
        for time, well, rate in steps:
            if time == begin:
                rates[well] = rate
        if not np.array_equal(before, rates):
            elapsed = 0.0
        for step in march.run(pressure, source_of(field, rates), begin, end - begin, elapsed):
            clock.add(step)
            pressure = step.p1
            if on_step:
                on_step(step)
        elapsed += end - begin
    return pressure, clock.log_rate(pressure, 0.0), rates, elapsed


def forecast(field, weekly_rates, look_ahead, refine=1):
    """`weekly_rates`: signed, wells × weeks. Returns per-week numbers for the plan's weeks and the look-ahead."""
    weeks = weekly_rates.shape[1]
    # A sixth of a week at most: weekly extremes and the quadrature want a few points in every week.
    march = March(field, refine, max_step=WEEK_S / 6)
    pressure, log_rate, rates, elapsed = run_history(field, march)
    clock = SeismicClock(field, pressure, 0.0, log_rate)
    background_week = field.background * WEEK_S
    rows, events_before = [], np.zeros(field.count)
    for week in range(weeks + look_ahead):
        now = weekly_rates[:, min(week, weeks - 1)]
        if not np.array_equal(now, rates):
            rates, elapsed = now.copy(), 0.0
        extra = rates * field.well_resistance
        lowest = highest = pressure[field.well_cells] + extra
        for step in march.run(pressure, source_of(field, rates), week * WEEK_S, WEEK_S, elapsed):
            clock.add(step)
            pressure = step.p1
            at_wells = pressure[field.well_cells] + extra
            lowest, highest = np.minimum(lowest, at_wells), np.maximum(highest, at_wells)
        elapsed += WEEK_S
        events = clock.events()
        in_week, events_before = events - events_before, events
        zone_events, zone_background = field.split_by_zone(in_week), field.split_by_zone(background_week)
        end = field.initial_pressure + at_wells
        rows.append(
            {
                "week": week + 1,
                "expectedEvents": float(in_week.sum()),
                "rateMultiple": float(in_week.sum() / background_week.sum()),
                "zones": [
                    {
                        "name": zone["name"],
                        "expectedEvents": count,
                        "rateMultiple": count / base if base > 0 else None,
                    }
                    for zone, count, base in zip(field.zones, zone_events, zone_background)
                ],
                "wells": [
                    {
                        "name": name,
                        "bottomHoleEndPa": float(end[i]),
                        "bottomHoleMinPa": float(field.initial_pressure + lowest[i]),
                        "bottomHoleMaxPa": float(field.initial_pressure + highest[i]),
                    }
                    for i, name in enumerate(field.well_names)
                ],
                "observers": [
                    {"name": point["name"], "overpressurePa": float(pressure[cell])}
                    for point, cell in zip(field.observers, field.observer_cells)
                ],
                "heatJ": float((np.abs(rates) * field.heat_per_m3).sum() * WEEK_S),
            }
        )
    return rows


def summary(field, rows):
    total = sum(row["expectedEvents"] for row in rows)
    background = float(field.background.sum() * WEEK_S * len(rows))
    return {
        "weeks": rows,
        "totals": {
            "expectedEvents": total,
            "backgroundEvents": background,
            "rateMultiple": total / background,
            "heatJ": sum(row["heatJ"] for row in rows),
        },
    }
