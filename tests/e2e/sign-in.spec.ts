import { DEMO_PASSWORD, expect, personOf, signIn, test } from './fixtures';

test.setTimeout(180_000);

test('a page that needs an account leads to sign-in and back to itself', async ({ page }) => {
  await signIn(page, 'maintainer', '/?equation=wave');
  await expect(page).toHaveURL(/\/\?equation=wave$/);
});

test('one of the demo’s people signs in by pressing their name', async ({ page }) => {
  const reader = personOf('reader');
  await page.goto('/sign-in');
  await page.getByRole('button', { name: new RegExp(reader.name) }).click();
  await expect(page.getByText(reader.name).first()).toBeVisible();
  await expect(page).toHaveTitle('Catalog · Levelbook');
});

test('signing out closes the book', async ({ page }) => {
  await signIn(page, 'reader');
  await page.getByText(personOf('reader').name).first().click();
  await page.getByRole('button', { name: 'Sign out', exact: true }).click();
  await expect(page).toHaveURL(/\/sign-in/);
  await page.goto('/');
  await expect(page).toHaveURL(/\/sign-in/);
});

test('signing out everywhere ends the session of another browser too', async ({ page, browser }) => {
  const elsewhere = await browser.newContext();
  const other = await elsewhere.newPage();
  await signIn(other, 'contributor', page.url() === 'about:blank' ? '/' : page.url());
  await signIn(page, 'contributor');
  await page.getByText(personOf('contributor').name).first().click();
  await page.getByRole('button', { name: 'Sign out everywhere' }).click();
  await expect(page).toHaveURL(/\/sign-in/);
  await other.reload();
  await expect(other).toHaveURL(/\/sign-in/);
  await elsewhere.close();
});

test.describe('with a wrong password', () => {
  test.use({ allowed: [/401/] });

  test('sign-in says so, and how many tries are left', async ({ page }) => {
    const stranger = `stranger-${Date.now()}@example.org`;
    await page.goto('/sign-in');
    await page.getByLabel('E-mail address').fill(stranger);
    for (const left of ['Four tries are left', 'Three tries are left']) {
      await page.getByLabel('Password').fill(`${DEMO_PASSWORD}!`);
      await page.getByRole('button', { name: 'Sign in', exact: true }).click();
      await expect(page.getByRole('alert').filter({ hasText: left })).toBeVisible();
      await expect(page.getByLabel('E-mail address')).toHaveValue(stranger);
    }
  });
});
