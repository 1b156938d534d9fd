import AxeBuilder from '@axe-core/playwright';
import type { Browser, Page } from '@playwright/test';
import { expect, personOf, signIn, test } from './fixtures';

/** Keeping the house: somebody is invited by a letter, comes in, gets another role, and is shut out. */

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'];
const PASSWORD = 'seven bells at slack water';

async function breaksNoRule(page: Page, name: string) {
  await page.waitForLoadState('load');
  for (const width of [1440, 390]) {
    await page.setViewportSize({ width, height: 900 });
    const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
    expect(violations.map(({ id, nodes }) => `${name}: ${id} at ${nodes[0]?.target.join(' ')}`)).toEqual([]);
    const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect(over, `${name} runs over the side at ${width} px`).toBeLessThanOrEqual(0);
  }
  await page.setViewportSize({ width: 1440, height: 900 });
}

/** The latest letter to somebody, once the worker has sent it and the catcher has it. */
async function openLetter(page: Page, email: string, subject: RegExp) {
  await expect(async () => {
    await page.goto(`/arrived-mail?to=${encodeURIComponent(email)}`);
    await page.getByRole('link', { name: subject }).first().click({ timeout: 2_000 });
    await expect(page.getByRole('heading', { name: 'As plain text' })).toBeVisible({ timeout: 5_000 });
  }).toPass({ timeout: 60_000, intervals: [1_000] });
}

async function linkOf(page: Page, place: string): Promise<string> {
  const href = await page.locator(`pre a[href*="/${place}/"]`).getAttribute('href');
  if (!href) throw new Error(`the letter has no link to ${place}`);
  return new URL(href).pathname;
}

async function aVisitor(browser: Browser) {
  const context = await browser.newContext();
  return { context, page: await context.newPage() };
}

const lineOf = (page: Page, name: string) => page.getByRole('listitem').filter({ hasText: name });

test('the last administrator can neither leave nor step down', async ({ page }) => {
  await signIn(page, 'administrator', '/people');
  const self = lineOf(page, personOf('administrator').email);
  await self.getByText('Change', { exact: true }).click();
  await expect(self.getByText('This is the last administrator; make somebody else one first.')).toBeVisible();
  await expect(self.getByRole('button')).toHaveCount(0);
});

test('an administrator invites by letter, changes a role, and closes the account, which ends the session at once', async ({
  page,
  browser,
}) => {
  test.setTimeout(240_000);
  const guest = `Ada Lindqvist ${Date.now().toString(36)}`;
  const email = `${guest.replaceAll(' ', '.').toLowerCase()}@example.org`;

  await signIn(page, 'administrator', '/people');
  const form = page.getByRole('form', { name: 'Invite somebody' });
  await form.getByLabel('Name').fill(guest);
  await form.getByLabel('E-mail address').fill('not an address');
  await form.getByRole('button', { name: 'Send the invitation' }).click();
  await expect(form.getByText('accepted: an e-mail address such as ada@example.org')).toBeVisible();
  await expect(form.getByLabel('Name')).toHaveValue(guest);
  await form.getByLabel('E-mail address').fill(email);
  await form.getByLabel('Role').selectOption('contributor');
  await form.getByRole('button', { name: 'Send the invitation' }).click();
  await expect(form.getByText(`The letter to ${email} is on its way.`)).toBeVisible();
  await expect(lineOf(page, guest)).toContainText('invited');
  await breaksNoRule(page, 'people');

  await openLetter(page, email, /invites you/);
  await breaksNoRule(page, 'a letter');
  const link = await linkOf(page, 'invitation');

  const visitor = await aVisitor(browser);
  await visitor.page.goto(link);
  await breaksNoRule(visitor.page, 'invitation');
  await visitor.page.getByLabel('Password').fill('too short');
  await visitor.page.getByRole('button', { name: 'Take up the invitation' }).click();
  await expect(visitor.page.getByText('accepted: at least 12').first()).toBeVisible();
  await visitor.page.getByLabel('Password').fill(PASSWORD);
  await visitor.page.getByRole('button', { name: 'Take up the invitation' }).click();
  await expect(visitor.page.getByRole('navigation', { name: 'Tools' })).toBeVisible({ timeout: 30_000 });
  await visitor.page.goto('/profile');
  await expect(visitor.page.getByText(`${guest}, ${email}, contributor.`)).toBeVisible();
  await expect(visitor.page.getByText('this one')).toBeVisible();
  await breaksNoRule(visitor.page, 'profile');

  const second = await aVisitor(browser);
  await second.page.goto(link);
  await expect(second.page.getByRole('heading', { name: 'This invitation does not serve' })).toBeVisible();
  await second.context.close();

  await page.goto('/people');
  await lineOf(page, guest).getByText('Change', { exact: true }).click();
  await lineOf(page, guest).getByLabel('Role').selectOption('administrator');
  await lineOf(page, guest).getByLabel('Why').first().fill('Keeps the house while Ruth is away.');
  await lineOf(page, guest).getByRole('button', { name: 'Change the role' }).click();
  await expect(lineOf(page, guest).locator('summary')).toContainText('administrator');
  await lineOf(page, guest).getByRole('button', { name: 'Close the account' }).click();
  await expect(lineOf(page, guest).getByText('accepted: a sentence that says why')).toBeVisible();
  await breaksNoRule(page, 'people with a line open');
  await visitor.page.goto('/people');
  await expect(visitor.page.getByRole('heading', { name: 'People', exact: true })).toBeVisible();

  await page.reload();
  await lineOf(page, guest).getByText('Change', { exact: true }).click();
  await lineOf(page, guest).getByLabel('Why').last().fill('Ruth is back.');
  await lineOf(page, guest).getByRole('button', { name: 'Close the account' }).click();
  await expect(lineOf(page, guest)).toContainText('closed on');
  await visitor.page.reload();
  await expect(visitor.page).toHaveURL(/\/sign-in/);
  await visitor.context.close();
});

