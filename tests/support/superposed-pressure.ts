import { amplitudesAt } from '../../models/diffusion/amplitudes';
import { DiffusionOperator } from '../../models/diffusion/operator';
import { buildResponseLibrary } from '../../models/diffusion/response-library';
import { buildGrid, cellAt } from '../../models/grid/grid';
import type { ReservoirSpec } from '../../models/scenario/types';

export interface SteppedWell {
  at: [number, number];
  /** Time in seconds and signed rate from then on, injection positive. */
  steps: [number, number][];
}

/** Overpressure at points and ascending times by the response library: result[point][time], Pa. */
export function superposedPressure(
  reservoir: ReservoirSpec,
  wells: SteppedWell[],
  points: [number, number][],
  timesS: number[],
): number[][] {
  const grid = buildGrid(reservoir);
  const cells = wells.map(({ at }) => cellAt(grid, ...at));
  const library = buildResponseLibrary(new DiffusionOperator(grid), cells, { longestS: timesS.at(-1)! });
  const result = points.map(() => timesS.map(() => 0));
  library.wells.forEach((response, j) => {
    const steps = wells[j].steps.map(([fromS, rateM3PerS]) => ({ fromS, rateM3PerS }));
    const rows = amplitudesAt(response, steps, timesS);
    points.forEach((point, p) => {
      const from = cellAt(grid, ...point) * response.count;
      timesS.forEach((_, t) => {
        for (let k = 0; k < response.count; k++) {
          result[p][t] += response.modes[from + k] * rows[t * response.count + k];
        }
      });
    });
  });
  return result;
}
