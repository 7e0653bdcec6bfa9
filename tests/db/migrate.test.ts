import { cpSync, existsSync, readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

import Database from 'better-sqlite3';
import { drizzle } from 'drizzle-orm/better-sqlite3';
import { migrate } from 'drizzle-orm/better-sqlite3/migrator';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';

import { openDatabase } from '../../db/client';
import { appliedMigration, migrateDatabase, MIGRATIONS_FOLDER } from '../../db/migrate';
import { hasEnded, requestPlan, waitForJob } from '../support/plan-requests';
import { makeDataDir, startTestServer } from '../support/test-server';

let dir: ReturnType<typeof makeDataDir>;
let file: string;
beforeEach(() => {
  dir = makeDataDir();
  file = join(dir.path, 'stillfield.sqlite');
});
afterEach(() => dir.remove());

/**
 * Rebuilds two tables the way the generator does where SQLite cannot alter one: `people`, whose sessions and
 * accounts cascade, and `fields`, whose memberships do and whose wells, plans and audit rows forbid it.
 */
function rebuild(table: string, columns: string[]): string {
  const names = columns.map((name) => `"${name}"`).join(', ');
  return [
    'PRAGMA foreign_keys=OFF;',
    `CREATE TABLE __new_${table} AS SELECT * FROM ${table} WHERE 0;`,
    `INSERT INTO __new_${table}(${names}) SELECT ${names} FROM ${table};`,
    `DROP TABLE ${table};`,
    `ALTER TABLE __new_${table} RENAME TO ${table};`,
    `CREATE UNIQUE INDEX ${table}_rebuilt ON ${table}(id);`,
    'PRAGMA foreign_keys=ON;',
  ].join('--> statement-breakpoint\n');
}

/** The shipped migrations and one more, in a folder of their own. */
function withMigration(sql: string): string {
  const folder = join(dir.path, 'migrations');
  cpSync(MIGRATIONS_FOLDER, folder, { recursive: true });
  const journalFile = join(folder, 'meta', '_journal.json');
  const journal = JSON.parse(readFileSync(journalFile, 'utf8'));
  const last = journal.entries.at(-1);
  const next = { ...last, idx: last.idx + 1, when: last.when + 1000, tag: '9999_next' };
  journal.entries.push(next);
  writeFileSync(journalFile, JSON.stringify(journal));
  writeFileSync(join(folder, '9999_next.sql'), sql);
  return folder;
}

function rebuildMigration(tables: string[]): string {
  const sqlite = new Database(file);
  const columnsOf = (table: string) =>
    (sqlite.pragma(`table_info(${table})`) as { name: string }[]).map(({ name }) => name);
  const sql = tables.map((table) => rebuild(table, columnsOf(table)));
  sqlite.close();
  return withMigration(sql.join('--> statement-breakpoint\n'));
}

function countRows(path = file): Record<string, number> {
  const sqlite = new Database(path);
  const tables = sqlite
    .prepare(`select name from sqlite_master where type = 'table' and name not like '\\_\\_%' escape '\\'`)
    .pluck()
    .all() as string[];
  const counts = tables
    .filter((name) => !name.startsWith('sqlite_'))
    .map((name) => [name, sqlite.prepare(`select count(*) from "${name}"`).pluck().get() as number]);
  sqlite.close();
  return Object.fromEntries(counts);
}

/** A database as it is in use: a field with its history, people with sessions, a computed plan, a job. */
async function fillDatabase(): Promise<void> {
  const server = await startTestServer({ dataDir: dir.path });
  const engineer = await server.as('fieldEngineer');
  const { jobId } = await requestPlan(server, engineer);
  await waitForJob(server, jobId, hasEnded);
  await server.stop();
}

describe('a filled database', () => {
  beforeEach(() => fillDatabase());

  test('keeps every row when tables that others refer to are rebuilt', async () => {
    const before = countRows();
    const filled = Object.entries(before).filter(([, count]) => count > 0);
    expect(filled.map(([name]) => name)).toEqual(
      expect.arrayContaining(['sessions', 'accounts', 'memberships', 'wells', 'plans', 'jobs', 'audit']),
    );
    const folder = rebuildMigration(['people', 'fields']);
    const copy = migrateDatabase(file, folder);
    expect(countRows()).toEqual(before);
    expect(copy).toBe(`${file}.before-9999_next`);
    expect(countRows(copy!)).toEqual(before);
    const { sqlite, close } = openDatabase(file);
    expect(sqlite.pragma('foreign_key_check')).toEqual([]);
    expect(appliedMigration(sqlite, folder)).toBe('9999_next');
    close();
  });

  test('would lose its sessions and accounts to the same migration run the plain way', () => {
    const before = countRows();
    const folder = rebuildMigration(['people']);
    const sqlite = new Database(file);
    sqlite.pragma('foreign_keys = ON');
    // What forbids the deletion of a person is out of the way; what cascades goes along in silence.
    for (const table of ['jobs', 'plan_rates', 'plan_forecast_weeks', 'plan_results', 'plans', 'audit']) {
      sqlite.exec(`delete from ${table}`);
    }
    migrate(drizzle(sqlite), { migrationsFolder: folder });
    sqlite.close();
    const after = countRows();
    expect(before.sessions).toBeGreaterThan(0);
    expect([after.sessions, after.accounts]).toEqual([0, 0]);
  });

  test('is put back whole when a migration fails', () => {
    const before = countRows();
    const folder = withMigration('delete from sessions;--> statement-breakpoint\nselect * from nowhere;');
    expect(() => migrateDatabase(file, folder)).toThrow();
    expect(countRows()).toEqual(before);
  });

  test('is put back whole when a migration leaves a row without its parent', () => {
    const before = countRows();
    const folder = withMigration('delete from people;');
    expect(() => migrateDatabase(file, folder)).toThrow(/without their parent row/);
    expect(countRows()).toEqual(before);
  });

  test('of a newer program is left untouched', () => {
    migrateDatabase(file, withMigration('create table later (id text);'));
    const bytes = readFileSync(file);
    expect(() => migrateDatabase(file)).toThrow(/newer version/);
    expect(readFileSync(file).equals(bytes)).toBe(true);
  });

  test('that is up to date is neither copied nor changed', () => {
    expect(migrateDatabase(file)).toBeNull();
    expect(readdirSync(dir.path).filter((name) => name.includes('before'))).toEqual([]);
  });

  test('refuses to lose what was decided: people, fields and plans that rows depend on stay', () => {
    const { sqlite, close } = openDatabase(file);
    for (const table of ['people', 'fields', 'plans', 'wells', 'reservoir_model_versions']) {
      expect(() => sqlite.exec(`delete from ${table}`), table).toThrow(/FOREIGN KEY/);
    }
    close();
  });
});

test('an empty file gets every table, without a copy', () => {
  expect(existsSync(file)).toBe(false);
  expect(migrateDatabase(file)).toBeNull();
  expect(countRows()).toMatchObject({ fields: 0, plans: 0, jobs: 0, audit: 0 });
});

test('the database writes ahead, waits for others and keeps references', () => {
  migrateDatabase(file);
  const { sqlite, close } = openDatabase(file);
  const setting = (name: string) => sqlite.pragma(name, { simple: true });
  expect([setting('journal_mode'), setting('foreign_keys'), setting('synchronous')]).toEqual(['wal', 1, 2]);
  expect(setting('busy_timeout')).toBeGreaterThan(0);
  close();
});
