/**
 * A server in a process of its own whose jobs never end by themselves, to be killed by a test. It prints its
 * address as the first line. DATA_DIR tells where it keeps its database.
 */
import { readConfig } from '../../server/config';
import { startServer } from '../../server/start-server';
import { buildSmallField } from './small-field';
import { scriptedModel } from './test-server';

const config = readConfig({ NODE_ENV: 'test', PORT: '0', DATA_DIR: process.env.DATA_DIR });
const server = await startServer(config, {
  model: scriptedModel('slow'),
  demoField: async (nowAt) => buildSmallField(nowAt),
});
console.log(server.url);
process.on('SIGTERM', () => void server.stop().then(() => process.exit(0)));
