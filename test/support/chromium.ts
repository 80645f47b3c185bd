import { existsSync } from 'node:fs';
import { chromium, type Browser } from 'playwright-core';

/** Debian's chromium without a sandbox (tests may run as root) and without calls of its own to the network. */
const flags = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export async function startChromium(): Promise<Browser> {
  const path = [process.env['CHROMIUM'], '/usr/bin/chromium', '/usr/bin/chromium-browser'].find((candidate) => candidate && existsSync(candidate));
  if (!path) throw new Error('Install chromium (apt-get install chromium) or name one in CHROMIUM.');
  return chromium.launch({ executablePath: path, headless: true, args: flags });
}
