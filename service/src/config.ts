import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { randomBytes } from 'node:crypto';
import { join, resolve } from 'node:path';
import { rootFolder } from './root-folder';

export interface Config {
  readonly port: number;
  readonly partnerPagePort: number;
  readonly dataFolder: string;
  readonly demonstration: boolean;
  readonly publicUrl: string;
  readonly partnerPageUrl: string;
  readonly sessionSecret: string;
  readonly smtpUrl: string | null;
  readonly logLevel: string;
  readonly administrator: { readonly email: string; readonly password: string } | null;
}

/** A wrong environment variable: one line that names it, what it got and what it takes. */
export class ConfigurationError extends Error {
  constructor(name: string, got: string, takes: string) {
    super(`${name} is ${JSON.stringify(got)}; it takes ${takes}.`);
    this.name = 'ConfigurationError';
  }
}

type Environment = Readonly<Record<string, string | undefined>>;

function read<Value>(
  environment: Environment,
  name: string,
  fallback: string,
  takes: string,
  parse: (text: string) => Value | undefined,
): Value {
  const text = environment[name]?.trim() || fallback;
  const value = parse(text);
  if (value === undefined) throw new ConfigurationError(name, text, takes);
  return value;
}

function parsePort(text: string): number | undefined {
  const port = Number(text);
  return /^\d{1,5}$/.test(text) && port >= 1 && port <= 65535 ? port : undefined;
}

function parseOrigin(text: string): string | undefined {
  if (!URL.canParse(text)) return undefined;
  const url = new URL(text);
  return /^https?:$/.test(url.protocol) && url.pathname === '/' && url.search === '' ? url.origin : undefined;
}

const logLevels: readonly string[] = ['silent', 'error', 'warn', 'info', 'debug'];
const parseLogLevel = (text: string): string | undefined => (logLevels.includes(text) ? text : undefined);

const parseSwitch = (text: string): boolean | undefined => (text === 'on' ? true : text === 'off' ? false : undefined);

function readAdministrator(environment: Environment): Config['administrator'] {
  const email = environment['ADMIN_EMAIL']?.trim();
  const password = environment['ADMIN_PASSWORD'];
  if (!email && !password) return null;
  if (!email || !/^[^\s@]+@[^\s@]+$/.test(email))
    throw new ConfigurationError('ADMIN_EMAIL', email ?? '', 'an e-mail address, together with ADMIN_PASSWORD');
  if (!password || password.length < 15)
    throw new ConfigurationError(
      'ADMIN_PASSWORD',
      password ? 'a shorter password' : '',
      'at least 15 characters, together with ADMIN_EMAIL',
    );
  return { email, password };
}

/** Kept in the data folder when the environment gives none, so that sessions outlive a restart. */
function sessionSecretOf(environment: Environment, dataFolder: string): string {
  const given = environment['SESSION_SECRET'];
  if (given !== undefined && given !== '') {
    if (given.length < 32) throw new ConfigurationError('SESSION_SECRET', 'a shorter text', 'at least 32 characters');
    return given;
  }
  const path = join(dataFolder, 'session-secret');
  if (!existsSync(path)) writeFileSync(path, randomBytes(32).toString('hex'), { mode: 0o600, flag: 'wx' });
  return readFileSync(path, 'utf8').trim();
}

function readSmtpUrl(environment: Environment): string | null {
  const text = environment['SMTP_URL']?.trim();
  if (!text) return null;
  if (!URL.canParse(text) || !/^smtps?:$/.test(new URL(text).protocol))
    throw new ConfigurationError('SMTP_URL', text, 'an smtp:// or smtps:// address');
  return text;
}

/** Reads and checks the environment once, at start. Makes the data folder. */
export function readConfig(environment: Environment): Config {
  const port = read(environment, 'PORT', '4300', 'a port number from 1 to 65535', parsePort);
  const partnerPagePort = read(environment, 'PARTNER_PAGE_PORT', '4301', 'a port number from 1 to 65535', parsePort);
  if (port === partnerPagePort)
    throw new ConfigurationError('PARTNER_PAGE_PORT', String(partnerPagePort), 'another port than PORT');
  const dataFolder = resolve(rootFolder, environment['DATA_DIR']?.trim() || 'data');
  const demonstration = read(environment, 'DEMO', 'on', 'on or off', parseSwitch);
  const publicUrl = read(
    environment,
    'PUBLIC_URL',
    `http://localhost:${port}`,
    'an http:// or https:// address without a path',
    parseOrigin,
  );
  const smtpUrl = readSmtpUrl(environment);
  const logLevel = read(environment, 'LOG_LEVEL', 'warn', `one of ${logLevels.join(', ')}`, parseLogLevel);
  const administrator = readAdministrator(environment);
  mkdirSync(dataFolder, { recursive: true });
  return {
    port,
    partnerPagePort,
    dataFolder,
    demonstration,
    publicUrl,
    partnerPageUrl: `http://localhost:${partnerPagePort}`,
    sessionSecret: sessionSecretOf(environment, dataFolder),
    smtpUrl,
    logLevel,
    administrator,
  };
}
