"""The quietest plan of a scenario, with a certified lower bound.

Unit responses come from time stepping once for all wells; expected events over the plan's weeks and the look-ahead are
then a convex function of the weekly rates with an exact gradient, and every other limit is linear. Two ways to the
optimum: cutting planes in a trust region with linear programmes (HiGHS), or SLSQP. Both report a lower bound: every
linearisation of a convex function lies below it (Kelley 1960).
"""

import numpy as np
import scipy.sparse as sp
from scipy.optimize import linprog, minimize

from field import WEEK_S, weekly
from forecast import forecast, run_history, summary
from march import March, source_of

WITHIN_WEEK_NODES = 16  # Gauss points in a plan week, crowded towards its beginning
LOOK_AHEAD_NODES = 3
RATE_UNIT = 1e-3  # the programme's variables are in litres per second
PRESSURE_UNIT = 1e5
HEAT_UNIT = 1e12
CUT_GROUPS = 8


class Infeasible(Exception):
    pass


def within_week():
    """Times and weights of ∫ over a week: Gauss-Legendre in ξ, s = week · ξ³."""
    x, w = np.polynomial.legendre.leggauss(WITHIN_WEEK_NODES)
    x, w = (x + 1) / 2, w / 2
    return WEEK_S * x**3, WEEK_S * w * 3 * x**2


def look_ahead_week():
    x, w = np.polynomial.legendre.leggauss(LOOK_AHEAD_NODES)
    return WEEK_S * (x + 1) / 2, WEEK_S * w / 2


class Responses:
    """Pressure of every cell for one unit of injection per control well, and the field if nothing were changed."""

    def __init__(self, field, weeks, look_ahead, refine=1):
        self.field, self.weeks, self.look_ahead = field, weeks, look_ahead
        self.early, self.early_weights = within_week()
        self.late, self.late_weights = look_ahead_week()
        march = March(field, refine, max_step=2 * WEEK_S)
        duration = (weeks + look_ahead) * WEEK_S
        self.control = [i for i, well in enumerate(field.wells) if well.get("control", True)]
        # Nodes: plan weeks × early offsets plus the week's end, then look-ahead weeks × late offsets.
        plan_times = [w * WEEK_S + s for w in range(weeks) for s in [*self.early, WEEK_S]]
        late_times = [w * WEEK_S + s for w in range(weeks + look_ahead) for s in self.late]
        pressure, self.log_rate, self.last, elapsed = run_history(field, March(field, refine, max_step=4 * WEEK_S))
        self.start_pressure = pressure
        hold = self._sample(march, pressure, source_of(field, self.last), elapsed, plan_times + late_times, duration)
        self.hold_plan, self.hold_late = hold[: len(plan_times)], hold[len(plan_times) + weeks * LOOK_AHEAD_NODES :]
        every = len(field.wells)
        unit = np.zeros((field.count, every))
        unit[field.well_cells, np.arange(every)] = 1.0
        response = self._sample(march, np.zeros_like(unit), unit, 0.0, plan_times + late_times, duration)
        nodes = WITHIN_WEEK_NODES + 1
        # [offset, lag, well, cell] and [late offset, lag, well, cell]
        self.plan_response = np.ascontiguousarray(
            response[: len(plan_times)].reshape(weeks, nodes, field.count, every).transpose(1, 0, 3, 2)
        )
        self.late_response = np.ascontiguousarray(
            response[len(plan_times) :]
            .reshape(weeks + look_ahead, LOOK_AHEAD_NODES, field.count, every)
            .transpose(1, 0, 3, 2)
        )

    @staticmethod
    def _sample(march, pressure, source, elapsed, times, duration):
        order = np.argsort(times, kind="stable")
        sampled = np.empty((len(times), *pressure.shape))
        at = 0
        for step in march.run(pressure, source, 0.0, duration, elapsed):
            end = step.start + step.length
            while at < len(order) and times[order[at]] <= end * (1 + 1e-12):
                sampled[order[at]] = step.at((times[order[at]] - step.start) / step.length)
                at += 1
        assert at == len(order)
        return sampled


