// `npm start`: prepares what is missing, then serves the application and its interface on one port.
import { prepareDatabaseDriver } from './database-driver.mjs';
import { buildWebBundle } from './web-bundle.mjs';

try {
  prepareDatabaseDriver();
  await buildWebBundle();
} catch (error) {
  console.error(error.message);
  process.exit(1);
}
const { register } = await import('tsx/esm/api');
register();
await import('../main.ts');
