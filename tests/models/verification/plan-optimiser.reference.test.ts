import { describe, expect, it } from 'vitest';

import { NumericalError, StoppedError } from '../../../models/errors';
import {
  cutAt,
  InfeasibleError,
  minimiseConvex,
  type ConvexProgram,
  type ConvexValue,
} from '../../../models/planning/cutting-plane';
import { LinearProgram, linearSolver } from '../../../models/planning/linear-program';

/** A convex program over a box; state what matters. */
function program(
  changes: Partial<ConvexProgram> & Pick<ConvexProgram, 'evaluate'>,
  size: number,
): ConvexProgram {
  return {
    lower: new Float64Array(size).fill(0),
    upper: new Float64Array(size).fill(10),
    rows: [],
    startPoints: [],
    leastPart: 0,
    ...changes,
  };
}

const sumIs = (total: number, size = 2) => ({
  lower: total,
  upper: total,
  indices: Array.from({ length: size }, (_, v) => v),
  values: new Array<number>(size).fill(1),
});

describe('linear programs with prices', () => {
  // Computed by hand (non-degenerate, unique): max 1.2q1 + q2 + 0.8q3, q1+q2+q3 ≤ 120, 0.5q1+0.25q2+0.1q3 ≤ 35,
  // 0 ≤ q ≤ 60 has the optimum (35, 60, 25), value 122, row prices 0.7 and 1.0, bound price 0.05 on q2.
  const solve = async (firstSide: number, secondSide: number) => {
    const lp = new LinearProgram(await linearSolver());
    for (const gain of [1.2, 1, 0.8]) lp.addColumn(-gain, 0, 60);
    lp.addRow({ lower: -Infinity, upper: firstSide, indices: [0, 1, 2], values: [1, 1, 1] });
    lp.addRow({ lower: -Infinity, upper: secondSide, indices: [0, 1, 2], values: [0.5, 0.25, 0.1] });
    const answer = lp.solve();
    lp.dispose();
    return answer!;
  };

  it('finds the optimum and its duals', async () => {
    const { x, objective, rowDual, columnDual } = await solve(120, 35);
    [35, 60, 25].forEach((value, v) => expect(x[v]).toBeCloseTo(value, 9));
    expect(-objective).toBeCloseTo(122, 9);
    expect(-rowDual[0]).toBeCloseTo(0.7, 9);
    expect(-rowDual[1]).toBeCloseTo(1, 9);
    [0, 0.05, 0].forEach((value, v) => expect(-columnDual[v]).toBeCloseTo(value, 9));
  });

  it('a price is what a unit of give is worth', async () => {
    expect(-(await solve(121, 35)).objective).toBeCloseTo(122.7, 9);
    expect(-(await solve(120, 36)).objective).toBeCloseTo(123, 9);
  });
});

describe('cutting planes against water-filling', () => {
  // Stationarity e^q1 = 2 e^q2 with q1 + q2 = 10: q1 = 5 + ln(2)/2.
  const best = 5 + Math.LN2 / 2;
  const exponentials = ([q1, q2]: Float64Array): ConvexValue => ({
    parts: [Math.exp(q1), 2 * Math.exp(q2)],
    gradients: [Float64Array.of(Math.exp(q1), 0), Float64Array.of(0, 2 * Math.exp(q2))],
  });
  const softplus = (x: number) => Math.log1p(Math.exp(x));
  const logistic = (x: number) => 1 / (1 + Math.exp(-x));
  const logarithms = ([q1, q2]: Float64Array): ConvexValue => ({
    parts: [softplus(q1), softplus(q2 + Math.LN2)],
    gradients: [Float64Array.of(logistic(q1), 0), Float64Array.of(0, logistic(q2 + Math.LN2))],
  });
  it.each([
    ['exponentials', exponentials, 419.775805],
    ['logarithms of exponentials', logarithms, 10.7026534],
  ])('%s', async (_name, evaluate, value) => {
    const found = await minimiseConvex(program({ evaluate, rows: [sumIs(10)] }, 2), {
      relativeGap: 1e-9,
      mostRounds: 200,
    });
    expect(found.value / value - 1).toBeLessThan(1e-7);
    expect(found.value / value - 1).toBeGreaterThan(-1e-7);
    expect(found.lowerBound).toBeLessThanOrEqual(found.value);
    expect(found.x[0]).toBeCloseTo(best, 3);
  });

  it('cuts bound from below as worked by hand', () => {
    // N(x) = e^x + 2e^(10−x) on [4, 6]: the cut at 5 alone gives 296.826318, with the one at 6 369.180757.
    const cut = (x: number) => {
      const slope = Math.exp(x) - 2 * Math.exp(10 - x);
      return cutAt(Float64Array.of(x), 0, Math.exp(x) + 2 * Math.exp(10 - x), Float64Array.of(slope));
    };
    const [five, six] = [cut(5), cut(6)];
    const at = (line: typeof five, x: number) => line.constant + line.gradient[0] * x;
    expect(Math.min(at(five, 4), at(five, 6))).toBeCloseTo(296.826318, 5);
    const crossing = (six.constant - five.constant) / (five.gradient[0] - six.gradient[0]);
    expect(at(five, crossing)).toBeCloseTo(369.180757, 5);
  });

  it('the bound never passes the optimum and the best value never falls below it', async () => {
    for (const mostRounds of [2, 3, 4, 5, 6, 8]) {
      const found = await minimiseConvex(program({ evaluate: exponentials, rows: [sumIs(10)] }, 2), {
        relativeGap: 0,
        mostRounds,
      });
      expect(found.lowerBound).toBeLessThanOrEqual(419.775805 * (1 + 1e-9));
      expect(found.value).toBeGreaterThanOrEqual(419.775804);
    }
  });

  it('a start point saves rounds and changes nothing else', async () => {
    const options = { relativeGap: 1e-6, mostRounds: 200 };
    const cold = await minimiseConvex(program({ evaluate: exponentials, rows: [sumIs(10)] }, 2), options);
    const startPoints = [Float64Array.of(best, 10 - best)];
    const warm = await minimiseConvex(
      program({ evaluate: exponentials, rows: [sumIs(10)], startPoints }, 2),
      options,
    );
    expect(Math.abs(warm.value / cold.value - 1)).toBeLessThan(2e-6);
    expect(warm.rounds).toBeLessThan(cold.rounds);
  });
});

