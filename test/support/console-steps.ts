import type { Page } from 'playwright-core';
import { testPassword } from './test-service';

/** What people do in the console, by the words on the screen. */
export async function signIn(page: Page, service: string, email: string): Promise<void> {
  await page.goto(`${service}/sign-in`);
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(testPassword);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { level: 1, name: 'Desk', exact: true }).waitFor();
}

/** Invites a person and gives the link that is shown this once. */
export async function invite(
  page: Page,
  service: string,
  person: { name: string; email: string; role: string },
): Promise<string> {
  await page.goto(`${service}/people`);
  await page.getByRole('button', { name: 'Invite a person' }).click();
  await page.getByLabel('Name').fill(person.name);
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByRole('checkbox', { name: person.role }).check();
  await page.getByRole('button', { name: 'Invite', exact: true }).click();
  return page.getByRole('region', { name: 'The invitation’s link' }).innerText();
}

export async function acceptInvitation(page: Page, link: string): Promise<void> {
  await page.goto(link);
  await page.getByLabel('New password').fill(testPassword);
  await page.getByRole('button', { name: 'Set the password' }).click();
  await page.getByRole('button', { name: 'Sign in' }).waitFor();
}

export async function bringIn(page: Page, service: string, file: string, name: string): Promise<void> {
  await page.goto(`${service}/records`);
  await page.getByRole('link', { name: 'Bring in' }).first().click();
  await page.getByLabel('Choose a file').setInputFiles(file);
  await page.getByRole('button', { name: 'Send the file' }).click();
  await page.getByLabel('Name', { exact: true }).fill(name);
  await page.getByRole('button', { name: 'Bring in', exact: true }).click();
  await page.getByRole('heading', { level: 1, name }).waitFor();
}

/** Confirms the question that is open, after a note where one is asked for. */
export async function confirm(page: Page, verb: string, note?: string): Promise<void> {
  const dialog = page.getByRole('dialog');
  if (note !== undefined) await dialog.getByRole('textbox').first().fill(note);
  await dialog.getByRole('button', { name: verb }).click();
  await dialog.waitFor({ state: 'detached' });
}

export async function issueKey(page: Page, kind: 'Partner key' | 'Embed key', label: string): Promise<string> {
  await page.getByRole('button', { name: 'Issue a key' }).click();
  await page.getByRole('radio', { name: new RegExp(`^${kind}`) }).check();
  await page.getByLabel('Label').fill(label);
  await page.getByRole('button', { name: 'Issue the key' }).click();
  const key = await page.getByRole('region', { name: 'The key', exact: true }).innerText();
  await page.getByRole('button', { name: 'I have copied the key' }).click();
  return key;
}
