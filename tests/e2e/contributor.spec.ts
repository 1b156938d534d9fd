/** The contributor's story: a scheme from nothing to the review desk, and what must not be lost on the way. */
import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { DEMO_PASSWORD, expect, personOf, test } from './fixtures';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'];

async function signInForDrafts(page: Page): Promise<void> {
  await page.goto('/sign-in?callbackUrl=/drafts');
  await page.waitForLoadState('networkidle');
  await page.getByLabel('E-mail address').fill(personOf('contributor').email);
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByRole('heading', { name: 'Drafting table' })).toBeVisible();
}

/** Begins a draft of an advection scheme by points. @returns its address */
async function beginDraft(page: Page, title: string): Promise<string> {
  await page.getByLabel('Title').fill(title);
  await page.getByRole('button', { name: 'Begin the draft' }).click();
  await page.waitForURL(/\/drafts\/[0-9a-f-]{36}$/);
  await expect(page.getByRole('heading', { name: title })).toBeVisible();
  await expect(page.getByText('Analysis, as you draw')).toBeVisible();
  return new URL(page.url()).pathname;
}

const site = (page: Page, name: string) => page.getByRole('checkbox', { name: new RegExp(`^${name},`) });
const weight = (page: Page, name: string) => page.getByLabel(`Weight at ${name}`, { exact: true });
const reading = (page: Page, term: string) =>
  page.locator('.live .read', { has: page.locator('dt', { hasText: new RegExp(`^${term}$`) }) });
const isKept = (page: Page) => expect(page.locator('.call').getByText(/^kept,/)).toBeVisible();

async function expectAccessible(page: Page, name: string): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
  expect(violations.map(({ id, nodes }) => `${name}: ${id} at ${nodes[0]?.target.join(' ')}`)).toEqual([]);
  const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  expect(over, `${name} runs over the side`).toBeLessThanOrEqual(0);
}

const BIBTEX = `@article{LW60, author = {Lax, Peter and Wendroff, Burton}, title = {Systems of Conservation Laws},
  journal = {Comm. Pure Appl. Math.}, volume = 13, pages = {217--237}, year = 1960, doi = {10.1002/cpa.3160130205}}`;

for (const width of [1440, 390]) {
  test.describe(`${width} px`, () => {
    test.use({ viewport: { width, height: 900 }, allowed: [/422/] });

    test('a contributor drafts Lax–Wendroff from nothing to submission', async ({ page }) => {
      test.setTimeout(180_000);
      await signInForDrafts(page);
      await expectAccessible(page, 'the list of drafts');
      const address = await beginDraft(page, `Lax–Wendroff of ${width}, ${Date.now()}`);

      // By mouse, then by keys; each move is spoken.
      await site(page, 'n, i minus 1').click();
      await site(page, 'n, i').focus();
      await page.keyboard.press('ArrowRight');
      await expect(page.getByText('n, i plus 1, not read')).toBeAttached();
      await page.keyboard.press('Space');
      await expect(site(page, 'n, i plus 1')).toBeChecked();
      await page.keyboard.press('Enter');
      await expect(weight(page, 'n, i + 1')).toBeFocused();
      await weight(page, 'n, i + 1').fill('-mu/2 + lambda^2/2');
      await expect(page.getByText("unknown symbol 'mu'").first()).toBeVisible();
      await weight(page, 'n, i + 1').fill('-lambda/2 + lambda^2/2');
      await weight(page, 'n, i').fill('1 - lambda^2');
      await weight(page, 'n, i − 1').fill('lambda/2 + lambda^2/2');
      await expect(page.getByLabel('Formula', { exact: true })).toHaveValue(
        'u[n+1,i] = (lambda/2 + lambda^2/2)*u[n,i-1] + (1 - lambda^2)*u[n,i] + (-lambda/2 + lambda^2/2)*u[n,i+1]',
      );

      await expect(reading(page, 'Order in time')).toContainText('2', { timeout: 30_000 });
      await expect(reading(page, 'Bound')).toContainText('|λ| ≤ 1');
      await expect(page.getByRole('row', { name: /^x²/ })).toContainText('holds');
      await expectAccessible(page, 'the drafting table');

      await expect(page.getByRole('button', { name: 'Send to review' })).toBeDisabled();
      await page.getByRole('link', { name: 'It needs a reference or a note with its derivation.' }).click();
      await page.getByLabel('Add from BibTeX').fill(BIBTEX);
      await page.getByRole('button', { name: 'Add these references' }).click();
      await expect(page.getByLabel('Authors of reference 1')).toHaveValue('Peter Lax, Burton Wendroff');
      await page.getByLabel('Gist').fill('Second order with one level; damps the shortest waves.');

      await isKept(page);
      await page.reload();
      await expect(weight(page, 'n, i − 1')).toHaveValue('lambda/2 + lambda^2/2');
      await expect(page.getByLabel('Gist')).toHaveValue('Second order with one level; damps the shortest waves.');

      const files = page.getByLabel('Attach files');
      await files.setInputFiles({
        name: 'plot.png',
        mimeType: 'image/png',
        buffer: Buffer.from('PK\u0003\u0004 no picture'),
      });
      await expect(page.getByText('plot.png is none of these by its content')).toBeVisible();
      await files.setInputFiles({ name: 'growth.csv', mimeType: 'text/csv', buffer: Buffer.from('theta,g\n0,1\n') });
      await expect(page.getByRole('link', { name: 'growth.csv' })).toBeVisible();

      await page.getByRole('button', { name: 'Send to review' }).click();
      await expect(page.getByRole('button', { name: 'Take it back' })).toBeVisible();
      await expect(page.getByText('This revision is in review.')).toBeVisible();
      await expect(weight(page, 'n, i')).not.toBeEditable();
      await expectAccessible(page, 'a draft in review');
      expect(new URL(page.url()).pathname).toBe(address);
    });
  });
}

