import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { extname, join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const BUNDLE = join(ROOT, 'dist', 'web');
const STAMP = join(ROOT, 'dist', 'web-bundle.json');
/** Everything that the bundle is made from. */
const SOURCES = [
  'app',
  'src',
  'models/units.ts',
  'assets',
  'app.json',
  'metro.config.js',
  'tsconfig.json',
  'package-lock.json',
];
const COMPRESSED = ['.js', '.css', '.html', '.json', '.svg', '.ttf', '.ico'];
/** Offline, without telemetry and without questions. */
export const EXPO_SETTINGS = { EXPO_OFFLINE: '1', EXPO_NO_TELEMETRY: '1', CI: '1' };

/** Exports the web application where its sources have changed since the last time. */
export async function buildWebBundle() {
  const sources = hashOf(SOURCES.map((name) => join(ROOT, name)));
  if (existsSync(STAMP) && JSON.parse(readFileSync(STAMP, 'utf8')).sources === sources) return;
  console.log('Building the web application (one to two minutes) …');
  rmSync(STAMP, { force: true });
  rmSync(BUNDLE, { recursive: true, force: true });
  await exportBundle();
  await compressFiles();
  writeFileSync(STAMP, JSON.stringify({ sources }));
}

function filesIn(path) {
  if (!existsSync(path)) return [];
  if (statSync(path).isFile()) return [path];
  return readdirSync(path)
    .sort()
    .flatMap((name) => filesIn(join(path, name)));
}

function hashOf(paths) {
  const hash = createHash('sha256').update(process.version);
  for (const file of paths.flatMap(filesIn)) {
    const content = readFileSync(file);
    hash.update(`${relative(ROOT, file)}\0${content.length}\0`).update(content);
  }
  return hash.digest('hex');
}

async function exportBundle() {
  const expo = join(ROOT, 'node_modules', 'expo', 'bin', 'cli');
  const words = [expo, 'export', '--platform', 'web', '--output-dir', relative(ROOT, BUNDLE)];
  const child = spawn(process.execPath, words, {
    cwd: ROOT,
    env: { ...process.env, NODE_ENV: 'production', ...EXPO_SETTINGS },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (text) => (output += text));
  const code = await new Promise((done, failed) => child.once('error', failed).once('close', done));
  const isComplete = code === 0 && existsSync(join(BUNDLE, 'index.html'));
  if (!isComplete) throw new Error(`The web application could not be built:\n${output.slice(-4000)}`);
}

/** Once here instead of at every request. */
async function compressFiles() {
  const files = filesIn(BUNDLE).filter((file) => COMPRESSED.includes(extname(file)));
  const quality = { params: { [constants.BROTLI_PARAM_QUALITY]: 11 } };
  await Promise.all(
    files.map(async (file) => {
      const content = readFileSync(file);
      writeFileSync(`${file}.br`, await promisify(brotliCompress)(content, quality));
      writeFileSync(`${file}.gz`, await promisify(gzip)(content, { level: 9 }));
    }),
  );
}
