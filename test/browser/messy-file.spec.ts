import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, Locator, Page } from 'playwright-core';
import { keepPictures, startChromium } from '../support/chromium';
import { acceptInvitation, confirm, invite, signIn } from '../support/console-steps';
import { messyFile } from '../support/messy-file';
import { startService, type RunningService } from '../support/running-service';
import { testPassword } from '../support/test-service';

const administrator = 'ada@desk.example';
const { fileName, text, faults } = messyFile();

jest.setTimeout(120_000);

describe('a messy file becomes records that one can stand behind', () => {
  let service: RunningService;
  let browser: Browser;
  let noor: Page;
  const folder = mkdtempSync(join(tmpdir(), 'tarebeam-messy-'));
  const file = join(folder, fileName);
  const nextMonth = join(folder, 'marl-point-next-month.csv');

  const newPage = async (): Promise<Page> => {
    const context = await browser.newContext({ viewport: { width: 1280, height: 900 } });
    context.setDefaultTimeout(20_000);
    return context.newPage();
  };

  beforeAll(async () => {
    const lines = text.split('\r\n');
    writeFileSync(file, text);
    // Three jobs of the file again under references of their own.
    const added = lines.slice(3, 6).map((line) => line.replace(/^J2/, 'K2'));
    writeFileSync(nextMonth, [lines[2], ...added, ''].join('\r\n'));
    service = await startService({ DEMO: 'off', ADMIN_EMAIL: administrator, ADMIN_PASSWORD: testPassword });
    browser = await startChromium();
    const ada = await newPage();
    noor = await newPage();
    await signIn(ada, service.url, administrator);
    const person = { name: 'Noor Falk', email: 'noor@desk.example', role: 'Analyst' };
    await acceptInvitation(noor, await invite(ada, service.url, person));
    await signIn(noor, service.url, person.email);
  });
  afterAll(async () => {
    await browser?.close();
    await service?.stop();
    rmSync(folder, { recursive: true, force: true });
  });

  // Every step rests on the one before: after a failure the rest fail at once, and what was seen is kept.
  let failed: string | undefined;
  const step = (title: string, walk: () => Promise<void>): void =>
    it(title, async () => {
      if (failed !== undefined) throw new Error(`The walk ended at: ${failed}`);
      try {
        await walk();
      } catch (error) {
        failed = title;
        await keepPictures({ noor });
        throw error;
      }
    });

  /** The finding that tells this, as the words on its entry. */
  async function finding(heading: string, about: RegExp): Promise<string> {
    const entry: Locator = noor.locator('tb-finding-entry').filter({ hasText: heading }).filter({ hasText: about });
    await entry.first().waitFor();
    return (await entry.first().innerText()).replace(/\s+/g, ' ');
  }

  const columnRow = (name: string): Locator =>
    noor.getByRole('row').filter({ has: noor.getByRole('rowheader', { name: new RegExp(`^${name}`) }) });

  const revisionId = (): string => new URL(noor.url()).pathname.split('/').pop() ?? '';

  step(
    '1. the desk proposes how to read it: the line of names, marks, dates and the units behind the numbers',
    async () => {
      await noor.goto(`${service.url}/records/bring-in`);
      await noor.getByLabel('Choose a file').setInputFiles(file);
      await noor.getByRole('button', { name: 'Send the file' }).click();
      await noor.getByRole('heading', { level: 1, name: fileName }).waitFor();
      expect(await noor.getByLabel('Header line').inputValue()).toBe(String(faults.titleLines + 1));
      expect(await noor.getByLabel('Between the cells').inputValue()).toBe(';');
      expect(await noor.getByLabel('Decimal mark').inputValue()).toBe(',');
      expect(await noor.getByLabel('Kind of finished').inputValue()).toBe('date');
      expect(await noor.getByLabel('Order of the dates in finished').inputValue()).toBe('day-first');
      expect(await noor.getByLabel('Unit of length overall').inputValue()).toBe('m');
      const seen = (await columnRow('length overall').innerText()).replace(/\s+/g, ' ');
      expect(seen).toMatch(new RegExp(`ft.*${faults.feetInCells.length} numbers?.*0\\.3048`));
    },
  );

  step('2. an analyst takes 999 as missing and sets the owners aside before anything counts', async () => {
    expect(await columnRow('crew').innerText()).toContain(`999 stands ${faults.marked999.length} times`);
    await noor.getByRole('button', { name: 'Take 999 as missing in crew' }).click();
    await columnRow('crew').getByText(`${faults.marked999.length} missing`).waitFor();
    await noor.getByRole('checkbox', { name: `Set ${faults.personal.column} aside` }).check();
    await columnRow(faults.personal.column).getByText('never stored').waitFor();
    await noor.getByText('Being read again').waitFor({ state: 'hidden' });
    await noor.getByLabel('Name', { exact: true }).fill('Marl Point jobs');
    await noor.getByRole('button', { name: 'Bring in', exact: true }).click();
    await noor.getByRole('heading', { level: 1, name: 'Marl Point jobs, revision 1' }).waitFor();
    expect(await noor.getByText(`${faults.rowCount} rows, 15 columns`, { exact: false }).count()).toBeGreaterThan(0);
  });

  step('3. what was set aside is nowhere on the disk', async () => {
    const left = readdirSync(service.dataFolder, { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile())
      .map((entry) => join(entry.parentPath, entry.name))
      .filter((path) => readFileSync(path).includes(faults.personal.example));
    expect(left).toEqual([]);
    expect(service.output()).not.toContain(faults.personal.example);
    const original = await noor.request.get(`${service.url}/api/record-revisions/${revisionId()}/original`);
    expect([original.status(), ((await original.json()) as { code: string }).code]).toEqual([410, 'original-not-kept']);
  });

  step('4. every other fault is found, with its rows', async () => {
    await noor.getByLabel('Target').selectOption(faults.leak.target);
    await finding('Perhaps known too late', /invoiced \(h\) alone predicts/);
    const feet = await finding('Units mixed up', /waterline length/);
    expect(feet).toContain(`Rows ${faults.feet.join(', ')}`);
    const kilograms = await finding('Units mixed up', /displacement/);
    expect(kilograms).toContain(`Rows ${faults.kilograms.join(', ')}`);
    expect(await finding('Repeated rows', /repeat an earlier row in every column\./)).toContain(
      `Rows ${faults.repeated.join(', ')}`,
    );
    expect(await finding('Nearly repeated rows', /every column but beam/)).toContain(
      `Rows ${faults.nearlyRepeated.join(', ')}`,
    );
    const spelled = await finding('Levels spelt alike', /hull writes one level/);
    for (const spelling of faults.spellings) expect(spelled).toContain(spelling.trim());
    await finding('Column with one value', new RegExp(faults.constantColumn));
    await finding('Columns alike', /beam \(cm\) is nearly a copy of beam \(m\)/);
    await finding('Column made of others', /all but a sum of multiples of/);
    expect(await finding('Outlying values', /labour \(h\) lies more than/)).toContain(`Row ${faults.typingError.row}`);
    await finding('Words among numbers', new RegExp(`${faults.nearlyNumeric} holds numbers but for 3 rows`));
    const { column, from, to } = faults.timeGap;
    await finding('Gap in time', new RegExp(`${column} has no record between ${from} and ${to}`));
  });

  step('5. a figure leads to the rows behind it', async () => {
    await noor.getByRole('button', { name: 'ballast (t)', exact: true }).click();
    await noor.getByRole('link', { name: 'Rows with Missing of ballast (t)' }).press('Enter');
    const numbers = noor.locator('tb-rows-table tbody th');
    await expectTexts(numbers, ['5', '50', '111', '207']);
    await noor.getByLabel('Rows where').fill('crew is missing and [beam (m)] > 3');
    await noor.getByRole('button', { name: 'Show these rows', exact: true }).click();
    await noor.waitForURL((url) => url.searchParams.get('where')?.startsWith('crew') ?? false);
    await expectTexts(numbers, faults.marked999.map(String));
  });

  step('6. the remedies become steps, are reordered and undone, and make revision 2', async () => {
    await noor.getByRole('button', { name: 'Add every proposed remedy' }).click();
    await noor.getByRole('dialog').getByRole('button', { name: /^Add/ }).click();
    await noor.getByRole('dialog').waitFor({ state: 'detached' });
    await noor.getByRole('link', { name: 'the mending', exact: true }).click();
    await noor.getByRole('heading', { level: 1, name: 'Mend revision 1' }).waitFor();
    const steps = noor.locator('tb-step-list > ol > li');
    await steps.first().waitFor();
    const before = await steps.count();
    await noor
      .getByRole('button', { name: /^Remove/ })
      .last()
      .click();
    await steps.nth(before - 1).waitFor({ state: 'detached' });
    await noor.getByRole('button', { name: 'Undo' }).click();
    await steps.nth(before - 1).waitFor();
    const [feetFirst, feetSecond] = [0, 1].map((at) => steps.nth(at).filter({ hasText: 'Multiply waterline length' }));
    await feetFirst.waitFor();
    await noor
      .getByRole('button', { name: /^Move down/ })
      .first()
      .press('Enter');
    await feetSecond.waitFor();
    await noor.getByText(/Kept at/).waitFor();
    await noor.getByRole('button', { name: 'Make revision 2' }).click();
    await noor.getByRole('heading', { level: 1, name: 'Marl Point jobs, revision 2' }).waitFor();
  });

  step('7. the mended revision tells how it was made, and holds only what a person must judge', async () => {
    const made = noor.locator('tb-mending-history');
    await made.getByText('Multiplied waterline length (m) by 0.3048 in 5 rows', { exact: false }).waitFor();
    await noor.getByText('findings to look at', { exact: false }).waitFor();
    const kinds = await noor.locator('tb-finding-entry h3').allInnerTexts();
    expect(kinds.map((kind) => kind.toLowerCase()).sort()).toEqual(['gap in time', 'nearly repeated rows']);
  });

  step('8. the two revisions are compared row by row', async () => {
    await noor.goto(`${service.url}/records/revisions/${revisionId()}/compare`);
    await noor.getByRole('heading', { name: 'Changed cells' }).waitFor();
    const lead = (await noor.locator('tb-sheet header').innerText()).replace(/\s+/g, ' ');
    expect(lead).toMatch(/3 (rows )?removed/);
    await noor.getByRole('button', { name: 'waterline length (m)', exact: true }).click();
    await noor.getByRole('heading', { name: 'waterline length (m)' }).first().waitFor();
  });

  step('9. a month is appended to the first revision and the steps are applied again', async () => {
    await noor.goto(`${service.url}/records`);
    await noor.getByRole('link', { name: 'Marl Point jobs', exact: true }).click();
    await noor.getByRole('radio', { name: /by appending/ }).check();
    await noor.getByLabel('Append to').selectOption({ label: 'Revision 1, 305 rows' });
    await noor.getByLabel('Choose the newer file').setInputFiles(nextMonth);
    await noor.getByRole('button', { name: 'Send the file' }).click();
    await noor.getByRole('button', { name: 'Append as revision 3' }).click();
    await noor.getByRole('heading', { level: 1, name: 'Marl Point jobs, revision 3' }).waitFor();
    expect(await noor.getByText('308 rows, 15 columns', { exact: false }).count()).toBeGreaterThan(0);
    await noor.getByRole('link', { name: 'Apply the steps of revision 2 here' }).click();
    await noor.getByRole('heading', { level: 1, name: 'Mend revision 3' }).waitFor();
    await noor.getByRole('button', { name: 'Make revision 4' }).click();
    await noor.getByRole('heading', { level: 1, name: 'Marl Point jobs, revision 4' }).waitFor();
    expect(await noor.getByText('305 rows', { exact: false }).count()).toBeGreaterThan(0);
  });

  step('10. a revision is exported, and one that nothing rests on is deleted after saying what goes', async () => {
    const exported = await noor.request.get(`${service.url}/api/record-revisions/${revisionId()}/csv`);
    const lines = (await exported.body())
      .toString('utf8')
      .replace(/^\ufeff/, '')
      .trimEnd()
      .split(/\r?\n/);
    expect(lines).toHaveLength(306);
    expect(lines[0]).not.toContain(faults.personal.column);
    await noor.goto(`${service.url}/records`);
    await noor.getByRole('link', { name: 'Marl Point jobs', exact: true }).click();
    await noor.getByRole('button', { name: 'More about revision 2' }).click();
    await noor.getByRole('menuitem', { name: /Delete/ }).click();
    await noor.getByRole('dialog').getByText('302 rows', { exact: false }).waitFor();
    await confirm(noor, 'Delete revision 2');
    await noor.getByRole('link', { name: 'Revision 4', exact: true }).waitFor();
    expect(await noor.getByRole('link', { name: 'Revision 2', exact: true }).count()).toBe(0);
  });
});

/** Waits until the elements read so. */
async function expectTexts(elements: Locator, texts: readonly string[]): Promise<void> {
  const read = async (): Promise<string> => (await elements.allInnerTexts()).map((one) => one.trim()).join();
  const deadline = Date.now() + 15_000;
  while ((await read()) !== texts.join() && Date.now() < deadline) await elements.page().waitForTimeout(100);
  expect(await read()).toBe(texts.join());
}
