import type { z } from 'zod';

import { appliedMigration } from '../../../db/migrate';
import { MODEL_VERSION } from '../../../models/version';
import type { getHealth } from '../../../src/contract/health';
import type { Context } from '../../context';

type Health = z.output<typeof getHealth.reply>;

export function readHealth(context: Context): Health {
  const database = readDatabase(context);
  return {
    status: database.ok ? 'ok' : 'degraded',
    version: context.version,
    modelVersion: MODEL_VERSION,
    database,
    queue: context.jobs.load(),
  };
}

function readDatabase(context: Context): Health['database'] {
  try {
    return { ok: true, migration: appliedMigration(context.database.sqlite) };
  } catch (error) {
    context.log.error({ err: error }, 'the database does not answer');
    return { ok: false, migration: null };
  }
}
