import { lusolve, sparse, type Matrix } from 'mathjs';
import { describe, expect, it } from 'vitest';

import { DiffusionOperator } from '../../../models/diffusion/operator';
import { NumericalError } from '../../../models/errors';
import { buildGrid, cellAt, type Grid } from '../../../models/grid/grid';
import { isInsidePolygon, polygonArea } from '../../../models/grid/polygon';
import { analyse, factorise, solveInPlace } from '../../../models/linalg/sparse-cholesky';
import { buildBackground } from '../../../models/seismicity/background';
import type { PointM, ReservoirSpec } from '../../../models/scenario/types';
import { smallScenario } from '../../support/small-scenario';

const square: PointM[] = [
  [0, 0],
  [10, 0],
  [10, 10],
  [0, 10],
];

const grid = (changes: Partial<ReservoirSpec> = {}): Grid =>
  buildGrid({
    ...smallScenario().reservoir,
    barriers: [],
    widthM: 1200,
    heightM: 1000,
    cellsX: 12,
    cellsY: 10,
    ...changes,
  });

describe('polygons', () => {
  it('inside, outside, and a dent', () => {
    const dented: PointM[] = [...square, [5, 5]];
    expect(isInsidePolygon(5, 8, square)).toBe(true);
    expect(isInsidePolygon(2, 5, dented)).toBe(false);
    expect(isInsidePolygon(8, 5, dented)).toBe(true);
    expect(isInsidePolygon(11, 5, square)).toBe(false);
    expect(polygonArea(square)).toBe(100);
    expect(polygonArea(dented)).toBe(75);
  });
});

describe('regions', () => {
  it('a cell belongs to the last region that holds its centre', () => {
    const box = (to: number): PointM[] => [
      [0, 0],
      [to, 0],
      [to, 1000],
      [0, 1000],
    ];
    const { transmissivity, storageM3PerPa } = grid({
      regions: [
        { name: 'wide', polygonM: box(600), permeabilityFactor: 0.1, storageFactor: 1 },
        { name: 'narrow', polygonM: box(260), permeabilityFactor: 3, storageFactor: 2 },
      ],
    });
    const plain = (2e-14 * 250) / 2.2e-4;
    expect(transmissivity[1] / plain).toBeCloseTo(3, 12);
    expect(transmissivity[2] / plain).toBeCloseTo(3, 12); // its centre is at 250 m
    expect(transmissivity[3] / plain).toBeCloseTo(0.1, 12);
    expect(transmissivity[6] / plain).toBeCloseTo(1, 12);
    expect(storageM3PerPa[0] / storageM3PerPa[6]).toBeCloseTo(2, 12);
  });
});

describe('barriers', () => {
  const barred = (lineM: PointM[], transmissibilityFactor = 0) =>
    grid({ barriers: [{ name: 'fault', lineM, transmissibilityFactor }] });
  const changedFaces = (changed: Grid) => {
    const plain = grid();
    const count = (a: Float64Array, b: Float64Array) =>
      a.reduce((sum, value, i) => sum + (value === b[i] ? 0 : 1), 0);
    return [
      count(changed.eastM3PerPaS, plain.eastM3PerPaS),
      count(changed.northM3PerPaS, plain.northM3PerPaS),
    ];
  };

  it('a straight one closes one face a row', () => {
    expect(
      changedFaces(
        barred([
          [600, 0],
          [600, 1000],
        ]),
      ),
    ).toEqual([10, 0]);
    expect(
      changedFaces(
        barred([
          [0, 480],
          [1200, 480],
        ]),
      ),
    ).toEqual([0, 12]);
  });

  it('through a row of centres it still closes one row of faces', () => {
    expect(
      changedFaces(
        barred([
          [650, 0],
          [650, 1000],
        ]),
      ),
    ).toEqual([10, 0]);
  });

  it('one that falls short of the line between two centres closes nothing', () => {
    expect(
      changedFaces(
        barred([
          [600, 1],
          [600, 49],
        ]),
      ),
    ).toEqual([0, 0]);
  });

  it('a face crossed twice by one barrier is multiplied once', () => {
    const zigzag = barred(
      [
        [580, 40],
        [620, 60],
        [580, 80],
      ],
      0.5,
    );
    const face = cellAt(zigzag, 550, 50);
    expect(zigzag.eastM3PerPaS[face] / grid().eastM3PerPaS[face]).toBeCloseTo(0.5, 12);
  });

  it('a sealed one lets nothing through', () => {
    const sealed = barred([
      [600, -10],
      [600, 1010],
    ]);
    for (let iy = 0; iy < 10; iy++) expect(sealed.eastM3PerPaS[iy * 12 + 5]).toBe(0);
  });
});

