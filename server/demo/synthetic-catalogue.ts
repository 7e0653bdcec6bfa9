/**
 * A catalogue that a field's own model could have produced: invented earthquakes for demonstrations.
 *
 *   events of a week and zone ~ Poisson(expected events), magnitudes by Gutenberg–Richter, places even in the zone
 */
import { gutenbergRichterMagnitude, type SeededRandom } from '../../models/catalogue/random';
import { isInsidePolygon } from '../../models/grid/polygon';
import { forecastScenario } from '../../models/scenario/forecast-scenario';
import type { PointM, RatesSpec, ReservoirSpec, Scenario, SeismicitySpec } from '../../models/scenario/types';
import type { DemoField } from './types';

type Ground = Pick<Scenario, 'reservoir' | 'seismicity' | 'wells'>;

const CATALOGUE_CELLS = 50;
const MAGNITUDE_BIN = 0.1;

/** Events drawn from the model's own weekly counts: Poisson in number, Gutenberg–Richter in size. */
export function syntheticCatalogue(
  random: SeededRandom,
  ground: Ground,
  rates: Map<string, number[]>,
  weekAt: (week: number) => number,
  idPrefix: string,
): DemoField['events'] {
  const { reservoir, seismicity, wells } = ground;
  const { weeks } = forecastScenario({
    format: 'stillfield-scenario/1',
    reservoir: onCoarserGrid(reservoir),
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
        const [xM, yM] = placeIn(random, ground, polygon);
        events.push({
          publicId: '',
          at: Math.round(weekAt(week) + random.next() * (weekAt(week + 1) - weekAt(week))),
          xM,
          yM,
          depthM: Math.round(random.between(2100, 2900)),
          magnitude: reportedMagnitude(random, seismicity),
          magnitudeType: 'ML',
        });
      }
    }
  });
  return events
    .sort((a, b) => a.at - b.at)
    .map((event, index) => ({ ...event, publicId: `${idPrefix}-${String(index + 1).padStart(4, '0')}` }));
}

/**
 * The same ground in fewer cells, quick enough for the first start. A barrier holds back as much as before: what
 * its factor f adds to a face's resistance is in proportion to (1/f − 1)·Δx.
 */
function onCoarserGrid(reservoir: ReservoirSpec): ReservoirSpec {
  const growth = reservoir.cellsX / CATALOGUE_CELLS;
  return {
    ...reservoir,
    cellsX: CATALOGUE_CELLS,
    cellsY: CATALOGUE_CELLS,
    barriers: reservoir.barriers.map((barrier) => ({
      ...barrier,
      transmissibilityFactor: 1 / (1 + (1 / barrier.transmissibilityFactor - 1) / growth),
    })),
  };
}

/** Reported to a tenth, so that the lowest bin holds what lies half a tenth below its centre as well. */
function reportedMagnitude(random: SeededRandom, { completenessMagnitude, bValue }: SeismicitySpec): number {
  const least = completenessMagnitude - MAGNITUDE_BIN / 2;
  const bins = Math.round(
    (gutenbergRichterMagnitude(random, least, bValue) - completenessMagnitude) / MAGNITUDE_BIN,
  );
  return Number((completenessMagnitude + Math.max(0, bins) * MAGNITUDE_BIN).toFixed(1));
}

/** A point inside the polygon, or outside all zones where there is none; whole metres. */
function placeIn(
  random: SeededRandom,
  { reservoir, seismicity }: Ground,
  polygon: PointM[] | null,
): [number, number] {
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
