import { defineConfig, globalIgnores } from 'eslint/config';
import nextVitals from 'eslint-config-next/core-web-vitals';
import nextTypescript from 'eslint-config-next/typescript';
import { floors } from './eslint-floors.mjs';

/** Programs that are started from a shell, and speak to whoever started them. */
const SPEAKING = [
  'lib/launch/**',
  'lib/facts/analyse-files.ts',
  'db/migrate.ts',
  'db/seed/**',
  'worker.ts',
  'tests/bench/**',
];

export default defineConfig([
  globalIgnores([
    '.next/**',
    '.data/**',
    'next-env.d.ts',
    'playwright-report/**',
    'test-results/**',
    'tests/kernels/golden/**',
  ]),
  ...nextVitals,
  ...nextTypescript,
  {
    plugins: { floors },
    rules: {
      'floors/imports-go-down': 'error',
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/ban-ts-comment': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      'no-console': 'error',
      eqeqeq: 'error',
    },
  },
  { files: SPEAKING, rules: { 'no-console': 'off' } },
  {
    // A test that is switched off looks like one that passes.
    files: ['tests/**'],
    rules: {
      // useTestDatabase is no hook of React.
      'react-hooks/rules-of-hooks': 'off',
      'no-restricted-syntax': [
        'error',
        {
          selector:
            'MemberExpression[object.name=/^(it|test|describe)$/][property.name=/^(only|skip|todo|fixme|skipIf)$/]',
          message: 'Every test runs.',
        },
      ],
    },
  },
]);
