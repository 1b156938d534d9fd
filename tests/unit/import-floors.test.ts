import { ESLint } from 'eslint';
import { describe, expect, it } from 'vitest';

const eslint = new ESLint();

/** The complaints about imports in a file with this text at this place; the file need not exist. */
async function complaints(filePath: string, text: string): Promise<string[]> {
  const [result] = await eslint.lintText(text, { filePath });
  return (result?.messages ?? []).filter((m) => m.ruleId === 'floors/imports-go-down').map((m) => m.message);
}

describe('the linter keeps imports going down', { timeout: 60_000 }, () => {
  it.each([
    // file                                text
    ['lib/numerics/made-up.ts', "import { LIMITS } from '@/lib/entries/definition'; export default LIMITS;"],
    ['lib/numerics/made-up.ts', "export { LIMITS } from '../entries/definition';"],
    ['lib/numerics/made-up.ts', "import fs from 'node:fs'; export default fs;"],
    ['lib/entries/made-up.ts', "import { people } from '@/db/schema/people'; export default people;"],
    ['lib/entries/made-up.ts', "import type { people } from '@/db/schema/people'; export type P = typeof people;"],
    ['lib/entries/made-up.ts', "import { cache } from 'react'; export default cache;"],
    ['lib/entries/made-up.ts', "export const later = () => import('next/headers');"],
    ['db/queries/made-up.ts', "import { Button } from '@/components/ui/button'; export default Button;"],
    ['db/queries/made-up.ts', "import { cookies } from 'next/headers'; export default cookies;"],
    ['components/ui/made-up.tsx', "import { people } from '@/db/schema/people'; export default people;"],
    ['components/ui/made-up.tsx', "import { Pool } from 'pg'; export default Pool;"],
    ['app/made-up/page.tsx', "import { eq } from 'drizzle-orm'; export default eq;"],
    ['app/made-up/page.tsx', "import { Pool } from 'pg'; export default Pool;"],
    ['lib/launch/made-up.mjs', "import { z } from '../entries/definition'; export default z;"],
  ])('refuses, in %s, the text %s', async (filePath, text) => {
    expect(await complaints(filePath, text)).toHaveLength(1);
  });

  it.each([
    ['lib/entries/made-up.ts', "import { EQUATIONS } from '@/lib/numerics/equation'; export default EQUATIONS;"],
    ['lib/kernels/made-up.ts', "import { createHash } from 'node:crypto'; export default createHash;"],
    [
      'lib/people/made-up.ts',
      "import 'server-only';\nimport { people } from '@/db/schema/people'; export default people;",
    ],
    ['db/queries/made-up.ts', "import { ROLES } from '@/lib/people/role'; export default ROLES;"],
    ['components/ui/made-up.tsx', "import { ROLES } from '@/lib/people/role'; export default ROLES;"],
    ['app/made-up/page.tsx', "import { people } from '@/db/schema/people'; export default people;"],
  ])('allows, in %s, the text %s', async (filePath, text) => {
    expect(await complaints(filePath, text)).toEqual([]);
  });

  it('tells the author of a noun what makes a use case', async () => {
    const [sentence] = await complaints('lib/people/made-up.ts', "export { people } from '@/db/schema/people';");
    expect(sentence).toContain("A use case starts with: import 'server-only';");
  });
});
