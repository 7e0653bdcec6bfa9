import type { Scenario, WellSpec } from '../../models/scenario/types';

export const WEEK_S = 604_800;

type Well = Partial<WellSpec> & Pick<WellSpec, 'name' | 'kind' | 'xM' | 'yM'>;

/** A well of the small field; state what matters. */
export function well(changes: Well): WellSpec {
  return {
    radiusM: 0.108,
    skin: 0,
    control: true,
    minRateM3PerS: 0,
    maxRateM3PerS: 0.05,
    maxChangeM3PerSPerWeek: 0.008,
    minPressurePa: null,
    maxPressurePa: null,
    heatJPerM3: changes.kind === 'producer' ? 4.6e8 : 0,
    outages: [],
    ...changes,
  };
}

/**
 * A quick field that can be planned for: two producers and three injectors on 24 × 20 cells, half a year of
 * history that loads the south, six weeks and eight of look-ahead.
 */
export function smallScenario(): Scenario {
  const rates: Record<string, [number, number]> = {
    'P-1': [0.03, 0.032],
    'P-2': [0.02, 0.022],
    'I-1': [0.012, 0.026],
    'I-2': [0.018, 0.016],
    'I-3': [0.02, 0.012],
  };
  return {
    format: 'stillfield-scenario/1',
    reservoir: {
      widthM: 4800,
      heightM: 4000,
      cellsX: 24,
      cellsY: 20,
      thicknessM: 250,
      permeabilityM2: 2e-14,
      storagePerPa: 1.2e-10,
      viscosityPaS: 2.2e-4,
      initialPressurePa: 2e7,
      densityKgPerM3: 930,
      boundary: { west: 'fixedPressure', east: 'noFlow', south: 'noFlow', north: 'noFlow' },
      regions: [],
      barriers: [
        {
          name: 'middle fault',
          lineM: [
            [2400, 900],
            [2400, 2900],
          ],
          transmissibilityFactor: 0.05,
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
        {
          name: 'south strand',
          polygonM: [
            [400, 300],
            [4400, 300],
            [4400, 1100],
            [400, 1100],
          ],
          weight: 4,
        },
      ],
      elsewhereWeight: 0.2,
    },
    wells: [
      well({ name: 'P-1', kind: 'producer', xM: 1500, yM: 2500, minRateM3PerS: 0.01 }),
      well({ name: 'P-2', kind: 'producer', xM: 3300, yM: 2300, heatJPerM3: 4.4e8 }),
      well({ name: 'I-1', kind: 'injector', xM: 1100, yM: 1300 }),
      well({ name: 'I-2', kind: 'injector', xM: 3700, yM: 1500 }),
      well({ name: 'I-3', kind: 'injector', xM: 2700, yM: 3500 }),
    ],
    history: Object.entries(rates).map(([name, [first, last]]) => ({
      well: name,
      steps: [
        { fromS: -26 * WEEK_S, rateM3PerS: first },
        { fromS: -8 * WEEK_S, rateM3PerS: last },
      ],
    })),
    rates: [],
    plan: {
      weeks: 6,
      lookAheadWeeks: 8,
      objective: 'quietest',
      heatTargetJPerWeek: [1.47e13],
      heatCeilingJPerWeek: [1.5e13],
      lossFraction: 0,
      caps: [],
      setPointStepM3PerS: null,
      polishTolerance: 0,
    },
    observers: [{ name: 'OB-1', xM: 2000, yM: 700 }],
  };
}
