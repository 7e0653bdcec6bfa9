/**
 * What the model costs, each part beside a baseline measured in the same run: `npm run bench`.
 *
 * Seconds of different machines cannot be compared, ratios can. Each part runs in a process of its own, so that its
 * peak memory is its own.
 */
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

import { SECONDS_PER_DAY, SECONDS_PER_WEEK } from '../../models/constants';
import { amplitudesAt } from '../../models/diffusion/amplitudes';
import { DiffusionOperator } from '../../models/diffusion/operator';
import { buildResponseLibrary, type WellResponse } from '../../models/diffusion/response-library';
import { stepPressure } from '../../models/diffusion/time-stepping';
import { buildGrid, cellAt, type Grid } from '../../models/grid/grid';
import { buildFieldModel } from '../../models/scenario/field-model';
import { forecastScenario, givenRates } from '../../models/scenario/forecast-scenario';
import { checkByTimeStepping } from '../../models/scenario/independent-check';
import { planScenario } from '../../models/scenario/plan-scenario';
import { benchScenario } from './bench-scenario';

const SIZE = { cells: 80, wells: 10, weeks: 12, lookAheadWeeks: 12 };

interface Line {
  what: string;
  seconds: number;
  baseline: string;
  baselineSeconds: number;
  notes: string;
}

const seconds = (from: number) => (performance.now() - from) / 1000;

/** Unit responses of all wells for 24 weeks, against implicit steps to about the same accuracy. */
function benchLibrary(): Line {
  const scenario = benchScenario(SIZE);
  const grid = buildGrid(scenario.reservoir);
  const cells = scenario.wells.map((well) => cellAt(grid, well.xM, well.yM));
  const longestS = 24 * SECONDS_PER_WEEK;
  const started = performance.now();
  const { wells } = buildResponseLibrary(new DiffusionOperator(grid), cells, { longestS });
  const own = seconds(started);

  const daysS = [1, 7, 84, 168].map((day) => day * SECONDS_PER_DAY);
  const refined = stepped(grid, cells[0]!, daysS, 0.05);
  const steppedStart = performance.now();
  const plain = cells.map((cell) => stepped(grid, cell, daysS, 0.25));
  const baselineSeconds = seconds(steppedStart);
  const worst = (found: Float64Array[]) =>
    Math.max(...found.map((field, at) => largestDifference(field, refined[at]!) / refined[at]![cells[0]!]!));
  return {
    what: 'response library',
    seconds: own,
    baseline: 'TR-BDF2 steps, one well after another',
    baselineSeconds,
    notes: `error at days 1, 7, 84, 168: ${worst(fields(wells[0]!, daysS)).toExponential(1)}, baseline ${worst(plain[0]!).toExponential(1)}`,
  };
}

function fields(response: WellResponse, timesS: number[]): Float64Array[] {
  const rows = amplitudesAt(response, [{ fromS: 0, rateM3PerS: 1 }], timesS);
  return timesS.map((_, at) =>
    Float64Array.from({ length: response.modes.length / response.count }, (__, cell) => {
      let sum = 0;
      for (let k = 0; k < response.count; k++) {
        sum += response.modes[cell * response.count + k]! * rows[at * response.count + k]!;
      }
      return sum;
    }),
  );
}

function stepped(grid: Grid, cell: number, timesS: number[], share: number): Float64Array[] {
  const operator = new DiffusionOperator(grid);
  const pressure = new Float64Array(operator.size);
  const found: Float64Array[] = [];
  stepPressure(
    operator,
    pressure,
    [0, ...timesS],
    (interval, source) => {
      if (interval > 0) found.push(pressure.slice());
      source[cell]! += 1;
    },
    { tolerancePa: Infinity, firstStepS: 3600 * share, shareSinceChange: share, longestStepS: Infinity },
    () => {},
  );
  return [...found, pressure];
}

const largestDifference = (a: Float64Array, b: Float64Array) =>
  a.reduce((most, value, at) => Math.max(most, Math.abs(value - b[at]!)), 0);

/** A forecast from a scenario, against implicit steps for pressure and seismicity. */
function benchForecast(): Line {
  const scenario = benchScenario(SIZE);
  const started = performance.now();
  const { totals } = forecastScenario(scenario);
  const own = seconds(started);
  const steppedStart = performance.now();
  const model = buildFieldModel(scenario, SIZE.weeks + SIZE.lookAheadWeeks);
  const rates = givenRates(model);
  const libraryShare = seconds(steppedStart);
  const check = checkByTimeStepping(model, rates, 2);
  return {
    what: 'forecast',
    seconds: own,
    baseline: 'TR-BDF2 steps through history and horizon',
    baselineSeconds: seconds(steppedStart) - libraryShare,
    notes: `expected events differ by ${Math.abs(check.expectedEvents / totals.expectedEvents - 1).toExponential(1)}`,
  };
}

/** The plan, against what its rounds would cost if each needed a stepped forecast and differences as gradients. */
async function benchPlan(): Promise<Line> {
  const scenario = benchScenario(SIZE);
  const started = performance.now();
  const plan = await planScenario(scenario);
  const own = seconds(started);
  const model = buildFieldModel(scenario, SIZE.weeks + SIZE.lookAheadWeeks);
  const steppedStart = performance.now();
  checkByTimeStepping(model, givenRates(model), 1);
  const variables = SIZE.wells * SIZE.weeks;
  return {
    what: 'plan',
    seconds: own,
    baseline: `${plan.rounds} rounds of stepped forecasts with one difference for each of ${variables} rates (one timed, the rest counted)`,
    baselineSeconds: seconds(steppedStart) * plan.rounds * (variables + 1),
    notes: `${plan.rounds} rounds, gap ${(100 * plan.gap).toFixed(3)} %, ${plan.totals.rateMultiple.toFixed(3)} × background, hold ${plan.comparison.hold.rateMultiple.toFixed(3)} ×`,
  };
}

const PARTS: Record<string, () => Line | Promise<Line>> = {
  library: benchLibrary,
  forecast: benchForecast,
  plan: benchPlan,
};

const [only] = process.argv.slice(2);
if (only) {
  const line = await PARTS[only]!();
  const memoryMiB = Math.round(process.resourceUsage().maxRSS / 1024);
  process.stdout.write(JSON.stringify({ ...line, memoryMiB }));
} else {
  console.log(
    `${SIZE.wells} wells, ${SIZE.weeks} + ${SIZE.lookAheadWeeks} weeks, ${SIZE.cells} × ${SIZE.cells} cells\n`,
  );
  for (const part of Object.keys(PARTS)) {
    const { status, stdout, stderr } = spawnSync(
      process.execPath,
      ['--import', 'tsx', fileURLToPath(import.meta.url), part],
      { encoding: 'utf8' },
    );
    if (status !== 0) throw new Error(`${part} failed: ${stderr}`);
    const line = JSON.parse(stdout) as Line & { memoryMiB: number };
    console.log(`${line.what}: ${line.seconds.toFixed(2)} s, peak ${line.memoryMiB} MiB`);
    console.log(
      `  ${(line.baselineSeconds / line.seconds).toFixed(1)} × faster than: ${line.baseline} (${line.baselineSeconds.toFixed(1)} s)`,
    );
    console.log(`  ${line.notes}\n`);
  }
}
