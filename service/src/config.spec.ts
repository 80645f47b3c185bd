import { mkdtempSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { readConfig } from './config';

describe('configuration', () => {
  let folder: string;
  beforeEach(() => void (folder = mkdtempSync(join(tmpdir(), 'tarebeam-config-'))));
  afterEach(() => rmSync(folder, { recursive: true }));
  const read = (environment: Record<string, string>) => readConfig({ DATA_DIR: folder, ...environment });

  it('has a default for everything', () => {
    expect(read({})).toMatchObject({
      port: 4300,
      partnerPagePort: 4301,
      demonstration: true,
      publicUrl: 'http://localhost:4300',
      smtpUrl: null,
      administrator: null,
    });
  });

  it.each([
    [{ PORT: 'ninety' }, 'PORT is "ninety"; it takes a port number from 1 to 65535.'],
    [{ PORT: '70000' }, 'PORT is "70000"; it takes a port number from 1 to 65535.'],
    [{ PORT: '4301' }, 'PARTNER_PAGE_PORT is "4301"; it takes another port than PORT.'],
    [{ DEMO: 'yes' }, 'DEMO is "yes"; it takes on or off.'],
    [
      { PUBLIC_URL: 'desk.example/app' },
      'PUBLIC_URL is "desk.example/app"; it takes an http:// or https:// address without a path.',
    ],
    [{ SMTP_URL: 'mail.example' }, 'SMTP_URL is "mail.example"; it takes an smtp:// or smtps:// address.'],
    [{ LOG_LEVEL: 'loud' }, 'LOG_LEVEL is "loud"; it takes one of silent, error, warn, info, debug.'],
    [
      { ADMIN_EMAIL: 'ann@desk.example' },
      'ADMIN_PASSWORD is ""; it takes at least 15 characters, together with ADMIN_EMAIL.',
    ],
  ])('names the variable, what it got and what it takes: %j', (environment, message) => {
    expect(() => read(environment)).toThrow(message);
  });

  it('never repeats a secret that it refuses', () => {
    expect(() => read({ SESSION_SECRET: 'brief secret' })).toThrow(/^SESSION_SECRET is "a shorter text"/);
    expect(() => read({ ADMIN_EMAIL: 'ann@desk.example', ADMIN_PASSWORD: 'brief' })).toThrow(
      /^ADMIN_PASSWORD is "a shorter password"/,
    );
  });

  it('makes a session secret, keeps it for the owner alone and finds it again', () => {
    const first = read({}).sessionSecret;
    expect(first).toHaveLength(64);
    expect(read({}).sessionSecret).toBe(first);
    expect(statSync(join(folder, 'session-secret')).mode & 0o077).toBe(0);
  });
});