test.describe('what is typed', () => {
  // Without a line the engine's worker cannot be fetched anew either; it comes with the line.
  test.use({ allowed: [/ERR_INTERNET_DISCONNECTED|Failed to fetch|importScripts.*failed to load/] });

  test('is kept through a lost connection, told as not saved, and saved when the line is back', async ({
    page,
    context,
  }) => {
    await signInForDrafts(page);
    await beginDraft(page, `Cut off ${Date.now()}`);
    await isKept(page);
    await context.setOffline(true);
    await page.getByLabel('Notes and derivation').fill('Written without a line.');
    await expect(page.getByText('not saved yet', { exact: true })).toBeVisible();
    await context.setOffline(false);
    await isKept(page);
    await page.reload();
    await expect(page.getByLabel('Notes and derivation')).toHaveValue('Written without a line.');
  });

  test('in two windows is lost in neither: the second is told, and both texts are offered', async ({
    page,
    context,
  }) => {
    await signInForDrafts(page);
    const address = await beginDraft(page, `Two windows ${Date.now()}`);
    await isKept(page);
    const other = await context.newPage();
    await other.goto(address);
    await other.getByLabel('Notes and derivation').fill('From the other window.');
    await isKept(other);

    await page.getByLabel('Notes and derivation').fill('From this window.');
    await expect(page.getByText('This draft was changed in another window while you wrote here')).toBeVisible();
    const both = page.getByRole('row', { name: /^Notes/ });
    await expect(both).toContainText('From this window.');
    await expect(both).toContainText('From the other window.');
    await page.getByRole('button', { name: 'Take the other' }).click();
    await expect(page.getByLabel('Notes and derivation')).toHaveValue('From the other window.');
    await page.getByText('The text that was set aside is still here').click();
    await page.getByRole('button', { name: 'Exchange the two' }).click();
    await isKept(page);
    await page.reload();
    await expect(page.getByLabel('Notes and derivation')).toHaveValue('From this window.');
  });

  test('into a file with faults changes nothing, and each fault is told with its line', async ({ page }) => {
    await signInForDrafts(page);
    await beginDraft(page, `From a file ${Date.now()}`);
    const file = page.getByLabel('Read a file, CSV or JSON');
    const csv = (text: string) => ({ name: 'table.csv', mimeType: 'text/csv', buffer: Buffer.from(text) });
    await file.setInputFiles(csv('level,offset,coefficient\n1,0,1\n0,0\n0,half,-1\n'));
    await expect(page.getByText('Line 3: 2 columns; accepted: 3')).toBeVisible();
    await expect(page.getByText("Line 4: the offset 'half' cannot be read")).toBeVisible();
    await expect(weight(page, 'n, i')).toHaveValue('1');
    await file.setInputFiles(csv('level,offset,coefficient\n1,0,1\n0,-1,-lambda\n0,0,-1 + lambda\n'));
    await expect(page.getByText('table.csv was read.')).toBeVisible();
    await expect(weight(page, 'n, i − 1')).toHaveValue('lambda');
    await expect(reading(page, 'Bound')).toContainText('0 ≤ λ ≤ 1', { timeout: 30_000 });
  });

  test('as HTML into notes is shown, not run', async ({ page }) => {
    await signInForDrafts(page);
    await beginDraft(page, `Notes ${Date.now()}`);
    await page
      .getByLabel('Notes and derivation')
      .fill('**Bold** <script>document.title = "run"</script> [x](javascript:alert(1))');
    await page.getByText('as set').click();
    await expect(page.locator('.setnotes strong')).toHaveText('Bold');
    await expect(page.locator('.setnotes')).toContainText('<script>');
    await expect(page.locator('.setnotes a')).toHaveCount(0);
    expect(await page.title()).not.toBe('run');
  });
});
