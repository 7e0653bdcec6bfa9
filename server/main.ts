import { ConfigError, readConfig, type Config } from './config';
import { demoSignIns } from './features/people/service';
import { startServer } from './start-server';

const config = configOrExit();
const server = await startServer(config).catch((error: NodeJS.ErrnoException) => {
  if (error.code !== 'EADDRINUSE') throw error;
  console.error(`Port ${config.port} is in use. Set PORT to another one.`);
  process.exit(1);
});

console.log(`Stillfield runs at ${server.context.config.publicUrl}`);
const signIns = demoSignIns(server.context);
if (signIns.length > 0) console.log('Demo sign-ins (for trying it out; never in production):');
for (const { role, email, password } of signIns) {
  console.log(`  ${role.padEnd(15)} ${email.padEnd(20)} ${password}`);
}

let stopping = false;
for (const signal of ['SIGINT', 'SIGTERM'] as const) {
  process.on(signal, () => {
    // A second time: somebody is in a hurry.
    if (stopping) process.exit(1);
    stopping = true;
    void server.stop().then(() => process.exit(0));
  });
}

function configOrExit(): Config {
  try {
    return readConfig(process.env);
  } catch (error) {
    if (!(error instanceof ConfigError)) throw error;
    console.error(error.message);
    process.exit(1);
  }
}
