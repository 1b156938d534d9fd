import path from 'node:path';
import { defineConfig } from 'vitest/config';

const root = import.meta.dirname;

export default defineConfig({
  resolve: {
    alias: {
      '@': root,
      // Outside Next the real one throws on purpose.
      'server-only': path.join(root, 'tests/support/server-only.ts'),
    },
  },
  test: {
    pool: 'forks',
    maxWorkers: 2,
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['tests/unit/**/*.test.{ts,tsx}', 'tests/reference/**/*.test.ts'],
          // Exact arithmetic on a machine that has other work to do.
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'database',
          include: ['tests/database/**/*.test.ts'],
          globalSetup: 'tests/support/template-database.ts',
          setupFiles: 'tests/support/own-database.ts',
          testTimeout: 20_000,
          hookTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: { name: 'kernels', include: ['tests/kernels/**/*.test.ts'], testTimeout: 120_000, hookTimeout: 120_000 },
      },
    ],
  },
});