class Objective:
    """Expected events as a function of the signed weekly rates (wells × weeks), with its gradient, by cell group."""

    def __init__(self, responses):
        self.r = responses
        field = responses.field
        self.scale = field.background * field.loading_time
        self.cells = np.flatnonzero(self.scale > 0)
        everywhere = len(self.cells) == field.count
        pick = (lambda a: a) if everywhere else (lambda a: np.ascontiguousarray(a[..., self.cells]))
        self.plan_response = pick(responses.plan_response[:-1])
        self.late_response = pick(responses.late_response)
        k = field.stress_per_pressure
        start = responses.start_pressure[self.cells]
        weeks, nodes = responses.weeks, WITHIN_WEEK_NODES
        hold = responses.hold_plan.reshape(weeks, nodes + 1, -1)[:, :-1, self.cells]
        offset = np.log(1 / field.loading_time) + responses.log_rate[self.cells]
        times = np.arange(weeks)[:, None] * WEEK_S + responses.early
        # exponent + log weight at the nodes when the last rates are held
        self.base_plan = (
            k * (hold - start) + (times / field.loading_time + np.log(responses.early_weights))[:, :, None] + offset
        )
        late = responses.hold_late.reshape(responses.look_ahead, LOOK_AHEAD_NODES, field.count)[:, :, self.cells]
        times = (weeks + np.arange(responses.look_ahead))[:, None] * WEEK_S + responses.late
        self.base_late = (
            k * (late - start) + (times / field.loading_time + np.log(responses.late_weights))[:, :, None] + offset
        )
        self.k = k
        self.groups = self._groups()

    def _groups(self):
        """Cells grouped by the nearest well: each group's count is convex too, and gets cuts of its own."""
        field = self.r.field
        x, y = field.x.ravel()[self.cells], field.y.ravel()[self.cells]
        distance = np.stack([np.hypot(x - well["xM"], y - well["yM"]) for well in field.wells])
        return np.argmin(distance, axis=0) % CUT_GROUPS

    def _toeplitz(self, change):
        """Rows: weeks; columns: (lag, well) → change of the well's rate `lag` weeks earlier."""
        wells, weeks = change.shape
        matrix = np.zeros((weeks, weeks, wells))
        for lag in range(weeks):
            matrix[lag:, lag, :] = change[:, : weeks - lag].T
        return matrix.reshape(weeks, weeks * wells)

    def _late_toeplitz(self, change):
        wells, weeks = change.shape
        total = weeks + self.r.look_ahead
        matrix = np.zeros((self.r.look_ahead, total, wells))
        for row in range(self.r.look_ahead):
            for week in range(weeks):
                matrix[row, weeks + row - week, :] = change[:, week]
        return matrix.reshape(self.r.look_ahead, total * wells)

    def __call__(self, rates):
        """Events per group, and their gradients [group, well, week]."""
        wells, weeks = rates.shape
        change = np.diff(np.column_stack([self.r.last, rates]), axis=1)
        exponent_plan = self.base_plan.copy()
        toeplitz = self._toeplitz(change)
        flat = [self.plan_response[i].reshape(weeks * wells, -1) for i in range(WITHIN_WEEK_NODES)]
        for i in range(WITHIN_WEEK_NODES):
            exponent_plan[:, i] += self.k * (toeplitz @ flat[i])
        top = exponent_plan.max(axis=(0, 1))
        exponent_late = self.base_late.copy()
        if self.r.look_ahead:
            late_toeplitz = self._late_toeplitz(change)
            late_flat = [self.late_response[i].reshape((weeks + self.r.look_ahead) * wells, len(self.cells)) for i in range(LOOK_AHEAD_NODES)]
            for i in range(LOOK_AHEAD_NODES):
                exponent_late[:, i] += self.k * (late_toeplitz @ late_flat[i])
            top = np.maximum(top, exponent_late.max(axis=(0, 1)))
        top = np.maximum(top, 0.0)
        weight_plan, weight_late = np.exp(exponent_plan - top), np.exp(exponent_late - top)
        growth = np.exp(-top) + weight_plan.sum(axis=(0, 1)) + weight_late.sum(axis=(0, 1))
        events = self.scale[self.cells] * (top + np.log(growth))
        factor = self.scale[self.cells] * self.k / growth
        weight_plan *= factor
        weight_late *= factor
        values, gradients = np.zeros(CUT_GROUPS), np.zeros((CUT_GROUPS, wells, weeks))
        for group in range(CUT_GROUPS):
            member = np.flatnonzero(self.groups == group)
            if len(member) == 0:
                continue
            values[group] = events[member].sum()
            by_change = np.zeros((wells, weeks))
            for i in range(WITHIN_WEEK_NODES):
                # [week, lag, well] → the change `lag` weeks before the week
                part = (weight_plan[:, i, member] @ flat[i][:, member].T).reshape(weeks, weeks, wells)
                for lag in range(weeks):
                    by_change[:, : weeks - lag] += part[lag:, lag, :].T
            for i in range(LOOK_AHEAD_NODES if self.r.look_ahead else 0):
                part = (weight_late[:, i, member] @ late_flat[i][:, member].T).reshape(
                    self.r.look_ahead, weeks + self.r.look_ahead, wells
                )
                for row in range(self.r.look_ahead):
                    for week in range(weeks):
                        by_change[:, week] += part[row, weeks + row - week, :]
            # A week's rate is this week's change minus the next one's.
            gradients[group] = by_change - np.column_stack([by_change[:, 1:], np.zeros(wells)])
        return values, gradients


