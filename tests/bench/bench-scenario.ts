import { SECONDS_PER_WEEK } from '../../models/constants';
import type { Scenario, WellSpec } from '../../models/scenario/types';

export interface BenchSize {
  cells: number;
  wells: number;
  weeks: number;
  lookAheadWeeks: number;
}

/** Steps of a fixed sequence in [0, 1): Weyl's with the golden ratio, the same on every machine. */
function* spread(): Generator<number, never> {
  for (let n = 1; ; n++) yield (n * 0.6180339887498949) % 1;
}

/**
 * A field of any size: every third well a producer, a year and a half of weekly history, a tight layer, a fault
 * that hardly lets water through, two zones, pressure limits; the heat of the last week is wanted again.
 */
export function benchScenario({ cells, wells: wellCount, weeks, lookAheadWeeks }: BenchSize): Scenario {
  const next = spread();
  const between = (low: number, high: number) => low + (high - low) * next.next().value;
  const wells: WellSpec[] = [];
  const history: Scenario['history'] = [];
  for (let j = 0; j < wellCount; j++) {
    const isProducer = j % 3 === 0;
    const name = `${isProducer ? 'P' : 'I'}-${j + 1}`;
    wells.push({
      name,
      kind: isProducer ? 'producer' : 'injector',
      xM: between(700, 5300),
      yM: between(700, 5300),
      radiusM: 0.108,
      skin: 0,
      control: true,
      minRateM3PerS: 0,
      maxRateM3PerS: 0.06,
      maxChangeM3PerSPerWeek: 0.008,
      minPressurePa: isProducer ? 1.1e7 : null,
      maxPressurePa: isProducer ? null : 2.8e7,
      heatJPerM3: isProducer ? between(4e8, 4.8e8) : 0,
      outages: [],
    });
    const base = isProducer ? 0.036 : 0.018;
    history.push({
      well: name,
      steps: Array.from({ length: 78 }, (_, week) => ({
        fromS: (week - 78) * SECONDS_PER_WEEK,
        rateM3PerS: base * between(0.7, 1.3),
      })),
    });
  }
  balanceLastWeek(wells, history);
  const lastRate = (j: number) => history[j].steps.at(-1)!.rateM3PerS;
  const heatJ = wells.reduce((sum, spec, j) => sum + spec.heatJPerM3 * lastRate(j) * SECONDS_PER_WEEK, 0);
  return {
    format: 'stillfield-scenario/1',
    reservoir: {
      widthM: 6000,
      heightM: 6000,
      cellsX: cells,
      cellsY: cells,
      thicknessM: 250,
      permeabilityM2: 2e-14,
      storagePerPa: 1.2e-10,
      viscosityPaS: 2.2e-4,
      initialPressurePa: 2e7,
      densityKgPerM3: 930,
      boundary: { west: 'fixedPressure', east: 'noFlow', south: 'noFlow', north: 'fixedPressure' },
      regions: [
        {
          name: 'tight south',
          polygonM: rectangle(0, 0, 6000, 1800),
          permeabilityFactor: 0.5,
          storageFactor: 1,
        },
      ],
      barriers: [
        {
          name: 'east fault',
          lineM: [
            [3900, 1200],
            [3900, 4800],
          ],
          transmissibilityFactor: 0.02,
        },
      ],
    },
    seismicity: {
      friction: 0.6,
      aSigmaPa: 1.5e5,
      stressingRatePaPerYear: 3750,
      backgroundEventsPerYear: 24,
      completenessMagnitude: 0.5,
      bValue: 1,
      zones: [
        { name: 'south strand', polygonM: rectangle(600, 1000, 4000, 1800), weight: 4 },
        { name: 'east strand', polygonM: rectangle(3900, 2000, 4700, 5000), weight: 3 },
      ],
      elsewhereWeight: 0.2,
    },
    wells,
    history,
    rates: [],
    plan: {
      weeks,
      lookAheadWeeks,
      objective: 'quietest',
      heatTargetJPerWeek: [heatJ],
      heatCeilingJPerWeek: [1.02 * heatJ],
      lossFraction: 0,
      caps: [],
      setPointStepM3PerS: null,
      polishTolerance: 0,
    },
    observers: [],
  };
}

/** Scales the injectors' last week so that it takes back what was produced. */
function balanceLastWeek(wells: WellSpec[], history: Scenario['history']): void {
  const total = (kind: WellSpec['kind']) =>
    history.reduce((sum, { steps }, j) => (wells[j].kind === kind ? sum + steps.at(-1)!.rateM3PerS : sum), 0);
  const factor = total('producer') / total('injector');
  history.forEach(({ steps }, j) => {
    if (wells[j].kind === 'injector') steps[steps.length - 1].rateM3PerS *= factor;
  });
}

function rectangle(west: number, south: number, east: number, north: number): [number, number][] {
  return [
    [west, south],
    [east, south],
    [east, north],
    [west, north],
  ];
}
