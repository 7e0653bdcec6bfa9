// Stands in for the model where a test is about jobs and not about numbers. What it does is in its address:
// scripted-worker.mjs?do=instant | slow | late | deaf | leave | broken | impossible
import { parentPort, workerData } from 'node:worker_threads';

const script = new URL(import.meta.url).searchParams.get('do');
const { scenario, stopFlag } = workerData;
const stop = new Int32Array(stopFlag);

const scripts = {
  instant() {
    parentPort.postMessage({ type: 'progress', fraction: 0.5, step: 'Half way' });
    parentPort.postMessage({ type: 'done', result: resultFor(scenario) });
  },
  /** Goes on until it is asked to stop, and tells how far it is. */
  slow() {
    for (let round = 1; Atomics.load(stop, 0) === 0; round++) {
      parentPort.postMessage({
        type: 'progress',
        fraction: 1 - 1 / (1 + round / 20),
        step: `Round ${round}`,
      });
      Atomics.wait(stop, 0, 0, 50);
    }
    parentPort.postMessage({ type: 'stopped' });
  },
  /** Has its answer ready at the very moment it is asked to stop, and gives it all the same. */
  late() {
    parentPort.postMessage({ type: 'progress', fraction: 0.9, step: 'Nearly there' });
    Atomics.wait(stop, 0, 0);
    parentPort.postMessage({ type: 'done', result: resultFor(scenario) });
  },
  /** Never looks whether it should stop. */
  deaf() {
    parentPort.postMessage({ type: 'progress', fraction: 0.1, step: 'Not listening' });
    for (;;) Math.hypot(3, 4);
  },
  leave() {
    process.exit(7);
  },
  /** Ends with an answer that nobody can write down. */
  broken() {
    parentPort.postMessage({ type: 'done', result: { weeks: [] } });
  },
  impossible() {
    const failure = {
      code: 'NO_PLAN',
      message: 'No plan keeps every limit. These collide:',
      details: ['The heat target of week 1 is 120 MWh too high.'],
    };
    parentPort.postMessage({ type: 'failed', failure });
  },
};
scripts[script]();

function resultFor({ wells, plan, history, seismicity, observers }) {
  const background = (seismicity.backgroundEventsPerYear * 604_800) / 31_557_600;
  const weeks = Array.from({ length: plan.weeks + plan.lookAheadWeeks }, (_, index) => ({
    week: index + 1,
    expectedEvents: background * 1.1,
    rateMultiple: 1.1,
    zones: seismicity.zones.map(({ name }) => ({ name, expectedEvents: background / 2, rateMultiple: 1.2 })),
    wells: wells.map(({ name }) => ({
      name,
      bottomHoleEndPa: 2e7,
      bottomHoleMinPa: 1.9e7,
      bottomHoleMaxPa: 2.1e7,
    })),
    observers: observers.map(({ name }) => ({ name, overpressurePa: 1e4 })),
    heatJ: plan.heatTargetJPerWeek[0],
  }));
  const rates = wells.map(({ name }) => ({
    well: name,
    weeklyM3PerS: Array.from({ length: plan.weeks }, () => lastRate(history, name)),
  }));
  const total = background * 1.1 * weeks.length;
  const alternative = {
    expectedEvents: total * 1.5,
    rateMultiple: 1.65,
    heatJ: 1e13,
    weeklyRateMultiple: weeks.map(() => 1.65),
    weeklyHeatJ: weeks.map((week) => week.heatJ),
    meetsTargets: true,
    breaks: [],
    rates,
  };
  return {
    weeks,
    totals: {
      expectedEvents: total,
      backgroundEvents: background * weeks.length,
      rateMultiple: 1.1,
      heatJ: weeks.reduce((sum, week) => sum + week.heatJ, 0),
    },
    rates,
    expectedEvents: total,
    lowerBound: total * 0.999,
    gap: 0.001,
    binding: [],
    comparison: { hold: alternative, evenSplit: null },
    check: { expectedEvents: total, relativeDifference: 0.0004 },
    rounds: 15,
    seconds: 0.1,
    modelVersion: 'scripted',
    diagnostics: { cells: 400, responseModes: 20, responseErrorEstimate: 1e-6, warnings: [] },
  };
}

function lastRate(history, name) {
  return history.find((entry) => entry.well === name)?.steps.at(-1).rateM3PerS ?? 0;
}
