// The product as `npm start` runs it, on a database of its own that goes away with the process.
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

const dataDir = mkdtempSync(join(tmpdir(), 'stillfield-browser-'));
process.on('exit', () => rmSync(dataDir, { recursive: true, force: true }));
process.env.DATA_DIR = dataDir;
await import('../../server/cli/start.mjs');
