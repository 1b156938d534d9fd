/** What every browser test has: a page that is watched, and people who sign in. */
import { type Page, expect as plainExpect, test as base } from '@playwright/test';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '@/lib/people/demo-people';
import type { Role } from '@/lib/people/role';

/** A machine that also runs a worker's compilers may be slow to answer. */
export const expect = plainExpect.configure({ timeout: 30_000 });

interface Watch {
  /** Messages and addresses that a test calls forth on purpose. */
  allowed: RegExp[];
}

export const test = base.extend<Watch & { watched: void }>({
  allowed: [[], { option: true }],
  watched: [
    async ({ page, allowed, baseURL }, use) => {
      const faults: string[] = [];
      const origin = new URL(baseURL ?? 'http://127.0.0.1').origin;
      page.on('console', (message) => {
        if (message.type() === 'error') faults.push(`console: ${message.text()}`);
      });
      page.on('pageerror', (error) => faults.push(`page: ${error.message}`));
      page.on('response', (response) => {
        if (response.status() >= 400) faults.push(`${response.status()} ${response.url()}`);
      });
      page.on('request', (request) => {
        if (/^https?:/.test(request.url()) && new URL(request.url()).origin !== origin)
          faults.push(`left the site: ${request.url()}`);
      });
      await use();
      expect(faults.filter((fault) => !allowed.some((pattern) => pattern.test(fault)))).toEqual([]);
    },
    { auto: true },
  ],
});

/** The first of the demo's people with this role. */
export const personOf = (role: Role) => {
  const person = DEMO_PEOPLE.find((one) => one.role === role);
  if (!person) throw new Error(`The demo has no ${role}.`);
  return person;
};

/** Signs in as the first of the demo's people with this role, by typing. */
export async function signIn(page: Page, role: Role, path = '/'): Promise<void> {
  await page.goto(path);
  await page.getByLabel('E-mail address').fill(personOf(role).email);
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByRole('navigation', { name: 'Tools' })).toBeVisible();
}

/** Keys count only once the page listens; the server's HTML is there before. */
export async function untilKeysHeard(page: Page): Promise<void> {
  await expect(page.locator('html[data-keys]:not([data-keys="0"])')).toBeAttached();
}

/** The line of the catalog with this call number; other lines may speak of it. */
export const lineOf = (page: Page, callNumber: string) =>
  page.locator('a.entry', { has: page.locator('.no', { hasText: callNumber }) });

/** The demo's maintainers vet an entry once its trial has passed: this may take a while after the first start. */
export async function untilListed(page: Page, callNumber: string): Promise<void> {
  await expect(async () => {
    await page.reload();
    await page.locator('.check').waitFor({ timeout: 30_000 });
    expect(await lineOf(page, callNumber).count()).toBe(1);
  }).toPass({ timeout: 240_000, intervals: [2_000] });
}

export { DEMO_PASSWORD };