class Limits:
    """A_ub x ≤ b_ub, A_eq x = b_eq and bounds; x = control wells' magnitudes in l/s, well by well."""

    def __init__(self, field, responses):
        self.field, self.responses = field, responses
        scenario_plan = field.scenario["plan"]
        self.weeks = weeks = scenario_plan["weeks"]
        self.control = responses.control
        self.size = len(self.control) * weeks
        self.fixed = field.given_rates(weeks)  # signed; rows of control wells are replaced
        self.outage = np.zeros((len(field.wells), weeks), dtype=bool)
        for i, well in enumerate(field.wells):
            for outage in well.get("outages", []):
                self.outage[i, max(0, outage["fromWeek"] - 1) : outage["toWeek"]] = True
        self.rows_ub, self.rhs_ub, self.names_ub = [], [], []
        self.rows_eq, self.rhs_eq = [], []
        self._bounds()
        self._ramps()
        self._heat(scenario_plan)
        self._balance(scenario_plan)
        self._pressures()
        self.a_ub = np.array(self.rows_ub) if self.rows_ub else np.zeros((0, self.size))
        self.b_ub = np.array(self.rhs_ub)
        self.a_eq, self.b_eq = np.array(self.rows_eq), np.array(self.rhs_eq)

    def column(self, position, week):
        return position * self.weeks + week

    def rates_of(self, x):
        rates = self.fixed.copy()
        for position, i in enumerate(self.control):
            part = x[position * self.weeks : (position + 1) * self.weeks] * RATE_UNIT
            rates[i] = self.field.well_signs[i] * part
        return rates

    def x_of(self, rates):
        return np.concatenate([np.abs(rates[i]) / RATE_UNIT for i in self.control])

    def _bounds(self):
        self.bounds = []
        for i in self.control:
            well = self.field.wells[i]
            for week in range(self.weeks):
                if self.outage[i, week]:
                    self.bounds.append((0.0, 0.0))
                else:
                    self.bounds.append((well.get("minRateM3PerS", 0) / RATE_UNIT, well["maxRateM3PerS"] / RATE_UNIT))

    def _add(self, row, limit, name):
        self.rows_ub.append(row)
        self.rhs_ub.append(limit)
        self.names_ub.append(name)

    def _ramps(self):
        for position, i in enumerate(self.control):
            ramp = self.field.wells[i].get("maxChangeM3PerSPerWeek")
            if ramp is None:
                continue
            for week in range(self.weeks):
                if self.outage[i, week] or (week and self.outage[i, week - 1]):
                    continue
                row = np.zeros(self.size)
                row[self.column(position, week)] = 1.0
                before = 0.0
                if week:
                    row[self.column(position, week - 1)] = -1.0
                else:
                    before = abs(self.responses.last[i]) / RATE_UNIT
                name = f"ramp {self.field.well_names[i]} week {week + 1}"
                self._add(row, ramp / RATE_UNIT + before, name + " up")
                self._add(-row, ramp / RATE_UNIT - before, name + " down")

    def _heat(self, scenario_plan):
        factor = self.field.heat_per_m3 * WEEK_S / HEAT_UNIT
        for key, sign in (("heatTargetJPerWeek", -1), ("heatCeilingJPerWeek", 1)):
            values = scenario_plan.get(key)
            if not values:
                continue
            for week, value in enumerate(weekly(values, self.weeks)):
                row = np.zeros(self.size)
                fixed = 0.0
                for i in range(len(self.field.wells)):
                    if i in self.control:
                        row[self.column(self.control.index(i), week)] = factor[i] * RATE_UNIT
                    else:
                        fixed += factor[i] * abs(self.fixed[i, week])
                self._add(sign * row, sign * (value / HEAT_UNIT - fixed), f"{key} week {week + 1}")

    def _balance(self, scenario_plan):
        loss = scenario_plan.get("lossFraction", 0)
        loss = weekly(loss if isinstance(loss, list) else [loss], self.weeks)
        for week in range(self.weeks):
            row, fixed = np.zeros(self.size), 0.0
            for i, sign in enumerate(self.field.well_signs):
                factor = 1.0 if sign > 0 else -(1 - loss[week])
                if i in self.control:
                    row[self.column(self.control.index(i), week)] = factor
                else:
                    fixed += factor * abs(self.fixed[i, week]) / RATE_UNIT
            self.rows_eq.append(row)
            self.rhs_eq.append(-fixed)

    def _pressures(self):
        """A producer's least and an injector's greatest pressure, at the nodes of each plan week and its end."""
        field, responses, weeks = self.field, self.responses, self.weeks
        nodes = WITHIN_WEEK_NODES + 1
        hold = responses.hold_plan.reshape(weeks, nodes, -1)
        # Every node: after a rate change somewhere else a pressure may peak within the week.
        for i, well in enumerate(field.wells):
            injector = field.well_signs[i] > 0
            limit = well.get("maxPressurePa") if injector else well.get("minPressurePa")
            if limit is None:
                continue
            sign = 1.0 if injector else -1.0
            cell = field.well_cells[i]
            own = responses.plan_response[:, :, :, cell]  # [offset, lag, well]
            for week in range(weeks):
                for node in range(nodes):
                    row, constant = np.zeros(self.size), field.initial_pressure + hold[week, node, cell]
                    for other in range(len(field.wells)):
                        # d p / d (signed rate in week k) = S(lag) − S(lag − 1)
                        lags = own[node, : week + 1, other][::-1]
                        by_rate = lags.copy()
                        by_rate[:-1] -= lags[1:]
                        constant -= responses.last[other] * lags[0]
                        if other == i:
                            by_rate[week] += field.well_resistance[i]
                        if other in self.control:
                            position = self.control.index(other)
                            first = self.column(position, 0)
                            row[first : first + week + 1] += by_rate * field.well_signs[other] * RATE_UNIT
                        else:
                            constant += by_rate @ self.fixed[other, : week + 1]
                    self._add(
                        sign * row / PRESSURE_UNIT,
                        sign * (limit - constant) / PRESSURE_UNIT,
                        f"pressure {well['name']} week {week + 1} node {node}",
                    )


