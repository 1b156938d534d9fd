/** The maintainers' story: a revision goes back with a remark, its author corrects it, two sign, a reader takes the kernel. */
import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { REVIEW_POINT_TEXT } from '@/lib/reviews/review-list';
import { DEMO_PASSWORD, expect, lineOf, test } from './fixtures';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'];
/** Upwind leapfrog, which Pavel Marsh has on his drafting table. */
const CALL_NUMBER = 'AD 013';
const DESKTOP = { width: 1440, height: 900 };

test.use({ actionTimeout: 40_000 });

async function comeAs(page: Page, email: string, path: string): Promise<void> {
  await page.context().clearCookies();
  await page.goto(`/sign-in?callbackUrl=${encodeURIComponent(path)}`);
  await page.waitForLoadState('networkidle');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.waitForURL((url) => url.pathname === path);
  await expect(page.locator('#content')).toBeVisible();
}

/** No rule of WCAG 2.2 AA is broken and nothing runs over the side, at both widths. */
async function expectAccessible(page: Page, name: string): Promise<void> {
  for (const width of [DESKTOP.width, 390]) {
    await page.setViewportSize({ width, height: DESKTOP.height });
    const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
    expect(violations.map(({ id, nodes }) => `${name} at ${width}: ${id} at ${nodes[0]?.target.join(' ')}`)).toEqual(
      [],
    );
    const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect(over, `${name} runs over the side at ${width}`).toBeLessThanOrEqual(0);
  }
  await page.setViewportSize(DESKTOP);
}

async function sign(page: Page, sentence: string, button: string): Promise<void> {
  const decision = page.getByRole('form', { name: 'Decision' });
  await decision.getByRole('radio', { name: /^Vet/ }).check();
  for (const point of Object.values(REVIEW_POINT_TEXT)) await decision.getByRole('checkbox', { name: point }).check();
  await decision.getByRole('textbox', { name: 'Note for the book' }).fill(sentence);
  await decision.getByRole('button', { name: button, exact: true }).click();
  await expect(decision.getByRole('status')).toHaveText('Signed.');
}

