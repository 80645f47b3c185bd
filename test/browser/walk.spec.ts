import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { partnerPageSettingsPath } from '../../service/src/partner-page/partner-page';
import { keepPictures, startChromium } from '../support/chromium';
import { acceptInvitation, bringIn, confirm, invite, issueKey, signIn } from '../support/console-steps';
import { startService, type RunningService } from '../support/running-service';
import { testPassword } from '../support/test-service';

// R's data set CO2 and what scikit-learn makes of it; source and method in reference.py beside the figures.
const fixtures = join(__dirname, '..', 'fixtures', 'walk');
const reference = JSON.parse(readFileSync(join(fixtures, 'reference.json'), 'utf8')) as {
  lambda: number;
  cvError: number;
  case: Record<string, string | number>;
  value: number;
  low: number;
  high: number;
};
const administrator = 'ada@desk.example';

interface AnsweredEstimate {
  id: string;
  value: number;
  interval: { low: number; high: number };
  edition: number;
}

jest.setTimeout(120_000);

describe('records become a form on a partner’s page', () => {
  let service: RunningService;
  let browser: Browser;
  let ada: Page;
  let noor: Page;
  let ivo: Page;
  let partnerKey = '';
  let embedKey = '';
  let estimateId = '';

  // Each person has a browser profile of their own.
  const newPage = async (): Promise<Page> => {
    const context = await browser.newContext({ viewport: { width: 1280, height: 900 } });
    context.setDefaultTimeout(15_000);
    return context.newPage();
  };

  beforeAll(async () => {
    service = await startService({ DEMO: 'off', ADMIN_EMAIL: administrator, ADMIN_PASSWORD: testPassword });
    browser = await startChromium();
    [ada, noor, ivo] = [await newPage(), await newPage(), await newPage()];
  });
  afterAll(async () => {
    await browser?.close();
    await service?.stop();
  });

  // Every step rests on the one before: after a failure the rest fail at once, and what each person saw is kept.
  let failed: string | undefined;
  const step = (title: string, walk: () => Promise<void>): void =>
    it(title, async () => {
      if (failed !== undefined) throw new Error(`The walk ended at: ${failed}`);
      try {
        await walk();
      } catch (error) {
        failed = title;
        await keepPictures({ ada, noor, ivo });
        throw error;
      }
    });

  step('1. people sign in after an invitation', async () => {
    await signIn(ada, service.url, administrator);
    const analystLink = await invite(ada, service.url, {
      name: 'Noor Falk',
      email: 'noor@desk.example',
      role: 'Analyst',
    });
    const reviewerLink = await invite(ada, service.url, {
      name: 'Ivo Brandt',
      email: 'ivo@desk.example',
      role: 'Reviewer',
    });
    await acceptInvitation(noor, analystLink);
    await acceptInvitation(ivo, reviewerLink);
    await signIn(noor, service.url, 'noor@desk.example');
    await signIn(ivo, service.url, 'ivo@desk.example');
    expect(await noor.getByRole('link', { name: 'People' }).count()).toBe(0);
  });

  step('2. an analyst brings in records and sees their columns', async () => {
    await bringIn(noor, service.url, join(fixtures, 'co2-uptake.csv'), 'Carbon dioxide uptake');
    await noor.getByText('84 rows, 5 columns.', { exact: false }).waitFor();
    const uptake = noor.getByRole('row').filter({ has: noor.getByRole('rowheader', { name: 'uptake' }) });
    expect(await uptake.innerText()).toMatch(/Number[^]*7\.7 to 45\.5/);
  });

  step('3. a ridge fit chooses the penalty that scikit-learn chooses', async () => {
    await noor.goto(`${service.url}/estimators`);
    await noor
      .getByRole('button', { name: /Name (an|the first) estimator/ })
      .first()
      .click();
    await noor.getByLabel('Name', { exact: true }).fill('Leaf uptake');
    await noor.getByLabel('What it estimates').fill('Uptake of carbon dioxide');
    await noor.getByLabel('Unit').fill('µmol/m²s');
    await noor.getByRole('button', { name: /Name the estimator/ }).click();
    await noor.getByRole('link', { name: 'Start a new fit' }).click();
    await noor.getByLabel('Record set').selectOption({ label: 'Carbon dioxide uptake' });
    await noor.getByLabel('Target').selectOption({ label: 'uptake' });
    await noor.getByRole('checkbox', { name: 'Use Plant' }).uncheck();
    await noor.getByRole('radio', { name: 'Grouped' }).check();
    await noor.getByLabel('Group column').selectOption({ label: 'Plant' });
    await noor.getByLabel('Folds').fill('12');
    await noor.getByRole('button', { name: 'Start the fit' }).click();
    await noor.getByRole('heading', { name: 'Penalty path' }).waitFor();
    const fitId = new URL(noor.url()).pathname.split('/').pop() ?? '';
    const fit = (await (await noor.request.get(`${service.url}/api/fits/${fitId}`)).json()) as {
      result: { penalty: { lambda: number }; path: { lambda: number; cvError: number }[] };
    };
    const { lambda } = fit.result.penalty;
    expect(Math.abs(lambda / reference.lambda - 1)).toBeLessThan(1e-8);
    const chosen = fit.result.path.find((point) => point.lambda === lambda);
    expect(Math.abs((chosen?.cvError ?? NaN) / reference.cvError - 1)).toBeLessThan(1e-8);
  });

  step('4. another person puts the edition in force', async () => {
    await noor.getByRole('button', { name: 'Draw up an edition' }).click();
    await confirm(noor, 'Draw up the edition', 'The first edition, on twelve plants.');
    await noor.getByRole('button', { name: 'Submit for review' }).click();
    await confirm(noor, 'Submit for review');
    await noor.getByText('Under review').first().waitFor();
    expect(await noor.getByRole('button', { name: 'Put in force' }).count()).toBe(0);
    await ivo.goto(noor.url());
    await ivo.getByRole('button', { name: 'Put in force' }).click();
    await confirm(ivo, 'Put in force');
    await ivo.getByText('In force').first().waitFor();
  });

  step('5. a partner gets a site, a partner key and an embed key', async () => {
    await ada.goto(`${service.url}/partners`);
    await ada.getByRole('button', { name: 'Enter a partner' }).first().click();
    await ada.getByLabel('Name').fill('Fernside Growers');
    await ada.getByLabel('Contact e-mail').fill('office@fernside.example');
    await ada.getByRole('button', { name: 'Enter the partner' }).click();
    await ada.getByRole('heading', { level: 1, name: 'Fernside Growers' }).waitFor();
    await ada.getByRole('button', { name: 'List a site' }).click();
    await ada.getByLabel('Origin').fill(service.partnerPageUrl);
    await ada.getByRole('button', { name: 'List the site' }).click();
    await ada.getByRole('button', { name: `Take off ${service.partnerPageUrl}` }).waitFor();
    partnerKey = await issueKey(ada, 'Partner key', 'Greenhouse server');
    embedKey = await issueKey(ada, 'Embed key', 'Public page');
    expect(partnerKey).not.toBe(embedKey);
  });

  step('6. the partner’s server gets the estimate that scikit-learn gives', async () => {
    const headers = { 'X-Api-Key': partnerKey, 'Content-Type': 'application/json' };
    const listed = (await (await fetch(`${service.url}/v1/estimators`, { headers })).json()) as {
      items: { slug: string }[];
    };
    expect(listed.items.map((estimator) => estimator.slug)).toEqual(['leaf-uptake']);
    const answer = await fetch(`${service.url}/v1/estimators/leaf-uptake/estimates`, {
      method: 'POST',
      headers,
      body: JSON.stringify({ inputs: reference.case }),
    });
    expect(answer.status).toBe(200);
    expect(answer.headers.get('ratelimit-policy')).toMatch(/"per-key-minute"; ?q=60; ?w=60/);
    const estimate = (await answer.json()) as AnsweredEstimate;
    expect(Math.abs(estimate.value / reference.value - 1)).toBeLessThan(1e-8);
    // The interval's ends are kept rounded outward in the formula: seven digits.
    expect(Math.abs(estimate.interval.low / reference.low - 1)).toBeLessThan(1e-7);
    expect(Math.abs(estimate.interval.high / reference.high - 1)).toBeLessThan(1e-7);
  });

  step('7. the form on the partner’s page shows the same estimate, with its edition and reference', async () => {
    writeFileSync(
      partnerPageSettingsPath(service.dataFolder),
      JSON.stringify({ estimator: 'leaf-uptake', key: embedKey }),
    );
    const visitor = await newPage();
    await visitor.goto(service.partnerPageUrl);
    await visitor.evaluate(() => {
      document.addEventListener('tarebeam-estimate', (event) => {
        document.body.dataset['answered'] = JSON.stringify(
          (event as CustomEvent<{ estimate: unknown }>).detail.estimate,
        );
      });
    });
    const form = visitor.locator('tarebeam-form');
    await form.getByRole('radio', { name: 'Quebec' }).check();
    await form.getByRole('radio', { name: 'chilled', exact: true }).check();
    await form.getByLabel('conc').fill('420');
    await form.getByRole('button', { name: 'Estimate' }).click();
    await form.getByText('nine of ten', { exact: false }).first().waitFor();
    const answered = JSON.parse(
      (await visitor.locator('body').getAttribute('data-answered')) ?? 'null',
    ) as AnsweredEstimate;
    expect(Math.abs(answered.value / reference.value - 1)).toBeLessThan(1e-8);
    const shown = Number(await form.locator('.figure').first().innerText());
    expect(Math.abs(shown - reference.value)).toBeLessThanOrEqual(0.5);
    expect(await form.getByText(answered.id).count()).toBeGreaterThan(0);
    expect(await form.getByText(/edition 1/i).count()).toBeGreaterThan(0);
    estimateId = answered.id;
  });

  step('the embed key is refused to a page of a site that is not listed', async () => {
    const answer = await fetch(`${service.url}/v1/estimators/leaf-uptake`, {
      headers: { 'X-Api-Key': embedKey, Origin: 'https://elsewhere.example' },
    });
    expect(answer.status).toBe(403);
    expect(((await answer.json()) as { code: string }).code).toBe('site-not-listed');
  });

  step('years later the desk finds which edition gave the number and who approved it', async () => {
    await ada.goto(`${service.url}/estimates/${estimateId}`);
    await ada.getByText('Ivo Brandt').first().waitFor();
    expect(await ada.getByRole('link', { name: /edition 1/i }).count()).toBeGreaterThan(0);
    expect(await ada.getByText('Fernside Growers').count()).toBeGreaterThan(0);
  });

  step('no key was written to the service’s output', async () => {
    expect(service.output()).not.toContain(partnerKey);
    expect(service.output()).not.toContain(embedKey);
  });
});