class Programme:
    """The cuts so far and the linear programmes over them."""

    def __init__(self, limits):
        self.limits = limits
        self.cuts, self.constants = [], []

    def add(self, x, values, gradients):
        for group in range(CUT_GROUPS):
            if values[group] <= 0:
                continue
            row = np.zeros(self.limits.size + CUT_GROUPS)
            row[: self.limits.size] = gradients[group]
            row[self.limits.size + group] = -1.0
            self.cuts.append(row)
            self.constants.append(gradients[group] @ x - values[group])

    def solve(self, centre=None, radius=None):
        limits = self.limits
        low, high = np.array(limits.bounds, dtype=float).T
        if centre is not None:
            low, high = np.maximum(low, centre - radius), np.minimum(high, centre + radius)
            high = np.maximum(low, high)
        a_ub = sp.csr_matrix(
            np.vstack([np.pad(limits.a_ub, ((0, 0), (0, CUT_GROUPS))), np.array(self.cuts)])
            if self.cuts
            else np.pad(limits.a_ub, ((0, 0), (0, CUT_GROUPS)))
        )
        a_eq = sp.csr_matrix(np.pad(limits.a_eq, ((0, 0), (0, CUT_GROUPS))))
        cost = np.concatenate([np.zeros(limits.size), np.ones(CUT_GROUPS)])
        answer = linprog(
            cost,
            A_ub=a_ub,
            b_ub=np.concatenate([limits.b_ub, self.constants]),
            A_eq=a_eq,
            b_eq=limits.b_eq,
            bounds=[*zip(low, high), *[(0.0, None)] * CUT_GROUPS],
            method="highs",
        )
        return answer


def by_x(limits, gradients):
    """Gradient with respect to the programme's variables, per group."""
    signs = limits.field.well_signs
    return np.stack(
        [np.concatenate([group[i] * signs[i] * RATE_UNIT for i in limits.control]) for group in gradients]
    )