describe('sparse Cholesky', () => {
  it('solves as mathjs’s sparse LU does', () => {
    const rough = grid({
      boundary: { west: 'fixedPressure', east: 'noFlow', south: 'noFlow', north: 'fixedPressure' },
      barriers: [
        {
          name: 'fault',
          lineM: [
            [600, 0],
            [600, 700],
          ],
          transmissibilityFactor: 0.01,
        },
      ],
    });
    const operator = new DiffusionOperator(rough);
    const size = operator.size;
    const gammaS = 86_400;
    const dense = Array.from({ length: size }, (_, column) => {
      const unit = new Float64Array(size);
      unit[column] = 1;
      const image = new Float64Array(size);
      operator.apply(unit, image);
      return Array.from(
        image,
        (value, row) => gammaS * value + (row === column ? rough.storageM3PerPa[row] : 0),
      );
    });
    const right = Array.from({ length: size }, (_, i) => Math.sin(3 * i + 1));
    const reference = (lusolve(sparse(dense), right) as Matrix).toArray() as number[][];
    const found = Float64Array.from(right);
    operator.solveShifted(gammaS, found);
    const largest = Math.max(...reference.map(([value]) => Math.abs(value)));
    reference.forEach(([value], i) => expect(Math.abs(found[i] - value) / largest).toBeLessThan(1e-11));
  });
});

describe('a matrix that is not positive definite', () => {
  it('is an error, not a number', () => {
    // [[1, 2], [2, 1]] has the eigenvalues 3 and −1.
    const matrix = {
      size: 2,
      columnStart: Int32Array.of(0, 1, 3),
      rowIndex: Int32Array.of(0, 0, 1),
      value: Float64Array.of(1, 2, 1),
    };
    expect(() => factorise(matrix, analyse(matrix))).toThrow(NumericalError);
    const definite = { ...matrix, value: Float64Array.of(4, 2, 5) };
    const x = Float64Array.of(8, 22);
    solveInPlace(factorise(definite, analyse(definite)), x);
    expect([...x]).toEqual([-0.25, 4.5]);
  });
});

describe('background', () => {
  it('adds up to the total, by weight, and the parts cover every cell once', () => {
    const { seismicity, reservoir } = smallScenario();
    const background = buildBackground(buildGrid(reservoir), seismicity);
    const perS = 24 / 31_557_600;
    expect(background.ratePerS.reduce((a, b) => a + b, 0) / perS).toBeCloseTo(1, 12);
    expect(background.groupRatePerS.reduce((a, b) => a + b, 0) / perS).toBeCloseTo(1, 12);
    const [inside, outside] = [background.ratePerS[0], background.ratePerS[background.groupStart[1]]];
    expect(inside / outside).toBeCloseTo(4 / 0.2, 9);
    expect(new Set(background.cells).size).toBe(480);
    expect(background.partStart.at(-1)).toBe(480);
    background.partGroup.forEach((group, part) => {
      expect(background.partStart[part]).toBeGreaterThanOrEqual(background.groupStart[group]);
      expect(background.partStart[part + 1]).toBeLessThanOrEqual(background.groupStart[group + 1]);
    });
  });
});
