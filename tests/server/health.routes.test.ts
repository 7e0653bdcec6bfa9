import { afterEach, beforeEach, expect, test } from 'vitest';

import packageJson from '../../package.json';
import { MODEL_VERSION } from '../../models/version';
import { openApiDocument } from '../../server/http/open-api';
import { requestPlan, waitForJob } from '../support/plan-requests';
import { scriptedModel, startTestServer, type TestServer } from '../support/test-server';

let server: TestServer;
beforeEach(async () => {
  server = await startTestServer({ model: scriptedModel('slow') });
});
afterEach(() => server.stop());

const health = async () => (await server.stranger.get('/api/health')).body;

test('tells version, database and queue to anybody', async () => {
  expect(await health()).toEqual({
    status: 'ok',
    version: packageJson.version,
    modelVersion: MODEL_VERSION,
    database: { ok: true, migration: expect.stringMatching(/^\d{4}_\w+$/) },
    queue: { running: 0, waiting: 0 },
  });
});

test('counts what runs and what waits', async () => {
  const engineer = await server.as('fieldEngineer');
  const { jobId } = await requestPlan(server, engineer);
  await requestPlan(server, engineer, { weeks: 4 });
  await waitForJob(server, jobId, ({ state }) => state === 'running');
  expect((await health()).queue).toEqual({ running: 1, waiting: 1 });
});

test('is degraded, not silent, when the database does not know its own migrations', async () => {
  server.context.database.sqlite.exec('alter table __drizzle_migrations rename column created_at to lost_at');
  expect(await health()).toMatchObject({ status: 'degraded', database: { ok: false, migration: null } });
});

test('describes itself', async () => {
  const { body } = await server.stranger.get('/api/openapi.json');
  expect(body).toEqual(JSON.parse(JSON.stringify(openApiDocument(packageJson.version))));
});
