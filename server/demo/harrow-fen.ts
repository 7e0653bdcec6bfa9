/**
 * Harrow Fen: an invented field for demonstrations. No such place, wells or earthquakes exist.
 *
 * The story it tells: three producers deliver about 65 MW of heat. For half a year scale has been closing the
 * northern injectors a little, so the crew let the southern ones take more, and the south strand answered. With
 * today's rates held, the forecast stays well above background; the same heat can be had near background by
 * moving water back north and west, as far as the pumps and pressures there allow.
 */
import { gutenbergRichterMagnitude, SeededRandom } from '../../models/catalogue/random';
import { isInsidePolygon } from '../../models/grid/polygon';
import { forecastScenario } from '../../models/scenario/forecast-scenario';
import type { PointM, RatesSpec, ReservoirSpec, SeismicitySpec, WellSpec } from '../../models/scenario/types';
import { kelvinFromCelsius, SECOND_PER } from '../../models/units';
import { heatPerProducedVolumeJPerM3, liquidWater } from '../../models/water/liquid-water';
import { viscosityPaS } from '../../models/water/viscosity';
import { addWeeks, weekStartOf } from '../time/local-week';
import type { DemoField } from './types';

const TIME_ZONE = 'Europe/London';
const WEEKS_OF_HISTORY = 78;
const SEED = 20_260_907;

const PRODUCED_K = kelvinFromCelsius(140);
const REINJECTED_K = kelvinFromCelsius(70);
const RESERVOIR_PA = 21.5e6;
/** Heat is taken out at the surface, at the separators' pressure. */
const SURFACE_PA = 2e6;

const hotWater = liquidWater(PRODUCED_K, RESERVOIR_PA);

const reservoir: ReservoirSpec = {
  widthM: 6400,
  heightM: 6400,
  cellsX: 80,
  cellsY: 80,
  thicknessM: 220,
  permeabilityM2: 7e-14,
  storagePerPa: 1.5e-10,
  viscosityPaS: viscosityPaS(PRODUCED_K, hotWater.densityKgPerM3),
  initialPressurePa: RESERVOIR_PA,
  densityKgPerM3: hotWater.densityKgPerM3,
  boundary: { west: 'fixedPressure', east: 'noFlow', south: 'noFlow', north: 'fixedPressure' },
  regions: [
    {
      name: 'tight south',
      polygonM: rectangle(0, 0, 6400, 2200),
      permeabilityFactor: 0.4,
      storageFactor: 0.9,
    },
  ],
  barriers: [
    {
      name: 'Mill fault',
      lineM: [
        [4500, 1800],
        [4700, 3300],
        [4550, 5000],
      ],
      transmissibilityFactor: 0.05,
    },
  ],
};

const seismicity: SeismicitySpec = {
  friction: 0.6,
  aSigmaPa: 7e4,
  stressingRatePaPerYear: 4.2e4,
  backgroundEventsPerYear: 52,
  completenessMagnitude: 0.5,
  bValue: 1.05,
  zones: [
    {
      name: 'south strand',
      polygonM: [
        [900, 900],
        [4600, 1300],
        [4600, 1800],
        [900, 1400],
      ],
      weight: 5,
    },
    {
      name: 'Mill strand',
      polygonM: [
        [4850, 2400],
        [5300, 2400],
        [5350, 4800],
        [4800, 4800],
      ],
      weight: 4,
    },
  ],
  elsewhereWeight: 0.3,
};

const producer = (name: string, xM: number, yM: number): WellSpec => ({
  name,
  kind: 'producer',
  xM,
  yM,
  radiusM: 0.122,
  skin: -1,
  control: true,
  minRateM3PerS: 0.06,
  maxRateM3PerS: 0.09,
  maxChangeM3PerSPerWeek: 0.008,
  minPressurePa: 1.7e7,
  maxPressurePa: null,
  heatJPerM3: heatPerProducedVolumeJPerM3(PRODUCED_K, REINJECTED_K, SURFACE_PA),
  outages: [],
});

