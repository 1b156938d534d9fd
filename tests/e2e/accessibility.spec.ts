import AxeBuilder from '@axe-core/playwright';
import { expect, signIn, test } from './fixtures';

test.setTimeout(180_000);

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'];
const PAGES = [
  ['the catalog', '/'],
  ['the sheet of a scheme', '/sheets/leapfrog-central-2'],
] as const;

for (const width of [1440, 390]) {
  for (const colorScheme of ['light', 'dark'] as const) {
    test.describe(`${width} px, ${colorScheme}`, () => {
      test.use({ viewport: { width, height: 900 }, colorScheme });

      test('sign-in breaks no rule of WCAG 2.2 AA', async ({ page }) => {
        await page.goto('/sign-in');
        expect((await new AxeBuilder({ page }).withTags(TAGS).analyze()).violations).toEqual([]);
      });

      test('catalog and sheet break no rule of WCAG 2.2 AA, and nothing runs over the side', async ({ page }) => {
        await signInAt(page, width);
        for (const [name, path] of PAGES) {
          await page.goto(path);
          await page.waitForLoadState('networkidle');
          const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
          expect(violations.map(({ id, nodes }) => `${name}: ${id} at ${nodes[0]?.target.join(' ')}`)).toEqual([]);
          const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
          expect(over, `${name} runs over the side`).toBeLessThanOrEqual(0);
        }
      });
    });
  }
}

/** On a phone the tools are folded away, so the page is awaited instead of them. */
async function signInAt(page: Parameters<typeof signIn>[0], width: number) {
  if (width > 700) return signIn(page, 'maintainer');
  await page.goto('/sign-in');
  await page.getByRole('button', { name: /Tomas Aalto/ }).click();
  await expect(page.getByLabel('Look for')).toBeVisible();
}
