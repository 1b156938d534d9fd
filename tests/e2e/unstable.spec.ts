import { expect, lineOf, signIn, test } from './fixtures';

test.setTimeout(180_000);

test('the sheet of forward Euler with central differences says that it never works, and why', async ({ page }) => {
  await signIn(page, 'maintainer');
  const shown = page.locator('.shown .num');
  const all = (await shown.textContent()) ?? '';
  await page.getByLabel('Look for').fill('forward euler central');
  // A line that is still moving up the list cannot be pressed.
  await expect(shown).not.toHaveText(all);
  const line = lineOf(page, 'AD 008');
  await expect(line).toContainText('no λ ≠ 0');
  await line.click();

  await expect(page.getByRole('heading', { level: 1 })).toContainText(/euler/i);
  const bound = page.locator('#bound');
  await expect(bound).toContainText(/Unstable for every λ/);
  await expect(bound).toContainText(/\|g\| = 1\.\d+/);
  await expect(bound).toContainText(/waves of four points/);
});
