import { createServer } from 'node:http';
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
  const server = createServer();
  await new Promise<void>((listening, failed) => {
    server.once('error', failed);
    server.listen({ port: config.port, host: config.host }, listening);
  });
  const { port } = server.address() as AddressInfo;
  const publicUrl = config.port === 0 ? `http://localhost:${port}` : config.publicUrl;
  const context = makeContext({ ...config, port, publicUrl }, replacements);
  await seedDemo(context);
  server.on('request', makeApp(context));
  context.jobs.recover();
  return {
    context,
    url: `http://localhost:${port}`,
    async stop() {
      const closed = new Promise((done) => server.close(done));
      await context.jobs.stop();
      // Event streams would keep the server open for ever.
      server.closeAllConnections();
      await closed;
      context.database.close();
    },
  };
}
