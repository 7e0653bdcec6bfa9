import { randomUUID } from 'node:crypto';

import { hashPassword } from 'better-auth/crypto';

import type { Db } from '../../db/client';
import { recordAudit } from '../../db/store/audit';
import {
  insertField,
  insertModelVersion,
  insertOutage,
  insertWells,
  listAllFieldIds,
} from '../../db/store/fields';
import { countPeople, insertMembership, insertPerson, listDemoPeople } from '../../db/store/people';
import { insertHeatTarget, insertMeteredRate, insertSeismicEvent } from '../../db/store/readings';
import { MODEL_VERSION } from '../../models/version';
import { ConfigError } from '../config';
import type { Context } from '../context';
import { addWeeks, weekStartOf } from '../time/local-week';
import { DEMO_PEOPLE } from './people';
import type { DemoField } from './types';

/** Injected water is what was produced: the demonstration loses none. */
const LOSS_FRACTION = 0;
/** Half a litre a second: what an operator can dial in. */
const SET_POINT_STEP_M3_PER_S = 0.0005;

/** Fills an empty database with the demonstration field and its crew; a production server refuses to have them. */
export async function seedDemo(context: Context): Promise<void> {
  const { db } = context.database;
  if (context.config.production && listDemoPeople(db).length > 0) {
    throw new ConfigError(
      'DATA_DIR',
      'holds demonstration accounts, which production refuses: use an empty one.',
    );
  }
  if (!context.config.demo || countPeople(db) > 0 || listAllFieldIds(db).length > 0) return;
  const field = await context.demoField(context.clock());
  const people = await Promise.all(
    DEMO_PEOPLE.map(async (person) => ({
      ...person,
      id: randomUUID(),
      passwordHash: await hashPassword(person.password),
    })),
  );
  db.transaction((tx) => writeDemo(tx, field, people, context.clock()), { behavior: 'immediate' });
  context.log.info({ field: field.name }, 'the demonstration field was seeded');
}

type Person = (typeof DEMO_PEOPLE)[number] & { id: string; passwordHash: string };

function writeDemo(db: Db, demo: DemoField, people: Person[], createdAt: number): void {
  const fieldId = randomUUID();
  const { name, place, timeZone, rateMultipleLimit } = demo;
  insertField(db, {
    id: fieldId,
    name,
    place,
    timeZone,
    rateMultipleLimit,
    lossFraction: LOSS_FRACTION,
    setPointStepM3PerS: SET_POINT_STEP_M3_PER_S,
    createdAt,
  });
  for (const { id, name: personName, email, passwordHash, role } of people) {
    insertPerson(db, { id, name: personName, email, passwordHash, isDemo: true, createdAt });
    insertMembership(db, { fieldId, personId: id, role, createdAt });
  }
  const wellIds = writeWells(db, fieldId, demo, createdAt);
  writeModel(db, fieldId, demo, createdAt);
  writeReadings(db, fieldId, demo, wellIds, createdAt);
  recordAudit(db, {
    happenedAt: createdAt,
    fieldId,
    personId: null,
    event: 'demoFieldSeeded',
    subjectId: fieldId,
  });
}

function writeWells(db: Db, fieldId: string, demo: DemoField, nowAt: number): Map<string, string> {
  const rows = [
    ...demo.wells.map(({ outages: _outages, ...well }) => ({ ...well, fieldId, id: randomUUID() })),
    ...demo.monitors.map((well) => ({ ...well, kind: 'monitor' as const, fieldId, id: randomUUID() })),
  ].map((row, position) => ({ ...row, position }));
  insertWells(db, rows);
  const wellIds = new Map(rows.map((row) => [row.name, row.id]));
  // An outage of the demonstration counts its weeks from the coming one.
  const firstWeekAt = addWeeks(weekStartOf(nowAt, demo.timeZone), 1, demo.timeZone);
  const weekAt = (week: number) => addWeeks(firstWeekAt, week - 1, demo.timeZone);
  for (const well of demo.wells) {
    for (const { fromWeek, toWeek } of well.outages) {
      insertOutage(db, {
        id: randomUUID(),
        wellId: wellIds.get(well.name)!,
        fromWeekStartsAt: weekAt(fromWeek),
        toWeekStartsAt: weekAt(toWeek),
        reason: 'Planned maintenance',
      });
    }
  }
  return wellIds;
}

function writeModel(db: Db, fieldId: string, demo: DemoField, createdAt: number): void {
  const modelVersionId = randomUUID();
  const { zones, ...seismicity } = demo.seismicity;
  insertModelVersion(
    db,
    {
      id: modelVersionId,
      fieldId,
      number: 1,
      reservoir: JSON.stringify(demo.reservoir),
      seismicity: JSON.stringify(seismicity),
      modelVersion: MODEL_VERSION,
      accepted: true,
      note: 'The invented ground of the demonstration field.',
      createdById: null,
      createdAt,
    },
    zones.map(({ name, polygonM, weight }, position) => ({
      modelVersionId,
      position,
      name,
      polygonM: JSON.stringify(polygonM),
      weight,
    })),
  );
}

function writeReadings(
  db: Db,
  fieldId: string,
  demo: DemoField,
  wellIds: Map<string, string>,
  nowAt: number,
): void {
  for (const { well, weekStartsAt, rateM3PerS } of demo.weeklyRates) {
    insertMeteredRate(db, { wellId: wellIds.get(well)!, weekStartsAt, rateM3PerS });
  }
  for (const { at: occurredAt, ...event } of demo.events)
    insertSeismicEvent(db, { ...event, fieldId, occurredAt });
  const currentWeekAt = weekStartOf(nowAt, demo.timeZone);
  demo.heatTargetJPerWeek.forEach((heatJ, week) =>
    insertHeatTarget(db, { fieldId, weekStartsAt: addWeeks(currentWeekAt, week, demo.timeZone), heatJ }),
  );
}
