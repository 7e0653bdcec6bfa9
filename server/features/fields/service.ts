import {
  findAcceptedModel,
  findField,
  listFieldsById,
  listWells,
  type FieldRow,
  type ModelVersionRow,
  type WellRow,
} from '../../../db/store/fields';
import { listMemberships } from '../../../db/store/people';
import { listEventTimes, listMeteredRates } from '../../../db/store/readings';
import { SECONDS_PER_WEEK, SECONDS_PER_YEAR } from '../../../models/constants';
import type { SeismicitySpec } from '../../../models/scenario/types';
import type { Role } from '../../../src/contract/enums';
import type { Context } from '../../context';
import { notFound } from '../../errors';
import { addWeeks, weeksBetween, weekStartOf } from '../../time/local-week';

const PAST_WEEKS_SHOWN = 26;

export interface PastWeek {
  weekStartsAt: number;
  observedEvents: number;
  rateMultiple: number;
  heatJ: number;
}

export type SeismicityWithoutZones = Omit<SeismicitySpec, 'zones'>;

export function requireField(context: Context, fieldId: string): FieldRow {
  const field = findField(context.database.db, fieldId);
  if (!field) throw notFound('The field');
  return field;
}

export function fieldsOf(context: Context, personId: string): { field: FieldRow; roles: Role[] }[] {
  const { db } = context.database;
  const memberships = listMemberships(db, personId);
  const ids = [...new Set(memberships.map((row) => row.fieldId))];
  return listFieldsById(db, ids).map((field) => ({
    field,
    roles: memberships.filter((row) => row.fieldId === field.id).map((row) => row.role),
  }));
}

export function currentWeekStart(context: Context, field: FieldRow): number {
  return weekStartOf(context.clock(), field.timeZone);
}

export function seismicityOf(model: ModelVersionRow): SeismicityWithoutZones {
  return JSON.parse(model.seismicity);
}

export function acceptedModel(context: Context, fieldId: string): ModelVersionRow | undefined {
  return findAcceptedModel(context.database.db, fieldId);
}

/** Background events of one week. */
export const backgroundPerWeek = (seismicity: { backgroundEventsPerYear: number }) =>
  (seismicity.backgroundEventsPerYear * SECONDS_PER_WEEK) / SECONDS_PER_YEAR;

/** Complete weeks as they were metered and counted, oldest first; empty while the field has no model. */
export function pastWeeks(context: Context, field: FieldRow): PastWeek[] {
  const { db } = context.database;
  const model = findAcceptedModel(db, field.id);
  if (!model) return [];
  const nowWeek = currentWeekStart(context, field);
  const firstShown = addWeeks(nowWeek, -PAST_WEEKS_SHOWN, field.timeZone);
  const rates = listMeteredRates(db, field.id, nowWeek, firstShown);
  const firstMetered = rates[0]?.weekStartsAt;
  if (firstMetered === undefined) return [];

  const seismicity = seismicityOf(model);
  const events = listEventTimes(db, field.id, firstMetered, nowWeek, seismicity.completenessMagnitude);
  const heatPerM3 = new Map(listWells(db, field.id).map((well) => [well.id, well.heatJPerM3 ?? 0]));
  const count = weeksBetween(firstMetered, nowWeek, field.timeZone);
  return Array.from({ length: count }, (_, index) => {
    const weekStartsAt = addWeeks(firstMetered, index, field.timeZone);
    const weekEndsAt = addWeeks(weekStartsAt, 1, field.timeZone);
    const observedEvents = events.filter((at) => at >= weekStartsAt && at < weekEndsAt).length;
    const heatJ = rates
      .filter((rate) => rate.weekStartsAt === weekStartsAt)
      .reduce((sum, rate) => sum + rate.rateM3PerS * heatPerM3.get(rate.wellId)! * SECONDS_PER_WEEK, 0);
    return {
      weekStartsAt,
      observedEvents,
      rateMultiple: observedEvents / backgroundPerWeek(seismicity),
      heatJ,
    };
  });
}

/** The newest metered rate of each well, by its identifier. */
export function lastRates(
  context: Context,
  fieldId: string,
): Map<string, { rateM3PerS: number; weekStartsAt: number }> {
  const rates = listMeteredRates(context.database.db, fieldId, context.clock());
  return new Map(rates.map(({ wellId, rateM3PerS, weekStartsAt }) => [wellId, { rateM3PerS, weekStartsAt }]));
}

export function wellsOf(context: Context, fieldId: string): WellRow[] {
  return listWells(context.database.db, fieldId);
}
