import { defineConfig, globalIgnores } from 'eslint/config';
import nextTypescript from 'eslint-config-next/typescript';
import nextVitals from 'eslint-config-next/core-web-vitals';

const sqlPackages = ['drizzle-orm', 'drizzle-orm/*', '@libsql/client', '@libsql/client/*', 'libsql'];

/**
 * @param {string[]} files
 * @param {string[]} group
 * @param {string} message
 * @param {string[]} ignores
 * @returns {import('eslint').Linter.Config}
 */
const fence = (files, group, message, ignores = []) => ({
  files,
  ignores,
  rules: {
    '@typescript-eslint/no-restricted-imports': ['error', { patterns: [{ group, message, allowTypeImports: true }] }],
  },
});

const onlyDbSpeaksSql = [
  ...sqlPackages,
  '@/db/client',
  '@/db/scope',
  '@/db/schema',
  '@/db/schema/*',
  '**/db/client',
  '**/db/scope',
];
const rooms = ['lib/auth/**', 'lib/jobs/**'];

/** Arrows point down: app -> components, app -> db -> lib. The file sets are disjoint, since the last match wins. */
export default defineConfig([
  ...nextVitals,
  ...nextTypescript,
  globalIgnores(['.next/**', '.data/**', 'next-env.d.ts', 'db/migrations/**']),
  {
    files: ['**/*.{ts,tsx}'],
    rules: {
      // The optimiser must not see private pictures (next.config.ts); sizes are made by the photo pipeline.
      '@next/next/no-img-element': 'off',
      // Signing in and out load the page anew on purpose: nothing of the other session may stay in memory.
      '@next/next/no-location-assign-relative-destination': 'off',
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
    },
  },
  fence(['app/**/*.{ts,tsx}'], onlyDbSpeaksSql, 'Pages and handlers call db/queries; only db/ speaks SQL.'),
  fence(
    ['components/**/*.{ts,tsx}', 'emails/**/*.{ts,tsx}'],
    ['@/db/*', '@/db/**', '@/app/*', '@/app/**', '**/db/**', ...sqlPackages],
    'Views take props; they import neither db/ nor app/.',
  ),
  fence(
    ['lib/**/*.{ts,tsx}'],
    ['@/db/*', '@/db/**', '@/app/*', '@/app/**', '@/components/*', '@/components/**', ...sqlPackages],
    'lib/ holds rules and adapters: no SQL, no pages, no views.',
    rooms,
  ),
  fence(
    rooms.map((room) => `${room}/*.{ts,tsx}`),
    [...onlyDbSpeaksSql, '@/app/**', '@/components/**'],
    'This room may call db/queries, and nothing below them.',
  ),
  fence(['db/**/*.{ts,tsx}'], ['@/app/**', '@/components/**', 'next', 'next/*'], 'db/ knows nothing of pages.'),
]);
