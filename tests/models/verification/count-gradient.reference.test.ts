import { describe, expect, it } from 'vitest';

import { buildFieldModel, type FieldModel } from '../../../models/scenario/field-model';
import { checkByTimeStepping } from '../../../models/scenario/independent-check';
import {
  gradientByRates,
  prepareSeismicRun,
  runForward,
  withLongLookAhead,
  type SeismicRun,
} from '../../../models/scenario/seismic-run';
import { SeededRandom } from '../../../models/catalogue/random';
import { smallScenario } from '../../support/small-scenario';

const WEEKS = 6;

function prepared(aSigmaPa: number): { model: FieldModel; run: SeismicRun } {
  const scenario = smallScenario();
  scenario.seismicity.aSigmaPa = aSigmaPa;
  const model = buildFieldModel(scenario, 14);
  return {
    model,
    run: prepareSeismicRun(
      model,
      Array.from({ length: 14 }, (_, week) => week < WEEKS),
    ),
  };
}

function randomRates(model: FieldModel, random: SeededRandom): Float64Array[] {
  return model.wells.map(() => Float64Array.from({ length: WEEKS }, () => random.between(0.005, 0.045)));
}

const total = (run: SeismicRun, rates: Float64Array[]) =>
  runForward(run, rates).partEvents.reduce((a, b) => a + b, 0);

describe('the gradient of the discretised count (adjoint)', () => {
  it.each([
    [1.5e5, false],
    [1.5e5, true],
    [2e4, false],
  ])('against sixth-order differences, aσ = %f Pa, long look-ahead %s', (aSigmaPa, long) => {
    const { model, run: weekly } = prepared(aSigmaPa);
    const run = long ? withLongLookAhead(weekly, WEEKS) : weekly;
    const rates = randomRates(model, new SeededRandom(5));
    const parts = runForward(run, rates, [run.panels.panels.length]).gradients[0]!;
    const gradient = model.wells.map((_, j) => {
      const sum = new Float64Array(WEEKS);
      for (const part of parts)
        gradientByRates(run, part, WEEKS)[j].forEach((value, week) => (sum[week] += value));
      return sum;
    });
    const scale = Math.max(...gradient.map((row) => Math.max(...row.map(Math.abs))));
    const at = (j: number, week: number, change: number) => {
      const changed = rates.map((row) => row.slice());
      changed[j][week] += change;
      return total(run, changed);
    };
    const h = 4e-4;
    for (let j = 0; j < model.wells.length; j++) {
      for (const week of [0, 3, WEEKS - 1]) {
        // Sixth-order central difference (Fornberg 1988, Math. Comp. 51, 699–706, table 1).
        const difference =
          (45 * (at(j, week, h) - at(j, week, -h)) -
            9 * (at(j, week, 2 * h) - at(j, week, -2 * h)) +
            (at(j, week, 3 * h) - at(j, week, -3 * h))) /
          (60 * h);
        expect(Math.abs(gradient[j][week] - difference) / scale, `${j}/${week}`).toBeLessThan(1e-7);
      }
    }
  });

  it('counts as many weeks as asked for', () => {
    const { model, run } = prepared(1.5e5);
    const rates = randomRates(model, new SeededRandom(8));
    const upTo = 4;
    const sumTo = (changed: Float64Array[]) =>
      runForward(run, changed)
        .counts.slice(0, upTo * 2)
        .reduce((a, b) => a + b, 0);
    const [parts] = runForward(run, rates, [upTo]).gradients;
    const slope = parts!.reduce((sum, part) => sum + gradientByRates(run, part, WEEKS)[2]![1]!, 0);
    const at = (change: number) => {
      const changed = rates.map((row) => row.slice());
      changed[2]![1]! += change;
      return sumTo(changed);
    };
    const h = 1e-3;
    const difference = (8 * (at(h) - at(-h)) - (at(2 * h) - at(-2 * h))) / (12 * h);
    expect(Math.abs(slope / difference - 1)).toBeLessThan(1e-7);
    // Weeks after the last one counted do not matter.
    const late = parts!.reduce((sum, part) => sum + gradientByRates(run, part, WEEKS)[2]![5]!, 0);
    expect(late).toBe(0);
  });

  it('every part has its own, and the parts add up', () => {
    const { model, run } = prepared(1.5e5);
    const rates = randomRates(model, new SeededRandom(6));
    const count = runForward(run, rates, [14]);
    const byWeek = count.counts.reduce((a, b) => a + b, 0);
    const byPart = count.partEvents.reduce((a, b) => a + b, 0);
    expect(byPart / byWeek).toBeCloseTo(1, 12);
    expect(count.gradients[0]).toHaveLength(count.partEvents.length);
  });
});