test('the ledger tells of it, under conditions that live in the address, and leaves as CSV', async ({ page }) => {
  await signIn(page, 'administrator', '/ledger');
  await breaksNoRule(page, 'ledger');
  await page.getByRole('combobox', { name: 'What' }).selectOption('person');
  await page.getByRole('button', { name: 'Show these lines' }).click();
  await expect(page).toHaveURL(/what=person/);
  await expect(page.getByRole('row').filter({ hasText: 'invited' }).first()).toBeVisible();
  const csv = await page.request.get('/ledger/export?what=person.invited');
  expect(csv.headers()['content-type']).toContain('text/csv');
  expect(await csv.text()).toMatch(/^number,when,who,what,about,address,why,particulars\r\n\d+,/);
  await page.goto('/ledger?from=yesterday');
  await expect(page.getByText('From: accepted: a day such as 2026-11-30.')).toBeVisible();
});

test('outbox and arrived mail show what became of each letter', async ({ page }) => {
  await signIn(page, 'administrator', '/outbox');
  await expect(page.getByRole('row').filter({ hasText: 'invitation' }).first()).toContainText('sent');
  await breaksNoRule(page, 'outbox');
  await page.getByRole('link', { name: 'Arrived mail' }).click();
  await expect(page.getByRole('heading', { name: 'Arrived mail' })).toBeVisible();
  await breaksNoRule(page, 'arrived mail');
});

test.describe('for readers', () => {
  test.use({ allowed: [/./] });

  test('the pages of the house are closed, their addresses too', async ({ page }) => {
    await signIn(page, 'reader');
    await expect(page.getByRole('link', { name: 'People' })).toHaveCount(0);
    for (const path of ['/people', '/ledger', '/outbox', '/arrived-mail']) {
      await page.goto(path);
      await expect(page.getByText('Your role does not open this page.')).toBeVisible();
    }
    expect((await page.request.get('/ledger/export')).status()).toBe(403);
  });
});

test.describe('a forgotten password', () => {
  test('a letter leads to a new one, whose setting ends the sessions elsewhere', async ({ page, browser }) => {
    test.setTimeout(240_000);
    const guest = `Bo Fredholm ${Date.now().toString(36)}`;
    const email = `${guest.replaceAll(' ', '.').toLowerCase()}@example.org`;
    await signIn(page, 'administrator', '/people');
    const form = page.getByRole('form', { name: 'Invite somebody' });
    await form.getByLabel('Name').fill(guest);
    await form.getByLabel('E-mail address').fill(email);
    await form.getByRole('button', { name: 'Send the invitation' }).click();
    await openLetter(page, email, /invites you/);
    const visitor = await aVisitor(browser);
    await visitor.page.goto(await linkOf(page, 'invitation'));
    await visitor.page.getByLabel('Password').fill(PASSWORD);
    await visitor.page.getByRole('button', { name: 'Take up the invitation' }).click();
    await expect(visitor.page.getByRole('navigation', { name: 'Tools' })).toBeVisible({ timeout: 30_000 });

    const elsewhere = await aVisitor(browser);
    await elsewhere.page.goto('/sign-in');
    await elsewhere.page.getByRole('link', { name: 'Forgotten your password?' }).click();
    // The page before has a field of the same name.
    await expect(elsewhere.page.getByRole('heading', { name: 'A new password' })).toBeVisible();
    await elsewhere.page.getByLabel('E-mail address').fill(email);
    await breaksNoRule(elsewhere.page, 'asking for a new password');
    await elsewhere.page.getByRole('button', { name: 'Send me a letter' }).click();
    await expect(elsewhere.page.getByText('If this address has an account')).toBeVisible();
    await openLetter(page, email, /new password/);
    await elsewhere.page.goto(await linkOf(page, 'reset'));
    await elsewhere.page.getByLabel('Password').fill(`${PASSWORD} again`);
    await elsewhere.page.getByRole('button', { name: 'Set the password' }).click();
    await expect(elsewhere.page.getByRole('navigation', { name: 'Tools' })).toBeVisible({ timeout: 30_000 });
    await visitor.page.reload();
    await expect(visitor.page).toHaveURL(/\/sign-in/);
    await visitor.context.close();

    await elsewhere.context.close();
  });
});
