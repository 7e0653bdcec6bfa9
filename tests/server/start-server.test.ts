import { request } from 'node:http';

import { afterEach, beforeEach, expect, test } from 'vitest';

import { readConfig } from '../../server/config';
import type { DemoField } from '../../server/demo/types';
import { startServer } from '../../server/start-server';
import { buildSmallField } from '../support/small-field';
import { makeDataDir, scriptedModel } from '../support/test-server';

let dir: ReturnType<typeof makeDataDir>;
beforeEach(() => {
  dir = makeDataDir();
});
afterEach(() => dir.remove());

/** The port is chosen by the system; this tells it as soon as it is open. */
async function freePort(): Promise<number> {
  const server = await startServer(config(0), { model: scriptedModel(), demoField: small });
  const { port } = new URL(server.url);
  await server.stop();
  dir.remove();
  dir = makeDataDir();
  return Number(port);
}

const small = async (nowAt: number) => buildSmallField(nowAt);
const config = (port: number) => readConfig({ NODE_ENV: 'test', DATA_DIR: dir.path, PORT: String(port) });

function statusOf(port: number): Promise<number> {
  return new Promise((done, failed) => {
    request({ port, path: '/api/health' }, (response) => done(response.resume().statusCode!))
      .on('error', failed)
      .end();
  });
}

test('a request that comes while the server starts is told to come back, one that comes later is answered', async () => {
  const port = await freePort();
  let seed!: (field: DemoField) => void;
  let asked!: () => void;
  const isSeeding = new Promise<void>((done) => (asked = done));
  const starting = startServer(config(port), {
    model: scriptedModel(),
    demoField: () => {
      asked();
      return new Promise<DemoField>((done) => (seed = done));
    },
  });
  await isSeeding;
  expect(await statusOf(port)).toBe(503);
  seed(await small(Date.now()));
  const server = await starting;
  expect(await statusOf(port)).toBe(200);
  await server.stop();
});

test('a start that fails leaves no port open', async () => {
  const port = await freePort();
  const starting = startServer(config(port), {
    model: scriptedModel(),
    demoField: () => Promise.reject(new Error('no field today')),
  });
  await expect(starting).rejects.toThrow('no field today');
  await expect(statusOf(port)).rejects.toThrow(/ECONNREFUSED/);
});

test('a port that is taken is an error at once', async () => {
  const server = await startServer(config(0), { model: scriptedModel(), demoField: small });
  const taken = Number(new URL(server.url).port);
  await expect(startServer(config(taken), { model: scriptedModel(), demoField: small })).rejects.toThrow(
    /EADDRINUSE/,
  );
  await server.stop();
});
