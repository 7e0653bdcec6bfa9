"""The field of a scenario file as sparse matrices: cells, faces, wells, zones.

Written from the equations alone (cell-centred finite volumes, two-point fluxes, Peaceman 1978), so that it can
serve as an independent reference. SI units throughout; a rate inside the equations is positive for injection.
"""

import json
import math

import numpy as np
import scipy.sparse as sp

WEEK_S = 604800.0
YEAR_S = 365.25 * 86400.0


def inside_polygon(x, y, polygon):
    """Even-odd rule, half-open on edges, for arrays of points."""
    inside = np.zeros(x.shape, dtype=bool)
    count = len(polygon)
    for i in range(count):
        x1, y1 = polygon[i]
        x2, y2 = polygon[(i + 1) % count]
        if y1 == y2:
            continue
        straddles = (y1 > y) != (y2 > y)
        inside ^= straddles & (x < (x2 - x1) * (y - y1) / (y2 - y1) + x1)
    return inside


def crosses(line_start, line_end, ax, ay, bx, by):
    """Whether the straight piece of a barrier meets each segment a-b; touching counts, lying along it does not."""
    (px, py), (qx, qy) = line_start, line_end
    side_a = (qx - px) * (ay - py) - (qy - py) * (ax - px)
    side_b = (qx - px) * (by - py) - (qy - py) * (bx - px)
    side_p = (bx - ax) * (py - ay) - (by - ay) * (px - ax)
    side_q = (bx - ax) * (qy - ay) - (by - ay) * (qx - ax)
    along = (side_a == 0) & (side_b == 0)
    return (side_a * side_b <= 0) & (side_p * side_q <= 0) & ~along