const injector = (name: string, xM: number, yM: number, changes: Partial<WellSpec> = {}): WellSpec => ({
  name,
  kind: 'injector',
  xM,
  yM,
  radiusM: 0.108,
  skin: 0,
  control: true,
  minRateM3PerS: 0.02,
  maxRateM3PerS: 0.055,
  maxChangeM3PerSPerWeek: 0.006,
  minPressurePa: null,
  maxPressurePa: 2.4e7,
  heatJPerM3: 0,
  outages: [],
  ...changes,
});

const wells: WellSpec[] = [
  producer('HF-1', 2300, 3700),
  producer('HF-2', 3300, 4100),
  producer('HF-3', 2900, 3300),
  injector('HF-4', 1300, 1600),
  injector('HF-5', 2600, 1700),
  injector('HF-6', 3800, 1950),
  injector('HF-7', 1200, 4700, { skin: 3, maxRateM3PerS: 0.042 }),
  injector('HF-8', 2600, 5300, { skin: 4, maxRateM3PerS: 0.042, outages: [{ fromWeek: 6, toWeek: 6 }] }),
  injector('HF-9', 5700, 4300, { maxRateM3PerS: 0.04 }),
  injector('HF-10', 3900, 5600, { control: false, maxChangeM3PerSPerWeek: null }),
];

const monitors = [
  { name: 'OB-1', xM: 2000, yM: 1200 },
  { name: 'OB-2', xM: 5000, yM: 3600 },
];

/** Shares of the injection at the beginning and today; the change came over the last half year. */
const INJECTION_SHARES: Record<string, [number, number]> = {
  'HF-4': [0.13, 0.165],
  'HF-5': [0.13, 0.19],
  'HF-6': [0.13, 0.165],
  'HF-7': [0.165, 0.12],
  'HF-8': [0.165, 0.115],
  'HF-9': [0.15, 0.12],
  'HF-10': [0.13, 0.125],
};
const PRODUCTION_M3_PER_S: Record<string, number> = { 'HF-1': 0.08, 'HF-2': 0.082, 'HF-3': 0.074 };
const SHIFT_WEEKS = 30;
/** What meters are read to, m³/s. */
const METER_STEP = 1e-4;

/** @param nowAt the history ends with the last complete week before it */
export function buildHarrowFen(nowAt: number): DemoField {
  const random = new SeededRandom(SEED);
  const thisWeekAt = weekStartOf(nowAt, TIME_ZONE);
  const weekAt = (week: number) => addWeeks(thisWeekAt, week - WEEKS_OF_HISTORY, TIME_ZONE);
  const rates = weeklyHistory(random);
  const heatJ = wells.reduce(
    (sum, { name, heatJPerM3 }) => sum + rates.get(name)!.at(-1)! * heatJPerM3 * SECOND_PER.week,
    0,
  );
  return {
    name: 'Harrow Fen',
    place: 'An invented field in flat country',
    timeZone: TIME_ZONE,
    reservoir,
    seismicity,
    wells,
    monitors,
    weeklyRates: [...rates].flatMap(([well, weekly]) =>
      weekly.map((rateM3PerS, week) => ({ well, weekStartsAt: weekAt(week), rateM3PerS })),
    ),
    events: syntheticCatalogue(random, rates, weekAt),
    heatTargetJPerWeek: Array.from({ length: 26 }, (_, week) => heatTarget(heatJ, week)),
    rateMultipleLimit: 1.5,
  };
}

/** A little less than today is sold in the coming weeks, a little more in the cold ones. */
const heatTarget = (todayJ: number, week: number) =>
  Math.round((todayJ * (week < 6 ? 0.98 : 0.99)) / (10 * 3.6e9)) * 10 * 3.6e9;

