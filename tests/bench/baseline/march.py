"""Implicit time stepping of capacity · dp/dt = −flow · p + source, with constant sources between rate changes.

Alexander's three-stage, third-order, L-stable and stiffly accurate SDIRK scheme (Alexander 1977, SIAM J. Numer.
Anal. 14, 1006–1021): each step solves three systems with one sparse LU factorisation. Steps start short after
each change and lengthen in proportion to the time since it; between the step's ends a cubic Hermite polynomial
gives the pressure at any time.
"""

import math

import numpy as np
import scipy.sparse as sp
from scipy.sparse.linalg import splu

from field import WEEK_S

GAMMA = 0.43586652150845899942
A21 = (1 - GAMMA) / 2
B1 = -(6 * GAMMA**2 - 16 * GAMMA + 1) / 4
B2 = (6 * GAMMA**2 - 20 * GAMMA + 5) / 4

STEPS_PER_LEVEL = 6
FIRST_LEVEL = 10  # the first level ends a week / 2^10 (ten minutes) after the change


class Step:
    """One step: pressures and their time derivatives at both ends."""

    __slots__ = ("start", "length", "p0", "d0", "p1", "d1")

    def __init__(self, start, length, p0, d0, p1, d1):
        self.start, self.length = start, length
        self.p0, self.d0, self.p1, self.d1 = p0, d0, p1, d1

    def at(self, fraction, rows=slice(None)):
        h, s = self.length, fraction
        return (
            (1 + 2 * s) * (1 - s) ** 2 * self.p0[rows]
            + s * (1 - s) ** 2 * h * self.d0[rows]
            + s * s * (3 - 2 * s) * self.p1[rows]
            + s * s * (s - 1) * h * self.d1[rows]
        )


class March:
    def __init__(self, field, refine=1, max_step=WEEK_S):
        self.field = field
        self.per_level = STEPS_PER_LEVEL * refine
        self.max_step = max_step / refine
        self.capacity_matrix = sp.diags(field.capacity)
        self.factors = {}

    def _factor(self, length):
        key = round(length, 6)
        if key not in self.factors:
            if len(self.factors) > 60:
                self.factors.pop(next(iter(self.factors)))
            matrix = (self.capacity_matrix + GAMMA * length * self.field.flow).tocsc()
            self.factors[key] = splu(
                matrix, permc_spec="MMD_AT_PLUS_A", diag_pivot_thresh=0.0, options={"SymmetricMode": True}
            )
        return self.factors[key]

    def derivative(self, pressure, source):
        rate = source - self.field.flow @ pressure
        return rate / (self.field.capacity if rate.ndim == 1 else self.field.capacity[:, None])

    def _step(self, pressure, source, length):
        factor, flow = self._factor(length), self.field.flow
        k1 = factor.solve(source - flow @ pressure)
        k2 = factor.solve(source - flow @ (pressure + (length * A21) * k1))
        k3 = factor.solve(source - flow @ (pressure + (length * B1) * k1 + (length * B2) * k2))
        return pressure + length * (B1 * k1 + B2 * k2 + GAMMA * k3)

    def lengths(self, duration, elapsed=0.0):
        """Steps that fill `duration` when `elapsed` seconds have passed since the last change."""
        end = elapsed + duration
        time = elapsed
        tolerance = 1e-9 * max(end, 1.0)
        while end - time > tolerance:
            level = WEEK_S / 2**FIRST_LEVEL
            while time >= level - tolerance:
                level *= 2
            base = 0.0 if level <= WEEK_S / 2**FIRST_LEVEL else level / 2
            length = min((level - base) / self.per_level, self.max_step)
            span = min(level, end) - time
            # A whole number of equal steps to the end of this level, or to the end of the piece.
            count = max(1, math.ceil(span / length - 1e-9))
            for _ in range(count):
                yield span / count
            time = min(level, end)

    def run(self, pressure, source, start, duration, elapsed=0.0):
        """Yields the steps from `start` on; `source` is constant over `duration`."""
        time, derivative = start, self.derivative(pressure, source)
        for length in self.lengths(duration, elapsed):
            after = self._step(pressure, source, length)
            after_derivative = self.derivative(after, source)
            yield Step(time, length, pressure, derivative, after, after_derivative)
            time, pressure, derivative = time + length, after, after_derivative


def source_of(field, signed_rates):
    source = np.zeros(field.count)
    np.add.at(source, field.well_cells, signed_rates)
    return source
