import { createServer, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';

import { makeApp } from './app';
import type { Config } from './config';
import { makeContext, type Context, type Replacements } from './context';
import { seedDemo } from './demo/seed';

export interface RunningServer {
  readonly context: Context;
  readonly url: string;
  stop(): Promise<void>;
}

/** Opens the port first, so that "any free port" is known before anything that speaks of it is made. */
export async function startServer(config: Config, replacements: Replacements = {}): Promise<RunningServer> {
  let answer: RequestListener = stillStarting;
  const server = createServer((req, res) => answer(req, res));
  await listen(server, config);
  const { port } = server.address() as AddressInfo;
  const publicUrl = config.port === 0 ? `http://localhost:${port}` : config.publicUrl;
  let context: Context | undefined;
  try {
    context = makeContext({ ...config, port, publicUrl }, replacements);
    await seedDemo(context);
    answer = makeApp(context);
    context.jobs.recover();
  } catch (error) {
    await close(server);
    context?.database.close();
    throw error;
  }
  const { jobs, database } = context;
  return {
    context,
    url: `http://localhost:${port}`,
    async stop() {
      await close(server, jobs.stop());
      database.close();
    },
  };
}

/** A request that nobody answers would hang for ever, so one that comes too early is told to come back. */
const stillStarting: RequestListener = (_req, res) => {
  const error = { code: 'STARTING', message: 'The server is starting. Try again in a moment.' };
  res.writeHead(503, { 'Content-Type': 'application/json', 'Retry-After': '2' });
  res.end(JSON.stringify({ error }));
};

function listen(server: Server, { port, host }: Config): Promise<void> {
  return new Promise((listening, failed) => {
    server.once('error', failed);
    server.listen({ port, host }, listening);
  });
}

/** Takes no new connections, waits for `work`, then ends what is open: event streams never end by themselves. */
async function close(server: Server, work: Promise<void> = Promise.resolve()): Promise<void> {
  const closed = new Promise((done) => server.close(done));
  await work;
  server.closeAllConnections();
  await closed;
}