def cutting_planes(objective, limits, tolerance, rounds=200):
    programme = Programme(limits)
    counts = {"evaluations": 0}

    def evaluate(x):
        values, gradients = objective(limits.rates_of(x))
        programme.add(x, values, by_x(limits, gradients))
        counts["evaluations"] += 1
        return values.sum()

    # The first cut where the last rates are held, feasible or not: a linearisation is a bound from anywhere.
    evaluate(limits.x_of(np.repeat(limits.responses.last[:, None], limits.weeks, axis=1)))
    answer = programme.solve()
    if answer.status != 0:
        raise Infeasible(answer.message)
    best = answer.x[: limits.size]
    best_value = evaluate(best)
    bound = answer.fun
    spread = np.array([high - low for low, high in limits.bounds])
    radius = 0.25
    for _ in range(rounds):
        answer = programme.solve()
        if answer.status == 0:
            bound = max(bound, answer.fun)
        if best_value - bound <= tolerance * best_value:
            break
        trial = programme.solve(best, radius * np.maximum(spread, 1e-9))
        if trial.status != 0:
            radius *= 2
            continue
        predicted = best_value - trial.fun
        value = evaluate(trial.x[: limits.size])
        if value < best_value - 0.1 * predicted:
            if value < best_value - 0.6 * predicted:
                radius = min(1.0, radius * 2)
            best, best_value = trial.x[: limits.size], value
        else:
            if value < best_value:
                best, best_value = trial.x[: limits.size], value
            radius = max(radius / 2, 1e-5)
    return best, best_value, bound, counts["evaluations"]


def slsqp(objective, limits, tolerance):
    counts = {"evaluations": 0}
    programme = Programme(limits)

    def fun(x):
        values, gradients = objective(limits.rates_of(x))
        gradients = by_x(limits, gradients)
        programme.add(x, values, gradients)
        counts["evaluations"] += 1
        return values.sum(), gradients.sum(axis=0)

    fun(limits.x_of(np.repeat(limits.responses.last[:, None], limits.weeks, axis=1)))
    start = programme.solve()
    if start.status != 0:
        raise Infeasible(start.message)
    answer = minimize(
        fun,
        start.x[: limits.size],
        jac=True,
        method="SLSQP",
        bounds=limits.bounds,
        constraints=[
            {"type": "ineq", "fun": lambda x: limits.b_ub - limits.a_ub @ x, "jac": lambda x: -limits.a_ub},
            {"type": "eq", "fun": lambda x: limits.a_eq @ x - limits.b_eq, "jac": lambda x: limits.a_eq},
        ],
        options={"maxiter": 300, "ftol": tolerance / 10},
    )
    return answer.x, answer.fun, programme.solve().fun, counts["evaluations"]


def unsupported(scenario):
    plan = scenario["plan"]
    found = [key for key in ("caps", "locks", "groups", "ensemble", "risk", "maxChangesPerWeek") if plan.get(key)]
    found += [f"{well['name']}.offOrAboveMin" for well in scenario["wells"] if well.get("offOrAboveMin")]
    if plan.get("objective", "quietest") != "quietest":
        found.append(f"objective {plan['objective']}")
    return found


def plan(field, method="cuts", tolerance=1e-5, refine=1):
    missing = unsupported(field.scenario)
    if missing:
        raise ValueError(f"the reference does not plan with {', '.join(missing)}")
    settings = field.scenario["plan"]
    weeks, look_ahead = settings["weeks"], settings.get("lookAheadWeeks", 26)
    responses = Responses(field, weeks, look_ahead, refine)
    objective = Objective(responses)
    limits = Limits(field, responses)
    solve = cutting_planes if method == "cuts" else slsqp
    x, value, bound, evaluations = solve(objective, limits, tolerance)
    rates = limits.rates_of(x)
    answer = summary(field, forecast(field, rates, look_ahead, refine))
    answer["rates"] = [
        {"well": name, "weeklyM3PerS": list(np.abs(rates[i]))} for i, name in enumerate(field.well_names)
    ]
    answer["expectedEvents"] = float(value)
    answer["lowerBound"] = float(bound)
    answer["gap"] = float((value - bound) / value)
    answer["check"] = {
        "expectedEvents": answer["totals"]["expectedEvents"],
        "relativeDifference": answer["totals"]["expectedEvents"] / float(value) - 1,
    }
    answer["rounds"] = evaluations
    return answer
