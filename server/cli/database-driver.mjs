import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

import { installDebianPackages, isInstalled } from './debian-packages.mjs';

const PACKAGE = fileURLToPath(new URL('../../node_modules/better-sqlite3', import.meta.url));
const COMPILERS = { python3: 'python3', make: 'make', 'g++': 'g++' };

/**
 * Compiles the SQLite driver from its source where that has not been done yet.
 * Throws an Error whose message tells a person what to do.
 */
export function prepareDatabaseDriver() {
  if (loads()) return;
  if (!existsSync(PACKAGE)) throw new Error('The packages are not installed: run "npm ci" first.');
  requireCompilers();
  console.log('Compiling the database driver (once after each install, one to three minutes) …');
  const built = spawnSync('npm', ['run', '--silent', 'build-release', '--prefix', PACKAGE], {
    encoding: 'utf8',
    env: { ...process.env, JOBS: 'max', ...nodeHeaders() },
    maxBuffer: 1e9,
  });
  if (built.status === 0 && loads()) return;
  const lastLines = `${built.stdout ?? ''}${built.stderr ?? ''}`.trimEnd().split('\n').slice(-30).join('\n');
  throw new Error(`The database driver (better-sqlite3) could not be compiled:\n${lastLines}`);
}

/** In a process of its own: a driver compiled for another Node would take this one down with it. */
function loads() {
  const script = `new (require('better-sqlite3'))(':memory:').close()`;
  return spawnSync(process.execPath, ['-e', script], { cwd: dirname(PACKAGE), stdio: 'ignore' }).status === 0;
}

function requireCompilers() {
  const missing = () => Object.keys(COMPILERS).filter((command) => !isInstalled(command));
  if (missing().length > 0) installDebianPackages(missing().map((command) => COMPILERS[command]));
  if (missing().length === 0) return;
  const packages = missing().map((command) => COMPILERS[command]);
  throw new Error(
    `Compiling the database driver needs ${packages.join(', ')}. Install with:\n` +
      `  sudo apt-get install ${packages.join(' ')}\nand run this again.`,
  );
}

/** Node ships its own headers; with them the compiler needs nothing from the network. */
function nodeHeaders() {
  const root = dirname(dirname(process.execPath));
  return existsSync(join(root, 'include', 'node', 'node.h')) ? { npm_config_nodedir: root } : {};
}
