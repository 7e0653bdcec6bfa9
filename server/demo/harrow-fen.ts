/**
 * Harrow Fen: an invented field for demonstrations. No such place, wells or earthquakes exist.
 *
 * The story it tells: three producers deliver about 65 MW of heat. For half a year scale has been closing the
 * northern injectors a little, so the crew let the southern ones take more, and the south strand answered: with
 * today's rates held, the forecast stays well above twice the background. The same heat can be had near background
 * by moving water back north and west, as far as the pumps there allow. That undoes the load of half a year and no
 * more, so the forecast settles at the background instead of far below it.
 *
 * Ground and rates lie within what is usual for sedimentary fields: kh 16 D·m, φ·c_t 7e-11 1/Pa, aσ 0.05 MPa,
 * τ̇₀ 0.006 MPa/yr (so t_a is 8 years), 30 to 80 l/s a well (common practice, no source).
 */
import { SeededRandom } from '../../models/catalogue/random';
import type { PointM, ReservoirSpec, SeismicitySpec, WellSpec } from '../../models/scenario/types';
import { JOULE_PER, kelvinFromCelsius, SECOND_PER } from '../../models/units';
import { heatPerProducedVolumeJPerM3, liquidWater } from '../../models/water/liquid-water';
import { viscosityPaS } from '../../models/water/viscosity';
import { addWeeks, weekStartOf } from '../time/local-week';
import { syntheticCatalogue } from './synthetic-catalogue';
import type { DemoField } from './types';

const TIME_ZONE = 'Europe/London';
const WEEKS_OF_HISTORY = 78;
/** Of many possible catalogues one that shows the rise of the last months about as clearly as the model expects. */
const SEED = 3;

const PRODUCED_K = kelvinFromCelsius(140);
const REINJECTED_K = kelvinFromCelsius(70);
const RESERVOIR_PA = 21.5e6;
/** Heat is taken out at the surface, at the separators' pressure. */
const SURFACE_PA = 2e6;

const hotWater = liquidWater(PRODUCED_K, RESERVOIR_PA);
const HEAT_J_PER_M3 = heatPerProducedVolumeJPerM3(PRODUCED_K, REINJECTED_K, SURFACE_PA);

const reservoir: ReservoirSpec = {
  widthM: 6400,
  heightM: 6400,
  cellsX: 80,
  cellsY: 80,
  thicknessM: 220,
  permeabilityM2: 7e-14,
  storagePerPa: 7e-11,
  viscosityPaS: viscosityPaS(PRODUCED_K, hotWater.densityKgPerM3),
  initialPressurePa: RESERVOIR_PA,
  densityKgPerM3: hotWater.densityKgPerM3,
  boundary: { west: 'fixedPressure', east: 'noFlow', south: 'noFlow', north: 'fixedPressure' },
  regions: [
    {
      name: 'tight south',
      polygonM: rectangle(0, 0, 6400, 2200),
      permeabilityFactor: 0.4,
      storageFactor: 0.8,
    },
  ],
  barriers: [
    {
      name: 'Mill fault',
      lineM: [
        [4480, 900],
        [4700, 3300],
        [4550, 5000],
      ],
      transmissibilityFactor: 0.04,
    },
  ],
};