describe('convexity of the discretised count', () => {
  it('holds for 150 random pairs of plans, and every linearisation is a lower bound', () => {
    const { model, run } = prepared(5e4);
    const random = new SeededRandom(11);
    for (let pair = 0; pair < 150; pair++) {
      const [first, second] = [randomRates(model, random), randomRates(model, random)];
      const middle = first.map((row, j) => row.map((value, week) => (value + second[j][week]) / 2));
      const [a, b, m] = [total(run, first), total(run, second), total(run, middle)];
      expect(m).toBeLessThanOrEqual(((a + b) / 2) * (1 + 1e-12));
    }
    const base = randomRates(model, random);
    const count = runForward(run, base, [14]);
    const slopes = model.wells.map((_, j) =>
      count.gradients[0]!.reduce(
        (sum, part) => gradientByRates(run, part, WEEKS)[j].map((value, week) => value + sum[week]),
        new Float64Array(WEEKS),
      ),
    );
    const here = count.partEvents.reduce((sum, value) => sum + value, 0);
    for (let trial = 0; trial < 150; trial++) {
      const there = randomRates(model, random);
      let line = here;
      there.forEach((row, j) =>
        row.forEach((value, week) => (line += slopes[j][week] * (value - base[j][week]))),
      );
      expect(total(run, there)).toBeGreaterThanOrEqual(line - 1e-9 * here);
    }
  });
});

describe('weekly counts against refined time-stepping', () => {
  it.each([1.5e5, 5e4, 2e4])('within 0.2 percent, aσ = %f Pa', (aSigmaPa) => {
    const { model, run } = prepared(aSigmaPa);
    const rates = randomRates(model, new SeededRandom(21));
    const found = runForward(run, rates);
    const refined = checkByTimeStepping(model, rates, 8);
    expect(refined.groups).toBe(found.groups);
    found.counts.forEach((value, at) => expect(Math.abs(value / refined.counts[at] - 1)).toBeLessThan(2e-3));
  });

  it('and with stresses of hundreds of aσ, where a plain exponential overflows', () => {
    const { model, run } = prepared(400);
    const rates = randomRates(model, new SeededRandom(23));
    const found = runForward(run, rates);
    const refined = checkByTimeStepping(model, rates, 8);
    const [total, checked] = [found, refined].map(({ counts }) => counts.reduce((a, b) => a + b, 0));
    expect(Math.max(...found.logRateEnd.map(Math.abs))).toBeGreaterThan(300);
    for (const value of found.counts) expect(Number.isFinite(value) && value >= 0).toBe(true);
    expect(Math.abs(total / checked - 1)).toBeLessThan(2e-3);
  });

  it('the plain check is good for its one percent', () => {
    const { model } = prepared(2e4);
    const rates = randomRates(model, new SeededRandom(22));
    const plain = checkByTimeStepping(model, rates, 1);
    const refined = checkByTimeStepping(model, rates, 6);
    expect(Math.abs(plain.expectedEvents / refined.expectedEvents - 1)).toBeLessThan(2e-3);
  });
});
