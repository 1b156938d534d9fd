import { expect, signIn, test } from './fixtures';

test.setTimeout(300_000);

test('a new hire asks which scheme, sizes the run, and sets two schemes side by side', async ({ page }) => {
  await signIn(page, 'reader');

  await test.step('the shortlist ranks what fits and marks why the others do not', async () => {
    await page.getByRole('navigation', { name: 'Tools' }).getByRole('link', { name: 'Shortlist' }).click();
    const answer = page.getByRole('region', { name: 'Answer' });
    await expect(answer.getByRole('row').filter({ hasText: 'Budget a run' }).first()).toBeVisible();
    await expect(answer.locator('svg.plot').first()).toBeVisible();
    const weak = answer.getByRole('row', { name: /Runge–Kutta 2, centred/ });
    await expect(weak).toContainText('never');
    await expect(weak).toContainText(/Weakly unstable/);
    await expect(answer.locator('.cellbad').first()).toBeVisible();
  });

  await test.step('a changed condition is asked at once and stands in the address', async () => {
    await page.getByLabel('up to 1').check({ force: true });
    await expect(page).toHaveURL(/haloAtMost=1/);
    await expect(page.locator('.fit .first')).toContainText('1 | 1');
  });

  await test.step('where nothing fits it says what to let go, and letting go brings it', async () => {
    await page.goto('/shortlist?orderAtLeast=4&arraysAtMost=2');
    await expect(page.getByRole('region', { name: 'Answer' })).toContainText(/of \d+ schemes fit\. Letting go of/);
    await page.getByRole('link', { name: 'Ask without the order in time' }).click();
    await expect(page).toHaveURL(/orderAtLeast=0/);
    await expect(page.locator('.fit .first')).toContainText('AD 004');
    const orders = page.getByRole('group', { name: 'Order in time and space' });
    await expect(orders.getByRole('radio', { name: 'any' })).toBeChecked();
  });

  await test.step('a bad tolerance is answered under its field, and what was typed stays', async () => {
    await page.goto('/shortlist?errorPercent=0');
    await expect(page.getByRole('alert').first()).toContainText('No grid has an error of zero');
    await expect(page.getByLabel('Error allowed, per cent')).toHaveValue('0');
  });

  await test.step('the run budget of the first that fits stands on its ladder', async () => {
    await page.goto('/shortlist');
    await page.getByRole('link', { name: 'Budget a run' }).first().click();
    await expect(page.getByRole('heading', { level: 1, name: 'Run budget' })).toBeVisible();
    await expect(page.getByRole('row', { name: /^Spacing/ })).toContainText('÷ 2');
    await expect(page.locator('.rungs .cellbad').first()).toContainText('past a bound');
    await expect(page.getByRole('group', { name: 'Same error, other ways' })).toBeVisible();
  });

  await test.step('units mixed up are told in place', async () => {
    await page.getByLabel('Speed, or several').fill('1500 m');
    await page.getByLabel('Speed, or several').press('Enter');
    await expect(page.getByRole('alert').filter({ hasText: 'is a length' })).toBeVisible();
    await page.getByLabel('Speed, or several').fill('1500 m/s');
    await page.getByLabel('Speed, or several').press('Enter');
    await expect(page.locator('.rungs')).toBeVisible();
  });

  await test.step('a case is kept by name, and its link leads back to the run', async () => {
    const name = `Outer bank ${Date.now()}`;
    await page.getByLabel('Name of the case').fill(name);
    await page.getByRole('button', { name: 'Keep this run' }).click();
    await expect(page.getByText(`Kept as ${name}.`)).toBeVisible();
    await page.getByRole('link', { name, exact: true }).click();
    await expect(page.getByText(`case ${name}`)).toBeVisible();
    await page
      .getByRole('form', { name: `Take out ${name}` })
      .getByRole('button')
      .click();
    await expect(page.getByRole('link', { name, exact: true })).toHaveCount(0);
  });

  await test.step('two schemes stand side by side, what differs is marked', async () => {
    await page.goto('/compare?entry=lax-wendroff&entry=leapfrog-central-2');
    await expect(page.getByRole('row', { name: /^Time levels, differs|^Time levels ≠|^Time levels/ })).toContainText(
      '3',
    );
    await expect(page.locator('tr.differs').first()).toBeVisible();
    await expect(page.locator('svg.plot').first()).toBeVisible();
    await page.getByLabel('Add a scheme').selectOption({ index: 0 });
    await page.getByRole('button', { name: 'Add', exact: true }).click();
    await expect(page.getByText('3 of 4 places taken')).toBeVisible();
  });
});