class Field:
    """Everything that does not change with the rates."""

    def __init__(self, scenario):
        self.scenario = scenario
        reservoir = scenario["reservoir"]
        self.cells_x, self.cells_y = reservoir["cellsX"], reservoir["cellsY"]
        self.dx = reservoir["widthM"] / self.cells_x
        self.dy = reservoir["heightM"] / self.cells_y
        self.count = self.cells_x * self.cells_y
        centre_x = (np.arange(self.cells_x) + 0.5) * self.dx
        centre_y = (np.arange(self.cells_y) + 0.5) * self.dy
        # Shape (cellsY, cellsX); a cell's number is row * cellsX + column, rows counted from the south.
        self.x, self.y = np.meshgrid(centre_x, centre_y)
        self._properties(reservoir)
        self._matrices(reservoir)
        self._wells(reservoir)
        self._seismicity(scenario["seismicity"])

    def _properties(self, reservoir):
        permeability_factor = np.ones(self.x.shape)
        storage_factor = np.ones(self.x.shape)
        for region in reservoir.get("regions", []):
            member = inside_polygon(self.x, self.y, region["polygonM"])
            permeability_factor[member] = region.get("permeabilityFactor", 1)
            storage_factor[member] = region.get("storageFactor", 1)
        self.permeability_thickness = reservoir["permeabilityM2"] * permeability_factor * reservoir["thicknessM"]
        self.transmissivity = self.permeability_thickness / reservoir["viscosityPaS"]
        self.storativity = reservoir["storagePerPa"] * storage_factor * reservoir["thicknessM"]

    def _matrices(self, reservoir):
        number = np.arange(self.count).reshape(self.x.shape)
        t = self.transmissivity
        barriers = reservoir.get("barriers", [])

        def faces(first, second, across, along):
            tf, ts = t[first], t[second]
            value = 2 * tf * ts / (tf + ts) * across / along
            for barrier in barriers:
                hit = np.zeros(value.shape, dtype=bool)
                line = barrier["lineM"]
                for start, end in zip(line[:-1], line[1:]):
                    hit |= crosses(start, end, self.x[first], self.y[first], self.x[second], self.y[second])
                value = np.where(hit, value * barrier["transmissibilityFactor"], value)
            return number[first].ravel(), number[second].ravel(), value.ravel()

        west_of, east_of = np.s_[:, :-1], np.s_[:, 1:]
        south_of, north_of = np.s_[:-1, :], np.s_[1:, :]
        ax, bx, tx = faces(west_of, east_of, self.dy, self.dx)
        ay, by, ty = faces(south_of, north_of, self.dx, self.dy)
        a, b, value = np.concatenate([ax, ay]), np.concatenate([bx, by]), np.concatenate([tx, ty])
        diagonal = np.zeros(self.count)
        np.add.at(diagonal, a, value)
        np.add.at(diagonal, b, value)
        sides = {
            "west": (np.s_[:, 0], self.dy, self.dx),
            "east": (np.s_[:, -1], self.dy, self.dx),
            "south": (np.s_[0, :], self.dx, self.dy),
            "north": (np.s_[-1, :], self.dx, self.dy),
        }
        for side, (cells, across, along) in sides.items():
            if reservoir["boundary"][side] == "fixedPressure":
                diagonal[number[cells]] += t[cells] * across / (along / 2)
        everything = np.arange(self.count)
        self.flow = sp.csr_matrix(
            (
                np.concatenate([-value, -value, diagonal]),
                (np.concatenate([a, b, everything]), np.concatenate([b, a, everything])),
            ),
            shape=(self.count, self.count),
        )
        self.capacity = (self.storativity * self.dx * self.dy).ravel()

    def cell_of(self, x, y):
        column = min(self.cells_x - 1, max(0, int(math.floor(x / self.dx))))
        row = min(self.cells_y - 1, max(0, int(math.floor(y / self.dy))))
        return row * self.cells_x + column

    def _wells(self, reservoir):
        self.wells = self.scenario["wells"]
        self.initial_pressure = reservoir["initialPressurePa"]
        self.well_names = [well["name"] for well in self.wells]
        self.well_cells = np.array([self.cell_of(well["xM"], well["yM"]) for well in self.wells])
        self.well_signs = np.array([1.0 if well["kind"] == "injector" else -1.0 for well in self.wells])
        equivalent_radius = 0.14 * math.hypot(self.dx, self.dy)
        # Pressure in the well above its cell's, per unit of injection (Peaceman 1978).
        self.well_resistance = np.array(
            [
                reservoir["viscosityPaS"]
                / (2 * math.pi * self.permeability_thickness.ravel()[cell])
                * (math.log(equivalent_radius / well["radiusM"]) + well.get("skin", 0))
                for well, cell in zip(self.wells, self.well_cells)
            ]
        )
        self.heat_per_m3 = np.array(
            [(well.get("heatJPerM3") or 0.0) if well["kind"] == "producer" else 0.0 for well in self.wells]
        )
        self.observers = self.scenario.get("observers", [])
        self.observer_cells = [self.cell_of(point["xM"], point["yM"]) for point in self.observers]

    def _seismicity(self, seismicity):
        self.loading_time = seismicity["aSigmaPa"] / seismicity["stressingRatePaPerYear"] * YEAR_S
        # Exponent g per pascal of overpressure.
        self.stress_per_pressure = seismicity["friction"] / seismicity["aSigmaPa"]
        weight = np.full(self.x.shape, float(seismicity.get("elsewhereWeight", 1)))
        zone_of = np.full(self.x.shape, -1)
        self.zones = seismicity.get("zones", [])
        for index, zone in enumerate(self.zones):
            member = inside_polygon(self.x, self.y, zone["polygonM"])
            weight[member] = zone["weight"]
            zone_of[member] = index
        per_second = seismicity["backgroundEventsPerYear"] / YEAR_S
        self.background = (per_second * weight / weight.sum()).ravel()
        self.zone_of = zone_of.ravel()

    def split_by_zone(self, per_cell):
        return [float(per_cell[self.zone_of == index].sum()) for index in range(len(self.zones))]

    # Rates ------------------------------------------------------------------------------------------------

    def history_steps(self):
        """Sorted list of (time, well, signed rate) and the last signed rate of each well."""
        steps = []
        last = np.zeros(len(self.wells))
        for entry in self.scenario.get("history", []):
            well = self.well_names.index(entry["well"])
            ordered = sorted(entry["steps"], key=lambda step: step["fromS"])
            for step in ordered:
                steps.append((float(step["fromS"]), well, self.well_signs[well] * step["rateM3PerS"]))
            if ordered:
                last[well] = self.well_signs[well] * ordered[-1]["rateM3PerS"]
        steps.sort(key=lambda step: step[0])
        return steps, last

    def given_rates(self, weeks):
        """Signed weekly rates (wells × weeks) as the file gives them; the last history rate where it does not."""
        _, last = self.history_steps()
        rates = np.repeat(last[:, None], weeks, axis=1)
        for entry in self.scenario.get("rates", []):
            well = self.well_names.index(entry["well"])
            values = entry["weeklyM3PerS"]
            values = values * weeks if len(values) == 1 else (values + values[-1:] * weeks)[:weeks]
            rates[well] = self.well_signs[well] * np.array(values, dtype=float)
        return rates


def read_scenario(path):
    with open(path, encoding="utf-8") as file:
        scenario = json.load(file)
    if scenario.get("format") != "stillfield-scenario/1":
        raise ValueError("format: stillfield-scenario/1 expected")
    return scenario


def weekly(values, weeks):
    """A one-entry weekly list holds for all weeks."""
    return np.array(values * weeks if len(values) == 1 else values[:weeks], dtype=float)
