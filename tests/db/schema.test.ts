import { spawnSync } from 'node:child_process';
import { cpSync } from 'node:fs';
import { join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';

import { getTableColumns, getTableName } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';

import { MIGRATIONS_FOLDER } from '../../db/migrate';
import { schema } from '../../db/schema/all';
import { startTestServer, type TestServer } from '../support/test-server';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.stop());

const tables = Object.values(schema);

test('the migrations make exactly the tables and columns that the schema names', () => {
  const { sqlite } = server.context.database;
  for (const table of tables) {
    const name = getTableName(table);
    const found = (sqlite.pragma(`table_info(${name})`) as { name: string }[]).map((column) => column.name);
    const wanted = Object.values(getTableColumns(table)).map((column) => column.name);
    expect(found.sort(), name).toEqual(wanted.sort());
  }
});

test('no change of the schema waits for a migration', () => {
  const out = join(server.dataDir, 'migrations');
  cpSync(MIGRATIONS_FOLDER, out, { recursive: true });
  const words = [
    'generate',
    '--dialect',
    'sqlite',
    '--schema',
    './db/schema/*.ts',
    '--out',
    relative(ROOT, out),
  ];
  const { stdout } = spawnSync(join(ROOT, 'node_modules/.bin/drizzle-kit'), words, {
    cwd: ROOT,
    encoding: 'utf8',
  });
  expect(stdout).toContain('No schema changes');
});

test('a moment is a whole number of milliseconds', () => {
  const moments = tables.flatMap((table) =>
    Object.values(getTableColumns(table)).filter((column) => column.name.endsWith('_at')),
  );
  expect(moments.length).toBeGreaterThan(20);
  for (const column of moments) expect(column.getSQLType()).toBe('integer');
});

describe('the database itself refuses', () => {
  const run = (sql: string) => () => server.context.database.sqlite.exec(sql);
  test.each([
    ['a rate below zero', 'update metered_rates set rate_m3_per_s = -1', /metered_rates_magnitude/],
    [
      'a producer without a radius',
      `update wells set radius_m = null where kind = 'producer'`,
      /wells_operating/,
    ],
    ['two wells of one name', `update wells set name = 'P-1'`, /UNIQUE/],
    [
      'a job for nobody',
      `insert into jobs (id, field_id, kind, requested_by_id, state, step, input_hash, model_version, created_at) values ('j', (select id from fields), 'plan.build', 'nobody', 'queued', '', '', '', 0)`,
      /FOREIGN KEY/,
    ],
  ])('%s', (_case, sql, reason) => {
    expect(run(sql)).toThrow(reason);
  });

  test('an outage that ends before it begins', () => {
    expect(run('update outages set to_week_starts_at = from_week_starts_at - 1')).toThrow(/outages_order/);
  });
});
