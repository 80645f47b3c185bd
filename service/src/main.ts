import { createServer } from 'node:http';
import { join } from 'node:path';
import { pino } from 'pino';
import { createApp } from './app';
import { compose } from './compose';
import { ConfigurationError, readConfig } from './config';
import { migrate } from './database/migrator';

async function start(): Promise<void> {
  const config = readConfig(process.env);
  const log = pino({ level: process.env['LOG_LEVEL'] ?? 'info' });
  const services = compose({ config, log });
  await migrate(services.knex, join(__dirname, '..', '..', 'migrations'));
  services.fitRunner.open();
  const server = createServer(createApp(services));
  server.listen(config.port, () => log.info(`Console ${config.publicUrl}/`));
}

start().catch((error: unknown) => {
  // A wrong setting is told in one line, without a stack.
  console.error(error instanceof ConfigurationError ? error.message : error);
  process.exitCode = 1;
});
