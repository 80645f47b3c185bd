import { AxeBuilder } from '@axe-core/playwright';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { keepPictures, startChromium } from '../support/chromium';
import { startService, type RunningService } from '../support/running-service';

interface DemonstrationNote {
  readonly password: string;
}
interface Listed<Item> {
  readonly items: readonly Item[];
}

// WCAG 2.2 A and AA, by axe-core's own rules.
const rules = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const widths = [1280, 390];

jest.setTimeout(240_000);

describe('every screen of the demonstration', () => {
  let service: RunningService;
  let browser: Browser;
  let password = '';
  const errors: string[] = [];

  async function signedIn(email: string): Promise<Page> {
    const context = await browser.newContext({ viewport: { width: 1280, height: 900 } });
    context.setDefaultTimeout(15_000);
    const page = await context.newPage();
    page.on('pageerror', (error) => errors.push(`${page.url()}: ${error.message}`));
    await page.goto(`${service.url}/sign-in`);
    await page.getByLabel('E-mail').fill(email);
    await page.getByLabel('Password', { exact: true }).fill(password);
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
    return page;
  }

  async function read<Answer>(page: Page, path: string): Promise<Answer> {
    return (await (await page.request.get(`${service.url}/api${path}`)).json()) as Answer;
  }

  /** Opens a screen at both widths: it has a heading and a title and never scrolls sideways; axe finds nothing wrong. */
  async function inspect(page: Page, path: string): Promise<void> {
    for (const width of widths) {
      await page.setViewportSize({ width, height: 900 });
      await page.goto(`${service.url}${path}`);
      await page.getByRole('heading', { level: 1 }).first().waitFor();
      await page.waitForLoadState('networkidle');
      const sideways = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
      expect({ path, width, sideways: Math.max(0, sideways) }).toEqual({ path, width, sideways: 0 });
      expect(await page.title()).not.toBe('');
    }
    expect({ path, found: await violationsOf(page) }).toEqual({ path, found: [] });
  }

  async function violationsOf(page: Page): Promise<string[]> {
    // A scatter has two thousand marks, which are one picture with a name; looking at each takes axe minutes.
    const { violations } = await new AxeBuilder({ page }).exclude('tb-held-out-figure svg').withTags(rules).analyze();
    return violations.map(
      (violation) => `${violation.id}: ${violation.nodes.map((node) => node.target.join(' ')).join(', ')}`,
    );
  }

  beforeAll(async () => {
    service = await startService({ DEMO: 'on' }, 220_000);
    password = (JSON.parse(readFileSync(join(service.dataFolder, 'demonstration.json'), 'utf8')) as DemonstrationNote)
      .password;
    browser = await startChromium();
  });
  afterAll(async () => {
    await browser?.close();
    await service?.stop();
  });

  /** The addresses of one record set, fit, edition and so on of the demonstration. */
  async function addresses(page: Page): Promise<Record<string, string>> {
    const [set] = (await read<Listed<{ id: string; revision: { id: string } }>>(page, '/record-sets')).items;
    const [edition] = (await read<Listed<{ id: string; fitId: string }>>(page, '/estimators/refit-labour/editions'))
      .items;
    const [estimate] = (await read<Listed<{ id: string }>>(page, '/estimators/refit-labour/estimates?limit=1')).items;
    const [partner] = (await read<Listed<{ id: string }>>(page, '/partners')).items;
    return {
      set: set.id,
      revision: set.revision.id,
      edition: edition.id,
      fit: edition.fitId,
      estimate: estimate.id,
      partner: partner.id,
    };
  }

  describe.each([
    [
      'an analyst',
      'ines.caldwell@marlbay.example',
      [
        '/desk',
        '/records',
        '/records/bring-in',
        '/records/{set}',
        '/records/revisions/{revision}',
        '/estimators',
        '/estimators/refit-labour',
        '/estimators/refit-labour/new-fit',
        '/estimators/refit-labour/fits/{fit}',
        '/estimators/refit-labour/editions/{edition}',
        '/estimates/{estimate}',
        '/settings',
      ],
    ],
    ['an administrator', 'maren.tolley@marlbay.example', ['/partners', '/partners/{partner}', '/people', '/journal']],
  ])('of %s', (_who, email, paths) => {
    let page: Page;
    let found: Record<string, string>;
    beforeAll(async () => {
      page = await signedIn(email);
      found = await addresses(page);
    });

    it.each(paths)('%s is readable at both widths', async (pattern) => {
      try {
        await inspect(
          page,
          pattern.replace(/\{(\w+)\}/g, (_whole, name: string) => found[name]),
        );
      } catch (error) {
        await keepPictures({ page });
        throw error;
      }
    });
  });

  it('of a partner developer shows their own partner and nothing of the desk', async () => {
    const page = await signedIn('sam.orrell@pelltarn.example');
    await page.getByRole('heading', { level: 1, name: 'Pell & Tarn Brokers' }).waitFor();
    expect(await page.getByRole('link', { name: 'Records' }).count()).toBe(0);
    await page.goto(`${service.url}/records`);
    await page.getByRole('heading', { level: 1 }).first().waitFor();
    expect((await page.request.get(`${service.url}/api/record-sets`)).status()).toBe(403);
  });

  it('on the partner’s page holds the form, readable at both widths', async () => {
    const page = await (await browser.newContext()).newPage();
    for (const width of widths) {
      await page.setViewportSize({ width, height: 900 });
      await page.goto(service.partnerPageUrl);
      await page.locator('tarebeam-form').getByRole('button', { name: 'Estimate' }).waitFor();
      const sideways = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
      expect(sideways).toBeLessThanOrEqual(0);
      const { violations } = await new AxeBuilder({ page }).include('tarebeam-form').withTags(rules).analyze();
      expect(violations.map((violation) => violation.id)).toEqual([]);
    }
  });

  it('throws no error', () => {
    expect(errors).toEqual([]);
  });

  it('documentation opens under its content policy', async () => {
    const page = await (await browser.newContext()).newPage();
    page.setDefaultTimeout(30_000);
    const refused: string[] = [];
    page.on('console', (message) => {
      if (/content security policy/i.test(message.text())) refused.push(message.text());
    });
    await page.goto(`${service.url}/docs`);
    await page.getByRole('heading', { name: /^Desk API/ }).waitFor();
    expect(refused).toEqual([]);
  });
});