function weeklyHistory(random: SeededRandom): Map<string, number[]> {
  const rates = new Map<string, number[]>(wells.map(({ name }) => [name, []]));
  for (let week = 0; week < WEEKS_OF_HISTORY; week++) {
    const isLast = week === WEEKS_OF_HISTORY - 1;
    const wobble = () => (isLast ? 1 : 1 + 0.03 * random.normal());
    let produced = 0;
    for (const [name, rate] of Object.entries(PRODUCTION_M3_PER_S)) {
      const metered = toMeter(rate * wobble());
      rates.get(name)!.push(metered);
      produced += metered;
    }
    const shift = Math.min(1, Math.max(0, (week - (WEEKS_OF_HISTORY - 1 - SHIFT_WEEKS)) / SHIFT_WEEKS));
    const shares = Object.entries(INJECTION_SHARES).map(
      ([name, [before, today]]) => [name, (before + (today - before) * shift) * wobble()] as const,
    );
    const total = shares.reduce((sum, [, share]) => sum + share, 0);
    let left = produced;
    shares.forEach(([name, share], index) => {
      const isRest = index === shares.length - 1;
      const metered = toMeter(isRest ? left : (share / total) * produced);
      rates.get(name)!.push(metered);
      left -= metered;
    });
  }
  return rates;
}

const toMeter = (rateM3PerS: number) => Number((Math.round(rateM3PerS / METER_STEP) * METER_STEP).toFixed(4));

/** Events drawn from the model's own weekly counts: Poisson in number, Gutenberg–Richter in size. */
function syntheticCatalogue(
  random: SeededRandom,
  rates: Map<string, number[]>,
  weekAt: (week: number) => number,
): DemoField['events'] {
  // A coarse grid is quick and good enough to draw from.
  const { weeks } = forecastScenario({
    format: 'stillfield-scenario/1',
    reservoir: { ...reservoir, cellsX: 40, cellsY: 40 },
    seismicity,
    wells,
    history: [],
    rates: [...rates].map(([well, weeklyM3PerS]): RatesSpec => ({ well, weeklyM3PerS })),
    plan: null,
    observers: [],
  });
  const events: DemoField['events'] = [];
  weeks.forEach(({ expectedEvents, zones }, week) => {
    const inZones = zones.reduce((sum, zone) => sum + zone.expectedEvents, 0);
    const places = [
      ...zones.map((zone, index) => ({
        mean: zone.expectedEvents,
        polygon: seismicity.zones[index]!.polygonM,
      })),
      { mean: expectedEvents - inZones, polygon: null },
    ];
    for (const { mean, polygon } of places) {
      for (let left = random.poisson(mean); left > 0; left--) {
        const [xM, yM] = placeIn(random, polygon);
        events.push({
          publicId: '',
          at: Math.round(weekAt(week) + random.next() * (weekAt(week + 1) - weekAt(week))),
          xM,
          yM,
          depthM: Math.round(random.between(2100, 2900)),
          magnitude: Number(
            gutenbergRichterMagnitude(random, seismicity.completenessMagnitude, seismicity.bValue).toFixed(1),
          ),
          magnitudeType: 'ML',
        });
      }
    }
  });
  return events
    .sort((a, b) => a.at - b.at)
    .map((event, index) => ({ ...event, publicId: `hf-${String(index + 1).padStart(4, '0')}` }));
}

/** A point inside the polygon, or outside all zones where there is none; whole metres. */
function placeIn(random: SeededRandom, polygon: PointM[] | null): [number, number] {
  const isInside = (xM: number, yM: number) =>
    polygon
      ? isInsidePolygon(xM, yM, polygon)
      : seismicity.zones.every((zone) => !isInsidePolygon(xM, yM, zone.polygonM));
  for (;;) {
    const xM = Math.round(random.between(0, reservoir.widthM));
    const yM = Math.round(random.between(0, reservoir.heightM));
    if (isInside(xM, yM)) return [xM, yM];
  }
}

function rectangle(westM: number, southM: number, eastM: number, northM: number): PointM[] {
  return [
    [westM, southM],
    [eastM, southM],
    [eastM, northM],
    [westM, northM],
  ];
}
