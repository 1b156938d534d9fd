import { expect, signIn, test, untilKeysHeard } from './fixtures';

test.setTimeout(180_000);

test('the catalog is walked, opened and left by keys alone', async ({ page }) => {
  await signIn(page, 'maintainer');
  await untilKeysHeard(page);
  const chosen = page.locator('a.entry.sel');
  const first = await page.locator('a.entry').nth(0).getAttribute('href');
  const second = await page.locator('a.entry').nth(1).getAttribute('href');
  await expect(chosen).toHaveAttribute('href', first ?? '');

  await page.keyboard.press('j');
  await expect(chosen).toHaveAttribute('href', second ?? '');
  await page.keyboard.press('k');
  await expect(chosen).toHaveAttribute('href', first ?? '');
  await page.keyboard.press('ArrowDown');
  await expect(chosen).toHaveAttribute('href', second ?? '');

  await page.keyboard.press('/');
  await expect(page.getByLabel('Look for')).toBeFocused();
  await page.keyboard.type('jk');
  await expect(page.getByLabel('Look for')).toHaveValue('jk');
  await page.keyboard.press('Escape');
  await expect(page.getByLabel('Look for')).toHaveValue('');

  await page.locator('a.entry').nth(1).focus();
  await page.keyboard.press('Enter');
  await expect(page).toHaveURL(new RegExp(`${second}$`));
});

test('the parts of a sheet are reached by figure and by bracket', async ({ page }) => {
  await signIn(page, 'maintainer', '/sheets/leapfrog-central-2');
  await untilKeysHeard(page);
  await page.keyboard.press('4');
  await expect(page.locator('#kernel')).toBeFocused();
  await page.keyboard.press(']');
  await expect(page.locator('#trials')).toBeFocused();
  await page.keyboard.press('[');
  await expect(page.locator('#kernel')).toBeFocused();
});

test('single-letter keys can be turned off and on again', async ({ page }) => {
  await signIn(page, 'maintainer');
  await untilKeysHeard(page);
  const chosen = page.locator('a.entry.sel');
  const first = await chosen.getAttribute('href');

  await page.keyboard.press('?');
  const list = page.getByRole('dialog', { name: 'Keys of this page' });
  await expect(list).toContainText('Next line');
  await list.getByLabel('Single-letter keys are on').uncheck();
  await list.getByRole('button', { name: 'Close' }).click();
  await page.keyboard.press('j');
  await expect(chosen).toHaveAttribute('href', first ?? '');
  await page.keyboard.press('?');
  await expect(list).toBeHidden();
  await page.keyboard.press('ArrowDown');
  await expect(chosen).not.toHaveAttribute('href', first ?? '');

  await page.getByText('Tomas Aalto').first().click();
  await page.getByRole('button', { name: 'Keys of this page' }).click();
  await list.getByLabel('Single-letter keys are on').check();
});

test('the skip link leads past the head', async ({ page }) => {
  await signIn(page, 'reader');
  await page.keyboard.press('Tab');
  await expect(page.getByRole('link', { name: 'Skip to the page' })).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(page.locator('#content')).toBeFocused();
});
