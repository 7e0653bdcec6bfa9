// `npm run dev`: the server, started again at every change, and Metro, which serves the pages and passes
// everything under /api on to it. When one of the two ends, so does the other.
import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

import { prepareDatabaseDriver } from './database-driver.mjs';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const WEB_PORT = process.env.WEB_PORT ?? '8081';

try {
  prepareDatabaseDriver();
} catch (error) {
  console.error(error.message);
  process.exit(1);
}

const children = [
  run(['--watch', '--import', 'tsx', 'server/main.ts'], {}),
  run([join('node_modules', 'expo', 'bin', 'cli'), 'start', '--web', '--port', WEB_PORT], {
    EXPO_OFFLINE: '1',
    EXPO_NO_TELEMETRY: '1',
    BROWSER: 'none',
  }),
];
console.log(`Pages with live reload: http://localhost:${WEB_PORT}`);

for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, endAll);
for (const child of children) child.once('exit', endAll);

function run(words, settings) {
  return spawn(process.execPath, words, {
    cwd: ROOT,
    env: { ...process.env, ...settings },
    stdio: 'inherit',
  });
}

function endAll() {
  for (const child of children) child.kill('SIGTERM');
}
