import { readFileSync } from 'node:fs';

import { openDatabase, type DatabaseHandle } from '../db/client';
import { migrateDatabase } from '../db/migrate';
import { makeAuth, type Auth } from './auth/auth';
import type { Config } from './config';
import type { DemoField } from './demo/types';
import { JobQueue } from './jobs/queue';
import { makeLogger, type Logger } from './log';
import { realModel, type Model } from './model';

/** Everything the server is made of, built once. */
export interface Context {
  readonly config: Config;
  readonly log: Logger;
  /** UTC milliseconds. */
  readonly clock: () => number;
  readonly version: string;
  readonly database: DatabaseHandle;
  readonly auth: Auth;
  readonly model: Model;
  readonly jobs: JobQueue;
  /** What an empty database of a demonstration is filled with. */
  readonly demoField: (nowAt: number) => Promise<DemoField>;
}

export interface Replacements {
  log?: Logger;
  clock?: () => number;
  model?: Model;
  demoField?: Context['demoField'];
  /** How long a stopped computation may take to notice. */
  jobGraceMs?: number;
}

/** Loaded only where it is wanted: a production server never reads it. */
const harrowFen: Context['demoField'] = async (nowAt) =>
  (await import('./demo/harrow-fen')).buildHarrowFen(nowAt);

export function makeContext(config: Config, replacements: Replacements = {}): Context {
  const log = replacements.log ?? makeLogger(config.logLevel);
  const clock = replacements.clock ?? Date.now;
  const model = replacements.model ?? realModel;
  const copy = migrateDatabase(config.databaseFile);
  if (copy) log.info({ copy }, 'the database was migrated; a copy from before is kept');
  const database = openDatabase(config.databaseFile);
  const jobs = new JobQueue({
    db: database.db,
    log,
    clock,
    concurrency: config.jobConcurrency,
    timeLimitS: config.jobTimeLimitS,
    workerEntry: model.workerEntry,
    graceMs: replacements.jobGraceMs,
  });
  const auth = makeAuth(config, database.db, log);
  const demoField = replacements.demoField ?? harrowFen;
  return { config, log, clock, version: packageVersion(), database, auth, model, jobs, demoField };
}

function packageVersion(): string {
  const file = new URL('../package.json', import.meta.url);
  return (JSON.parse(readFileSync(file, 'utf8')) as { version: string }).version;
}
