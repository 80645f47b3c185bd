import { createServer, type Server } from 'node:http';
import type { Express } from 'express';
import { pino } from 'pino';
import { createApp } from './app';
import { compose, type Services } from './compose';
import { ConfigurationError, readConfig, type Config } from './config';
import { migrationsFolder } from './database/migrations-folder';
import { migrate } from './database/migrator';
import { announcement } from './demonstration/announcement';
import { ensureDemonstration } from './demonstration/demonstration';
import { readNote, type DemonstrationNote } from './demonstration/note';
import { listPartnerPage } from './demonstration/partner-page-site';
import { createPartnerPage } from './partner-page/partner-page';
import { enterFirstAdministrator } from './people/first-administrator';
import { welcome } from './welcome';

/** A body of 2 GB over 2.5 Mbit/s; Node's own five minutes would break such uploads off. */
const requestTimeoutMs = 2 * 60 * 60 * 1000;

async function listen(app: Express, port: number, variable: string): Promise<Server> {
  const server = createServer({ requestTimeout: requestTimeoutMs }, app);
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) =>
      reject(
        error.code === 'EADDRINUSE'
          ? new ConfigurationError(variable, String(port), 'a port that no other program uses')
          : error,
      ),
    );
    server.listen(port, () => resolve(server));
  });
}

/** Takes no new calls, lets the running ones end, then closes the database. A second signal ends at once. */
function stopOnSignal(servers: readonly Server[], services: Services): void {
  const stop = (): void => {
    for (const server of servers) {
      server.close();
      server.closeIdleConnections();
    }
    setTimeout(() => servers.forEach((server) => server.closeAllConnections()), 2000).unref();
    void services.close().then(() => process.exit(0));
  };
  for (const signal of ['SIGINT', 'SIGTERM'] as const) {
    process.once(signal, stop);
  }
}

async function open(config: Config, services: Services, demonstration: DemonstrationNote | null): Promise<void> {
  await migrate(services.knex, migrationsFolder);
  if (!config.demonstration) await enterFirstAdministrator({ ...services, administrator: config.administrator });
  if (demonstration) await listPartnerPage(services, demonstration);
  if (!config.demonstration && readNote(config.dataFolder)) {
    services.log.warn(
      'This data folder holds the demonstration, whose password is published. Set DATA_DIR to another folder for real work.',
    );
  }
  services.fitRunner.open();
  services.schedule.start();
}

async function start(): Promise<void> {
  const config = readConfig(process.env);
  const log = pino({ level: config.logLevel });
  const tell = (line: string): void => console.log(`  ${line}`);
  const demonstration = config.demonstration ? await ensureDemonstration({ config, log, now: new Date(), tell }) : null;
  const services = compose({ config, log });
  await open(config, services, demonstration);
  const servers = [
    await listen(createApp(services), config.port, 'PORT'),
    await listen(createPartnerPage(config), config.partnerPagePort, 'PARTNER_PAGE_PORT'),
  ];
  stopOnSignal(servers, services);
  console.log(welcome(config));
  if (demonstration) console.log(announcement(config, demonstration));
}

start().catch((error: unknown) => {
  // A wrong setting is told in one line, without a stack.
  console.error(error instanceof ConfigurationError ? error.message : error);
  process.exit(1);
});