const seismicity: SeismicitySpec = {
  friction: 0.6,
  aSigmaPa: 5e4,
  stressingRatePaPerYear: 6e3,
  backgroundEventsPerYear: 52,
  completenessMagnitude: 0.5,
  bValue: 1.05,
  zones: [
    {
      name: 'south strand',
      polygonM: [
        [700, 1940],
        [1300, 1950],
        [2000, 1810],
        [3200, 1780],
        [3900, 1890],
        [4300, 1900],
        [4300, 2070],
        [3900, 2060],
        [3200, 1950],
        [2000, 1980],
        [1300, 2120],
        [700, 2110],
      ],
      weight: 10,
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
  elsewhereWeight: 0.02,
};

const producer = (name: string, xM: number, yM: number): WellSpec => ({
  name,
  kind: 'producer',
  xM,
  yM,
  radiusM: 0.122,
  skin: -1,
  control: true,
  minRateM3PerS: 0.07,
  maxRateM3PerS: 0.084,
  maxChangeM3PerSPerWeek: 0.008,
  minPressurePa: 1.7e7,
  maxPressurePa: null,
  heatJPerM3: HEAT_J_PER_M3,
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
  minRateM3PerS: 0.028,
  maxRateM3PerS: 0.05,
  maxChangeM3PerSPerWeek: 0.01,
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
  injector('HF-4', 1300, 1400),
  injector('HF-5', 2600, 1300, { outages: [{ fromWeek: 6, toWeek: 6 }] }),
  injector('HF-6', 3900, 1500),
  injector('HF-7', 1200, 4700, { skin: 3, maxRateM3PerS: 0.037 }),
  injector('HF-8', 2600, 5300, { skin: 4, maxRateM3PerS: 0.037 }),
  injector('HF-9', 5700, 4750, { maxRateM3PerS: 0.035 }),
  injector('HF-10', 3900, 5600, { control: false, maxChangeM3PerSPerWeek: null }),
];

const monitors = [
  { name: 'OB-1', xM: 2000, yM: 1200 },
  { name: 'OB-2', xM: 5000, yM: 3600 },
];

/** Set-points, m³/s: at the beginning and today; the change came over the last half year. */
const INJECTION_M3_PER_S: Record<string, [number, number]> = {
  'HF-4': [0.033, 0.0365],
  'HF-5': [0.031, 0.0385],
  'HF-6': [0.031, 0.0365],
  'HF-7': [0.0375, 0.0315],
  'HF-8': [0.0375, 0.0305],
  'HF-9': [0.034, 0.0325],
  'HF-10': [0.032, 0.03],
};
const PRODUCTION_M3_PER_S: Record<string, number> = { 'HF-1': 0.08, 'HF-2': 0.082, 'HF-3': 0.074 };
/** What is sold: in the coming weeks a little less than today's 0.236 m³/s deliver, then a little more again. */
const SOLD_M3_PER_S = { comingWeeks: 0.231, later: 0.233 };
const COMING_WEEKS = 6;
const SHIFT_WEEKS = 30;
/** What meters are read to, m³/s. */
const METER_STEP = 1e-4;

/** @param nowAt the history ends with the last complete week before it */
export function buildHarrowFen(nowAt: number): DemoField {
  const random = new SeededRandom(SEED);
  const thisWeekAt = weekStartOf(nowAt, TIME_ZONE);
  const weekAt = (week: number) => addWeeks(thisWeekAt, week - WEEKS_OF_HISTORY, TIME_ZONE);
  const rates = weeklyHistory(random);
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
    events: syntheticCatalogue(random, { reservoir, seismicity, wells }, rates, weekAt, 'hf'),
    heatTargetJPerWeek: Array.from({ length: 26 }, (_, week) => heatTarget(week)),
    rateMultipleLimit: 1.5,
  };
}

/** In whole 10 MWh, as contracts are. */
function heatTarget(week: number): number {
  const soldM3PerS = week < COMING_WEEKS ? SOLD_M3_PER_S.comingWeeks : SOLD_M3_PER_S.later;
  const stepJ = 10 * JOULE_PER.MWh;
  return Math.floor((soldM3PerS * HEAT_J_PER_M3 * SECOND_PER.week) / stepJ) * stepJ;
}

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
    const injected = Object.entries(INJECTION_M3_PER_S).map(
      ([name, [before, today]]) => [name, (before + (today - before) * shift) * wobble()] as const,
    );
    const total = injected.reduce((sum, [, rate]) => sum + rate, 0);
    // All that is produced goes back: the last well takes what the others leave.
    let left = produced;
    injected.forEach(([name, rate], index) => {
      const isRest = index === injected.length - 1;
      const metered = toMeter(isRest ? left : (rate / total) * produced);
      rates.get(name)!.push(metered);
      left -= metered;
    });
  }
  return rates;
}

const toMeter = (rateM3PerS: number) => Number((Math.round(rateM3PerS / METER_STEP) * METER_STEP).toFixed(4));

function rectangle(westM: number, southM: number, eastM: number, northM: number): PointM[] {
  return [
    [westM, southM],
    [eastM, southM],
    [eastM, northM],
    [westM, northM],
  ];
}