describe('what the search refuses', () => {
  const square = ([q]: Float64Array): ConvexValue => ({
    parts: [q * q],
    gradients: [Float64Array.of(2 * q)],
  });

  it('a wrong gradient shows as a value below a cut', async () => {
    const wrong = ([q]: Float64Array): ConvexValue => ({
      parts: [(q - 3) ** 2 + 1],
      gradients: [Float64Array.of(-2 * (q - 3))],
    });
    const attempt = minimiseConvex(program({ evaluate: wrong, startPoints: [Float64Array.of(5)] }, 1), {
      relativeGap: 1e-9,
      mostRounds: 50,
    });
    await expect(attempt).rejects.toThrow(NumericalError);
  });

  it('a part that is not convex shows as a value below a cut', async () => {
    const concave = ([q]: Float64Array): ConvexValue => ({
      parts: [200 - q * q],
      gradients: [Float64Array.of(-2 * q)],
    });
    const attempt = minimiseConvex(program({ evaluate: concave, startPoints: [Float64Array.of(5)] }, 1), {
      relativeGap: 1e-9,
      mostRounds: 50,
    });
    await expect(attempt).rejects.toThrow(NumericalError);
  });

  it('limits that collide, with the rows known by then', async () => {
    const rows = [sumIs(30)];
    const attempt = minimiseConvex(program({ evaluate: square, rows }, 2), {
      relativeGap: 1e-6,
      mostRounds: 5,
    });
    await expect(attempt).rejects.toThrow(InfeasibleError);
    await attempt.catch((error: InfeasibleError) => expect(error.rows).toEqual(rows));
  });

  it('a linear objective inside a disc: the corner of the disc, certified from outside', async () => {
    // max q1 + q2 subject to q1² + q2² ≤ 8: (2, 2), value 4 (by symmetry, or Cauchy–Schwarz: 4² ≤ 2·8).
    const evaluate = ([q1, q2]: Float64Array): ConvexValue => {
      const value = (q1 * q1 + q2 * q2) / 8;
      const [g1, g2] = [q1 / 4, q2 / 4];
      const limit = {
        lower: -Infinity,
        upper: 1 - value + g1 * q1 + g2 * q2,
        indices: [0, 1],
        values: [g1, g2],
      };
      return { parts: [], gradients: [], limitRows: value > 0.9 ? [limit] : [], breaksLimit: value > 1 };
    };
    const found = await minimiseConvex(program({ evaluate, cost: Float64Array.of(-1, -1) }, 2), {
      relativeGap: 1e-3,
      mostRounds: 100,
    });
    expect(found.x[0]! ** 2 + found.x[1]! ** 2).toBeLessThanOrEqual(8);
    expect(found.value).toBeGreaterThanOrEqual(-4);
    expect(found.value).toBeLessThan(-4 * (1 - 1e-3));
    expect(found.lowerBound).toBeLessThanOrEqual(-4);
  });

  it('going on after a stop', async () => {
    const attempt = minimiseConvex(program({ evaluate: square }, 1), {
      relativeGap: 1e-6,
      mostRounds: 5,
      shouldStop: () => true,
    });
    await expect(attempt).rejects.toThrow(StoppedError);
  });

  it('a row that is found broken on the way is kept', async () => {
    const row = { lower: 2, upper: Infinity, indices: [0], values: [1] };
    const found = await minimiseConvex(
      program({ evaluate: square, violatedRows: ([q]) => (q < 2 - 1e-9 ? [row] : []) }, 1),
      { relativeGap: 1e-9, mostRounds: 60 },
    );
    expect(found.x[0]).toBeCloseTo(2, 6);
    expect(found.rows).toContain(row);
  });
});
