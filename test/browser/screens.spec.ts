import { AxeBuilder } from '@axe-core/playwright';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { keepPictures, startChromium } from '../support/chromium';
import { messyFile } from '../support/messy-file';
import { startService, type RunningService } from '../support/running-service';

interface DemonstrationNote {
  readonly password: string;
}
interface Listed<Item> {
  readonly items: readonly Item[];
}

interface RevisionNote {
  readonly id: string;
  readonly number: number;
}

// WCAG 2.2 A and AA, by axe-core's own rules.
const rules = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const widths = [1280, 390];
/**
 * Hundreds of marks or more, which are one picture with a name, and rows of a preview that are like those above them:
 * looking at each takes axe minutes.
 */
const leftOut = [
  ...['tb-held-out-figure svg', 'tb-scatter-plot svg', 'tb-correlation-map svg'],
  'tb-reading-preview tbody tr:nth-child(n + 10)',
];

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

  /** As a script does: with the token that came in the cookie. */
  async function send(page: Page, method: 'POST' | 'PUT' | 'DELETE', path: string, rest: object): Promise<unknown> {
    const token = (await page.context().cookies()).find(({ name }) => name === 'XSRF-TOKEN')?.value ?? '';
    const answer = await page.request.fetch(`${service.url}/api${path}`, {
      ...{ method, headers: { 'X-XSRF-TOKEN': token }, failOnStatusCode: true },
      ...rest,
    });
    return answer.status() === 204 ? undefined : answer.json();
  }

  type Prepare = (page: Page) => Promise<unknown>;

  /**
   * Opens a screen at both widths: it has a heading and a title and never scrolls sideways; axe finds nothing wrong.
   * `prepare` does on it what brings it into the state that is looked at.
   */
  async function inspect(page: Page, path: string, prepare: Prepare = async () => undefined): Promise<void> {
    for (const width of widths) {
      await page.setViewportSize({ width, height: 900 });
      await page.goto(`${service.url}${path}`);
      await page.getByRole('heading', { level: 1 }).first().waitFor();
      await page.waitForLoadState('networkidle');
      await prepare(page);
      await page.waitForLoadState('networkidle');
      const sideways = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
      expect({ path, width, sideways: Math.max(0, sideways) }).toEqual({ path, width, sideways: 0 });
      expect(await page.title()).not.toBe('');
      expect({ path, width, found: await violationsOf(page) }).toEqual({ path, width, found: [] });
    }
  }

  async function violationsOf(page: Page): Promise<string[]> {
    const { violations } = await leftOut
      .reduce((builder, part) => builder.exclude(part), new AxeBuilder({ page }))
      .withTags(rules)
      .analyze();
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

  describe('of records on their way', () => {
    let page: Page;
    let set = '';
    /** The oldest revision and the newest. */
    let [old, newest] = ['', ''];
    const address = (rest = ''): string => `/records/revisions/${old}${rest}`;

    beforeAll(async () => {
      page = await signedIn('ines.caldwell@marlbay.example');
      [{ id: set }] = (await read<Listed<{ id: string }>>(page, '/record-sets')).items;
      const { revisions } = await read<{ revisions: RevisionNote[] }>(page, `/record-sets/${set}`);
      const inOrder = [...revisions].sort((a, b) => a.number - b.number);
      [old, newest] = [inOrder[0].id, inOrder[inOrder.length - 1].id];
    });

    async function look(path: string, prepare?: Prepare): Promise<void> {
      try {
        await inspect(page, path, prepare);
      } catch (error) {
        await keepPictures({ page });
        throw error;
      }
    }

    it('shows how a file would be read, by itself and behind a revision', async () => {
      const { fileName: name, text } = messyFile();
      const file = { name, mimeType: 'text/csv', buffer: Buffer.from(text) };
      const { id } = (await send(page, 'POST', '/incoming-files', { multipart: { file } })) as { id: string };
      try {
        await look(`/records/bring-in/${id}`, () => page.getByRole('heading', { name: 'Preview' }).waitFor());
        await look(`/records/bring-in/${id}?appendTo=${old}`, () =>
          page.getByRole('button', { name: /^Append as revision/ }).waitFor(),
        );
      } finally {
        await send(page, 'DELETE', `/incoming-files/${id}`, {});
      }
    });

    it('shows the rows that an address asks for', async () => {
      const where = encodeURIComponent('[draught (m)] is missing');
      await look(address(`?where=${where}`), () => page.getByText('Only rows where draught (m) is missing').waitFor());
    });

    it('shows a column in full', () =>
      look(address(), async () => {
        await page.locator('tb-columns-table').getByRole('button', { name: 'draught (m)' }).click();
        await page.locator('tb-column-detail').waitFor();
      }));

    it('shows pairs, drawn and as tables', () =>
      look(address(), async () => {
        await page.getByRole('button', { name: 'Show how the columns go together' }).click();
        await page.locator('tb-correlation-map').waitFor();
        await page.getByLabel('Across').selectOption('beam (m)');
        await page.getByLabel('Upward').selectOption('draught (m)');
        await page.locator('tb-scatter-plot').waitFor();
        expect(await violationsOf(page)).toEqual([]);
        for (const each of ['tb-pairs-section tb-figure-frame', 'tb-scatter-figure'])
          await page.locator(each).getByRole('button', { name: 'Show as table' }).first().click();
        await page.getByRole('region', { name: 'Points' }).waitFor();
      }));

    it('shows mending with steps, one of which cannot be done, and the form of another', async () => {
      const steps = [
        { kind: 'convert-unit', column: 'length overall (m)', factor: 0.3048, where: '[length overall (m)] > 25' },
        { kind: 'drop-repeated-rows' },
        { kind: 'rename', column: 'no such column', to: 'another' },
      ];
      const draft = `/record-revisions/${old}/mending-draft`;
      await send(page, 'PUT', draft, { data: { steps } });
      try {
        await look(address('/mend'), async () => {
          await page.getByText('This step cannot be done.').waitFor();
          await page.getByRole('button', { name: 'Add a step' }).click();
          await page.getByRole('heading', { name: 'A new step' }).waitFor();
        });
      } finally {
        await send(page, 'PUT', draft, { data: { steps: [] } });
      }
    });

    it('shows two revisions beside each other', () =>
      look(address(`/compare?with=${newest}`), () => page.getByRole('heading', { name: 'Columns' }).waitFor()));

    it('shows what can be done with a revision', async () => {
      await look(`/records/${set}`, async () => {
        await page.locator('tb-revisions-table').getByRole('button', { name: 'More' }).first().click();
        await page.getByRole('menu').waitFor();
      });
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
