// `npm run build`: the web application, where it is stale. `npm start` does the same first.
import { buildWebBundle } from './web-bundle.mjs';

try {
  await buildWebBundle();
} catch (error) {
  console.error(error.message);
  process.exitCode = 1;
}