test('a maintainer returns a revision, its author corrects it, two vet it, and a reader copies its kernel', async ({
  page,
  context,
}) => {
  test.setTimeout(600_000);
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  let address = '';

  await test.step('a contributor sends a draft to review', async () => {
    await comeAs(page, 'pavel.marsh@example.org', '/drafts');
    await page.getByRole('link', { name: /Upwind leapfrog/ }).click();
    await page.getByRole('button', { name: 'Send to review' }).click();
    await expect(page.getByRole('button', { name: 'Take it back' })).toBeVisible();
  });

  await test.step('the queue says what waits, and leads to it', async () => {
    await comeAs(page, 'tomas.aalto@example.org', '/reviews');
    await expect(page.getByRole('link', { name: /^Review desk\s*\d+\s*waiting/ })).toBeVisible();
    await expectAccessible(page, 'the desk');
    await page.getByRole('complementary', { name: 'Queue' }).getByRole('link', { name: CALL_NUMBER }).click();
    await page.waitForURL(/\/reviews\/[0-9a-f-]{36}$/);
    address = new URL(page.url()).pathname;
    await expect(page.getByRole('heading', { name: 'Decision' })).toBeVisible();
    await expectAccessible(page, 'a review');
  });

  await test.step('a maintainer remarks on a line and on the notes, and returns it with a sentence', async () => {
    await page.getByRole('button', { name: 'Remark on a line' }).click();
    await page.getByRole('spinbutton', { name: 'Line' }).fill('1');
    await page.getByLabel('Remark on the kernel in C').fill('This line travels with the copy; it reads well.');
    await page.getByRole('button', { name: 'Remark', exact: true }).click();
    await expect(page.getByRole('article', { name: 'Remark of Tomas Aalto on line 1' })).toBeVisible();

    await page.getByRole('button', { name: 'Remark on the notes' }).click();
    await page.getByLabel('Remark on the notes').fill('Say for which sign of c this is the upwind side.');
    await page.getByRole('button', { name: 'Remark', exact: true }).click();
    await expect(page.getByRole('article', { name: 'Remark of Tomas Aalto on notes' })).toBeVisible();

    const decision = page.getByRole('form', { name: 'Decision' });
    await decision.getByRole('radio', { name: /^Return/ }).check();
    await decision.getByRole('textbox', { name: 'What must change' }).fill('The notes leave the sign of c open.');
    await decision.getByRole('button', { name: 'Return to its author' }).click();
    await expect(page.getByText('Returned to its author.').first()).toBeVisible();
    await expect(decision.getByRole('button', { name: 'Return to its author' })).toBeDisabled();
  });

  await test.step('its author answers, corrects the notes, tries it again and sends it in', async () => {
    await comeAs(page, 'pavel.marsh@example.org', address);
    const remark = page.getByRole('article', { name: 'Remark of Tomas Aalto on notes' });
    await remark.getByRole('button', { name: 'Answer' }).click();
    await remark.getByLabel('Answer to Tomas Aalto').fill('For c > 0; the notes say so now.');
    await remark.getByRole('button', { name: 'Answer' }).click();
    await expect(remark.getByText('For c > 0; the notes say so now.')).toBeVisible();

    await page.goto(address.replace('/reviews/', '/drafts/'));
    await page.waitForLoadState('networkidle');
    const notes = page.getByLabel('Notes and derivation');
    await notes.fill(`${await notes.inputValue()} The upwind side is the left one: c > 0.`);
    await expect(page.locator('.call').getByText(/^kept,/)).toBeVisible();
    await page.getByRole('button', { name: 'Start a trial' }).click();
    await expect(page.getByText(/The latest trial passed/)).toBeVisible({ timeout: 300_000 });
    await page.getByRole('button', { name: 'Send to review' }).click();
    await expect(page.getByRole('button', { name: 'Take it back' })).toBeVisible();
  });

  await test.step('the first maintainer signs, and cannot sign twice', async () => {
    await comeAs(page, 'tomas.aalto@example.org', address);
    await sign(page, 'The sign is stated; definition as in the source.', 'Sign');
    await expect(page.locator('#decision')).toContainText('1 of 2 signatures: Tomas Aalto');
    await expect(page.getByText('You have signed this revision already.')).toBeVisible();
    await expect(page.locator('#decision').getByRole('button', { name: 'Sign and vet' })).toBeDisabled();
  });

  await test.step('the second settles the remark and vets', async () => {
    await comeAs(page, 'ilse.quist@example.org', address);
    const remark = page.getByRole('article', { name: 'Remark of Tomas Aalto on notes' });
    await remark.getByRole('button', { name: 'Settle' }).click();
    await expect(page.getByRole('article', { name: 'Settled remark of Tomas Aalto on notes' })).toBeVisible();
    await sign(page, 'Bound and order confirmed by the trial.', 'Sign and vet');
    await expect(page.locator('.title').getByText('Vetted')).toBeVisible();
    await expectAccessible(page, 'a vetted revision on the desk');
  });

  await test.step('a reader finds it in the catalog and copies its kernel', async () => {
    await comeAs(page, 'jonas.feld@example.org', '/');
    await page.getByLabel('Look for').fill('upwind leapfrog');
    await lineOf(page, CALL_NUMBER).click();
    await expect(page.getByText('Tomas Aalto').first()).toBeVisible();
    await page.getByRole('button', { name: 'Copy kernel', exact: true }).click();
    await expect(page.getByRole('button', { name: 'Copied' })).toBeVisible();
    expect(await page.evaluate(() => navigator.clipboard.readText())).toContain(CALL_NUMBER);
    await expect(page.locator('#remarks')).toContainText('settled by Ilse Quist');
  });
});
