import { expect, lineOf, signIn, test, untilListed } from './fixtures';

test.setTimeout(420_000);

test('a reader finds leapfrog, reads what it does, takes its kernel and watches a trial', async ({ page, context }) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  await signIn(page, 'reader');
  await untilListed(page, 'AD 003');

  await test.step('typing "leap frog" puts it first', async () => {
    await page.getByLabel('Look for').fill('leap frog');
    await expect(page).toHaveURL(/look=leap\+frog/);
    await expect(page.locator('a.entry').first().locator('.no')).toHaveText('AD 003');
    await lineOf(page, 'AD 003').click();
    await expect(page.getByRole('heading', { level: 1 })).toContainText(/leapfrog/i);
  });

  const reading = (term: string) => page.locator('.read', { has: page.getByText(term, { exact: true }) });
  await test.step('its readings: order 2, 2, the bound and its double root, two arrays, one starting step', async () => {
    await expect(reading('Order in time').locator('dd').first()).toHaveText('2');
    await expect(reading('Order in space').locator('dd').first()).toHaveText('2');
    await expect(reading('Bound').locator('dd').first()).toHaveText('|λ| ≤ 1');
    await expect(page.locator('#bound')).toContainText(/double root/i);
    await expect(page.locator('#bound')).toContainText(/keep below/i);
    await expect(reading('Arrays').locator('dd').first()).toHaveText('2');
    await expect(reading('Time levels')).toContainText('needs one starting step');
    await expect(page.locator('.spread .sten').first()).toBeVisible();
    await expect(page.locator('#curves svg.plot').first()).toBeVisible();
  });

  await test.step('the kernel that is copied is the file that is served', async () => {
    await page.getByRole('button', { name: 'Copy kernel', exact: true }).click();
    await expect(page.getByRole('button', { name: 'Copied' })).toBeVisible();
    const copied = await page.evaluate(() => navigator.clipboard.readText());
    expect(copied).toContain('AD 003');
    expect(copied).toContain('levelbook:leapfrog');
    const address = await page.getByRole('link', { name: /^Download lb_/ }).getAttribute('href');
    const served = await page.request.get(address ?? '');
    expect(await served.text()).toBe(copied);
  });

  await test.step('Fortran and Python are one key away', async () => {
    await page.getByRole('tab', { name: 'C', exact: true }).focus();
    await page.keyboard.press('ArrowRight');
    await expect(page.getByRole('tabpanel')).toContainText('subroutine');
    await page.keyboard.press('ArrowRight');
    await expect(page.getByRole('tabpanel')).toContainText('import numpy');
  });

  await test.step('the findings of the trial stand in a table', async () => {
    const trials = page.locator('#trials');
    await expect(trials.getByRole('row', { name: /Observed order/ })).toContainText('holds');
    await expect(trials.getByRole('row', { name: /Languages agree/ })).toContainText('holds');
    await expect(trials).toContainText('gcc');
  });

  await test.step('a new trial runs to its end before the reader’s eyes', async () => {
    const trials = page.locator('#trials');
    await trials.getByRole('button', { name: 'Start a new trial' }).click();
    await expect(trials.getByRole('status')).toContainText(/trial (waits|is running)/);
    await expect(trials.getByRole('status')).toContainText('is running', { timeout: 180_000 });
    await expect(trials.getByRole('button', { name: 'Start a new trial' })).toBeEnabled({ timeout: 180_000 });
    await expect(trials.getByRole('row', { name: /Clean build/ })).toContainText('holds');
  });
});

test('the catalog carries its conditions in the address, and says what to let go when nothing is left', async ({
  page,
}) => {
  await signIn(page, 'maintainer');
  const band = page.getByRole('region', { name: 'Conditions' });
  const all = Number(await page.locator('.shown .num').textContent());

  await band
    .getByRole('group', { name: 'Equation' })
    .getByRole('button', { name: /^Advection/ })
    .click();
  await expect(page).toHaveURL(/equation=advection/);
  await expect(page.locator('.shown .num')).not.toHaveText(String(all));
  const left = Number(await page.locator('.shown .num').textContent());
  expect(left).toBeGreaterThan(0);
  expect(left).toBeLessThan(all);
  await expect(page.locator('a.entry')).toHaveCount(left);

  await page.reload();
  await expect(page.locator('.shown .num')).toHaveText(String(left));

  await band.getByRole('group', { name: 'Dimensions' }).getByRole('button', { name: /^3/ }).click();
  await expect(page.getByText('No line meets all 2 conditions.')).toBeVisible();
  await page.getByRole('button', { name: 'Let it go' }).click();
  await expect(page.locator('a.entry').first()).toBeVisible();
});
