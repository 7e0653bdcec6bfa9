import { describe, expect, it } from 'vitest';

import { gutenbergRichterMagnitude, SeededRandom } from '../../../models/catalogue/random';

const DRAWS = 200_000;
const draw = (from: (random: SeededRandom) => number, seed = 7) => {
  const random = new SeededRandom(seed);
  return Array.from({ length: DRAWS }, () => from(random));
};
const meanOf = (values: number[]) => values.reduce((a, b) => a + b, 0) / values.length;
const varianceOf = (values: number[]) => {
  const mean = meanOf(values);
  return meanOf(values.map((value) => (value - mean) ** 2));
};

describe('seeded random numbers', () => {
  it('the seed decides', () => {
    expect(draw((random) => random.next(), 3)).toEqual(draw((random) => random.next(), 3));
    expect(new SeededRandom(3).next()).not.toBe(new SeededRandom(4).next());
  });

  it('fill [0, 1) evenly, in single draws and in pairs', () => {
    const values = draw((random) => random.next());
    for (const value of values) if (!(value >= 0 && value < 1)) throw new Error(`${value} is outside`);
    // χ² with 15 and 255 degrees of freedom; the 99.9 % points are 37.7 and 330.5 (any statistics table).
    const chiSquared = (boxes: number, box: (index: number) => number, draws: number) => {
      const counts = new Array<number>(boxes).fill(0);
      for (let index = 0; index < draws; index++) counts[box(index)]++;
      return counts.reduce((sum, count) => sum + (count - draws / boxes) ** 2 / (draws / boxes), 0);
    };
    expect(chiSquared(16, (index) => Math.floor(values[index] * 16), DRAWS)).toBeLessThan(37.7);
    const pair = (index: number) =>
      Math.floor(values[2 * index] * 16) * 16 + Math.floor(values[2 * index + 1] * 16);
    expect(chiSquared(256, pair, DRAWS / 2)).toBeLessThan(330.5);
  });

  it('normal: mean 0, variance 1', () => {
    const values = draw((random) => random.normal());
    expect(Math.abs(meanOf(values))).toBeLessThan(4 / Math.sqrt(DRAWS));
    expect(Math.abs(varianceOf(values) - 1)).toBeLessThan(4 * Math.sqrt(2 / DRAWS));
  });

  it.each([0.3, 1.7, 6])('Poisson of mean %f: mean and variance are both that', (mean) => {
    const values = draw((random) => random.poisson(mean));
    expect(Math.abs(meanOf(values) - mean)).toBeLessThan(4 * Math.sqrt(mean / DRAWS));
    expect(Math.abs(varianceOf(values) / mean - 1)).toBeLessThan(0.03);
  });

  it('refuse what they cannot draw from', () => {
    const random = new SeededRandom(1);
    for (const mean of [-1, NaN, 501]) expect(() => random.poisson(mean)).toThrow(RangeError);
    expect(() => gutenbergRichterMagnitude(random, 0.5, 0)).toThrow(RangeError);
    expect(random.poisson(0)).toBe(0);
  });

  it('magnitudes give back their b-value by Aki (1965)', () => {
    const magnitudes = draw((random) => gutenbergRichterMagnitude(random, 0.5, 1.1));
    const b = Math.LOG10E / (meanOf(magnitudes) - 0.5);
    expect(Math.abs(b - 1.1)).toBeLessThan((4 * 1.1) / Math.sqrt(DRAWS));
  });
});
