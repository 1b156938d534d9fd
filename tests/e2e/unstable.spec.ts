import { expect, signIn, test } from './fixtures';

test.setTimeout(180_000);

test('the sheet of forward Euler with central differences says that it never works, and why', async ({ page }) => {
  await signIn(page, 'maintainer');
  await page.getByLabel('Look for').fill('forward euler central');
  const line = page
    .locator('a.entry', { hasText: /^AD/ })
    .filter({ hasText: /forward euler/i })
    .first();
  await expect(line).toContainText('no λ ≠ 0');
  await line.click();

  await expect(page.getByRole('heading', { level: 1 })).toContainText(/euler/i);
  const bound = page.locator('#bound');
  await expect(bound).toContainText(/Unstable for every λ/);
  await expect(bound).toContainText(/\|g\| = 1\.\d+/);
  await expect(bound).toContainText(/waves of four points/);
});
