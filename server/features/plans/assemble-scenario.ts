import {
  listOutages,
  listWells,
  listZones,
  type FieldRow,
  type ModelVersionRow,
  type OutageRow,
  type WellRow,
} from '../../../db/store/fields';
import { listMeteredRates, type MeteredRate } from '../../../db/store/readings';
import type { HistorySpec, Scenario, SeismicitySpec, WellSpec } from '../../../models/scenario/types';
import type { PlanRequest } from '../../../src/contract/plans';
import type { Db } from '../../../db/client';
import { addWeeks, weeksBetween } from '../../time/local-week';
import type { SeismicityWithoutZones } from '../fields/service';

/** Among plans this close to the best, the one that moves the set-points least is taken. */
const POLISH_TOLERANCE = 0.005;

export type HorizonRequest = Pick<
  PlanRequest,
  'firstWeekStartsAt' | 'weeks' | 'lookAheadWeeks' | 'objective' | 'heatTargetJPerWeek' | 'heatBand'
>;

/** Everything that a plan depends on, out of the database, as one scenario. */
export function assembleScenario(
  db: Db,
  field: FieldRow,
  model: ModelVersionRow,
  request: HorizonRequest,
): Scenario {
  const rows = listWells(db, field.id);
  const { firstWeekStartsAt, weeks } = request;
  const lastWeekStartsAt = addWeeks(firstWeekStartsAt, weeks - 1, field.timeZone);
  const outages = listOutages(db, field.id, firstWeekStartsAt, lastWeekStartsAt);
  const toWeek = (at: number) => weeksBetween(firstWeekStartsAt, at, field.timeZone) + 1;
  const operating = rows.filter((well) => well.kind !== 'monitor');
  return {
    format: 'stillfield-scenario/1',
    reservoir: JSON.parse(model.reservoir),
    seismicity: seismicityWithZones(db, model),
    wells: operating.map((well) => wellSpec(well, outages, toWeek, weeks)),
    history: historyOf(operating, listMeteredRates(db, field.id, firstWeekStartsAt), firstWeekStartsAt),
    rates: [],
    plan: {
      weeks,
      lookAheadWeeks: request.lookAheadWeeks,
      objective: request.objective,
      heatTargetJPerWeek: request.heatTargetJPerWeek,
      heatCeilingJPerWeek: request.heatTargetJPerWeek.map((target) => target * (1 + request.heatBand)),
      lossFraction: field.lossFraction,
      caps: [],
      setPointStepM3PerS: field.setPointStepM3PerS,
      polishTolerance: POLISH_TOLERANCE,
    },
    observers: rows.filter((well) => well.kind === 'monitor').map(({ name, xM, yM }) => ({ name, xM, yM })),
  };
}

function seismicityWithZones(db: Db, model: ModelVersionRow): SeismicitySpec {
  const zones = listZones(db, model.id).map(({ name, polygonM, weight }) => ({
    name,
    polygonM: JSON.parse(polygonM),
    weight,
  }));
  return { ...(JSON.parse(model.seismicity) as SeismicityWithoutZones), zones };
}

function wellSpec(
  well: WellRow,
  outages: OutageRow[],
  toWeek: (at: number) => number,
  weeks: number,
): WellSpec {
  if (well.kind === 'monitor') throw new Error(`${well.name} does not move water`);
  return {
    name: well.name,
    kind: well.kind,
    xM: well.xM,
    yM: well.yM,
    // The database keeps these four for every well that moves water.
    radiusM: well.radiusM!,
    skin: well.skin!,
    control: well.control,
    minRateM3PerS: well.minRateM3PerS!,
    maxRateM3PerS: well.maxRateM3PerS,
    maxChangeM3PerSPerWeek: well.maxChangeM3PerSPerWeek,
    minPressurePa: well.minPressurePa,
    maxPressurePa: well.maxPressurePa,
    heatJPerM3: well.heatJPerM3!,
    outages: outages
      .filter((outage) => outage.wellId === well.id)
      .map((outage) => ({
        fromWeek: Math.max(1, toWeek(outage.fromWeekStartsAt)),
        toWeek: Math.min(weeks, toWeek(outage.toWeekStartsAt)),
      })),
  };
}

/** Metered weeks as steps before the plan's start; a rate holds until the next one that differs. */
function historyOf(wells: WellRow[], rates: MeteredRate[], startsAt: number): HistorySpec[] {
  return wells.flatMap((well) => {
    const steps: HistorySpec['steps'] = [];
    for (const rate of rates) {
      if (rate.wellId !== well.id || steps.at(-1)?.rateM3PerS === rate.rateM3PerS) continue;
      steps.push({ fromS: (rate.weekStartsAt - startsAt) / 1000, rateM3PerS: rate.rateM3PerS });
    }
    return steps.length > 0 ? [{ well: well.name, steps }] : [];
  });
}
