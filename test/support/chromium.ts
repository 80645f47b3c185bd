import { existsSync, mkdirSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { chromium, type Browser, type Page } from 'playwright-core';

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
  const path = [process.env['CHROMIUM'], '/usr/bin/chromium', '/usr/bin/chromium-browser'].find(
    (candidate) => candidate && existsSync(candidate),
  );
  if (!path) throw new Error('Install chromium (apt-get install chromium) or name one in CHROMIUM.');
  return chromium.launch({ executablePath: path, headless: true, args: flags });
}

/** For whoever must find out why a browser test failed. */
export async function keepPictures(pages: Readonly<Record<string, Page>>): Promise<void> {
  const folder = join(tmpdir(), 'tarebeam-pictures');
  mkdirSync(folder, { recursive: true });
  for (const [name, page] of Object.entries(pages)) {
    await page.screenshot({ path: join(folder, `${name}.png`), fullPage: true }).catch(() => undefined);
  }
  console.error(`What each person saw is in ${folder}.`);
}
