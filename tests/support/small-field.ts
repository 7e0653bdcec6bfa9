import type { DemoField } from '../../server/demo/types';
import { addWeeks, weekStartOf } from '../../server/time/local-week';

export const SMALL_FIELD_ZONE = 'Europe/Berlin';

/** The least field that a plan can be made for: one producer, two injectors, a fixed one, a monitor. */
export function buildSmallField(nowAt: number, weeksOfHistory = 8): DemoField {
  const timeZone = SMALL_FIELD_ZONE;
  const nowWeek = weekStartOf(nowAt, timeZone);
  const weeks = Array.from({ length: weeksOfHistory }, (_, index) =>
    addWeeks(nowWeek, index - weeksOfHistory, timeZone),
  );
  const rates: Record<string, number> = { 'P-1': 0.04, 'I-1': 0.02, 'I-2': 0.012, 'I-3': 0.008 };
  const well = {
    radiusM: 0.1,
    skin: 0,
    control: true,
    minRateM3PerS: 0,
    maxRateM3PerS: 0.06,
    maxChangeM3PerSPerWeek: 0.01,
    minPressurePa: null,
    maxPressurePa: null,
    heatJPerM3: 0,
    outages: [],
  };
  return {
    name: 'Small Fen',
    place: 'Nowhere in particular',
    timeZone,
    reservoir: {
      widthM: 4000,
      heightM: 4000,
      cellsX: 20,
      cellsY: 20,
      thicknessM: 200,
      permeabilityM2: 2e-14,
      storagePerPa: 1.2e-10,
      viscosityPaS: 2.2e-4,
      initialPressurePa: 2e7,
      densityKgPerM3: 930,
      boundary: { west: 'noFlow', east: 'fixedPressure', south: 'noFlow', north: 'fixedPressure' },
      regions: [],
      barriers: [],
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
            [0, 0],
            [4000, 0],
            [4000, 1200],
            [0, 1200],
          ],
          weight: 4,
        },
      ],
      elsewhereWeight: 0.2,
    },
    wells: [
      { ...well, name: 'P-1', kind: 'producer', xM: 2000, yM: 2600, minRateM3PerS: 0.01, heatJPerM3: 4.6e8 },
      { ...well, name: 'I-1', kind: 'injector', xM: 1000, yM: 900 },
      { ...well, name: 'I-2', kind: 'injector', xM: 3000, yM: 3000, outages: [{ fromWeek: 2, toWeek: 2 }] },
      { ...well, name: 'I-3', kind: 'injector', xM: 3000, yM: 1000, control: false },
    ],
    monitors: [{ name: 'M-1', xM: 1500, yM: 1500 }],
    weeklyRates: weeks.flatMap((weekStartsAt) =>
      Object.entries(rates).map(([name, rateM3PerS]) => ({ well: name, weekStartsAt, rateM3PerS })),
    ),
    events: weeks.map((weekStartsAt, index) => ({
      publicId: `small-${index}`,
      at: weekStartsAt + 3_600_000 * (index + 1),
      xM: 1200,
      yM: 800,
      depthM: 2400,
      magnitude: 0.6 + index * 0.1,
      magnitudeType: 'ML',
    })),
    heatTargetJPerWeek: Array.from({ length: 26 }, () => 1.1e13),
    rateMultipleLimit: 2,
  };
}
